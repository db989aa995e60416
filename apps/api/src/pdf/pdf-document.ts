import { createRequire } from 'node:module';

export type Doc = PDFKit.PDFDocument;

const fontPath = (name: string): string =>
  createRequire(import.meta.url).resolve(`@expo-google-fonts/source-sans-3/${name}.ttf`);

/**
 * Writes a PDF with the two faces registered as `regular` and `bold`; pdfkit is only loaded when one is asked for. The
 * same content at the same instant gives the same bytes.
 */
export async function writePdf(
  options: PDFKit.PDFDocumentOptions,
  write: (doc: Doc) => void | Promise<void>,
): Promise<Buffer> {
  const { default: PDFDocument } = await import('pdfkit');
  const doc = new PDFDocument({ lang: 'en-GB', displayTitle: true, ...options });
  const chunks: Buffer[] = [];
  const ended = new Promise<void>((resolve, reject) => doc.on('end', resolve).on('error', reject));
  doc.on('data', (chunk: Buffer) => chunks.push(chunk));
  doc.registerFont('regular', fontPath('400Regular/SourceSans3_400Regular'));
  doc.registerFont('bold', fontPath('600SemiBold/SourceSans3_600SemiBold'));
  await write(doc);
  doc.end();
  await ended;
  return Buffer.concat(chunks);
}
