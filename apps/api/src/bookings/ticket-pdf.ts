import { bookingCodeWords } from '@mereward/shared/bookings/booking-code';
import type { Doc } from '../pdf/pdf-document';
import { writePdf } from '../pdf/pdf-document';
import type { Fact } from './ticket-words';

/** A ticket in words, ready to be drawn. */
export type TicketSheet = {
  fisheryName: string;
  title: string;
  code: string;
  qr: string;
  changedAt: Date;
  notYet: readonly string[];
  facts: readonly Fact[];
  parts: readonly { title: string; lines: readonly string[] }[];
};

const MARGIN = 20;
const WIDTH = 419.53 - 2 * MARGIN; // A5
const BOTTOM = 595.28 - MARGIN;
const QR = 106;
const QUIET = 12; // four modules of white round the square, by ISO/IEC 18004
const TERM = 86;
const INK = '#000000';
const GAP = -1.4; // the face’s own lines stand wide for so small a sheet

/** Draws a ticket on A5, black on white so that any printer will do; what is longer goes on to another page. */
export async function drawTicket(sheet: TicketSheet): Promise<Buffer> {
  const { default: qrcode } = await import('qrcode');
  const info = {
    Title: `${sheet.title}, ${bookingCodeWords(sheet.code)}`,
    Author: sheet.fisheryName,
    CreationDate: sheet.changedAt,
  };
  return writePdf({ size: 'A5', margin: MARGIN, info }, (doc) => {
    drawSquare(doc, qrcode.create(sheet.qr, { errorCorrectionLevel: 'M' }).modules);
    drawHead(doc, sheet);
    if (sheet.notYet.length > 0) drawNotYet(doc, sheet.notYet);
    for (const each of sheet.facts) drawFact(doc, each);
    for (const part of sheet.parts) drawPart(doc, part);
  });
}

function drawSquare(doc: Doc, { size, data }: { size: number; data: Uint8Array }): void {
  const module = QR / size;
  const [left, top] = [MARGIN + WIDTH - QR, MARGIN];
  doc.fillColor(INK);
  for (let row = 0; row < size; row++)
    for (let column = 0; column < size; column++)
      if (data[row * size + column])
        doc.rect(left + column * module, top + row * module, module + 0.02, module + 0.02);
  doc.fill();
}

function drawHead(doc: Doc, { fisheryName, title, code, qr }: TicketSheet): void {
  const width = WIDTH - QR - QUIET;
  doc.fillColor(INK).font('regular').fontSize(11).text(fisheryName, MARGIN, MARGIN, { width });
  doc.font('bold').fontSize(16).text(title, { width }).moveDown(0.3);
  doc.font('regular').fontSize(9).text('Code', { width });
  doc.font('bold').fontSize(34).text(bookingCodeWords(code), { width, lineGap: -6, characterSpacing: 1 });
  doc.font('regular').fontSize(7.5).text(qr, { width });
  doc.y = Math.max(doc.y, MARGIN + QR) + QUIET;
}

function drawNotYet(doc: Doc, lines: readonly string[]): void {
  const words = ['Still to do', ...lines].join('\n');
  doc.font('bold').fontSize(10).lineGap(GAP);
  const height = doc.heightOfString(words, { width: WIDTH - 12 }) + 10;
  doc.lineWidth(1.2).strokeColor(INK).rect(MARGIN, doc.y, WIDTH, height).stroke();
  const top = doc.y;
  doc.text(words, MARGIN + 6, top + 5, { width: WIDTH - 12 });
  doc.x = MARGIN;
  doc.y = top + height + 6;
}

/** A new page when so much room is not left. */
function makeRoom(doc: Doc, height: number): void {
  if (doc.y + height > BOTTOM) doc.addPage();
}

function drawFact(doc: Doc, [what, is]: Fact): void {
  doc.font('regular').fontSize(10).lineGap(GAP);
  const width = WIDTH - TERM;
  const height = doc.heightOfString(is, { width });
  makeRoom(doc, height + 4);
  const top = doc.y;
  doc.font('bold').text(what, MARGIN, top, { width: TERM - 6 });
  doc.font('regular').text(is, MARGIN + TERM, top, { width });
  doc.x = MARGIN;
  doc.y = top + height + 2;
}

function drawPart(doc: Doc, { title, lines }: TicketSheet['parts'][number]): void {
  makeRoom(doc, 40);
  doc.moveDown(0.2).font('bold').fontSize(9.5).lineGap(GAP).text(title, MARGIN, doc.y, { width: WIDTH });
  doc.font('regular').fontSize(8.2);
  for (const line of lines) {
    makeRoom(doc, doc.heightOfString(line, { width: WIDTH }));
    doc.text(line, MARGIN, doc.y, { width: WIDTH });
  }
}
