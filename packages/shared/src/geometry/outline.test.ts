import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { LonLat } from './geodesic';
import {
  outlineFromGeoJson,
  outlineFromRings,
  outlineFromText,
  outlineInPlane,
  outlineToGeoJson,
  originOf,
} from './outline';
import { fromPlane } from './plane';

const ORIGIN: LonLat = [-1.1427, 52.3651];
const ring = (...corners: [number, number][]): LonLat[] =>
  corners.map(([xM, yM]) => fromPlane(ORIGIN, { xM, yM }));
const closed = (places: LonLat[]): LonLat[] => [...places, places[0] ?? ORIGIN];
const SHORE = closed(ring([0, 0], [100, 0], [100, 100], [0, 100]));
const island = (x: number, y: number, side = 10): LonLat[] =>
  closed(ring([x, y], [x, y + side], [x + side, y + side], [x + side, y]));
const codes = (reading: { findings: { kind: string; code: string }[] }) =>
  reading.findings.map(({ kind, code }) => `${kind} ${code}`);

describe('rings of positions', () => {
  test('a good shore with an island needs no mending', () => {
    const { outline, areaM2, findings } = outlineFromRings([SHORE, island(40, 40)]);
    expect(findings).toEqual([]);
    expect(areaM2).toBeCloseTo(9900, 3);
    expect(outline?.coordinates.map((each) => each.length)).toEqual([5, 5]);
  });

  test('a repeated position is dropped, an open ring closed and a wrong turn turned, each said', () => {
    const [first = ORIGIN, ...rest] = [...SHORE.slice(0, -1)].reverse();
    const reading = outlineFromRings([[first, first, ...rest]]);
    expect(codes(reading).sort()).toEqual(['mended repeated', 'mended turned', 'mended unclosed']);
    expect(reading.areaM2).toBeCloseTo(10_000, 3);
    const again = outlineFromRings(reading.outline?.coordinates ?? []);
    expect(again.findings).toEqual([]);
  });

  test.each([
    ['an island across the shore', [SHORE, island(95, 40)], 'refused island-outside'],
    ['an island outside', [SHORE, island(140, 40)], 'refused island-outside'],
    ['islands across one another', [SHORE, island(40, 40), island(45, 45)], 'refused islands-overlap'],
    ['an island on an island', [SHORE, island(40, 40, 30), island(50, 50)], 'refused islands-overlap'],
    [
      'a shore that folds back on itself',
      [ring([0, 0], [100, 0], [50, 0], [50, 50])],
      'refused self-crossing',
    ],
    [
      'a shore that touches itself',
      [ring([0, 0], [100, 0], [50, 50], [100, 100], [0, 100], [50, 50])],
      'refused self-crossing',
    ],
    ['a shore of nothing', [ring([0, 0], [0.1, 0], [0.1, 0.1])], 'refused no-area'],
    ['two positions', [ring([0, 0], [100, 0])], 'refused too-few'],
    ['no ring at all', [], 'refused no-polygon'],
  ])('%s is refused', (_, rings, expected) => {
    const reading = outlineFromRings(rings);
    expect(reading.outline).toBeNull();
    expect(codes(reading)).toContain(expected);
  });

  test('a self-crossing says where', () => {
    const { findings } = outlineFromRings([closed(ring([0, 0], [100, 100], [100, 0], [0, 100]))]);
    const at = findings[0]?.at ?? [0, 0];
    const [x, y] = fromPlane(ORIGIN, { xM: 50, yM: 50 });
    expect(at[0]).toBeCloseTo(x, 8);
    expect(at[1]).toBeCloseTo(y, 8);
    expect(findings[0]?.words).toContain('52.36555° N');
  });

  test('latitude past the pole is refused with the usual cause', () => {
    const { findings } = outlineFromRings([
      [
        [52, 98],
        [52.1, 98],
        [52.1, 98.1],
      ],
    ]);
    expect(findings[0]?.words).toMatch(/longitude comes first/);
  });

  test('eastings and northings are refused with the usual cause', () => {
    const { findings } = outlineFromRings([
      [
        [458_000, 274_000],
        [458_100, 274_000],
        [458_100, 274_100],
      ],
    ]);
    expect(findings[0]?.words).toMatch(/eastings and northings/);
  });

  test('a position that is not a number is refused', () => {
    expect(
      codes(
        outlineFromRings([
          [
            [Number.NaN, 52],
            [1, 52],
            [1, 53],
          ],
        ]),
      ),
    ).toEqual(['refused bad-position']);
  });

  test('a huge tracing is refused before it is worked on', () => {
    const many = Array.from({ length: 20_001 }, (_, i): LonLat => [i / 1e6, 52]);
    expect(codes(outlineFromRings([many]))).toEqual(['refused too-many']);
  });

  test('a long traced shore is checked whole', () => {
    const corners = Array.from({ length: 5000 }, (_, i): [number, number] => {
      const turn = (i * 2 * Math.PI) / 5000;
      const wavyM = 200 + 20 * Math.sin(31 * turn);
      return [wavyM * Math.cos(turn), wavyM * Math.sin(turn)];
    });
    expect(codes(outlineFromRings([closed(ring(...corners))]))).toEqual([]);
    const knotted = [...corners.slice(0, 2500), ...corners.slice(10, 20), ...corners.slice(2500)];
    expect(codes(outlineFromRings([closed(ring(...knotted))]))).toEqual(['refused self-crossing']);
  });
});

