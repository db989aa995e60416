import type { ChartView } from '@mereward/shared/charts/contract';
import { fromPlane, type LonLat } from '@mereward/shared/geometry/plane';

type Position = [number, number];
type Geometry =
  | { type: 'Point'; coordinates: Position }
  | { type: 'MultiLineString'; coordinates: Position[][] }
  | { type: 'Polygon'; coordinates: Position[][] };
export type Feature = {
  type: 'Feature';
  id?: string;
  geometry: Geometry;
  properties: Record<string, string | number | null>;
};
export type FeatureCollection = { type: 'FeatureCollection'; features: Feature[] };

const DIGITS = 1e7; // a centimetre on the ground

const rounded = ([lon, lat]: LonLat): Position => [
  Math.round(lon * DIGITS) / DIGITS,
  Math.round(lat * DIGITS) / DIGITS,
];

/** A chart as RFC 7946 GeoJSON, made of what the reader's own view of it holds and of nothing else. */
export function chartGeojson(view: ChartView): FeatureCollection {
  const place = (xM: number, yM: number): Position => rounded(fromPlane(view.origin, { xM, yM }));
  const stated = {
    chart: view.version,
    status: view.status,
    datum_m: view.datumM,
    surveyed_from: view.surveyedFrom,
    surveyed_to: view.surveyedTo,
  };
  const lake: Feature = {
    type: 'Feature',
    id: view.lakeId,
    geometry: { type: 'Polygon', coordinates: view.outline.coordinates.map((ring) => ring.map(rounded)) },
    properties: { kind: 'lake', name: view.lakeName, fishery: view.fisheryName, caution: CAUTION, ...stated },
  };
  const pegs = view.pegs.map(({ id, number, name, xM, yM, facingDeg }): Feature => ({
    type: 'Feature',
    id,
    geometry: { type: 'Point', coordinates: place(xM, yM) },
    properties: { kind: 'peg', number, name, facing_deg: Math.round(facingDeg) },
  }));
  const marks = view.marks.map(({ id, code, name, xM, yM }): Feature => ({
    type: 'Feature',
    id,
    geometry: { type: 'Point', coordinates: place(xM, yM) },
    properties: { kind: 'marker', code, name },
  }));
  return {
    type: 'FeatureCollection',
    features: [
      lake,
      ...pegs,
      ...marks,
      ...contours(view, place),
      ...soundings(view, place),
      ...bottomPoints(view, place),
    ],
  };
}

const CAUTION =
  'Depths from casting, below the stated datum. They change. Not for boating, wading, swimming or diving.';

type Place = (xM: number, yM: number) => Position;

function contours({ isobaths, version }: ChartView, place: Place): Feature[] {
  return (isobaths ?? []).map(({ levelM, lines }) => ({
    type: 'Feature',
    geometry: { type: 'MultiLineString', coordinates: lines.map((line) => pairs(line, place)) },
    properties: { kind: 'contour', depth_at_datum_m: levelM, chart: version },
  }));
}

function pairs(line: readonly number[], place: Place): Position[] {
  return Array.from({ length: Math.floor(line.length / 2) }, (_, i) =>
    place(line[2 * i] ?? 0, line[2 * i + 1] ?? 0),
  );
}

/** Casts that read no depth: the same kind of feature, its depth null. */
function bottomPoints({ bottomPoints: felt, version }: ChartView, place: Place): Feature[] {
  return (felt ?? []).map(({ id, xM, yM, bottom, grade }) => ({
    type: 'Feature',
    id,
    geometry: { type: 'Point', coordinates: place(xM, yM) },
    properties: { kind: 'cast', depth_at_datum_m: null, sigma_m: null, bottom, grade, chart: version },
  }));
}

function soundings({ soundings: seen, version }: ChartView, place: Place): Feature[] {
  return (seen ?? []).map(({ id, xM, yM, depthM, sigmaM, bottom, grade, ofLog }) => ({
    type: 'Feature',
    id,
    geometry: { type: 'Point', coordinates: place(xM, yM) },
    properties: {
      kind: ofLog ? 'sounding' : 'cast',
      ...{ depth_at_datum_m: depthM, sigma_m: sigmaM, bottom, grade, chart: version },
    },
  }));
}
