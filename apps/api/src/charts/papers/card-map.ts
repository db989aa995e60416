import type { PegPageView } from '@mereward/shared/charts/contract';
import { drawMap } from '@mereward/shared/charts/drawing/draw-map';
import { extractReachM, numberedSpot } from '@mereward/shared/charts/drawing/extract-page';
import { extractParts, outlookView } from '@mereward/shared/charts/drawing/extract-parts';
import { northMarks, scaleBarMarks } from '@mereward/shared/charts/drawing/furniture';
import { stepsOf } from '@mereward/shared/charts/drawing/page';
import { palettes } from '@mereward/shared/charts/drawing/palette';
import { stickWords } from '@mereward/shared/charts/spot-words';
import { USUAL_SPACING_M } from '@mereward/shared/units/wraps';
import { paintSteps } from './pdf-steps';

type Doc = PDFKit.PDFDocument;
type Frame = { x: number; y: number; width: number; height: number };

/** Px of the drawing to a point of the card: letters of 12 px come out at 6 pt. */
const PX_A_POINT = 2;
const BEHIND_PX = 44;
const INK = '#000000';

/**
 * The water before the peg as the screens draw it, in black on white: the peg at the left, its water to the right, its
 * spots by number.
 */
export function drawCardMap(doc: Doc, page: PegPageView, frame: Frame): void {
  const { extract } = page;
  if (!extract) return;
  const palette = palettes.print;
  const size = { widthPx: frame.width * PX_A_POINT, heightPx: frame.height * PX_A_POINT };
  const spots = page.spots ?? [];
  const outlook = { towards: 'right', reachM: extractReachM(extract, spots), behindPx: BEHIND_PX } as const;
  const view = outlookView(extract, outlook, size);
  const map = drawMap(extractParts(page, extract), {
    palette,
    view,
    depthWords: (depthM) => depthM.toFixed(extract.contourStepM < 0.5 ? 2 : 1),
    selectedPegId: null,
    selectedSpotId: null,
  });
  const stickSpacingM = spots[0]?.stickSpacingM ?? USUAL_SPACING_M;
  const bar = {
    x: 10,
    y: view.heightPx - 16,
    mostPx: view.widthPx / 4,
    stickSpacingM,
    sticks: stickWords(stickSpacingM),
  };
  const round = [
    ...scaleBarMarks(view, bar, palette),
    ...northMarks(view, { x: view.widthPx - 30, y: 34 }, palette),
  ];
  const layers = [
    {
      view,
      atPx: { x: 0, y: 0 },
      marks: [...map, ...spots.flatMap((spot, i) => numberedSpot(spot, i + 1, palette))],
    },
    { marks: round },
  ];
  doc.save();
  doc.translate(frame.x, frame.y).scale(1 / PX_A_POINT);
  paintSteps(doc, stepsOf({ widthPx: view.widthPx, heightPx: view.heightPx, ground: null, layers }));
  doc.lineWidth(1).rect(0, 0, view.widthPx, view.heightPx).stroke(INK);
  doc.restore();
}
