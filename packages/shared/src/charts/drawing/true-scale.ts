import type { Line } from './mark';
import { fitView, type View } from './view';

/** A point of print: 1/72 in, metres. */
const POINT_M = 0.0254 / 72;

/** Scales a ruler is made for, as 1 to so many. Common practice, no published source. */
export const ROUND_SCALES = [
  100, 200, 250, 500, 750, 1000, 1250, 1500, 2000, 2500, 5000, 7500, 10_000, 15_000, 20_000, 25_000, 50_000,
] as const;

/** Points of paper that a metre of lake takes at 1 to `scale`: 2.83 at 1:1000. */
export const pointsPerM = (scale: number): number => 1 / (scale * POINT_M);

/** Where a map stands on paper: its room in px, what is kept free of it on every side, and how many px make a point. */
export type PaperRoom = {
  widthPx: number;
  heightPx: number;
  besidePx: number; // kept free left and right
  abovePx: number; // kept free above and below
  pxPerPoint: number;
};

export type TrueScale = { scale: number; view: View };

/**
 * The largest round scale at which the whole of some lines (metres) has room, north up, with the view that draws it
 * exactly so. Water too large for the smallest scale is drawn to fit, at a scale that is no round one.
 */
export function trueScale(lines: readonly Line[], room: PaperRoom): TrueScale {
  const { widthPx, heightPx, besidePx, abovePx } = room;
  const page = { widthPx, heightPx: heightPx + 2 * (besidePx - abovePx), marginPx: besidePx };
  const fitted = { ...fitView(lines, page, 0), heightPx };
  const leastScale = pointsPerM(1) / (fitted.pxPerM / room.pxPerPoint);
  const scale = ROUND_SCALES.find((each) => each >= leastScale * (1 - 1e-9)) ?? Math.ceil(leastScale);
  return { scale, view: { ...fitted, pxPerM: pointsPerM(scale) * room.pxPerPoint } };
}
