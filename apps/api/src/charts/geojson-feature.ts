import type { Point } from '@mereward/shared/geometry/point';
import { fromPlane, type LonLat } from '@mereward/shared/geometry/plane';
import type { Outline } from '@mereward/shared/geometry/polygon';
import { signedAreaM2 } from '@mereward/shared/geometry/polygon';

export type Position = [number, number];
export type Geometry =
  | { type: 'Point'; coordinates: Position }
  | { type: 'LineString'; coordinates: Position[] }
  | { type: 'MultiLineString'; coordinates: Position[][] }
  | { type: 'Polygon'; coordinates: Position[][] }
  | { type: 'MultiPolygon'; coordinates: Position[][][] };
export type Properties = Record<string, string | number | null>;
export type Feature = { type: 'Feature'; id?: string; geometry: Geometry; properties: Properties };
export type FeatureCollection = { type: 'FeatureCollection'; features: Feature[] };

const DIGITS = 1e7; // a centimetre on the ground

export const rounded = ([lon, lat]: LonLat): Position => [
  Math.round(lon * DIGITS) / DIGITS,
  Math.round(lat * DIGITS) / DIGITS,
];

/** Lays places of a lake's plane on the globe: WGS 84, longitude first. */
export type Place = (xM: number, yM: number) => Position;

export const placing =
  (origin: LonLat): Place =>
  (xM, yM) =>
    rounded(fromPlane(origin, { xM, yM }));

export const pointOf = (coordinates: Position): Geometry => ({ type: 'Point', coordinates });

/** x, y, x, y … as positions, those that fall together to the centimetre said once. */
export function positionsOf(line: ArrayLike<number>, place: Place): Position[] {
  const positions: Position[] = [];
  for (let i = 0; i + 1 < line.length; i += 2) add(positions, place(line[i] ?? 0, line[i + 1] ?? 0));
  return positions;
}

function add(positions: Position[], next: Position): void {
  const last = positions.at(-1);
  if (last?.[0] !== next[0] || last[1] !== next[1]) positions.push(next);
}

/** A ring as RFC 7946 has it: closed, counter-clockwise round what it holds and clockwise round a hole. */
function ringOf(ring: readonly Point[], place: Place, hole: boolean): Position[] {
  const turned = signedAreaM2(ring) > 0 === hole ? [...ring].reverse() : ring;
  const positions: Position[] = [];
  for (const { xM, yM } of turned) add(positions, place(xM, yM));
  const first = positions[0];
  if (first) add(positions, first);
  return positions;
}

const LEAST_RING = 4; // three corners, and the first again

/** Polygons of the plane as one geometry; what is left of them at a centimetre. Null when nothing is. */
export function polygonsGeometry(polygons: readonly Outline[], place: Place): Geometry | null {
  const coordinates = polygons.flatMap(({ shore, islands }) => {
    const outer = ringOf(shore, place, false);
    const holes = islands
      .map((ring) => ringOf(ring, place, true))
      .filter(({ length }) => length >= LEAST_RING);
    return outer.length >= LEAST_RING ? [[outer, ...holes]] : [];
  });
  const [only] = coordinates;
  if (!only) return null;
  return coordinates.length === 1
    ? { type: 'Polygon', coordinates: only }
    : { type: 'MultiPolygon', coordinates };
}
