import type { FreePeg } from '@mereward/shared/bookings/availability-contract';
import { expect, test } from 'vitest';
import { groundWords, pegsLike, wayWords } from './peg-words';

const peg = (number: string, eastM: number, more: Partial<FreePeg> = {}): FreePeg => ({
  pegId: number,
  lakeId: 'far',
  number,
  name: '',
  state: 'free',
  whyNot: null,
  nextFree: null,
  position: [eastM / 70_000, 51],
  people: 1,
  rods: 3,
  placesLeft: null,
  fromParkingM: null,
  steps: null,
  surface: '',
  barrow: 'unknown',
  stepFree: { kind: 'unknown', facts: '' },
  ground: { shallowestM: 0.8, deepestM: 2.6, bottoms: ['silt'] },
  priceFromPence: 2800,
  ...more,
});
const gravel = { shallowestM: 1, deepestM: 3, bottoms: ['gravel' as const, 'clay' as const] };

test('pegs like a taken one are free, of its lake, first with its bottom and then the nearest', () => {
  const gone = peg('FO7', 0, { state: 'taken', ground: gravel });
  const all = [
    gone,
    peg('FO8', 10),
    peg('FO6', -20, { ground: gravel }),
    peg('FO9', 30, { ground: gravel }),
    peg('FO5', -12, { ground: gravel, state: 'held' }),
    peg('OP1', 5, { ground: gravel, lakeId: 'pool' }),
  ];
  expect(pegsLike(gone, all).map(({ number }) => number)).toEqual(['FO6', 'FO9', 'FO8']);
});

test('where the bottom of the taken peg is not known the nearest are like it', () => {
  const gone = peg('FO7', 0, { state: 'taken', ground: null });
  expect(
    pegsLike(gone, [gone, peg('FO9', 30, { ground: gravel }), peg('FO8', 10)]).map(({ number }) => number),
  ).toEqual(['FO8', 'FO9']);
});

test('what a peg holds is said in the reader’s unit', () => {
  expect(groundWords(gravel, { length: 'm' })).toMatch(/^1(\.0)?.*3(\.0)?\sm, gravel and clay$/);
  expect(groundWords(null, { length: 'm' })).toBeNull();
});

test('the way says what is known and nothing else', () => {
  expect(wayWords(peg('FO7', 0))).toBe('');
  expect(wayWords(peg('FO7', 0, { fromParkingM: 120, steps: 1 }))).toBe('120 m from the car, 1 step');
  expect(
    wayWords(
      peg('FO7', 0, { fromParkingM: 40, steps: 0, stepFree: { kind: 'assisted', facts: '' }, barrow: 'yes' }),
    ),
  ).toBe('40 m from the car, step-free with help, barrow');
});
