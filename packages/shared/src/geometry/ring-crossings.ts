import { distanceBetweenM, type Point } from './point';
import { segmentCrossing, nearestOnSegment } from './shore-distance';

type Side = { a: Point; b: Point; ring: number; index: number; sides: number; minXM: number; maxXM: number };

/** Two sides that meet where they must not: which rings they belong to and where. */
export type Crossing = { rings: readonly [number, number]; at: Point };

/** Sides nearer than this to one another are taken to touch: far below what any survey or tracing can tell. */
const TOUCH_M = 1e-6;

/**
 * Pairs of sides looked at before giving up. A traced shore of the most positions needs about three million; a line
 * that runs to and fro needs as many as its positions squared, and would hold up everybody else for a minute.
 */
const MOST_PAIRS = 6e6;

/**
 * The first places where rings cross or touch themselves or one another, at most one for each pair of rings.
 * Rings are open, metres. Sides are swept from west to east, so a traced shore of n points costs about n·√n. Null when
 * the rings run to and fro so much that finding out would take too long.
 */
export function ringCrossings(rings: readonly (readonly Point[])[]): Crossing[] | null {
  const found = new Map<string, Crossing>();
  const open: Side[] = [];
  let pairs = 0;
  for (const side of sidesFromWest(rings)) {
    let kept = 0;
    pairs += open.length;
    if (pairs > MOST_PAIRS) return null;
    for (const other of open) {
      if (other.maxXM < side.minXM - TOUCH_M) continue;
      open[kept++] = other;
      const pair = `${other.ring}-${side.ring}`;
      if (found.has(pair)) continue;
      const at = meeting(other, side);
      if (at) found.set(pair, { rings: [other.ring, side.ring], at });
    }
    open.length = kept;
    open.push(side);
  }
  return [...found.values()];
}

function sidesFromWest(rings: readonly (readonly Point[])[]): Side[] {
  const sides: Side[] = [];
  rings.forEach((points, ring) => {
    points.forEach((a, index) => {
      const b = points[(index + 1) % points.length] ?? a;
      const minXM = Math.min(a.xM, b.xM);
      sides.push({ a, b, ring, index, sides: points.length, minXM, maxXM: Math.max(a.xM, b.xM) });
    });
  });
  return sides.sort((p, q) => p.minXM - q.minXM);
}

function meeting(p: Side, q: Side): Point | null {
  if (Math.max(p.a.yM, p.b.yM) < Math.min(q.a.yM, q.b.yM) - TOUCH_M) return null;
  if (Math.max(q.a.yM, q.b.yM) < Math.min(p.a.yM, p.b.yM) - TOUCH_M) return null;
  if (p.ring === q.ring) {
    if ((p.index + 1) % p.sides === q.index) return foldBack(p, q);
    if ((q.index + 1) % q.sides === p.index) return foldBack(q, p);
  }
  const share = segmentCrossing([p.a, p.b], [q.a, q.b]);
  if (share !== null)
    return { xM: p.a.xM + share * (p.b.xM - p.a.xM), yM: p.a.yM + share * (p.b.yM - p.a.yM) };
  return [q.a, q.b].find((end) => near(end, p)) ?? [p.a, p.b].find((end) => near(end, q)) ?? null;
}

function near(point: Point, side: Side): boolean {
  return distanceBetweenM(point, nearestOnSegment(point, side.a, side.b)) < TOUCH_M;
}

/** Neighbouring sides share a corner; they only clash when the second runs straight back over the first. */
function foldBack(first: Side, second: Side): Point | null {
  const back = near(second.b, first) || near(first.a, second);
  return back && first.sides > 2 ? second.b : null;
}
