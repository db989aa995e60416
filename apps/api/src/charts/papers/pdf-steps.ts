import type { Step, TextStep } from '@mereward/shared/charts/drawing/page';
import { BASELINE_SHARE } from '@mereward/shared/charts/drawing/to-svg';

type Doc = PDFKit.PDFDocument;

/** Share of the size that a halo stands out round letters, as the SVG writer draws it. */
const HALO_SHARE = 0.42;

/** Draws a page's acts in order on a PDF whose faces are registered as `regular` and `bold`. */
export function paintSteps(doc: Doc, steps: readonly Step[]): void {
  doc.lineCap('round').lineJoin('round');
  for (const step of steps) {
    switch (step.do) {
      case 'path':
        paintPath(doc, step);
        break;
      case 'text':
        paintText(doc, step);
        break;
      case 'clip':
        doc.save();
        doc.path(step.d).clip(step.evenOdd ? 'even-odd' : 'non-zero');
        break;
      case 'unclip':
        doc.restore();
        break;
    }
  }
}

function paintPath(doc: Doc, { d, fill, stroke }: Extract<Step, { do: 'path' }>): void {
  if (fill) doc.path(d).fill(fill, 'even-odd');
  if (!stroke) return;
  doc.lineWidth(stroke.widthPx);
  const [dash, space] = stroke.dashPx ?? [];
  if (dash !== undefined) doc.dash(dash, { space: space ?? dash });
  doc.path(d).stroke(stroke.colour);
  doc.undash();
}

function paintText(doc: Doc, step: TextStep): void {
  const { words, x, y, sizePx, turnDeg, halo, colour } = step;
  doc.save();
  if (turnDeg !== 0) doc.rotate(turnDeg, { origin: [x, y] });
  doc.font(step.bold ? 'bold' : 'regular').fontSize(sizePx);
  const widthPx = doc.widthOfString(words);
  const left = step.anchor === 'start' ? x : step.anchor === 'end' ? x - widthPx : x - widthPx / 2;
  const place = { lineBreak: false, baseline: 'alphabetic', oblique: step.slanted } as const;
  const baseline = y + sizePx * BASELINE_SHARE;
  if (halo) {
    doc.lineWidth(sizePx * HALO_SHARE).strokeColor(halo);
    doc.text(words, left, baseline, { ...place, stroke: true, fill: false });
  }
  doc.fillColor(colour).text(words, left, baseline, place);
  doc.restore();
}
