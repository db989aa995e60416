/**
 * Twenty thousand damaged files, the same on every run, against the readers of logs and of casts. Nothing outside is
 * compared; what holds is what was promised: whatever a file holds, it is read, or refused in words that say what is
 * wrong; nothing taken from it is out of bounds; and what is not taken is accounted for. (That no reader hangs is seen by
 * the run's ending.)
 */
import { readCastsText } from '@mereward/api/surveys/casts-table';
import { Problem } from '@mereward/shared/problems/problem';
import { readCasts } from '@mereward/shared/surveys/casts-file';
import { readFileText } from '@mereward/shared/surveys/file-text';
import type { LogOptions } from '@mereward/shared/surveys/log-contract';
import { expect, test } from 'vitest';
import { aKit } from '../../support/kit';
import { readingOf, SAMPLES_AT } from '../../support/log-reading';
import { chances, mutated } from '../../support/mutate';
import { sentence } from '../../support/sounding-log';

const EACH = 4000;
const TIMEOUT_MS = 120_000;

const [LON, LAT] = SAMPLES_AT;
const rows = Array.from({ length: 9 }, (_, i) => ({
  lon: LON + i * 1e-5,
  lat: LAT + i * 1e-5,
  depth: 2 + i / 10,
}));

const nmea = rows
  .flatMap(({ depth }, i) => [
    sentence(`GNRMC,05120${i}.00,A,5221.906${i},N,00108.5620,W,0.05,,140526,,,A`),
    sentence(`SDDPT,${depth},0.35`),
    sentence(`GNGGA,05120${i}.50,5221.906${i},N,00108.5620,W,4,12,0.6,62.31,M,47.2,M,1.0,0001`),
    sentence(`SDDBT,7.9,f,2.41,M,1.32,F`),
    sentence(`GPZDA,05120${i}.70,14,05,2026,00,00`),
  ])
  .join('\r\n');
const gpx = `<?xml version="1.0" encoding="UTF-8"?>
<gpx xmlns="http://www.topografix.com/GPX/1/1" xmlns:d="http://example.org/d" version="1.1" creator="t"><trk><trkseg>
${rows.map(({ lon, lat, depth }) => `<trkpt lat="${lat}" lon="${lon}"><ele>60.5</ele><time>2026-05-14T05:12:00Z</time><extensions><d:depth>${depth}</d:depth></extensions></trkpt>`).join('\n')}
</trkseg></trk></gpx>`;
const geojson = JSON.stringify({
  type: 'FeatureCollection',
  features: rows.map(({ lon, lat, depth }, i) => ({
    type: 'Feature',
    id: i,
    geometry: { type: 'Point', coordinates: [lon, lat, -depth] },
    properties: { depth_m: depth, at: '2026-05-14T05:12:00Z' },
  })),
});
const table = [
  'lat;lon;depth_ft;time',
  ...rows.map(({ lon, lat, depth }) => `${lat};"${lon}";${depth};2026-05-14T05:12:00Z`),
].join('\r\n');
const casts = [
  'peg,mark,wraps,remainder,drop,drag,returned,pulls',
  ...rows.map((_, i) => `FO7,M3,${10 + i},0,sharp_crack,fine_rattle,none,${7 + i}`),
].join('\n');
const whole = [nmea, gpx, geojson, table, casts];

const encoder = new TextEncoder();

/** The bytes of a damaged text: sometimes in another encoding than it says, or without its end. */
function bytesOf(text: string, chance: (below: number) => number): Uint8Array {
  if (chance(20) === 0) return Uint8Array.from(text, (letter) => letter.charCodeAt(0) & 255);
  if (chance(30) === 0)
    return Uint8Array.from([
      0xff,
      0xfe,
      ...[...text].flatMap((letter) => [letter.charCodeAt(0) & 255, letter.charCodeAt(0) >> 8]),
    ]);
  const bytes = encoder.encode(text);
  return chance(40) === 0 ? bytes.subarray(0, chance(bytes.length + 1)) : bytes;
}

