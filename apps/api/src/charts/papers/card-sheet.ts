import type { PegPageView } from '@mereward/shared/charts/contract';
import { dayWords } from '@mereward/shared/time/civil-day';
import { createRequire } from 'node:module';
import { drawCardMap } from './card-map';
import {
  emergencyLines,
  factLines,
  levelLine,
  markLine,
  missingLine,
  SPOT_HEADING,
  spotCells,
  stickLine,
  type CardLine,
} from './card-words';

type Doc = PDFKit.PDFDocument;
export type Card = { page: PegPageView; printedOn: string; printedAt: Date; url: string };

const MARGIN = 24;
const WIDTH = 419.53 - 2 * MARGIN; // A5
const BOTTOM = 594 - MARGIN;
const QR = 74;
const MAP_WIDTH = 226;
const MAP_HEIGHT = 128;
const INK = '#111111';

const fontPath = (name: string): string =>
  createRequire(import.meta.url).resolve(`@expo-google-fonts/source-sans-3/${name}.ttf`);

/** Draws a peg's card, A5, in black on white so that any printer will do. pdfkit is only loaded when one is asked for. */
export async function drawCard(card: Card): Promise<Buffer> {
  const [{ default: PDFDocument }, { default: qrcode }] = await Promise.all([
    import('pdfkit'),
    import('qrcode'),
  ]);
  const { page } = card;
  const doc = new PDFDocument({
    size: 'A5',
    margin: MARGIN,
    lang: 'en-GB',
    displayTitle: true,
    info: {
      Title: `Peg ${page.number}, ${page.lake.name}`,
      Author: page.fishery.name,
      CreationDate: card.printedAt,
    },
  });
  const chunks: Buffer[] = [];
  const ended = new Promise<void>((resolve, reject) => doc.on('end', resolve).on('error', reject));
  doc.on('data', (chunk: Buffer) => chunks.push(chunk));
  doc.registerFont('regular', fontPath('400Regular/SourceSans3_400Regular'));
  doc.registerFont('bold', fontPath('600SemiBold/SourceSans3_600SemiBold'));
  drawQr(doc, qrcode.create(card.url, { errorCorrectionLevel: 'M' }).modules);
  drawHead(doc, card);
  doc.lineGap(-1); // the face's own lines stand wide for so small a sheet
  drawChartPart(doc, page);
  drawLines(doc, factLines(page));
  drawEmergency(doc, page);
  drawFoot(doc, card);
  doc.end();
  await ended;
  return Buffer.concat(chunks);
}

function drawQr(doc: Doc, { size, data }: { size: number; data: Uint8Array }): void {
  const module = QR / size;
  const [left, top] = [MARGIN + WIDTH - QR, MARGIN];
  doc.fillColor('#000000');
  for (let row = 0; row < size; row++)
    for (let column = 0; column < size; column++)
      if (data[row * size + column])
        doc.rect(left + column * module, top + row * module, module + 0.02, module + 0.02);
  doc.fill();
}

function drawHead(doc: Doc, { page, url }: Card): void {
  const width = WIDTH - QR - 12;
  doc
    .fillColor(INK)
    .font('regular')
    .fontSize(10)
    .text(`${page.fishery.name} · ${page.lake.name}`, MARGIN, MARGIN, { width });
  doc.font('bold').fontSize(30).text(`Peg ${page.number}`, { width, lineGap: -4 });
  if (page.name !== '') doc.font('regular').fontSize(13).text(page.name, { width });
  doc.font('regular').fontSize(7).text(`This peg today: ${url}`, { width });
  doc.y = Math.max(doc.y, MARGIN + QR) + 6;
}

