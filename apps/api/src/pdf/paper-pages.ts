import type { Doc } from './pdf-document';
import { writePdf } from './pdf-document';

export type PaperTable = {
  title?: string;
  heading: readonly string[];
  /** Share of the page's width for each column. */
  shares: readonly number[];
  rows: readonly (readonly string[])[];
};

/** A photo to print small: JPEG bytes, and the words under it. */
export type PaperPicture = { jpeg: Uint8Array; caption: string };

/** A piece of a document that runs over pages. `wide` tables lie on pages of their own. */
export type PaperBlock =
  | { kind: 'heading'; words: string }
  | { kind: 'words'; words: string; bold?: boolean }
  | { kind: 'facts'; facts: readonly (readonly [string, string])[] }
  | { kind: 'table'; table: PaperTable; wide?: boolean }
  | { kind: 'pictures'; pictures: readonly PaperPicture[] };

export type PaperDocument = {
  title: string;
  author: string;
  over: string; // small, above the title
  foot: string; // on every page, with its number
  writtenAt: Date;
  blocks: readonly PaperBlock[];
};

const EDGE = 36;
const FOOT = 26;
const INK = '#000000';
const BODY_PT = 9;
const CELL_PT = 7.5;
const TERM_SHARE = 0.3;
const PICTURES_ACROSS = 3;
const PICTURE_PT = 116;

/** A document on A4, black on white: heads of tables repeated, every page numbered out of how many. */
export function drawPages(paper: PaperDocument): Promise<Buffer> {
  const info = { Title: paper.title, Author: paper.author, CreationDate: paper.writtenAt };
  return writePdf({ size: 'A4', margin: EDGE, bufferPages: true, info }, (doc) => {
    doc.font('regular').fontSize(10).fillColor(INK).text(paper.over);
    doc.font('bold').fontSize(22).text(paper.title).moveDown(0.3);
    let lying = false;
    for (const block of paper.blocks) {
      const wide = block.kind === 'table' && block.wide === true;
      if (wide !== lying) doc.addPage({ size: 'A4', margin: EDGE, layout: wide ? 'landscape' : 'portrait' });
      lying = wide;
      drawBlock(doc, block);
    }
    numberPages(doc, paper.foot);
  });
}

const widthOf = (doc: Doc): number => doc.page.width - 2 * EDGE;
const bottomOf = (doc: Doc): number => doc.page.height - EDGE - FOOT;

/** A new page of the same lie when so much room is not left. */
function makeRoom(doc: Doc, height: number): boolean {
  if (doc.y + height <= bottomOf(doc)) return false;
  const layout = doc.page.width > doc.page.height ? 'landscape' : 'portrait';
  doc.addPage({ size: 'A4', margin: EDGE, layout });
  return true;
}

function drawBlock(doc: Doc, block: PaperBlock): void {
  switch (block.kind) {
    case 'heading':
      makeRoom(doc, 60);
      doc.moveDown(0.6).font('bold').fontSize(13).text(block.words, EDGE, doc.y).moveDown(0.2);
      break;
    case 'words':
      doc.font(block.bold ? 'bold' : 'regular').fontSize(BODY_PT);
      makeRoom(doc, doc.heightOfString(block.words, { width: widthOf(doc) }));
      doc.text(block.words, EDGE, doc.y, { width: widthOf(doc) }).moveDown(0.3);
      break;
    case 'facts':
      for (const [term, fact] of block.facts) drawFact(doc, term, fact);
      doc.moveDown(0.3);
      break;
    case 'table':
      drawTable(doc, block.table);
      break;
    case 'pictures':
      for (let i = 0; i < block.pictures.length; i += PICTURES_ACROSS)
        drawPictures(doc, block.pictures.slice(i, i + PICTURES_ACROSS));
      break;
  }
}

