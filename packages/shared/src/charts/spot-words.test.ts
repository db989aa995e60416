import { expect, test } from 'vitest';
import { countWords, spotWords, stickWords, type SpotFacts } from './spot-words';

const cast17: SpotFacts = {
  wrapsWhole: 14,
  remainderM: 0,
  stickSpacingM: 3.6576,
  depthM: 2.536,
  survey: { depthM: 2.536, levelM: 0.62 },
  datumM: 0.62,
  levelM: 0.38,
  bottom: 'gravel',
  grade: 'A',
  surveyedOn: '2027-04-03',
  chartVersion: '2027.1',
};

test('a spot says how to reach it, the depth today and where that comes from', () => {
  expect(spotWords(cast17)).toBe(
    '14 wraps (12 ft): about 2.3 m today (2.5 m at survey level 0.62), gravel, grade A, surveyed 3 Apr 2027, chart 2027.1',
  );
});

test('water that has gone is gone', () => {
  expect(spotWords({ ...cast17, levelM: -2 })).toContain('dry bank today (2.5 m at survey level 0.62)');
});

test('without a level today the charted depth stands with its own level', () => {
  expect(spotWords({ ...cast17, levelM: null, survey: null })).toContain(': 2.5 m at chart datum 0.62,');
});

test('what a reader may not see leaves no trace', () => {
  const words = spotWords({
    ...cast17,
    depthM: null,
    survey: null,
    bottom: null,
    grade: null,
    surveyedOn: null,
  });
  expect(words).toBe('14 wraps (12 ft): chart 2027.1');
});

test('sticks are named as anglers name them, and a remainder in metres', () => {
  expect([3.6576, 3.048, 2, 3.66].map(stickWords)).toEqual(['12 ft', '10 ft', '2 m', '3.66 m']);
  expect([countWords(8, 0.616), countWords(1, 0), countWords(14, 0.004)]).toEqual([
    '8 wraps + 0.62 m',
    '1 wrap',
    '14 wraps',
  ]);
});