/** The map with what its figures mean beside it, then the spots. Without depths the words take the whole width. */
function drawChartPart(doc: Doc, page: PegPageView): void {
  const { extract, spots } = page;
  const top = doc.y;
  const mapped = extract !== null && extract.isobaths.length > 0;
  if (mapped) drawCardMap(doc, page, { x: MARGIN, y: top, width: MAP_WIDTH, height: MAP_HEIGHT });
  const left = mapped ? MARGIN + MAP_WIDTH + 10 : MARGIN;
  doc.y = top;
  for (const words of [spots && stickLine(spots), levelLine(page), missingLine(page)])
    if (words)
      doc
        .fillColor(INK)
        .font('regular')
        .fontSize(8)
        .text(words, left, doc.y, { width: MARGIN + WIDTH - left })
        .moveDown(0.4);
  doc.x = MARGIN;
  doc.y = Math.max(doc.y, mapped ? top + MAP_HEIGHT : 0) + 6;
  if (!spots || spots.length === 0) return;
  drawSpots(
    doc,
    spots.map((spot, i) => spotCells(spot, i + 1)),
  );
  doc.font('regular').fontSize(8).text(markLine(spots), MARGIN, doc.y, { width: WIDTH }).moveDown(0.4);
}

const COLUMN_SHARES = [0.04, 0.24, 0.2, 0.11, 0.09, 0.14, 0.07, 0.11];

function drawSpots(doc: Doc, rows: readonly string[][]): void {
  const draw = (cells: readonly string[], font: 'bold' | 'regular'): void => {
    doc.font(font).fontSize(7.8);
    const widths = COLUMN_SHARES.map((share) => share * WIDTH - 4);
    const height = Math.max(
      ...cells.map((cell, i) => doc.heightOfString(cell || ' ', { width: widths[i] ?? 0 })),
    );
    if (doc.y + height > BOTTOM) doc.addPage();
    const top = doc.y;
    let left = MARGIN;
    for (const [i, cell] of cells.entries()) {
      doc.text(cell, left, top, { width: widths[i] ?? 0 });
      left += (widths[i] ?? 0) + 4;
    }
    doc.y = top + height + 2;
    doc
      .lineWidth(0.4)
      .strokeColor('#777777')
      .moveTo(MARGIN, doc.y)
      .lineTo(MARGIN + WIDTH, doc.y)
      .stroke();
    doc.y += 2;
  };
  draw(SPOT_HEADING, 'bold');
  for (const row of rows) draw(row, 'regular');
  doc.x = MARGIN;
}

function drawLines(doc: Doc, lines: readonly CardLine[]): void {
  for (const { label, words } of lines) {
    doc
      .font('bold')
      .fontSize(8)
      .fillColor(INK)
      .text(`${label}: `, MARGIN, doc.y, { width: WIDTH, continued: true });
    doc.font('regular').text(words);
  }
  doc.moveDown(0.3);
}

function drawEmergency(doc: Doc, page: PegPageView): void {
  const text = emergencyLines(page)
    .map(({ label, words }) => `${label}: ${words}`)
    .join('\n');
  const width = WIDTH - 16;
  const headHeight = doc.font('bold').fontSize(9).heightOfString(page.emergencyWords, { width });
  const height = headHeight + doc.font('regular').fontSize(8).heightOfString(text, { width }) + 9;
  if (doc.y + height > BOTTOM) doc.addPage();
  const top = doc.y;
  doc.lineWidth(1.4).strokeColor(INK).rect(MARGIN, top, WIDTH, height).stroke();
  doc
    .font('bold')
    .fontSize(9)
    .text(page.emergencyWords, MARGIN + 8, top + 5, { width });
  doc.font('regular').fontSize(8).text(text, { width });
  doc.x = MARGIN;
  doc.y = top + height + 6;
}

function drawFoot(doc: Doc, { page, printedOn }: Card): void {
  const advised = page.spots?.some((spot) => spot.presentation !== null) ? [page.rigCaution] : [];
  const version = page.chart ? `Chart ${page.chart.version}. ` : '';
  const words = [...page.cautions, ...advised, 'Byelaws and notices on the bank come before this card.'].join(
    ' ',
  );
  doc.font('regular').fontSize(8);
  const height = doc.font('bold').heightOfString(words, { width: WIDTH }) + 13;
  if (doc.y + height > BOTTOM) doc.addPage();
  doc.y = BOTTOM - height;
  doc.font('bold').fontSize(8).fillColor(INK).text(words, MARGIN, doc.y, { width: WIDTH });
  doc
    .font('regular')
    .text(`${version}Printed ${dayWords(printedOn)}. The page behind the code is newer than this print.`);
}
