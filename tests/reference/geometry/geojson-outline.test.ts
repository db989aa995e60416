/**
 * Source: fixtures/09_formats/geojson and its manifest, written from RFC 7946 and RFC 8259 and checked with
 * Shapely 1.8.5. Nothing numeric is compared: a file is taken, mended, noted or refused, each for the stated reason.
 */
import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { z } from 'zod';
import { outlineFromText } from '@mereward/shared/geometry/outline';
import type { OutlineFindingCode } from '@mereward/shared/geometry/outline-finding';

const fixtures = new URL('../fixtures/', import.meta.url);
const Manifest = z.object({ files: z.array(z.object({ kind: z.string(), file: z.string() })) });
const { files } = Manifest.parse(
  JSON.parse(readFileSync(new URL('09_formats_manifest.json', fixtures), 'utf8')),
);
const geojson = files.filter(({ kind }) => kind === 'geojson');

type Expected = {
  taken: boolean;
  codes: `${'mended' | 'refused' | 'noted'} ${OutlineFindingCode}`[];
  says: RegExp;
};

/**
 * What the manifest says of each file, in our findings. A file of points is good GeoJSON but no outline.
 * (lat_out_of_range.geojson holds latitude 89.86, which is in range: the unit tests beside the source try 98.)
 */
const expected: Record<string, Expected> = {
  'polygon_hole.geojson': { taken: true, codes: [], says: /^$/ },
  'outer_cw.geojson': {
    taken: true,
    codes: ['mended turned', 'mended turned'],
    says: /shore ran the wrong way/,
  },
  'points_alt.geojson': { taken: false, codes: ['noted left-out', 'refused no-polygon'], says: /2 × point/ },
  'null_geometry.geojson': {
    taken: false,
    codes: ['noted left-out', 'refused no-polygon'],
    says: /without a place/,
  },
  'empty.geojson': { taken: false, codes: ['refused no-polygon'], says: /no polygon in the file/ },
  'multipolygon.geojson': { taken: true, codes: ['noted several-waters'], says: /2 separate waters/ },
  'foreign_crs.geojson': {
    taken: false,
    codes: ['noted left-out', 'refused foreign-frame', 'refused no-polygon'],
    says: /EPSG:27700/,
  },
  'unclosed_ring.geojson': { taken: true, codes: ['mended unclosed'], says: /was not closed.*222\.\d m/ },
  'three_positions.geojson': { taken: false, codes: ['refused too-few'], says: /has 3 positions/ },
  'bowtie.geojson': { taken: false, codes: ['refused self-crossing'], says: /52\.36610° N, 1\.14170° W/ },
  'hole_outside.geojson': { taken: false, codes: ['refused island-outside'], says: /Island 1 lies outside/ },
  'lat_out_of_range.geojson': {
    taken: false,
    codes: ['refused no-polygon', 'noted left-out'],
    says: /no polygon in the file/,
  },
  'string_coords.geojson': {
    taken: false,
    codes: ['refused bad-position', 'refused no-polygon'],
    says: /quotation marks/,
  },
  'one_number.geojson': {
    taken: false,
    codes: ['refused bad-position', 'refused no-polygon'],
    says: /two numbers, longitude then latitude/,
  },
  'bad_type_case.geojson': {
    taken: false,
    codes: ['refused wrong-type', 'refused no-polygon'],
    says: /"polygon"; write "Polygon"/,
  },
  'no_properties.geojson': {
    taken: false,
    codes: ['mended missing-properties', 'noted left-out', 'refused no-polygon'],
    says: /no "properties"/,
  },
  'trailing_comma.geojson': { taken: false, codes: ['refused not-json'], says: /comma.*line 1, column 42/ },
  'nan.geojson': { taken: false, codes: ['refused not-json'], says: /not a number.*line 1, column/ },
  'bom.geojson': {
    taken: false,
    codes: ['mended byte-order-mark', 'refused no-polygon'],
    says: /byte order mark/,
  },
};

describe('GeoJSON files as outlines', () => {
  test('every GeoJSON file of the manifest is judged here', () => {
    const names = geojson.map(({ file }) => file.split('/').at(-1)).sort();
    expect(names).toEqual(Object.keys(expected).sort());
  });

  test.each(Object.entries(expected))('%s is read as its manifest says', (name, { taken, codes, says }) => {
    const text = readFileSync(new URL(`09_formats/geojson/${name}`, fixtures), 'utf8');
    const { outline, areaM2, findings } = outlineFromText(text);
    expect(findings.map(({ kind, code }) => `${kind} ${code}`).sort()).toEqual([...codes].sort());
    expect(findings.map(({ words }) => words).join('\n')).toMatch(says);
    expect(outline !== null).toBe(taken);
    expect(areaM2 !== null).toBe(taken);
  });
});
