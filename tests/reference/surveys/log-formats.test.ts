/**
 * Logs of soundings held against fixtures/09_formats and its manifest: GPX verdicts checked there with xmllint 2.9.14
 * against the GPX 1.1 schema, GeoJSON from RFC 7946 and RFC 8259, CSV from RFC 4180. Values must be the very ones of the
 * file. A file that is valid but holds no soundings is read, and says what it holds instead.
 */
import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { z } from 'zod';
import type { LogOptions } from '@mereward/shared/surveys/log-contract';
import { readingOf } from '../../support/log-reading';

const fixtures = new URL('../fixtures/', import.meta.url);
const Sample = z.object({ kind: z.string(), file: z.string(), valid: z.boolean(), why: z.string() });
const { files } = z
  .object({ files: z.array(Sample) })
  .parse(JSON.parse(readFileSync(new URL('09_formats_manifest.json', fixtures), 'utf8')));
const samples = (kind: string) => files.filter((each) => each.kind === kind);

function read(file: string, options: Partial<LogOptions> = {}) {
  return readingOf([{ name: file, bytes: readFileSync(new URL(file, fixtures)) }], options);
}

/** What a sample says when it is brought as a log: refused, or its words, faults and what has to be said first. */
function said(file: string): string {
  const reading = read(file);
  if (!reading.ok) return reading.words;
  const { files: inFiles, faults, asks, cautions } = reading.log.preview;
  return [...inFiles, ...asks]
    .map(({ words }) => words)
    .concat(
      faults.map(({ detail }) => detail),
      cautions,
    )
    .join(' ');
}

describe('GPX', () => {
  const expected: Record<string, { found: number; says: RegExp }> = {
    'waypoints.gpx': { found: 0, says: /2 points, 0 with a depth.*Are the heights <ele> depths/ },
    'track.gpx': { found: 0, says: /3 points, 0 with a depth.*Are the heights <ele> depths/ },
    'extensions.gpx': { found: 1, says: /1 points, 1 with a depth/ },
    'empty.gpx': { found: 0, says: /0 points.*Nothing is left to take in/ },
    'no_creator.gpx': { found: 0, says: /1 points, 0 with a depth.*places but no depths/ },
    'lat91.gpx': { found: 0, says: /not on Earth as GPX counts it/ },
    'lon180.gpx': { found: 0, says: /not on Earth as GPX counts it/ },
    'missing_lat.gpx': { found: 0, says: /no latitude or no longitude/ },
    'order.gpx': { found: 0, says: /1 points, 0 with a depth.*Are the heights/ },
    'decimal_comma.gpx': { found: 0, says: /decimals with a point, not a comma/ },
    'truncated.gpx': { found: 0, says: /line 3: It is not whole XML .* or was cut short/ },
    'doctype_entity.gpx': { found: 0, says: /line 1: It declares a document type.*was not read/ },
    'v10.gpx': { found: 0, says: /says it is GPX 1\.0; it was read as 1\.1/ },
  };
  test.each(samples('gpx'))('$file: $why', ({ file }) => {
    const name = file.split('/').at(-1) ?? '';
    const reading = read(file);
    expect(said(file)).toMatch(expected[name]?.says ?? /^$/);
    expect(reading.ok ? reading.log.preview.found : 0).toBe(expected[name]?.found);
  });

  test('an extension named depth, in whichever namespace, is the depth', () => {
    const reading = read('09_formats/gpx/extensions.gpx');
    expect(reading.ok && reading.log.kept).toMatchObject([
      { lon: -1.1427, lat: 52.3651, depthM: 2.4, atMs: null, at: 3 },
    ]);
  });

  test('heights are depths only when somebody says so', () => {
    const file = '09_formats/gpx/track.gpx';
    const bed = read(file, { depthFrom: 'ele', depthMeans: 'bed_height', waterHeightM: 62.5 });
    expect(bed.ok && bed.log.kept).toMatchObject([
      { depthM: 2.5, atMs: Date.parse('2026-05-14T05:00:00.250Z'), at: 3 },
    ]);
    expect(bed.ok && bed.log.preview.faultCount).toBe(2); // the two points without a height
    const depth = read(file, { depthFrom: 'ele' }); // 60 m: as deep as is believed
    expect(depth.ok && depth.log.kept).toMatchObject([{ depthM: 60 }]);
  });
});

