import type { Point } from '../../geometry/point';
import type { Outline } from '../../geometry/polygon';
import type { PegPageView } from '../contract';
import { bottomOf, layersOf } from './chart-part';
import type { MapParts } from './draw-map';
import { groundOf } from './ground';
import type { Line } from './mark';
import { fromPage, type View } from './view';

export type Extract = NonNullable<PegPageView['extract']>;

/** The piece of chart before a peg, made ready for a map; as much of it as came. Depths at datum. */
export function extractParts({ id, number }: Pick<PegPageView, 'id' | 'number'>, extract: Extract): MapParts {
  const part = extract.grid && { ...extract.grid, sigma: null };
  const layers = part && layersOf(part);
  const ground = groundOf({
    outline: outlineOf(extract.water),
    depth: part?.depth && layers ? layers.depth : null,
    isobaths: extract.isobaths,
    stepM: extract.contourStepM,
    raisedM: 0,
  });
  return {
    ground: { ...ground, shore: extract.shore },
    bottom: part ? bottomOf(part, layers) : [],
    soundings: [],
    spots: [],
    pegs: [{ ...extract.originM, id, number, facingDeg: extract.facingDeg, status: 'open' }],
    cast: null,
  };
}

function outlineOf(rings: readonly Line[]): Outline {
  const points = rings.map((ring) => {
    const places: Point[] = [];
    for (let i = 0; i + 1 < ring.length; i += 2) places.push({ xM: ring[i] ?? 0, yM: ring[i + 1] ?? 0 });
    return places;
  });
  const [shore = [], ...islands] = points;
  return { shore, islands };
}

/** An extract is this wide at least; no more of it may show. */
const EXTRACT_ACROSS_M = 116;

/** How a picture looks out from a peg: which way its water lies on the page, and the room left behind the peg. */
export type Outlook = { towards: 'up' | 'right'; reachM: number; behindPx: number };

/** The view out from a peg: it stands at the foot or the left, its water before it. No wider than the extract. */
export function outlookView(
  extract: Extract,
  { towards, reachM, behindPx }: Outlook,
  page: { widthPx: number; heightPx: number },
): View {
  const [aheadPx, acrossPx] =
    towards === 'up' ? [page.heightPx, page.widthPx] : [page.widthPx, page.heightPx];
  const pxPerM = Math.min((aheadPx - behindPx) / reachM, acrossPx / (reachM * 0.9));
  const shownPx = Math.min(acrossPx, Math.floor(EXTRACT_ACROSS_M * pxPerM));
  const size =
    towards === 'up'
      ? { widthPx: shownPx, heightPx: page.heightPx }
      : { widthPx: page.widthPx, heightPx: shownPx };
  const turnDeg = (towards === 'up' ? 0 : 90) - extract.facingDeg;
  const view = { ...size, pxPerM, centre: extract.originM, turnDeg };
  const ahead = aheadPx / 2 - behindPx;
  const middle = { x: size.widthPx / 2, y: size.heightPx / 2 };
  const centre =
    towards === 'up'
      ? fromPage(view, middle.x, middle.y - ahead)
      : fromPage(view, middle.x + ahead, middle.y);
  return { ...view, centre };
}
