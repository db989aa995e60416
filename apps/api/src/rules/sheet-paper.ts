import type { Rule } from '@mereward/shared/rules/contract';
import { changesWords, numberWords } from '@mereward/shared/rules/rule-changes';
import type { RuleChangeView, SheetView } from '@mereward/shared/rules/sheet-contract';
import { dayAndClock } from '@mereward/shared/time/day-names';
import { writePdf, type Doc } from '../pdf/pdf-document';

/** A sheet to print; `large` for eyes that want it. What `proof` says stands above the rules, in a dispute. */
export type SheetPaper = {
  fishery: string;
  zone: string;
  sheet: SheetView;
  large: boolean;
  printedAt: Date;
  proof: readonly (readonly [string, string])[] | null;
};

/** Type sizes, pt: large print begins at 16, as those who make it advise (from memory). */
const SIZES = {
  plain: { body: 10.5, small: 8.5, head: 14, title: 24 },
  large: { body: 17, small: 16, head: 21, title: 30 },
};
const EDGE = 48;
const FOOT_PT = 30;
const INK = '#000000';

type Set = { doc: Doc; size: (typeof SIZES)['plain'] };

/** The numbered rules on A4, black on white, with where each comes from, what changed, and a block to sign. */
export function drawSheet(paper: SheetPaper): Promise<Buffer> {
  const { fishery, sheet, large, printedAt, zone } = paper;
  const title = `Rules of ${fishery}`;
  const info = { Title: title, Author: fishery, CreationDate: printedAt };
  const size = large ? SIZES.large : SIZES.plain;
  return writePdf({ size: 'A4', margin: EDGE, bufferPages: true, info }, (doc) => {
    const set = { doc, size };
    doc.fillColor(INK).font('bold').fontSize(size.title).text(title);
    doc
      .font('regular')
      .fontSize(size.body)
      .text(`Version ${numberWords(sheet)}, in force since ${dayAndClock(sheet.publishedAt, zone)}.`)
      .text('Byelaws and notices on the bank beat this sheet.');
    if (paper.proof) drawProof(set, paper.proof);
    else drawChanges(set, sheet.changes);
    heading(set, 'The rules');
    for (const rule of sheet.rules) drawRule(set, rule);
    if (!paper.proof) drawSigning(set);
    numberPages(
      set,
      `${fishery}. Rules, version ${numberWords(sheet)}. Printed ${dayAndClock(printedAt.toISOString(), zone)}.`,
    );
  });
}

function heading({ doc, size }: Set, words: string): void {
  room({ doc, size }, size.head * 4);
  doc.moveDown(0.8).font('bold').fontSize(size.head).text(words, EDGE).moveDown(0.3);
}

/** A new page when so much room is not left. */
function room({ doc }: Set, heightPt: number): void {
  if (doc.y + heightPt > doc.page.height - EDGE - FOOT_PT) doc.addPage();
}

const BASIS = { byelaw: 'Byelaw', fishery: 'Rule of this fishery', advice: 'Advice' } as const;
const SEVERITY = { warn: 'a warning', remove: 'being asked to leave', ban: 'a ban' } as const;

function drawRule(set: Set, rule: Rule): void {
  const { doc, size } = set;
  const indent = size.body * 2.6;
  const width = doc.page.width - 2 * EDGE - indent;
  const marks = [
    BASIS[rule.basis],
    `breaking it: ${SEVERITY[rule.severity]}`,
    ...(rule.link ? [rule.link] : []),
  ];
  const small = [...(rule.reason ? [`Why: ${rule.reason}`] : []), marks.join(' · ')].join('\n');
  doc.font('regular').fontSize(size.body);
  const textPt = doc.heightOfString(rule.text, { width });
  doc.fontSize(size.small);
  room(set, textPt + doc.heightOfString(small, { width }) + size.body);
  const top = doc.y;
  doc
    .font('bold')
    .fontSize(size.body)
    .text(String(rule.number), EDGE, top, { width: indent - 6 });
  doc.font('regular').text(rule.text, EDGE + indent, top, { width });
  doc.fontSize(size.small).text(small, EDGE + indent, doc.y + 1, { width });
  doc.x = EDGE;
  doc.y += size.body * 0.5;
}

function drawChanges(set: Set, changes: readonly RuleChangeView[] | null): void {
  if (!changes || changes.length === 0) return;
  const { doc, size } = set;
  heading(set, `What changed: ${changesWords(changes)}`);
  for (const change of changes) {
    const lines = changeWords(change);
    doc.font('regular').fontSize(size.body);
    room(
      set,
      lines.reduce((sum, line) => sum + doc.heightOfString(line), size.body),
    );
    for (const line of lines) doc.text(line, EDGE);
    doc.moveDown(0.4);
  }
}

function changeWords(change: RuleChangeView): string[] {
  switch (change.kind) {
    case 'added':
      return [`${change.rule.number} is new.`];
    case 'removed':
      return [`${change.rule.number} is taken away: ${change.rule.text}`];
    case 'changed':
      return [
        `${change.after.number} was: ${change.before.text}`,
        `${change.after.number} now is: ${change.after.text}`,
      ];
  }
}

function drawProof(set: Set, proof: readonly (readonly [string, string])[]): void {
  const { doc, size } = set;
  heading(set, 'What was accepted, and when');
  for (const [term, fact] of proof) {
    doc.font('bold').fontSize(size.body).text(`${term}: `, EDGE, doc.y, { continued: true });
    doc.font('regular').text(fact);
  }
}

function drawSigning(set: Set): void {
  const { doc, size } = set;
  heading(set, 'Read and understood');
  for (const what of ['Name', 'Signature', 'Date and time', 'Witness']) {
    room(set, size.body * 3);
    doc
      .font('regular')
      .fontSize(size.body)
      .text(what, EDGE, doc.y + size.body);
    const y = doc.y - 2;
    doc
      .lineWidth(0.6)
      .moveTo(EDGE + size.body * 9, y)
      .lineTo(doc.page.width - EDGE, y)
      .stroke(INK);
  }
}

function numberPages({ doc, size }: Set, foot: string): void {
  const { count } = doc.bufferedPageRange();
  for (let i = 0; i < count; i += 1) {
    doc.switchToPage(i);
    doc.page.margins.bottom = 0;
    const width = doc.page.width - 2 * EDGE;
    const y = doc.page.height - EDGE + 4;
    doc.font('regular').fontSize(Math.min(size.small, 12)).fillColor(INK);
    doc.text(foot, EDGE, y, { width: width - 80, lineBreak: false, ellipsis: true });
    doc.text(`${i + 1} of ${count}`, EDGE, y, { width, lineBreak: false, align: 'right' });
  }
}