function drawFact(doc: Doc, term: string, fact: string): void {
  const width = widthOf(doc);
  const left = width * TERM_SHARE;
  doc.font('regular').fontSize(BODY_PT);
  const height = doc.heightOfString(fact || ' ', { width: width - left });
  makeRoom(doc, height + 3);
  const top = doc.y;
  doc.text(term, EDGE, top, { width: left - 8 });
  doc.text(fact, EDGE + left, top, { width: width - left });
  doc.y = Math.max(doc.y, top + height) + 2;
  rule(doc, 0.3);
  doc.y += 2;
}

function rule(doc: Doc, weight: number): void {
  doc
    .lineWidth(weight)
    .strokeColor('#777777')
    .moveTo(EDGE, doc.y)
    .lineTo(EDGE + widthOf(doc), doc.y)
    .stroke();
}

function drawTable(doc: Doc, { title, heading, shares, rows }: PaperTable): void {
  const head = (): void => drawRow(doc, { cells: heading, shares, font: 'bold' });
  makeRoom(doc, 60);
  if (title) doc.font('bold').fontSize(11).text(title, EDGE, doc.y).moveDown(0.3);
  head();
  for (const cells of rows) drawRow(doc, { cells, shares, font: 'regular', head });
  doc.x = EDGE;
  doc.moveDown(0.4);
}

/** A row of pictures of one height, each over its caption; a row is never parted by the end of a page. */
function drawPictures(doc: Doc, row: readonly PaperPicture[]): void {
  const columnPt = widthOf(doc) / PICTURES_ACROSS;
  const widthPt = columnPt - 10;
  doc.font('regular').fontSize(CELL_PT);
  const captionPt = Math.max(...row.map(({ caption }) => doc.heightOfString(caption, { width: widthPt })));
  makeRoom(doc, PICTURE_PT + captionPt + 14);
  const top = doc.y;
  for (const [i, { jpeg, caption }] of row.entries()) {
    const left = EDGE + i * columnPt;
    doc.image(Buffer.from(jpeg), left, top, { fit: [widthPt, PICTURE_PT], valign: 'bottom' });
    doc.fillColor(INK).text(caption, left, top + PICTURE_PT + 3, { width: widthPt });
  }
  doc.x = EDGE;
  doc.y = top + PICTURE_PT + captionPt + 12;
}

type TableRow = {
  cells: readonly string[];
  shares: readonly number[];
  font: 'bold' | 'regular';
  head?: () => void;
};

/** One row; on a new page under the head again when it has no room left. */
function drawRow(doc: Doc, { cells, shares, font, head }: TableRow): void {
  doc.font(font).fontSize(CELL_PT).fillColor(INK);
  const widths = shares.map((share) => share * widthOf(doc));
  const heights = cells.map((cell, i) =>
    cell === '' ? 0 : doc.heightOfString(cell, { width: (widths[i] ?? 0) - 4 }),
  );
  const height = Math.max(doc.currentLineHeight(true), ...heights);
  if (makeRoom(doc, height + 4)) head?.();
  doc.font(font).fontSize(CELL_PT).fillColor(INK);
  const top = doc.y;
  let left = EDGE;
  for (const [i, cell] of cells.entries()) {
    if (cell !== '') doc.text(cell, left, top, { width: (widths[i] ?? 0) - 4 });
    left += widths[i] ?? 0;
  }
  doc.y = top + height + 1;
  rule(doc, font === 'bold' ? 0.8 : 0.2);
  doc.y += 1.5;
}

function numberPages(doc: Doc, foot: string): void {
  const { count } = doc.bufferedPageRange();
  for (let i = 0; i < count; i++) {
    doc.switchToPage(i);
    doc.page.margins.bottom = 0; // the foot stands below what a page may fill
    const place = { width: widthOf(doc), lineBreak: false } as const;
    const y = doc.page.height - EDGE - 8;
    doc.font('regular').fontSize(7.5).fillColor(INK).text(foot, EDGE, y, place);
    doc.text(`Page ${i + 1} of ${count}`, EDGE, y, { ...place, align: 'right' });
  }
}
