import { thinLine } from '../geometry/line-thinning';
import { fromPlane, toPlane, type Point } from '../geometry/plane';
import { distanceBetweenM } from '../geometry/point';
import { ringCrossings } from '../geometry/ring-crossings';
import { segmentCrossing } from '../geometry/shore-distance';
import { stationPlace, type ShoreWalk } from './shore-walk';

/** No place of the walk lies farther than this from the line made of it, metres: well below what a phone can tell. */
export const WALK_TOLERANCE_M = 1;
/** A loop no longer than this, metres, is the phone's wandering or a step aside, not a shore. */
const LOOP_M = 20;
/** How much of the end may lie beside the start already walked, metres. */
const OVERLAP_M = 40;

export type WalkedRing = {
  /** Open ring of [lon, lat], to a centimetre. */
  places: [number, number][];
  /** How many small loops were cut off. */
  loops: number;
  /** Length at either end left out because the end of the walk ran beside its start, metres. */
  overlapM: number;
  /** The straight side that closes the ring, metres: nobody walked it. */
  closingM: number;
};

/** A ring made of a walk that came round: its overlap taken off, small loops cut, thinned. Null below three places. */
export function walkedRing({ stations }: Pick<ShoreWalk, 'stations'>): WalkedRing | null {
  const [first] = stations;
  if (!first) return null;
  const origin = stationPlace(first);
  const walked = stations.map((station) => toPlane(origin, stationPlace(station)));
  const { points, overlapM } = withoutOverlap(walked);
  const unlooped = withoutLoops(points);
  const ring = mendedSeam(thinned(unlooped.points));
  const [start] = unlooped.points;
  const end = unlooped.points.at(-1);
  if (ring.length < 3 || !start || !end) return null;
  return {
    places: ring.map((point) => {
      const [lon, lat] = fromPlane(origin, point);
      return [Math.round(lon * 1e7) / 1e7, Math.round(lat * 1e7) / 1e7];
    }),
    loops: unlooped.loops,
    overlapM,
    closingM: distanceBetweenM(start, end),
  };
}

const lengthM = (points: readonly Point[]): number =>
  points.reduce((sum, point, i) => sum + distanceBetweenM(points[i - 1] ?? point, point), 0);

/**
 * Whoever comes round walks a little past their start. Of the places near the start and near the end the two nearest
 * to each other are joined; what lies before the one and after the other was walked twice, and is left out.
 */
function withoutOverlap(points: readonly Point[]): { points: readonly Point[]; overlapM: number } {
  const reachM = Math.min(OVERLAP_M, lengthM(points) / 5);
  const heads = countWithin(points, reachM);
  const tails = countWithin([...points].reverse(), reachM);
  let best = { from: 0, to: points.length - 1, awayM: Infinity };
  for (let from = 0; from < heads; from++) {
    for (let to = points.length - 1; to >= points.length - tails && to > from + 2; to--) {
      const [a, b] = [points[from], points[to]];
      // A longer walk is better than a slightly nearer pair: half a metre nearer for each metre left out.
      const awayM =
        a && b
          ? distanceBetweenM(a, b) + 0.5 * (lengthM(points.slice(0, from + 1)) + lengthM(points.slice(to)))
          : Infinity;
      if (awayM < best.awayM) best = { from, to, awayM };
    }
  }
  const kept = points.slice(best.from, best.to + 1);
  return { points: kept, overlapM: lengthM(points.slice(0, best.from + 1)) + lengthM(points.slice(best.to)) };
}

/** So many points at either end may be given up where the end of a walk crosses or touches its start. */
const SEAM_POINTS = 6;

/** Where the ring's two ends meet they may cross or stand on each other: as few points as will do are left off there. */
function mendedSeam(ring: readonly Point[]): readonly Point[] {
  for (let off = 0; off <= SEAM_POINTS; off++)
    for (let atStart = 0; atStart <= off; atStart++) {
      const kept = ring.slice(atStart, ring.length - (off - atStart));
      if (kept.length < 3) return ring;
      const [start] = kept;
      const end = kept.at(-1);
      const apart = start && end && distanceBetweenM(start, end) > WALK_TOLERANCE_M / 2;
      if (apart && ringCrossings([kept])?.length === 0) return kept;
    }
  return ring; // it crosses itself elsewhere: that is told, with the place, when it is looked at
}

/** How many of the points lie within so many metres of the first, along the line. */
function countWithin(points: readonly Point[], reachM: number): number {
  let soFarM = 0;
  let count = 0;
  for (const [i, point] of points.entries()) {
    soFarM += distanceBetweenM(points[i - 1] ?? point, point);
    if (soFarM > reachM) break;
    count += 1;
  }
  return count;
}

/** Where the line crosses itself within a short way, that way is cut off at the crossing. */
function withoutLoops(points: readonly Point[]): { points: Point[]; loops: number } {
  const kept: Point[] = [];
  let loops = 0;
  for (const point of points) {
    const cut = loopEnd(kept, point);
    if (cut) {
      kept.length = cut.index + 1;
      kept.push(cut.at);
      loops += 1;
    }
    kept.push(point);
  }
  return { points: kept, loops };
}

/** The earlier side that a step to `next` crosses, when the way round from there is short. */
function loopEnd(kept: readonly Point[], next: Point): { index: number; at: Point } | null {
  const last = kept.at(-1);
  if (!last) return null;
  let wayM = distanceBetweenM(last, next);
  for (let index = kept.length - 3; index >= 0 && wayM <= LOOP_M; index--) {
    const [a, b, c] = [kept[index], kept[index + 1], kept[index + 2]];
    if (!a || !b || !c) return null;
    wayM += distanceBetweenM(b, c);
    const share = segmentCrossing([a, b], [last, next]);
    if (share !== null)
      return { index, at: { xM: a.xM + share * (b.xM - a.xM), yM: a.yM + share * (b.yM - a.yM) } };
  }
  return null;
}

function thinned(points: readonly Point[]): Point[] {
  const line = thinLine(
    points.flatMap(({ xM, yM }) => [xM, yM]),
    WALK_TOLERANCE_M,
  );
  return Array.from({ length: line.length / 2 }, (_, i) => ({
    xM: line[2 * i] ?? 0,
    yM: line[2 * i + 1] ?? 0,
  }));
}
