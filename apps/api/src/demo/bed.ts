import { insideOutline } from '@mereward/shared/geometry/polygon';
import type { Point } from '@mereward/shared/geometry/plane';
import { distanceToShoreM } from '@mereward/shared/geometry/shore-distance';
import type { Cover, Substrate } from '@mereward/shared/surveys/contract';
import { FAR_OSTLE, OSTLE_POOL, type DemoWater } from './waters';

/** What lies under an invented lake at a point of its plane. Depth in metres below chart datum. */
export type Bed = { depthM: number; substrate: Substrate; cover: Cover };

/** A long mound or trough: Gaussian across, fading at both ends. Height in metres, up negative depth. */
export type Ridge = { from: Point; to: Point; halfWidthM: number; depthM: number };

function along(ridge: Ridge, p: Point): number {
  const dx = ridge.to.xM - ridge.from.xM;
  const dy = ridge.to.yM - ridge.from.yM;
  const lengthM = Math.hypot(dx, dy);
  const t = ((p.xM - ridge.from.xM) * dx + (p.yM - ridge.from.yM) * dy) / (lengthM * lengthM);
  const acrossM = ((p.xM - ridge.from.xM) * dy - (p.yM - ridge.from.yM) * dx) / lengthM;
  const pastM = Math.max(0, -t, t - 1) * lengthM;
  return Math.exp(-((acrossM / ridge.halfWidthM) ** 2) - (pastM / (1.5 * ridge.halfWidthM)) ** 2);
}

/** Depth that falls from nothing at the shore to a floor, over a stated distance. */
const fromShore = (shoreM: number, floorM: number, overM: number): number =>
  floorM * (1 - Math.exp(-shoreM / overM));

const LONG_BAR: Ridge = { from: { xM: -95, yM: -28 }, to: { xM: 35, yM: -52 }, halfWidthM: 7, depthM: -1.5 };
const NORTH_BAR: Ridge = { from: { xM: -60, yM: 48 }, to: { xM: 20, yM: 62 }, halfWidthM: 6, depthM: -1.2 };
const GULLY: Ridge = { from: { xM: -90, yM: 22 }, to: { xM: 30, yM: -8 }, halfWidthM: 12, depthM: 2.1 };
const HOLE: Ridge = { from: { xM: 96, yM: -20 }, to: { xM: 112, yM: -6 }, halfWidthM: 18, depthM: 1.4 };
const WEST_BAY: Ridge = {
  from: { xM: -135, yM: -20 },
  to: { xM: -120, yM: 10 },
  halfWidthM: 24,
  depthM: -0.7,
};

/** A hard spot in the silt off peg FO18, such as fish keep clean. */
export const HARD_SPOT = { xM: -79, yM: -60, radiusM: 8 };
const onSpot = (p: Point): boolean =>
  Math.hypot(p.xM - HARD_SPOT.xM, p.yM - HARD_SPOT.yM) < HARD_SPOT.radiusM;

/** Far Ostle's invented bed: two gravel bars, a silted gully between them, a hole in the east, weed in the west bay, a hard spot in the south. */
export function farOstleBed(p: Point): Bed | null {
  const shoreM = waterDepthFromShore(FAR_OSTLE, p);
  if (shoreM === null) return null;
  const rise = 1 - Math.exp(-shoreM / 9); // features die out in the margin
  const shape = [LONG_BAR, NORTH_BAR, GULLY, HOLE, WEST_BAY].reduce(
    (sum, r) => sum + r.depthM * along(r, p),
    0,
  );
  const undulation = 0.16 * Math.sin(p.xM / 23) * Math.cos(p.yM / 19);
  const depthM = Math.max(
    fromShore(shoreM, 2.9, 11) + rise * (shape + undulation),
    Math.min(0.06 * shoreM, 0.5),
  );
  const onBar = Math.max(along(LONG_BAR, p), along(NORTH_BAR, p));
  return { depthM, substrate: farOstleSubstrate(p, depthM, onBar), cover: farOstleCover(p, shoreM, depthM) };
}

function farOstleSubstrate(p: Point, depthM: number, onBar: number): Substrate {
  if (onBar > 0.45) return 'gravel';
  if (onSpot(p)) return 'gravel';
  if (depthM > 3.1) return 'silt';
  if (onBar > 0.2) return 'clay';
  if (p.xM > 70 && p.yM < -15 && depthM < 2.6) return 'sand';
  return p.yM > 30 + 9 * Math.sin(p.xM / 31) ? 'clay' : 'silt';
}

function farOstleCover(p: Point, shoreM: number, depthM: number): Cover {
  if (Math.hypot(p.xM - 40, p.yM - 12) < 4) return 'snag'; // an old post line off the island
  const west = along(WEST_BAY, p);
  if (west > 0.55 && depthM < 2.6) return 'tall_weed';
  if (west > 0.25 && depthM < 2.8) return 'low_weed';
  return p.yM > 60 && shoreM < 12 ? 'leaf_litter' : 'clear';
}

/** The west end of the gully, that was dug out in the winter, and how much silt stood in it before. */
export const DUG_GULLY: Ridge = {
  from: { xM: -92, yM: 22 },
  to: { xM: -52, yM: 12 },
  halfWidthM: 11,
  depthM: -1.3,
};

/** The same bed the autumn before: the gully's west end full of silt, and weed over more of the west bay. */
export function farOstleAutumnBed(p: Point): Bed | null {
  const bed = farOstleBed(p);
  if (!bed) return null;
  const depthM = Math.max(0.4, bed.depthM + DUG_GULLY.depthM * along(DUG_GULLY, p));
  const weedy = along(WEST_BAY, p) > 0.18 && bed.cover !== 'tall_weed';
  return { ...bed, depthM, cover: weedy ? 'tall_weed' : bed.cover };
}

const POOL_HOLLOW: Ridge = { from: { xM: -18, yM: -6 }, to: { xM: 14, yM: 8 }, halfWidthM: 15, depthM: 0.5 };

/** Ostle Pool's invented bed: a shallow silted bowl, weed round the edge, one hard patch under the willows. */
export function ostlePoolBed(p: Point): Bed | null {
  const shoreM = waterDepthFromShore(OSTLE_POOL, p);
  if (shoreM === null) return null;
  const depthM =
    fromShore(shoreM, 1.45, 6) + (1 - Math.exp(-shoreM / 6)) * POOL_HOLLOW.depthM * along(POOL_HOLLOW, p);
  const hard = Math.hypot(p.xM - 22, p.yM + 14) < 8;
  const cover: Cover = hard ? 'clear' : shoreM > 4 && shoreM < 14 ? 'low_weed' : 'clear';
  return { depthM, substrate: hard ? 'gravel' : 'silt', cover };
}

function waterDepthFromShore(water: DemoWater, p: Point): number | null {
  return insideOutline(water.outline, p) ? distanceToShoreM(water.outline, p) : null;
}
