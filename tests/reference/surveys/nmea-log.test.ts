/**
 * Source: fixtures/09_formats/nmea, sentences written from layouts of NMEA 0183 as commonly documented (from memory;
 * the standard is not public), their checksums computed there. Places must agree within 1e-7°, the fixture's own
 * tolerance: a centimetre, finer than the last figure of ddmm.mmm.
 */
import { formatOf, readLog } from '@mereward/api/surveys/read-log';
import { USUAL_LOG_OPTIONS } from '@mereward/shared/surveys/log-contract';
import { readSentence } from '@mereward/shared/surveys/nmea-sentence';
import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { z } from 'zod';

const fixtures = new URL('../fixtures/09_formats/nmea/', import.meta.url);
const Case = z.object({
  sentence: z.string(),
  valid: z.boolean(),
  why: z.string(),
  expect: z.record(z.string(), z.unknown()).default({}),
});
const { cases } = z
  .object({ cases: z.array(Case) })
  .parse(JSON.parse(readFileSync(new URL('nmea.json', fixtures), 'utf8')));
const WITHIN_DEG = 1e-7;

test('every sentence of the fixture is tried', () => {
  expect(cases).toHaveLength(21);
});

describe('a valid sentence', () => {
  test.each(cases.filter(({ valid }) => valid))('$sentence: $why', ({ sentence, expect: stated }) => {
    const read = readSentence(sentence);
    expect(read.kind).not.toBe('fault');
    if (typeof stated['lat'] === 'number') {
      if (read.kind !== 'fix') throw new Error(`read as ${read.kind}`);
      expect(Math.abs(read.lat - stated['lat'])).toBeLessThan(WITHIN_DEG);
      if (typeof stated['lon'] === 'number')
        expect(Math.abs(read.lon - stated['lon'])).toBeLessThan(WITHIN_DEG);
      if (typeof stated['fix'] === 'number') expect(read.quality).toBe(stated['fix']);
    }
    if (stated['lat'] === null) expect(read.kind).toBe('clock'); // a time, and no place to be had from it
    if (typeof stated['date'] === 'string')
      expect(read).toMatchObject({ dayMs: Date.parse(`${stated['date']}T00:00:00Z`) });
    if (typeof stated['utc'] === 'string') {
      const at = read.kind === 'fix' ? (read.dayMs ?? 0) + read.secondS * 1000 : 0;
      expect(at).toBe(Date.parse(stated['utc']));
    }
    if (typeof stated['depth_m'] === 'number')
      expect(read).toEqual({ kind: 'depth', depthM: stated['depth_m'], from: 'transducer' });
    if (stated['depth_m'] === null) expect(read).toEqual({ kind: 'nothing' }); // a lost bottom is no depth of 0
    if (typeof stated['water_depth_m'] === 'number') {
      expect(read).toMatchObject({ kind: 'depth', from: 'surface' });
      expect(read.kind === 'depth' && read.depthM).toBeCloseTo(stated['water_depth_m'], 9);
    }
    if (stated['water_depth_m'] === null) expect(read).toMatchObject({ kind: 'depth', from: 'transducer' });
  });
});

describe('an invalid sentence', () => {
  test.each(cases.filter(({ valid }) => !valid))('$sentence is a fault in words: $why', ({ sentence }) => {
    const read = readSentence(sentence);
    expect(read.kind).toBe('fault');
    expect(read.kind === 'fault' && read.detail).toMatch(/left out\.$/);
  });
});

test('the fixture’s whole log is read, its nine faulty lines counted and told', () => {
  const bytes = readFileSync(new URL('log.nmea', fixtures));
  const file = { name: 'log.nmea', bytes };
  expect(formatOf(file)).toBe('nmea');
  const day = Date.parse('1994-03-23T00:00:00Z');
  const shore = [
    [-1e4, -1e4],
    [1e4, -1e4],
    [1e4, 1e4],
    [-1e4, 1e4],
  ].map(([xM = 0, yM = 0]) => ({ xM, yM }));
  const { preview, kept } = readLog(
    {
      files: [file],
      options: { ...USUAL_LOG_OPTIONS, transducerM: 0.3 },
      ground: {
        origin: [11.5166667, 48.1173],
        outline: { shore, islands: [] },
        startedMs: day,
        endedMs: null,
        nowMs: day + 86_400_000,
        visitDayMs: day,
      },
    },
    () => undefined,
  );
  expect(preview.faultCount).toBe(9);
  expect(preview.format).toBe('nmea');
  // The three depths after the first fix stand at it; the transducer's own offset of 0.35 m is taken where it is stated.
  expect(kept[0]).toMatchObject({ depthM: 2.71, at: 3, atMs: day + (12 * 3600 + 35 * 60 + 19) * 1000 });
  expect(kept[0]?.lat).toBeCloseTo(48.1173, 7);
});
