import type { Point } from '../../geometry/plane';
import type { Line } from './mark';

/** How the lake's plane lies on a page: what stands in the middle, how large, and how far north is turned. */
export type View = {
  widthPx: number;
  heightPx: number;
  pxPerM: number;
  centre: Point;
  turnDeg: number; // clockwise turn of the map on the page; 0: north is up
};

export type PagePoint = { x: number; y: number };

const RADIANS = Math.PI / 180;

/** Lake-plane metres → px right and down of the page's top left corner. */
export function toPage(view: View, xM: number, yM: number): PagePoint {
  const east = (xM - view.centre.xM) * view.pxPerM;
  const north = (yM - view.centre.yM) * view.pxPerM;
  const cos = Math.cos(view.turnDeg * RADIANS);
  const sin = Math.sin(view.turnDeg * RADIANS);
  return {
    x: view.widthPx / 2 + east * cos + north * sin,
    y: view.heightPx / 2 - (north * cos - east * sin),
  };
}

/** Px of the page → lake-plane metres; the exact inverse of `toPage`. */
export function fromPage(view: View, x: number, y: number): Point {
  const right = (x - view.widthPx / 2) / view.pxPerM;
  const up = (view.heightPx / 2 - y) / view.pxPerM;
  const cos = Math.cos(view.turnDeg * RADIANS);
  const sin = Math.sin(view.turnDeg * RADIANS);
  return {
    xM: view.centre.xM + right * cos - up * sin,
    yM: view.centre.yM + right * sin + up * cos,
  };
}

export type Box = { minXM: number; minYM: number; maxXM: number; maxYM: number };

export type PageSize = { widthPx: number; heightPx: number; marginPx: number };

/** The view that shows the whole of some lines in a page of this size. */
export function fitView(lines: readonly Line[], page: PageSize, turnDeg: number): View {
  const turned = { widthPx: 0, heightPx: 0, pxPerM: 1, centre: { xM: 0, yM: 0 }, turnDeg };
  let [left, right, top, bottom] = [Infinity, -Infinity, Infinity, -Infinity];
  for (const line of lines) {
    for (let i = 0; i + 1 < line.length; i += 2) {
      const { x, y } = toPage(turned, line[i]!, line[i + 1]!);
      left = Math.min(left, x);
      right = Math.max(right, x);
      top = Math.min(top, y);
      bottom = Math.max(bottom, y);
    }
  }
  if (left > right) throw new RangeError('There is nothing to fit into the view.');
  const freeWidthPx = Math.max(1, page.widthPx - 2 * page.marginPx);
  const freeHeightPx = Math.max(1, page.heightPx - 2 * page.marginPx);
  const pxPerM = Math.min(freeWidthPx / Math.max(1, right - left), freeHeightPx / Math.max(1, bottom - top));
  const centre = fromPage(turned, (left + right) / 2, (top + bottom) / 2);
  return { widthPx: page.widthPx, heightPx: page.heightPx, pxPerM, centre, turnDeg };
}

const WORTH_TURNING = 1.2;

/** North up, unless a quarter turn shows the water a good deal larger. */
export function bestFit(lines: readonly Line[], page: PageSize): View {
  const upright = fitView(lines, page, 0);
  const quarter = fitView(lines, page, -90);
  return quarter.pxPerM > WORTH_TURNING * upright.pxPerM ? quarter : upright;
}
