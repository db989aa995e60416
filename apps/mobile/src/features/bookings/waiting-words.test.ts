import { expect, test } from 'vitest';
import { ordinal, placeWords } from './waiting-words';

test('places in a line are said as people say them', () => {
  expect([1, 3, 6, 11, 12, 21, 22, 23, 111, 112].map(ordinal)).toEqual([
    'first',
    'third',
    '6th',
    '11th',
    '12th',
    '21st',
    '22nd',
    '23rd',
    '111th',
    '112th',
  ]);
});

test('somebody waiting is told their place, and of an offer how long it stands', () => {
  const zone = 'Europe/London';
  expect(placeWords({ status: 'waiting', place: 2, claimUntil: null, zone })).toBe('You are second in line.');
  expect(placeWords({ status: 'offered', place: null, claimUntil: '2027-07-17T09:30:00Z', zone })).toMatch(
    /until Sat 17 July 2027, 10:30/,
  );
});
