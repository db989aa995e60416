import type { LonLat } from './geodesic';
import { finding, type OutlineFinding } from './outline-finding';
import { outOfRange } from './outline-rings';

/** Polygons (rings of [lon, lat], shore first) found in a GeoJSON value, and what was found on the way. */
export type GeoJsonPolygons = { polygons: LonLat[][][]; lines: LonLat[][]; findings: OutlineFinding[] };

const TYPES = [
  'Point',
  'MultiPoint',
  'LineString',
  'MultiLineString',
  'Polygon',
  'MultiPolygon',
  'GeometryCollection',
  'Feature',
  'FeatureCollection',
];

const DEEPEST = 20;

type Found = GeoJsonPolygons & { leftOut: Map<string, number>; deep: number };

/** Walks any GeoJSON value (RFC 7946) and gathers its polygons. Reads everything, decides nothing about shape. */
export function geoJsonPolygons(value: unknown): GeoJsonPolygons {
  const found: Found = { polygons: [], lines: [], findings: [], leftOut: new Map(), deep: 0 };
  walk(value, found);
  const left = [...found.leftOut].map(([what, times]) => `${times} × ${what}`);
  if (left.length > 0) {
    found.findings.push(
      finding(['noted', 'left-out'], `Not part of an outline, so left out: ${left.join(', ')}`),
    );
  }
  return { polygons: found.polygons, lines: found.lines, findings: found.findings };
}

function walk(value: unknown, found: Found): void {
  if (!isRecord(value)) {
    const words =
      'The file holds no GeoJSON object where one belongs; it should start with a type such as "Feature"';
    found.findings.push(finding(['refused', 'wrong-type'], words));
    return;
  }
  if (found.deep >= DEEPEST) {
    found.findings.push(finding(['refused', 'wrong-type'], `Objects are nested more than ${DEEPEST} deep`));
    return;
  }
  found.deep++;
  frame(value['crs'], found);
  member(value, found);
  found.deep--;
}

function member(value: Record<string, unknown>, found: Found): void {
  const type = value['type'];
  if (type === 'FeatureCollection') walkEach(value['features'], 'features', found);
  else if (type === 'GeometryCollection') walkEach(value['geometries'], 'geometries', found);
  else if (type === 'Feature') feature(value, found);
  else geometry(type, value['coordinates'], found);
}

function walkEach(members: unknown, name: string, found: Found): void {
  if (!Array.isArray(members)) {
    found.findings.push(finding(['refused', 'wrong-type'], `"${name}" should be a list`));
    return;
  }
  for (const member of members) walk(member, found);
}

function feature(value: Record<string, unknown>, found: Found): void {
  if (!('properties' in value)) {
    const words =
      'A feature has no "properties", which GeoJSON asks for; it is read as if it had none to tell';
    found.findings.push(finding(['mended', 'missing-properties'], words));
  }
  const shape = value['geometry'];
  if (shape === null) count('feature without a place', found);
  else walk(shape, found);
}

function geometry(type: unknown, coordinates: unknown, found: Found): void {
  if (type === 'Polygon') keepPolygon(coordinates, found);
  else if (type === 'MultiPolygon') each(coordinates, found, (part) => keepPolygon(part, found));
  else if (type === 'LineString') keepLine(coordinates, found);
  else if (type === 'MultiLineString') each(coordinates, found, (part) => keepLine(part, found));
  else if (type === 'Point') keepPoint(coordinates, found);
  else if (type === 'MultiPoint') each(coordinates, found, (part) => keepPoint(part, found));
  else found.findings.push(wrongType(type));
}

function wrongType(type: unknown): OutlineFinding {
  const meant = TYPES.find((known) => typeof type === 'string' && known.toLowerCase() === type.toLowerCase());
  const said = typeof type === 'string' ? `"${type.slice(0, 40)}"` : 'nothing';
  const hint = meant ? `write "${meant}": capitals count` : `it should be one of ${TYPES.join(', ')}`;
  return finding(['refused', 'wrong-type'], `A part says its type is ${said}; ${hint}`);
}

function keepPolygon(coordinates: unknown, found: Found): void {
  const rings: LonLat[][] = [];
  each(coordinates, found, (ring) => {
    const places = positions(ring, found);
    if (places) rings.push(places);
  });
  if (rings.length > 0) found.polygons.push(rings);
}

function keepLine(coordinates: unknown, found: Found): void {
  const places = positions(coordinates, found);
  if (places) found.lines.push(places);
}

function keepPoint(coordinates: unknown, found: Found): void {
  if (position(coordinates, found)) count('point', found);
}

function each(list: unknown, found: Found, keep: (part: unknown) => void): void {
  if (Array.isArray(list)) list.forEach(keep);
  else
    found.findings.push(finding(['refused', 'bad-position'], '"coordinates" should be a list of positions'));
}

function positions(list: unknown, found: Found): LonLat[] | null {
  if (!Array.isArray(list)) {
    each(list, found, () => undefined);
    return null;
  }
  const places: LonLat[] = [];
  for (const part of list) {
    const place = position(part, found);
    if (!place) return null; // one word for a whole bad ring is enough
    places.push(place);
  }
  return places;
}

/** [lon, lat] or [lon, lat, height]; the height is not wanted here. */
function position(value: unknown, found: Found): LonLat | null {
  if (!Array.isArray(value) || value.length < 2) {
    const said = JSON.stringify(value)?.slice(0, 60) ?? 'nothing';
    const words = `A position should be two numbers, longitude then latitude, but is ${said}`;
    found.findings.push(finding(['refused', 'bad-position'], words));
    return null;
  }
  const [lon, lat]: unknown[] = value;
  if (typeof lon !== 'number' || typeof lat !== 'number') {
    const said = JSON.stringify(value).slice(0, 60);
    const words = `A position should be two numbers, but is ${said}: take the quotation marks off`;
    found.findings.push(finding(['refused', 'bad-position'], words));
    return null;
  }
  if (Math.abs(lon) <= 180 && Math.abs(lat) <= 90) return [lon, lat];
  found.findings.push(outOfRange([lon, lat], 'The file'));
  return null;
}

/** RFC 7946 dropped the "crs" member: everything is WGS 84. A file that names another frame must not be used. */
function frame(crs: unknown, found: Found): void {
  if (crs === undefined || crs === null) return;
  const properties = isRecord(crs) ? crs['properties'] : null;
  const name =
    isRecord(properties) && typeof properties['name'] === 'string' ? properties['name'] : 'unknown';
  if (/CRS:?84|EPSG:+(\d[\d.]*:)?4326$/i.test(name)) {
    found.findings.push(
      finding(['noted', 'named-frame'], `The file names its frame (${name}), which is WGS 84`),
    );
    return;
  }
  const words = `The file says its coordinates are in "${name.slice(0, 60)}", not WGS 84; export it again as WGS 84 longitude and latitude`;
  found.findings.push(finding(['refused', 'foreign-frame'], words));
}

function count(what: string, found: Found): void {
  found.leftOut.set(what, (found.leftOut.get(what) ?? 0) + 1);
}

function isRecord(value: unknown): value is Record<string, unknown> {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}
