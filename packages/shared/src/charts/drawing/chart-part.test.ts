import { describe, expect, test } from 'vitest';
import { changedWater, pointsOf } from './chart-part';

const water = [[0, 0, 9, 0, 9, 9]];
const area = [[1, 1, 2, 1, 2, 2]];
const cut = (rings: number[][] | null) => ({
  kind: 'weed_cut' as const,
  happenedOn: '2027-06-01',
  words: 'Weed was cut on 1 Jun 2027',
  rings,
});

describe('the water that changed since it was surveyed', () => {
  test('is the areas of what happened', () => {
    expect(changedWater({ age: 'changed', changes: [cut(area)] }, water)).toEqual(area);
  });

  test.each([
    ['it happened to the whole lake', { age: 'changed' as const, changes: [cut(area), cut(null)] }],
    ['the level alone tells of it', { age: 'changed' as const, changes: [] }],
    ['the chart is old', { age: 'old' as const, changes: [] }],
  ])('is all of it when %s', (_, chart) => {
    expect(changedWater(chart, water)).toBe(water);
  });

  test('is none of it on a chart of this year', () => {
    expect(changedWater({ age: 'current' }, water)).toEqual([]);
  });
});

test('a cast that read no depth is a point without a figure beside the soundings', () => {
  const at = { xM: 1, yM: 2, grade: 'C' as const };
  const soundings = [{ ...at, id: 'a', depthM: 2, sigmaM: 0.1, bottom: 'clay' as const }];
  const bottomPoints = [{ ...at, id: 'b', bottom: 'snag' as const }];
  expect(pointsOf({ soundings, bottomPoints }).map(({ depthM }) => depthM)).toEqual([2, null]);
  expect(pointsOf({ soundings: null })).toEqual([]);
});
