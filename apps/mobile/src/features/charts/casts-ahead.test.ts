import type { NextCasts } from '@mereward/shared/charts/chart-answers';
import { expect, test } from 'vitest';
import { castsAhead } from './casts-ahead';

const cast = (order: number, xM: number) => ({
  order,
  xM,
  yM: 0,
  gainShare: 0.01,
  cast: {
    rangeM: xM,
    lineOutM: xM,
    wrapsWhole: 10,
    remainderM: 0,
    stickSpacingM: 3.6576,
    wrapReference: 'lead_to_rod_tip' as const,
    countWords: '10 wraps (12 ft)',
    bearingDeg: 90,
    mark: null,
  },
});

const answer: NextCasts = {
  chart: { id: 'c', version: '2027.1', surveyedTo: '2027-04-03', datumM: 0.62 },
  pegs: [
    { pegId: 'p1', number: '1', name: '', gainShare: 0.03, casts: [cast(1, 20), cast(2, 40)], words: '' },
  ],
  meanSigmaM: 0.2,
  whyNot: null,
  method: '',
};

test('casts made on this visit are proposed no more, and those between them and the rest still are', () => {
  expect(castsAhead(answer, 'p1', []).map(({ order }) => order)).toEqual([1, 2]);
  expect(castsAhead(answer, 'p1', [{ xM: 21.5, yM: 2 }]).map(({ order }) => order)).toEqual([2]);
  expect(castsAhead(answer, 'p1', [{ xM: 30, yM: 0 }])).toHaveLength(2);
});

test('nothing is proposed where the chart says nothing of the peg', () => {
  expect(castsAhead(answer, 'p2', [])).toEqual([]);
  expect(castsAhead({ ...answer, pegs: null }, 'p1', [])).toEqual([]);
  expect(castsAhead(undefined, 'p1', [])).toEqual([]);
});
