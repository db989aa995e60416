import geodesic from 'geographiclib-geodesic';
import { normaliseBearing } from './bearing';

export { bearingDifferenceDeg, normaliseBearing } from './bearing';

/** A place on the WGS 84 ellipsoid in RFC 7946 order, degrees: longitude −180…180, latitude −90…90. */
export type LonLat = readonly [lon: number, lat: number];

const wgs84 = geodesic.Geodesic.WGS84;

/**
 * Geodesic from one place to another: distance in metres and true bearing at the start, degrees clockwise
 * from north. At coincident places the bearing is 0 by convention.
 * Source: Karney, Algorithms for geodesics, J. Geodesy 87, 2013 (good to 15 nm).
 */
export function geodesicBetween(from: LonLat, to: LonLat): { distanceM: number; bearingDeg: number } {
  const answer = wgs84.Inverse(from[1], from[0], to[1], to[0]);
  const distanceM = answer.s12 ?? Number.NaN;
  return { distanceM, bearingDeg: distanceM === 0 ? 0 : normaliseBearing(answer.azi1 ?? Number.NaN) };
}

/** The place reached by going `distanceM` metres along the geodesic that starts at `bearingDeg` true. */
export function geodesicAlong(from: LonLat, bearingDeg: number, distanceM: number): LonLat {
  const answer = wgs84.Direct(from[1], from[0], bearingDeg, distanceM);
  return [answer.lon2 ?? Number.NaN, answer.lat2 ?? Number.NaN];
}

/**
 * Signed area (m², positive when the ring runs counter-clockwise) and perimeter (m) of a geodesic polygon.
 * The ring may be open or closed. Source: Karney 2013, section 6.
 */
export function geodesicRing(ring: readonly LonLat[]): { areaM2: number; perimeterM: number } {
  const polygon = wgs84.Polygon(false);
  for (const [lon, lat] of openRing(ring)) polygon.AddPoint(lat, lon);
  const answer = polygon.Compute(false, true);
  return { areaM2: answer.area ?? 0, perimeterM: answer.perimeter };
}

/** Area of water in m²: the first ring (shore) less every later ring (islands), whatever way they run. */
export function geodesicAreaM2(rings: readonly (readonly LonLat[])[]): number {
  return rings.reduce((sum, ring, index) => {
    const areaM2 = Math.abs(geodesicRing(ring).areaM2);
    return index === 0 ? areaM2 : sum - areaM2;
  }, 0);
}

/** The ring without a last position that repeats the first. */
export function openRing(ring: readonly LonLat[]): readonly LonLat[] {
  const first = ring[0];
  const last = ring[ring.length - 1];
  const closed = ring.length > 1 && first && last && first[0] === last[0] && first[1] === last[1];
  return closed ? ring.slice(0, -1) : ring;
}