describe('GeoJSON', () => {
  const polygon = { type: 'Polygon', coordinates: [SHORE] };

  test('a closed line stands in for the shore when there is no polygon', () => {
    const reading = outlineFromGeoJson({ type: 'LineString', coordinates: SHORE });
    expect(codes(reading)).toEqual(['mended line-as-shore']);
    expect(reading.areaM2).toBeCloseTo(10_000, 3);
  });

  test('points and lines beside a polygon are left out, and counted', () => {
    const reading = outlineFromGeoJson({
      type: 'GeometryCollection',
      geometries: [
        polygon,
        { type: 'MultiPoint', coordinates: [SHORE[0], SHORE[1]] },
        { type: 'LineString', coordinates: SHORE },
      ],
    });
    expect(reading.findings.map(({ words }) => words).join()).toMatch(/2 × point.*1 × line/);
    expect(reading.outline).not.toBeNull();
  });

  test.each([
    ['a number', 7, 'refused wrong-type'],
    ['a list', [polygon], 'refused wrong-type'],
    [
      'a collection whose features are no list',
      { type: 'FeatureCollection', features: {} },
      'refused wrong-type',
    ],
    ['coordinates that are no list', { type: 'Polygon', coordinates: 'x' }, 'refused bad-position'],
    ['a ring that is no list', { type: 'Polygon', coordinates: [null] }, 'refused bad-position'],
    ['a position without numbers', { type: 'Polygon', coordinates: [[[null, 1]]] }, 'refused bad-position'],
    ['latitude 98', { type: 'Point', coordinates: [52, 98] }, 'refused out-of-range'],
  ])('%s is refused', (_, value, expected) => expect(codes(outlineFromGeoJson(value))).toContain(expected));

  test('endless nesting is refused rather than followed', () => {
    let nested: unknown = polygon;
    for (let i = 0; i < 5000; i++) nested = { type: 'GeometryCollection', geometries: [nested] };
    expect(codes(outlineFromGeoJson(nested))).toContain('refused wrong-type');
  });

  test('a file that names WGS 84 as its frame is taken', () => {
    const crs = { type: 'name', properties: { name: 'urn:ogc:def:crs:OGC:1.3:CRS84' } };
    expect(codes(outlineFromGeoJson({ ...polygon, crs }))).toEqual(['noted named-frame']);
  });

  test.each([
    ['', /file is empty/],
    ['{"type": "Poly', /not JSON, or is cut short/],
    ['<?xml version="1.0"?><gpx/>', /looks like XML/],
  ])('text %j is refused in words', (text, words) => {
    expect(outlineFromText(text).findings[0]?.words).toMatch(words);
  });
});

describe('the lake’s plane', () => {
  test('an outline goes to its plane and back to a tenth of a millimetre', () => {
    const { outline } = outlineFromRings([SHORE, island(40, 40)]);
    if (!outline) throw new Error('refused');
    const origin = originOf(outline);
    const plane = outlineInPlane(origin, outline);
    expect(plane.shore).toHaveLength(4);
    const back = outlineToGeoJson(origin, plane);
    outline.coordinates.flat().forEach(([lon, lat], i) => {
      const [backLon = 0, backLat = 0] = back.coordinates.flat()[i] ?? [];
      expect(Math.abs(backLon - lon)).toBeLessThan(1e-9);
      expect(Math.abs(backLat - lat)).toBeLessThan(1e-9);
    });
  });

  test('the origin is the middle of the shore', () => {
    const { outline } = outlineFromRings([SHORE]);
    const [lon, lat] = outline ? originOf(outline) : ORIGIN;
    const [x, y] = fromPlane(ORIGIN, { xM: 50, yM: 50 });
    expect(Math.abs(lon - x)).toBeLessThan(1e-7);
    expect(Math.abs(lat - y)).toBeLessThan(1e-7);
  });
});

describe('whatever is brought', () => {
  test('is answered with an outline or a reason, and never thrown at', () => {
    const loose = fc.oneof(
      fc.anything(),
      fc.json().map((text): unknown => JSON.parse(text)),
    );
    const coordinates = fc.oneof(loose, fc.array(fc.array(fc.array(fc.double(), { maxLength: 3 }))));
    const values = fc.oneof(
      loose,
      fc.record({
        type: fc.constantFrom('Polygon', 'MultiPolygon', 'LineString', 'Point', 'MultiPoint'),
        coordinates,
      }),
    );
    fc.assert(
      fc.property(values, (value) => {
        const { outline, findings } = outlineFromGeoJson(value);
        expect(outline === null).toBe(findings.some(({ kind }) => kind === 'refused'));
      }),
      { numRuns: 500 },
    );
    fc.assert(
      fc.property(fc.string(), (text) => {
        expect(outlineFromText(text).outline).toBeNull();
      }),
    );
  });
});
