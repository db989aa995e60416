import type { PegPageView, SpotView } from '@mereward/shared/charts/contract';
import { expect, test } from 'vitest';
import { levelLine, markLine, missingLine, spotCells, stickLine } from './card-words';

const spot: SpotView = {
  id: '6a1f7a2e-0d0c-4c0b-9f3e-1f1d1f6d1a01',
  name: 'The bar',
  note: '',
  xM: 0,
  yM: 51,
  usableRadiusM: 1,
  rangeM: 51.06,
  lineOutM: 51.2064,
  wrapsWhole: 14,
  remainderM: 0.3,
  stickSpacingM: 3.6576,
  wrapReference: 'lead_to_clip',
  bearingDeg: 359.7,
  mark: { code: 'M3', name: 'pump-house chimney', offsetDeg: -2 },
  depthM: 2.536,
  depthSigmaM: 0.1,
  bottom: 'gravel',
  bottomConfidence: 0.9,
  quotedFrom: 'cast',
  surveyLevelM: 0.62,
  depthAtSurveyM: 2.536,
  words: '',
  grade: 'A',
  surveyedOn: '2027-04-03',
  section: null,
  presentation: null,
  water: null,
  version: 1,
};

type Levels = Pick<PegPageView, 'chart' | 'levelNow' | 'layerNotes'>;
const page = (wishes: Partial<Levels>): PegPageView => ({
  id: spot.id,
  number: 'FO7',
  name: '',
  fishery: { id: spot.id, name: '', zone: 'Europe/London', dutyPhone: '', meetingPoint: '' },
  lake: { id: spot.id, name: '', emergencyAccess: '', phoneSignal: '' },
  details: {},
  photos: [],
  chart: {
    id: spot.id,
    version: '2027.1',
    surveyedFrom: '2027-04-03',
    surveyedTo: '2027-04-03',
    datumM: 0.62,
    age: 'current',
  },
  levelNow: null,
  spots: [spot],
  neighbourSpots: null,
  extract: null,
  layerNotes: { depth: null, bottom: null, spots: null, soundings: null },
  cautions: [],
  rigCaution: '',
  emergencyWords: '',
  cardUrl: '',
  shortUrl: '',
  ticket: null,
  ...wishes,
});

test('a spot is one row: aim by its mark, the count, the depth to a tenth', () => {
  expect(spotCells(spot, 1)).toEqual([
    '1',
    'The bar',
    'M3 2° left (0°)',
    '14 + 0.30 m',
    '2.5 m',
    'G · gravel',
    'A',
    '3 Apr 2027',
  ]);
  expect(
    spotCells({ ...spot, depthM: null, bottom: null, grade: null, surveyedOn: null, mark: null }, 2).slice(2),
  ).toEqual(['0°', '14 + 0.30 m', '–', '–', '–', '–']);
});

test('the card says which sticks its wraps mean, and each kind when spots differ', () => {
  expect(stickLine([spot])).toContain('Wraps are 12 ft, lead to reel clip.');
  expect(stickLine([spot, { ...spot, stickSpacingM: 3.048 }])).toBe(
    'Wraps are each survey’s own: 12 ft, lead to reel clip; 10 ft, lead to reel clip.',
  );
  expect(stickLine([])).toBe('');
  expect(markLine([spot])).toContain('M3 is the pump-house chimney.');
});

test('the card says the level its depths stand at and what that makes today', () => {
  const levelNow = { levelM: 0.38, at: '2027-07-17T05:00:00.000Z', boardCode: 'FO-G1', boardReadsM: 0.38 };
  expect(levelLine(page({ levelNow }))).toContain('it stood at 0.38 m: 0.24 m less water.');
  expect(levelLine(page({}))).toContain('Read the board');
  expect(levelLine(page({ chart: null }))).toBe('');
});

test('the card names the layers it leaves out, once with each reason', () => {
  const why = 'Shown to this fishery’s members.';
  expect(missingLine(page({ layerNotes: { depth: null, bottom: why, spots: why, soundings: why } }))).toBe(
    `Not on this card: bottom, spots. ${why}`,
  );
  expect(missingLine(page({}))).toBe('');
  expect(levelLine(page({ layerNotes: { depth: why, bottom: why, spots: why, soundings: why } }))).toBe('');
});