describe('GeoJSON', () => {
  const NO_POINTS = /0 points, 1 lines or areas, which hold no soundings.*Nothing is left/;
  const expected: Record<string, { found: number; says: RegExp }> = {
    'polygon_hole.geojson': { found: 0, says: NO_POINTS },
    'outer_cw.geojson': { found: 0, says: NO_POINTS },
    'points_alt.geojson': { found: 2, says: /2 features: 2 points/ },
    'null_geometry.geojson': { found: 0, says: /1 without a place/ },
    'empty.geojson': { found: 0, says: /0 features: 0 points/ },
    'multipolygon.geojson': { found: 0, says: NO_POINTS },
    'foreign_crs.geojson': { found: 0, says: /coordinates are in “EPSG:27700”\. Export it in WGS 84/ },
    'unclosed_ring.geojson': { found: 0, says: NO_POINTS },
    'three_positions.geojson': { found: 0, says: NO_POINTS },
    'bowtie.geojson': { found: 0, says: NO_POINTS },
    'hole_outside.geojson': { found: 0, says: NO_POINTS },
    // Its latitude is 89.86, which is in range: the unit tests beside the source try 98.
    'lat_out_of_range.geojson': { found: 0, says: /no numbers beside their places, so no depth/ },
    'string_coords.geojson': { found: 0, says: /A coordinate is not a number/ },
    'one_number.geojson': { found: 0, says: /at least a longitude and a latitude/ },
    'bad_type_case.geojson': { found: 0, says: /“polygon” is no shape of GeoJSON/ },
    'no_properties.geojson': { found: 0, says: /no numbers beside their places, so no depth/ },
    'trailing_comma.geojson': { found: 0, says: /It is not whole JSON/ },
    'nan.geojson': { found: 0, says: /It is not whole JSON/ },
    'bom.geojson': { found: 0, says: /0 features: 0 points/ },
  };
  test.each(samples('geojson'))('$file: $why', ({ file }) => {
    const name = file.split('/').at(-1) ?? '';
    const reading = read(file);
    expect(said(file)).toMatch(expected[name]?.says ?? /^$/);
    expect(reading.ok ? reading.log.preview.found : 0).toBe(expected[name]?.found);
  });

  test('the property named depth_m is the depth, and the third coordinate when that is said', () => {
    const file = '09_formats/geojson/points_alt.geojson';
    const named = read(file);
    expect(named.ok && named.log.kept.map(({ depthM }) => depthM)).toEqual([2.4, 1.1]);
    expect(named.ok && named.log.preview.guessed.depthFrom).toBe('property:depth_m');
    const third = read(file, { depthFrom: 'third', depthMeans: 'bed_height' });
    expect(third.ok && third.log.kept).toMatchObject([{ lon: -1.1427, lat: 52.3651, depthM: 2.4, at: 1 }]);
    expect(third.ok && third.log.preview.faults).toMatchObject([
      { at: 2, detail: expect.stringMatching(/third coordinate/) },
    ]);
  });
});

describe('CSV', () => {
  const ASKS = /Which column is the latitude\?.*Which column is the longitude\?/;
  const expected: Record<string, RegExp> = {
    'rfc4180.csv': ASKS,
    'no_final_eol.csv': ASKS,
    'all_quoted.csv': ASKS,
    'bom.csv': ASKS,
    'lf_only.csv': ASKS,
    'semicolon_decimal_comma.csv': ASKS,
    'latin1.csv': /not in UTF-8/,
    'utf16.csv': ASKS,
    'ragged.csv': ASKS,
    'open_quote.csv': /begins with a quote near line \d+ is never closed/,
    'stray_quote.csv': ASKS,
    'formula.csv': ASKS,
    'empty.csv': /The file is empty/,
    'dup_header.csv': ASKS,
  };
  // These are tables of casts: they hold no places, which has to be said before anything can be read of them.
  test.each(samples('csv'))('$file: $why', ({ file }) => {
    expect(said(file)).toMatch(expected[file.split('/').at(-1) ?? ''] ?? /^$/);
  });

  test.each(['rfc4180.csv', 'all_quoted.csv', 'bom.csv', 'lf_only.csv', 'no_final_eol.csv', 'utf16.csv'])(
    '%s gives the numbers of its columns, read as places',
    (name) => {
      const options = { columns: { lat: 2, lon: 1, depth: 3 } }; // wraps and bearings stand in for degrees
      const reading = readingOf(
        [{ name, bytes: readFileSync(new URL(`09_formats/csv/${name}`, fixtures)) }],
        { ...options, outsideM: 100 },
        [135.5, 12.5],
      );
      expect(reading.ok && reading.log.kept).toMatchObject([{ lon: 135.5, lat: 12.5, depthM: 2.4, at: 2 }]);
      expect(reading.ok && reading.log.preview.guessed.decimal).toBe('point');
    },
  );

  test('a decimal comma in a place settles what the commas are', () => {
    const reading = readingOf(
      [{ name: 'x', bytes: readFileSync(new URL('09_formats/csv/semicolon_decimal_comma.csv', fixtures)) }],
      { columns: { lat: 2, lon: 1, depth: 3 } },
      [135.5, 12.5],
    );
    expect(reading.ok && reading.log.preview.guessed.decimal).toBe('comma');
    expect(reading.ok && reading.log.kept).toMatchObject([{ lon: 135.5, lat: 12.5, depthM: 2.4 }]);
  });

  test('a row of another length than the heading is left out and told', () => {
    const reading = read('09_formats/csv/ragged.csv', { columns: { lat: 0, lon: 1, depth: 2 } });
    expect(reading.ok && reading.log.preview.faults).toMatchObject([
      { unit: 'row', at: 3, detail: expect.stringMatching(/2 cells and the heading 3/) },
    ]);
  });
});

test('every sample of the manifest that can be a log is among those checked here', () => {
  expect(['gpx', 'geojson', 'csv'].map((kind) => samples(kind).length)).toEqual([13, 19, 14]);
});