const OPTIONS: Partial<LogOptions>[] = [
  {},
  { depthFrom: 'ele', depthMeans: 'bed_height', waterHeightM: 63, transducerM: 0.3 },
  { depthFrom: 'third', depthMeans: 'bed_height', level: 'at_start' },
  { columns: { lat: 0, lon: 1, depth: 2, time: 3 }, decimal: 'comma' },
  { columns: { lat: 7, lon: 0, depth: 1 }, depthUnit: 'fathom', outsideM: 0 },
];

/** What any reading must keep to; answers whether something could be taken. */
function heldTo(name: string, bytes: Uint8Array, options: Partial<LogOptions>): boolean {
  const reading = readingOf([{ name, bytes }], options);
  if (!reading.ok) {
    expect(reading.words).toMatch(/^damaged(, (line|row|feature) \d+)?: .{12,}[.?!”]$/s);
    return false;
  }
  const { kept, preview } = reading.log;
  for (const { lon, lat, depthM, atMs } of kept)
    if (!(
      Math.abs(lon) <= 180 &&
      Math.abs(lat) <= 90 &&
      depthM > 0 &&
      depthM <= 60 &&
      (atMs === null || Number.isFinite(atMs))
    ))
      expect.fail(`took ${lon}, ${lat}, ${depthM}, ${String(atMs)}`);
  const left = preview.leftOut.reduce((sum, { count }) => sum + count, 0);
  expect(preview.found).toBe(kept.length + left);
  for (const { words } of [...preview.leftOut, ...preview.asks, ...preview.files])
    expect(words.length).toBeGreaterThan(8);
  for (const { detail } of preview.faults) expect(detail).toMatch(/\.$/);
  if (kept.length === 0) expect(preview.cautions.length).toBeGreaterThan(0);
  return kept.length > 0;
}

test.each([
  ['NMEA 0183', nmea, 1],
  ['GPX', gpx, 2],
  ['GeoJSON', geojson, 3],
  ['tables', table, 4],
])('damaged %s is read, or refused in words', { timeout: TIMEOUT_MS }, (_name, text, seed) => {
  const chance = chances(seed);
  expect(heldTo('damaged', encoder.encode(text), {})).toBe(true);
  let taken = 0;
  for (let i = 0; i < EACH; i++) {
    const bytes = bytesOf(mutated(text, chance, whole), chance);
    if (heldTo('damaged', bytes, OPTIONS[chance(2) * chance(OPTIONS.length)] ?? {})) taken += 1;
  }
  // Most damage leaves something that can be read, and some leaves nothing: both are tried.
  expect(taken).toBeGreaterThan(EACH / 20);
  expect(taken).toBeLessThan(EACH);
});

test('a damaged table of casts is read, or refused in words', { timeout: TIMEOUT_MS }, () => {
  const chance = chances(5);
  const ground = {
    pegs: [{ id: '00000000-0000-4000-8000-000000000001', number: 'FO7' }],
    marks: [{ id: '00000000-0000-4000-8000-000000000002', code: 'M3', name: 'chimney' }],
    kit: aKit(),
    startedAt: '2026-05-14T05:00:00.000Z',
  };
  let unharmed = 0;
  for (let i = 0; i < EACH; i++) {
    const read = readFileText(bytesOf(mutated(casts, chance, whole), chance));
    if (!read.ok) {
      expect(read.reason).toMatch(/\.$/);
      continue;
    }
    try {
      const { casts: found, errors } = readCasts(readCastsText(read.text).table, null, ground);
      for (const { detail } of errors) expect(detail.length).toBeGreaterThan(8);
      if (found.length === 0) expect(errors.length).toBeGreaterThan(0);
      for (const { observation } of found)
        if (!Number.isFinite(observation.remainderM) || observation.wrapsWhole > 120)
          expect.fail('a cast out of bounds');
      if (errors.length === 0) unharmed += 1;
    } catch (error) {
      if (!(error instanceof Problem)) throw error;
      expect(error.kind).toBe('invalid');
      expect(error.detail).toMatch(/\.$/);
    }
  }
  expect(unharmed).toBeGreaterThan(EACH / 200);
});
