import type { Point } from './point';

/**
 * A lake's water in its own plane. Rings are open (the last point is not the first again); the shore runs
 * counter-clockwise and islands clockwise, as RFC 7946 asks of a polygon.
 */
export type Outline = { shore: Point[]; islands: Point[][] };

/** The shore and then each island. */
export function ringsOf(outline: Outline): Point[][] {
  return [outline.shore, ...outline.islands];
}

/** The sides of an open ring, the closing one last. */
export function* sidesOf(ring: readonly Point[]): Generator<readonly [Point, Point]> {
  for (let i = 0; i < ring.length; i++) {
    const a = ring[i];
    const b = ring[(i + 1) % ring.length];
    if (a && b) yield [a, b];
  }
}

/**
 * Signed area of a ring, m², positive when counter-clockwise. Shoelace about the first point, so that a lake far
 * from its origin loses no digits.
 */
export function signedAreaM2(ring: readonly Point[]): number {
  const first = ring[0];
  if (!first) return 0;
  let twice = 0;
  for (const [a, b] of sidesOf(ring)) {
    twice += (a.xM - first.xM) * (b.yM - first.yM) - (b.xM - first.xM) * (a.yM - first.yM);
  }
  return twice / 2;
}

/** Water area, m²: inside the shore less the islands. */
export function outlineAreaM2(outline: Outline): number {
  const islandsM2 = outline.islands.reduce((sum, ring) => sum + Math.abs(signedAreaM2(ring)), 0);
  return Math.abs(signedAreaM2(outline.shore)) - islandsM2;
}

/** Length once round a ring, metres. */
export function ringLengthM(ring: readonly Point[]): number {
  let lengthM = 0;
  for (const [a, b] of sidesOf(ring)) lengthM += Math.hypot(b.xM - a.xM, b.yM - a.yM);
  return lengthM;
}

/** Length of all shorelines, islands' too, metres. */
export function perimeterM(outline: Outline): number {
  return ringsOf(outline).reduce((sum, ring) => sum + ringLengthM(ring), 0);
}

/** Is the point inside the ring? Even-odd by a ray eastward; a point on the edge may fall either way. */
export function insideRing(ring: readonly Point[], p: Point): boolean {
  let inside = false;
  let b = ring[ring.length - 1];
  for (const a of ring) {
    if (b && a.yM > p.yM !== b.yM > p.yM) {
      const crossingX = a.xM + ((p.yM - a.yM) / (b.yM - a.yM)) * (b.xM - a.xM);
      if (p.xM < crossingX) inside = !inside;
    }
    b = a;
  }
  return inside;
}

/** Is the point on the water: inside the shore and on no island? */
export function insideOutline(outline: Outline, p: Point): boolean {
  return insideRing(outline.shore, p) && !outline.islands.some((island) => insideRing(island, p));
}

/** The smallest box round the shore, metres. */
export function boundsOf(outline: Outline): { minXM: number; minYM: number; maxXM: number; maxYM: number } {
  const bounds = { minXM: Infinity, minYM: Infinity, maxXM: -Infinity, maxYM: -Infinity };
  for (const { xM, yM } of outline.shore) {
    bounds.minXM = Math.min(bounds.minXM, xM);
    bounds.minYM = Math.min(bounds.minYM, yM);
    bounds.maxXM = Math.max(bounds.maxXM, xM);
    bounds.maxYM = Math.max(bounds.maxYM, yM);
  }
  return bounds;
}
