import { geodesicAlong, geodesicBetween, type LonLat } from './geodesic';
import type { Point } from './point';

export type { LonLat } from './geodesic';
export { geodesicAreaM2 } from './geodesic';
export { distanceBetweenM, planeBearingDeg, pointAlong, type Point } from './point';

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
