import { geodesicAlong, geodesicBetween, normaliseBearing, type LonLat } from './geodesic';

export type { LonLat } from './geodesic';
export { geodesicAreaM2 } from './geodesic';

/** A point in a lake's own plane: metres east and north of the lake's origin. */
export type Point = { xM: number; yM: number };

const RADIANS = Math.PI / 180;

/**
 * A place in the lake's plane: azimuthal equidistant at `origin`, so the distance and the true bearing from
 * the origin are exact, and lengths between points within 1 km of it are good to 5 mm (in fact to microns).
 */
export function toPlane(origin: LonLat, place: LonLat): Point {
  const { distanceM, bearingDeg } = geodesicBetween(origin, place);
  return { xM: distanceM * Math.sin(bearingDeg * RADIANS), yM: distanceM * Math.cos(bearingDeg * RADIANS) };
}

/** The place of a point of the lake's plane; the exact inverse of `toPlane`. */
export function fromPlane(origin: LonLat, point: Point): LonLat {
  const distanceM = Math.hypot(point.xM, point.yM);
  return geodesicAlong(origin, Math.atan2(point.xM, point.yM) / RADIANS, distanceM);
}

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
