import { expect, test } from 'vitest';
import { fromPlane } from '../geometry/plane';
import { USUAL_LOG_OPTIONS, type LogOptions } from './log-contract';
import type { LogPoint } from './log-point';
import { leftOutWords, sieveLog } from './log-sieve';

const ORIGIN = [-1.1427, 52.3651] as const;
const START = Date.parse('2027-04-03T08:00:00Z');
const DAY_MS = 86_400_000;
const shore = [
  [-50, -50],
  [50, -50],
  [50, 50],
  [-50, 50],
].map(([xM = 0, yM = 0]) => ({ xM, yM }));
const ground = {
  origin: ORIGIN,
  outline: { shore, islands: [] },
  startedMs: START,
  endedMs: START + 3_600_000,
  nowMs: START + 10 * DAY_MS,
};

function point(xM: number, depthM: number, wishes: Partial<LogPoint> = {}): LogPoint {
  const [lon, lat] = fromPlane(ORIGIN, { xM, yM: 0 });
  return { lon, lat, depthM, atMs: START, file: 0, at: 1, ...wishes };
}
const sieve = (points: LogPoint[], wishes: Partial<LogOptions> = {}) =>
  sieveLog(points, { ...USUAL_LOG_OPTIONS, ...wishes }, ground);

test('depths of nought, of less, and past sixty metres are left out', () => {
  expect(sieve([0, -1, 0.1, 60, 60.1].map((depthM) => point(0, depthM)))).toEqual([
    'not_deep',
    'not_deep',
    null,
    null,
    'too_deep',
  ]);
});

test('places are left out beyond the stated distance from the water, not before', () => {
  expect(sieve([49, 54, 56].map((xM) => point(xM, 2)))).toEqual([null, null, 'outside']);
  expect(sieve([point(50.5, 2)], { outsideM: 0 })).toEqual(['outside']);
});

test('times more than a day from the visit are left out, unless its first level is taken for all', () => {
  const points = [-1.1, -0.9, 1, 1.2].map((days) => point(0, 2, { atMs: START + days * DAY_MS }));
  expect(sieve(points)).toEqual(['other_day', null, null, 'other_day']);
  expect(sieve(points, { level: 'at_start' })).toEqual([null, null, null, null]);
  expect(sieve([point(0, 2, { atMs: null })])).toEqual([null]);
});

test('a lone echo off its neighbours is a spike; a ledge, a slope and a far neighbour are not', () => {
  const row = (depths: number[], stepM = 1) =>
    sieve(depths.map((depthM, i) => point(i * stepM - 20, depthM)));
  expect(row([2, 2, 2, 5, 2, 2, 2])).toEqual([null, null, null, 'spike', null, null, null]);
  expect(row([2, 2, 2, 2, 5, 5, 5, 5])).toEqual(Array(8).fill(null));
  expect(row([1, 2, 3, 4, 5, 6, 7])).toEqual(Array(7).fill(null));
  expect(row([2, 2, 5, 2, 2], 8)).toEqual(Array(5).fill(null)); // too far apart to tell
  expect(row([2, 2, 2.4, 2, 2])).toEqual(Array(5).fill(null));
});

test('what is left out is said with its number and its rule', () => {
  expect(leftOutWords('outside', 3, USUAL_LOG_OPTIONS)).toBe(
    '3 soundings lie more than 5 m outside the outline of the water.',
  );
  expect(leftOutWords('outside', 1, USUAL_LOG_OPTIONS)).toMatch(/^1 sounding lies/);
});
