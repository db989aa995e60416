import { expect, test } from 'vitest';
import { drawSheet, type SheetInput } from './chart-sheet';
import { groundOf } from './ground';
import { stepsOf } from './page';
import { palettes } from './palette';

const shore = [
  { xM: 0, yM: 0 },
  { xM: 60, yM: 0 },
  { xM: 60, yM: 40 },
  { xM: 0, yM: 40 },
];
const frame = { columns: 61, rows: 41, cellM: 1, originM: { xM: 0, yM: 0 } };
const depth = { ...frame, values: Float64Array.from({ length: 61 * 41 }, (_, i) => ((i % 61) / 61) * 2) };
const input: SheetInput = {
  parts: {
    ground: groundOf({ outline: { shore, islands: [] }, depth, isobaths: null, stepM: 0.5, raisedM: 0 }),
    bottom: [],
    soundings: [],
    pegs: [{ id: 'a', number: '7', xM: 0, yM: 20, facingDeg: 90, status: 'open' }],
    spots: [],
    cast: null,
  },
  marks: [
    { code: 'M1', xM: 30, yM: 20 },
    { code: 'M9', xM: 900, yM: 20 },
  ],
  words: {
    lake: 'Far Ostle',
    fishery: 'Ostlemere Waters',
    version: 'Chart 2027.1',
    surveyed: 'Surveyed 3 to 11 April 2027',
    level: 'Depths in metres below datum 0.62 m',
    unit: 'm',
    cautions: ['Not for navigation or swimming.', 'It changes.'],
  },
  depthWords: (depthM) => depthM.toFixed(1),
  stickSpacingM: 3.6576,
  sticks: '12 ft',
};

test('a sheet always carries its version, dates, datum, north, scale in metres and wraps, and its cautions', () => {
  const steps = stepsOf(drawSheet(input, { widthPx: 1600, heightPx: 1131 }, palettes.print));
  const words = steps.flatMap((step) => (step.do === 'text' ? [step.words] : []));
  const { words: said } = input;
  expect(words).toEqual(
    expect.arrayContaining([
      said.lake,
      said.version,
      said.surveyed,
      said.level,
      ...said.cautions,
      'N',
      '7',
      'M1',
    ]),
  );
  expect(words.some((each) => /^\d+ m · [\d.]+ wraps of 12 ft$/.test(each))).toBe(true);
  expect(words).not.toContain('M9');
});

test('nothing written on it stands on anything else written at its foot', () => {
  const steps = stepsOf(drawSheet(input, { widthPx: 1600, heightPx: 1131 }, palettes.print));
  const foot = steps.flatMap((step) => (step.do === 'text' && step.y > 960 && step.x < 60 ? [step.y] : []));
  const rows = [...new Set(foot)].sort((a, b) => a - b);
  rows.slice(1).forEach((y, i) => expect(y - (rows[i] ?? 0)).toBeGreaterThanOrEqual(16));
});
