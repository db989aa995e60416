import { expect, test } from 'vitest';
import { cashDifference, countedPence } from './cash';

test('a tin is counted coin by coin', () => {
  expect(countedPence({ 2000: 2, 1000: 2, 200: 2 })).toBe(6400);
  expect(countedPence({})).toBe(0);
  expect(() => countedPence({ 100: 0.5 })).toThrow(RangeError);
  expect(() => countedPence({ 100: -1 })).toThrow(RangeError);
});

test('a difference needs a reason, and is flagged over £5 and 2 %', () => {
  expect(cashDifference(6600, 6400)).toEqual({ differencePence: -200, needsReason: true, flagged: false });
  expect(cashDifference(6600, 6099).flagged).toBe(true);
  expect(cashDifference(6600, 6100).flagged).toBe(false);
  expect(cashDifference(100_000, 102_001).flagged).toBe(true);
  expect(cashDifference(100_000, 102_000).flagged).toBe(false);
  expect(cashDifference(6600, 6600)).toEqual({ differencePence: 0, needsReason: false, flagged: false });
});
