/**
 * Source: fixtures/09_formats/gpx and its manifest, written from the GPX 1.1 schema and checked with xmllint
 * 2.9.14 against it. Nothing numeric is compared: a file is taken, noted or refused, each for the stated reason.
 * A file that the manifest marks `lenient_ok` breaks the schema in a way that changes no position: it is read.
 */
import { readGpx } from '@mereward/api/lakes/gpx';
import { outlineFromGpx } from '@mereward/api/lakes/outlines';
import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { z } from 'zod';

const fixtures = new URL('../fixtures/', import.meta.url);
const File = z.object({
  kind: z.string(),
  file: z.string(),
  valid: z.boolean(),
  expect: z
    .object({
      waypoints: z.number(),
      first_name: z.string(),
      segments: z.array(z.number()),
      lenient_ok: z.boolean(),
      security: z.string(),
    })
    .partial()
    .default({}),
});
const manifest: unknown = JSON.parse(readFileSync(new URL('09_formats_manifest.json', fixtures), 'utf8'));
// Other kinds of file in the manifest have expectations of other shapes.
const files = z
  .object({ files: z.array(z.looseObject({ kind: z.string() })) })
  .parse(manifest)
  .files.filter(({ kind }) => kind === 'gpx')
  .map((file) => File.parse(file));

const textOf = (file: string): string => readFileSync(new URL(file, fixtures), 'utf8');

/** What is said of the files that are refused. */
const reasons: Record<string, RegExp> = {
  'lat91.gpx': /latitude “91”.*not on Earth/,
  'lon180.gpx': /longitude “180”.*to below 180/,
  'missing_lat.gpx': /no latitude or no longitude/,
  'decimal_comma.gpx': /decimals with a point, not a comma/,
  'truncated.gpx': /line 3.*cut short/,
  'doctype_entity.gpx': /document type or entities.*not opened/,
};

describe('GPX files', () => {
  test('the manifest names thirteen of them', () => {
    expect(files).toHaveLength(13);
  });

  test.each(files.map((file) => [file.file, file] as const))(
    '%s is read as its manifest says',
    (name, file) => {
      const read = readGpx(textOf(name));
      const refused = read.findings.filter(({ kind }) => kind === 'refused');
      const wanted = file.valid || file.expect.lenient_ok === true;
      expect(refused.length === 0).toBe(wanted);
      if (!wanted)
        expect(refused[0]?.words).toMatch(reasons[name.split('/').at(-1) ?? ''] ?? /^no reason is known$/);
      if (!file.valid && wanted && !name.endsWith('order.gpx')) expect(read.findings).toHaveLength(1);
      if (file.valid) expect(read.findings).toEqual([]);
      const { waypoints, first_name: firstName, segments } = file.expect;
      if (waypoints !== undefined) expect(read.waypoints).toHaveLength(waypoints);
      if (firstName !== undefined) expect(read.waypoints[0]?.name).toBe(firstName);
      if (segments) expect(read.segments.map(({ length }) => length)).toEqual(segments);
    },
  );

  test('numbered characters are read, and anything else with an ampersand stays as written', () => {
    const name = (text: string) =>
      readGpx(`<gpx version="1.1"><wpt lat="1" lon="2"><name>${text}</name></wpt></gpx>`).waypoints[0]?.name;
    expect(name('P&#233;rigord &#x41;&amp;amp;')).toBe('Périgord A&amp;');
    expect(name('&nbsp;&#0;&#9999999;')).toBe('&nbsp;&#0;&#9999999;');
  });

  test('a file of more points than can be read is refused by their number', () => {
    const point = '<trkpt lat="1" lon="2"/>';
    const gpx = `<gpx version="1.1"><trk><trkseg>${point.repeat(20_001)}</trkseg></trk></gpx>`;
    expect(readGpx(gpx).findings.map(({ words }) => words)).toEqual([
      expect.stringMatching(/20001 points; at most 20000/),
    ]);
  });

  test('none of them walks round a water, and each says so or why it is refused', () => {
    for (const { file } of files) {
      const { outline, areaM2, findings } = outlineFromGpx(textOf(file));
      expect({ file, outline, areaM2 }).toEqual({ file, outline: null, areaM2: null });
      expect(findings.at(-1)?.words).not.toBe('');
      expect(findings.some(({ kind }) => kind === 'refused')).toBe(true);
    }
  });
});
