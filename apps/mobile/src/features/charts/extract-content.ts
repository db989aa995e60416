import type { PegPageView } from '@mereward/shared/charts/contract';
import { groundOf } from '@mereward/shared/charts/drawing/ground';
import type { Line } from '@mereward/shared/charts/drawing/mark';
import type { View } from '@mereward/shared/charts/drawing/view';
import { pointAlong, type Point } from '@mereward/shared/geometry/point';
import type { Outline } from '@mereward/shared/geometry/polygon';
import type { MapContent } from './map-layers';
import { bottomOf, layersOf } from './chart-part';

type Extract = NonNullable<PegPageView['extract']>;

/** The piece of chart before a peg, made ready for a map; as much of it as came. */
export function extractContent(page: PegPageView, extract: Extract): MapContent {
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
    marks: [],
    spots: page.spots ?? [],
    pegs: [
      {
        ...extract.originM,
        id: page.id,
        number: page.number,
        facingDeg: extract.facingDeg,
        status: 'open',
      },
    ],
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

/** Below the peg there's room for its number and the scale. */
const FOOT_PX = 74;

type Page = { widthPx: number; heightPx: number };

/** Looking out from the peg: it stands at the foot of the picture, its water above it. No wider than the extract. */
export function outlookView(extract: Extract, reachM: number, { widthPx, heightPx }: Page): View {
  const pxPerM = Math.min((heightPx - FOOT_PX) / reachM, widthPx / (reachM * 0.9));
  return {
    widthPx: Math.min(widthPx, Math.floor(EXTRACT_ACROSS_M * pxPerM)),
    heightPx,
    pxPerM,
    centre: pointAlong(extract.originM, extract.facingDeg, (heightPx / 2 - FOOT_PX) / pxPerM),
    turnDeg: -extract.facingDeg,
  };
}
