import { distanceBetweenM, pointAlong, type Point } from './point';
import { insideOutline, ringsOf, sidesOf, type Outline } from './polygon';

/** The point of the segment a–b nearest to p. */
export function nearestOnSegment(p: Point, a: Point, b: Point): Point {
  const dxM = b.xM - a.xM;
  const dyM = b.yM - a.yM;
  const lengthSquared = dxM * dxM + dyM * dyM;
  if (lengthSquared === 0) return a;
  const share = ((p.xM - a.xM) * dxM + (p.yM - a.yM) * dyM) / lengthSquared;
  const t = Math.min(1, Math.max(0, share));
  return { xM: a.xM + t * dxM, yM: a.yM + t * dyM };
}

/** The nearest point of any shoreline, islands' too, and its distance in metres (never negative). */
export function nearestShore(outline: Outline, p: Point): { point: Point; distanceM: number } {
  let point: Point = p;
  let distanceM = Infinity;
  for (const ring of ringsOf(outline)) {
    for (const [a, b] of sidesOf(ring)) {
      const candidate = nearestOnSegment(p, a, b);
      const candidateM = distanceBetweenM(p, candidate);
      if (candidateM < distanceM) {
        point = candidate;
        distanceM = candidateM;
      }
    }
  }
  return { point, distanceM };
}

/** Distance in metres from the point to the nearest shoreline, on water or on land; Infinity without a shore. */
export function distanceToShoreM(outline: Outline, p: Point): number {
  return nearestShore(outline, p).distanceM;
}

/**
 * Where along a–b the segment c–d is met, as a share 0…1 of a–b, or null when they don't meet. Touching counts.
 * Parallel segments that overlap report the nearer end of the overlap.
 */
export function segmentCrossing(ab: readonly [Point, Point], cd: readonly [Point, Point]): number | null {
  const [a, b] = ab;
  const [c, d] = cd;
  const rx = b.xM - a.xM;
  const ry = b.yM - a.yM;
  const sx = d.xM - c.xM;
  const sy = d.yM - c.yM;
  const cross = rx * sy - ry * sx;
  const qx = c.xM - a.xM;
  const qy = c.yM - a.yM;
  if (cross === 0) return overlapStart({ qx, qy, rx, ry, sx, sy });
  const t = (qx * sy - qy * sx) / cross;
  const u = (qx * ry - qy * rx) / cross;
  return t >= 0 && t <= 1 && u >= 0 && u <= 1 ? t : null;
}

type Parallel = { qx: number; qy: number; rx: number; ry: number; sx: number; sy: number };

function overlapStart({ qx, qy, rx, ry, sx, sy }: Parallel): number | null {
  const lengthSquared = rx * rx + ry * ry;
  if (lengthSquared === 0 || qx * ry - qy * rx !== 0) return null;
  const t0 = (qx * rx + qy * ry) / lengthSquared;
  const t1 = t0 + (sx * rx + sy * ry) / lengthSquared;
  const from = Math.max(0, Math.min(t0, t1));
  return from <= Math.min(1, Math.max(t0, t1)) ? from : null;
}

/** Every place where the segment a–b meets a shoreline, as rising shares of a–b; a corner is told once. */
export function shoreCrossings(outline: Outline, a: Point, b: Point): number[] {
  const shares: number[] = [];
  for (const ring of ringsOf(outline)) {
    for (const side of sidesOf(ring)) {
      const share = segmentCrossing([a, b], side);
      if (share !== null) shares.push(share);
    }
  }
  return shares.sort((x, y) => x - y).filter((share, i) => i === 0 || share - (shares[i - 1] ?? 0) > 1e-12);
}

/**
 * How far a straight line from `start` along a plane bearing runs over water before it meets land, metres, at
 * most `limitM`. A stance stands on the bank, so the line may first cross a strip of land up to `marginM` wide
 * (default 5 m); null when it finds no water within that.
 */
export function waterRunM(
  outline: Outline,
  start: Point,
  ray: { bearingDeg: number; limitM: number; marginM?: number },
): { entersAtM: number; leavesAtM: number } | null {
  const marginM = ray.marginM ?? 5;
  const end = pointAlong(start, ray.bearingDeg, ray.limitM);
  const crossingsM = [0, ...shoreCrossings(outline, start, end).map((t) => t * ray.limitM), ray.limitM];
  let entersAtM: number | null = null;
  for (let i = 0; i + 1 < crossingsM.length; i++) {
    const fromM = crossingsM[i] ?? 0;
    const toM = crossingsM[i + 1] ?? fromM;
    if (toM - fromM < 1e-9) continue;
    const wet = insideOutline(outline, pointAlong(start, ray.bearingDeg, (fromM + toM) / 2));
    if (wet && entersAtM === null) entersAtM = fromM;
    if (!wet && entersAtM !== null) return { entersAtM, leavesAtM: fromM };
    if (!wet && toM > marginM) return null;
  }
  return entersAtM === null ? null : { entersAtM, leavesAtM: ray.limitM };
}
