import { normaliseBearing } from './bearing';

/** A point in a lake's own plane: metres east and north of the lake's origin. */
export type Point = { xM: number; yM: number };

const RADIANS = Math.PI / 180;

/** Straight distance in the plane, metres. */
export function distanceBetweenM(a: Point, b: Point): number {
  return Math.hypot(b.xM - a.xM, b.yM - a.yM);
}

/**
 * Plane (grid) bearing from `a` to `b`, degrees clockwise from the plane's north, 0 ≤ answer < 360. Away from
 * the origin the plane's north is off true north by the meridian convergence (0.006° at 500 m in England): use
 * `geodesicBetween` where a true bearing is meant.
 */
export function planeBearingDeg(a: Point, b: Point): number {
  return normaliseBearing(Math.atan2(b.xM - a.xM, b.yM - a.yM) / RADIANS);
}

/** The point `distanceM` metres from `start` along a plane bearing in degrees. */
export function pointAlong(start: Point, bearingDeg: number, distanceM: number): Point {
  return {
    xM: start.xM + distanceM * Math.sin(bearingDeg * RADIANS),
    yM: start.yM + distanceM * Math.cos(bearingDeg * RADIANS),
  };
}
