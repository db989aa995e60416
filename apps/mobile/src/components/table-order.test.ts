import { expect, test } from 'vitest';
import { compareCells, lineHolds } from './table-order';

test('numbers order by size and words as people order them', () => {
  expect([10, 9, -1].sort(compareCells)).toEqual([-1, 9, 10]);
  expect(['Peg 10', 'peg 9', 'Peg 1'].sort(compareCells)).toEqual(['Peg 1', 'peg 9', 'Peg 10']);
});

test('a row is kept when every word typed stands somewhere in it', () => {
  const line = { values: ['Far Ostle', 24, null] };
  expect(lineHolds(line, 'ostle 24')).toBe(true);
  expect(lineHolds(line, 'ostle 25')).toBe(false);
  expect(lineHolds(line, '')).toBe(true);
});
