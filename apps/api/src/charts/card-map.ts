import type { PegPageView } from '@mereward/shared/charts/contract';

type Doc = PDFKit.PDFDocument;
type Frame = { x: number; y: number; width: number; height: number };

const INK = '#111111';

/** The water before the peg in black on white: shore, isobaths with their depths, the peg and its spots by number. */
export function drawCardMap(doc: Doc, { extract, spots }: PegPageView, frame: Frame): void {
  if (!extract) return;
  const fit = fitted(extract, spots ?? [], frame);
  doc.save();
  doc.rect(frame.x, frame.y, frame.width, frame.height).clip();
  for (const { levelM, lines } of extract.isobaths)
    for (const line of lines) drawIsobath(doc, fit, { levelM, line });
  doc.lineWidth(1.2).strokeColor(INK);
  for (const line of extract.shore) path(doc, line, fit).stroke();
  drawPeg(doc, fit, extract);
  for (const [i, spot] of (spots ?? []).entries()) drawSpot(doc, fit.at(spot.xM, spot.yM), `${i + 1}`);
  doc.restore();
  doc.lineWidth(0.5).strokeColor(INK).rect(frame.x, frame.y, frame.width, frame.height).stroke();
  drawNorthAndScale(doc, fit.ptPerM, frame);
}

type Extract = NonNullable<PegPageView['extract']>;
type Fit = { ptPerM: number; at: (xM: number, yM: number) => [number, number] };

function fitted(extract: Extract, spots: readonly { xM: number; yM: number }[], frame: Frame): Fit {
  const lines =
    extract.isobaths.length > 0 ? extract.isobaths.flatMap(({ lines: each }) => each) : extract.shore;
  const xs = [
    extract.originM.xM,
    ...spots.map(({ xM }) => xM),
    ...lines.flatMap((line) => line.filter((_, i) => i % 2 === 0)),
  ];
  const ys = [
    extract.originM.yM,
    ...spots.map(({ yM }) => yM),
    ...lines.flatMap((line) => line.filter((_, i) => i % 2 === 1)),
  ];
  const [west, east, south, north] = [Math.min(...xs), Math.max(...xs), Math.min(...ys), Math.max(...ys)];
  const ptPerM = Math.min(
    frame.width / Math.max(20, east - west + 16),
    frame.height / Math.max(20, north - south + 16),
  );
  const [midX, midY] = [(west + east) / 2, (south + north) / 2];
  return {
    ptPerM,
    at: (xM, yM) => [
      frame.x + frame.width / 2 + (xM - midX) * ptPerM,
      frame.y + frame.height / 2 - (yM - midY) * ptPerM,
    ],
  };
}

function path(doc: Doc, line: readonly number[], { at }: Fit): Doc {
  for (let i = 0; i + 1 < line.length; i += 2) {
    const [x, y] = at(line[i] ?? 0, line[i + 1] ?? 0);
    if (i === 0) doc.moveTo(x, y);
    else doc.lineTo(x, y);
  }
  return doc;
}

function drawIsobath(
  doc: Doc,
  fit: Fit,
  { levelM, line }: { levelM: number; line: readonly number[] },
): void {
  doc.lineWidth(Number.isInteger(levelM) ? 0.7 : 0.35).strokeColor('#444444');
  path(doc, line, fit).stroke();
  if (line.length < 24 || !Number.isInteger(levelM * 2)) return; // a short line has no room for its depth
  const middle = Math.floor(line.length / 4) * 2;
  const [x, y] = fit.at(line[middle] ?? 0, line[middle + 1] ?? 0);
  const label = `${levelM}`;
  doc.font('regular').fontSize(5.5);
  const width = doc.widthOfString(label) + 2;
  doc.rect(x - width / 2, y - 3.4, width, 6.8).fill('#ffffff');
  doc.fillColor(INK).text(label, x - width / 2, y - 3.6, { width, align: 'center', lineBreak: false });
}

function drawPeg(doc: Doc, fit: Fit, { originM, facingDeg }: Extract): void {
  const [x, y] = fit.at(originM.xM, originM.yM);
  doc.save().rotate(facingDeg, { origin: [x, y] });
  doc
    .moveTo(x - 6, y + 4)
    .lineTo(x + 6, y + 4)
    .lineTo(x, y - 6)
    .closePath()
    .fill(INK);
  doc.restore();
}

function drawSpot(doc: Doc, [x, y]: [number, number], label: string): void {
  doc.circle(x, y, 5.2).lineWidth(1).fillAndStroke('#ffffff', INK);
  doc.font('bold').fontSize(7).fillColor(INK);
  doc.text(label, x - 6, y - 4.4, { width: 12, align: 'center', lineBreak: false });
}

const SCALES_M = [5, 10, 20, 25, 50, 100];

function drawNorthAndScale(doc: Doc, ptPerM: number, { x, y, width, height }: Frame): void {
  const lengthM = SCALES_M.findLast((each) => each * ptPerM <= width / 3) ?? 5;
  const [left, base] = [x + 6, y + height - 7];
  doc
    .lineWidth(1)
    .strokeColor(INK)
    .moveTo(left, base)
    .lineTo(left + lengthM * ptPerM, base)
    .stroke();
  doc
    .font('regular')
    .fontSize(6)
    .fillColor(INK)
    .text(`${lengthM} m`, left, base - 9, { lineBreak: false });
  const [nx, ny] = [x + width - 12, y + 18];
  doc
    .moveTo(nx, ny)
    .lineTo(nx, ny - 10)
    .lineTo(nx - 2.5, ny - 6)
    .moveTo(nx, ny - 10)
    .lineTo(nx + 2.5, ny - 6)
    .stroke();
  doc.text('N', nx - 5, ny + 1, { width: 10, align: 'center', lineBreak: false });
}
