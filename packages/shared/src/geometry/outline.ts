import { geodesicRing, openRing, type LonLat } from './geodesic';
import { geoJsonPolygons } from './geojson-polygons';
import { finding, isRefused, type OutlineFinding } from './outline-finding';
import { checkRings, type RingsChecked } from './outline-rings';
import { fromPlane, toPlane } from './plane';
import { ringsOf, signedAreaM2, type Outline } from './polygon';

/** RFC 7946 Polygon: closed rings of [lon, lat], shore first (counter-clockwise), then islands (clockwise). */
export type OutlinePolygon = { type: 'Polygon'; coordinates: [number, number][][] };

/** A lake's outline as read: null when anything was refused, with everything found said in words. */
export type OutlineReading = {
  outline: OutlinePolygon | null;
  areaM2: number | null;
  findings: OutlineFinding[];
};

/** Reads the text of a GeoJSON file. */
export function outlineFromText(text: string): OutlineReading {
  const marked = text.charCodeAt(0) === 0xfeff;
  const findings = marked
    ? [finding(['mended', 'byte-order-mark'], 'The file began with a byte order mark, which is skipped')]
    : [];
  const json = marked ? text.slice(1) : text;
  let value: unknown;
  try {
    value = JSON.parse(json);
  } catch {
    return reading(null, [...findings, notJson(json)]);
  }
  const read = outlineFromGeoJson(value);
  return { ...read, findings: [...findings, ...read.findings] };
}

/**
 * Reads a GeoJSON Polygon, MultiPolygon, Feature or collection into one lake's outline. Of several waters the
 * largest is taken and the others named; a closed line stands in for a polygon when there is none.
 */
export function outlineFromGeoJson(value: unknown): OutlineReading {
  const { polygons, lines, findings } = geoJsonPolygons(value);
  const shores = polygons.length > 0 ? polygons : closedLines(lines).map((line) => [line]);
  if (polygons.length === 0 && shores.length > 0) {
    findings.push(finding(['mended', 'line-as-shore'], 'A closed line is read as the shore'));
  }
  if (polygons.length > 0 && lines.length > 0) {
    findings.push(
      finding(['noted', 'left-out'], `Not part of an outline, so left out: ${lines.length} × line`),
    );
  }
  if (shores.length === 0) {
    const words =
      'There is no polygon in the file, so no outline; draw the shore as a polygon and export it again';
    findings.push(finding(['refused', 'no-polygon'], words));
  }
  if (isRefused(findings)) return reading(null, findings);
  return reading(checkRings(largest(shores, findings)), findings);
}

/** Checks rings of [lon, lat] that came some other way (a track, a drawing), shore first, with the same findings. */
export function outlineFromRings(rings: readonly (readonly LonLat[])[]): OutlineReading {
  if (rings.length > 0) return reading(checkRings(rings), []);
  return reading(null, [finding(['refused', 'no-polygon'], 'There is no ring of positions, so no outline')]);
}

/** A middle for the lake's own plane: the middle of the shore's box, to 7 decimals (a centimetre). */
export function originOf(outline: OutlinePolygon): LonLat {
  const shore = outline.coordinates[0] ?? [];
  const start = shore[0] ?? [0, 0];
  const points = shore.map((place) => toPlane(start, place));
  const middle = (values: number[]): number => (Math.min(...values) + Math.max(...values)) / 2;
  const [lon, lat] = fromPlane(start, {
    xM: middle(points.map((p) => p.xM)),
    yM: middle(points.map((p) => p.yM)),
  });
  return [Math.round(lon * 1e7) / 1e7, Math.round(lat * 1e7) / 1e7];
}

/** The outline in the plane of `origin`: open rings, shore counter-clockwise, islands clockwise. */
export function outlineInPlane(
  origin: LonLat,
  outline: { coordinates: readonly (readonly LonLat[])[] },
): Outline {
  const [shore = [], ...islands] = outline.coordinates.map((ring, index) => {
    const points = openRing(ring).map((place) => toPlane(origin, place));
    return signedAreaM2(points) > 0 === (index === 0) ? points : points.reverse();
  });
  return { shore, islands };
}

/** The reverse: RFC 7946 Polygon of an outline in the plane of `origin`. */
export function outlineToGeoJson(origin: LonLat, outline: Outline): OutlinePolygon {
  const coordinates = ringsOf(outline).map((ring) => {
    const places = ring.map((point): [number, number] => {
      const [lon, lat] = fromPlane(origin, point);
      return [lon, lat];
    });
    const first = places[0];
    return first ? [...places, first] : places;
  });
  return { type: 'Polygon', coordinates };
}

function reading(checked: RingsChecked | null, before: OutlineFinding[]): OutlineReading {
  if (!checked) return { outline: null, areaM2: null, findings: before };
  const coordinates = checked.rings?.map((ring) => ring.map(([lon, lat]): [number, number] => [lon, lat]));
  const outline = coordinates ? ({ type: 'Polygon', coordinates } as const) : null;
  return { outline, areaM2: checked.areaM2, findings: [...before, ...checked.findings] };
}

function closedLines(lines: readonly LonLat[][]): LonLat[][] {
  return lines.filter((line) => line.length >= 4 && openRing(line).length < line.length);
}

function largest(shores: LonLat[][][], findings: OutlineFinding[]): LonLat[][] {
  const bySize = shores
    .map((rings) => ({ rings, areaM2: Math.abs(geodesicRing(rings[0] ?? []).areaM2) }))
    .sort((a, b) => b.areaM2 - a.areaM2);
  const [taken, ...others] = bySize;
  if (taken && others.length > 0) {
    const rest = others.map(({ areaM2 }) => `${(areaM2 / 10_000).toFixed(2)} ha`).join(', ');
    const words = `The file holds ${bySize.length} separate waters; the largest (${(taken.areaM2 / 10_000).toFixed(2)} ha) is taken, left out: ${rest}. Make each of them a lake of its own`;
    findings.push(finding(['noted', 'several-waters'], words));
  }
  return taken?.rings ?? [];
}

function notJson(text: string): OutlineFinding {
  const cause = firstCause(text);
  if (!cause) {
    const words = text.trim() === '' ? 'The file is empty' : 'The file is not JSON, or is cut short';
    return finding(['refused', 'not-json'], `${words}; export it again as GeoJSON`);
  }
  const before = text.slice(0, cause.index);
  const line = before.split('\n').length;
  const column = cause.index - before.lastIndexOf('\n');
  const words = `The file is not JSON: ${cause.words} at line ${line}, column ${column}; export it again as GeoJSON`;
  return finding(['refused', 'not-json'], words);
}

function firstCause(text: string): { index: number; words: string } | null {
  const causes = [
    { pattern: /\b(NaN|-?Infinity)\b/, words: 'a value that is not a number' },
    { pattern: /,\s*[\]}]/, words: 'a comma with nothing after it' },
    { pattern: /^\s*</, words: 'it looks like XML (perhaps GPX or KML)' },
  ];
  for (const { pattern, words } of causes) {
    const match = pattern.exec(text);
    if (match) return { index: match.index, words };
  }
  return null;
}
