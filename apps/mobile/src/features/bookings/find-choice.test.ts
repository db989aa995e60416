import { expect, test } from 'vitest';
import {
  choiceOf,
  filterCount,
  findAddress,
  freeQuery,
  NO_FILTERS,
  paramsOf,
  type FindChoice,
} from './find-choice';

const PEG = '11111111-1111-4111-8111-111111111111';
const KIND = '22222222-2222-4222-8222-222222222222';

const choice: FindChoice = {
  fisheryId: '33333333-3333-4333-8333-333333333333',
  day: '2027-07-17',
  kindId: KIND,
  start: '12:00',
  rods: 2,
  pegId: PEG,
  party: [
    { pegId: PEG, ticketTypeId: KIND, kind: 'holder', rods: 2, people: 1 },
    { pegId: null, ticketTypeId: KIND, kind: 'junior', rods: 1, people: 1 },
  ],
  filters: { ...NO_FILTERS, bottom: 'gravel', leastDepthM: 2.5, stepFree: true },
};

test('an address gives back the choice it was made of', () => {
  expect(choiceOf(paramsOf(choice))).toEqual(choice);
});

test('what an address says wrongly is left out', () => {
  expect(choiceOf({ day: 'tomorrow', rods: '99', party: 'x~y', bottom: 'custard', peg: ['a'] })).toEqual({
    fisheryId: null,
    day: null,
    kindId: null,
    start: null,
    rods: null,
    pegId: null,
    party: [],
    filters: NO_FILTERS,
  });
});

test('an address for after the sign-in is one our sign-in lets through', () => {
  const once = decodeURIComponent(findAddress(choice)); // the router may decode it once more
  expect(once).toMatch(/^\/tickets\?[\w\-/?=&%.~]*$/);
  expect(findAddress({ ...choiceOf({}) })).toBe('/tickets');
});

test('the server is asked for the hours and the filters, not for what is only on the screen', () => {
  const query = new URLSearchParams(freeQuery(choice) ?? '');
  expect(Object.fromEntries(query)).toEqual({
    day: '2027-07-17',
    ticketTypeId: KIND,
    start: '12:00',
    rods: '2',
    bottom: 'gravel',
    leastDepthM: '2.5',
    stepFree: 'assisted',
  });
  expect(freeQuery({ ...choice, day: null })).toBeNull();
});

test('filters in use are counted', () => {
  expect(filterCount(NO_FILTERS)).toBe(0);
  expect(filterCount(choice.filters)).toBe(3);
});
