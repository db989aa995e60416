import { expect, test } from 'vitest';
import { countdown, partOf, placeName } from './booking-words';

test('a place is named by its pegs and its lake, or by the lake alone', () => {
  const peg = (number: string) => ({ number, name: '' });
  expect(placeName({ pegs: [peg('FO7')], lakeName: 'Far Ostle' })).toBe('Peg FO7, Far Ostle');
  expect(placeName({ pegs: [peg('FO7'), peg('FO8'), peg('FO9')], lakeName: 'Far Ostle' })).toBe(
    'Pegs FO7, FO8 and FO9, Far Ostle',
  );
  expect(placeName({ pegs: [], lakeName: 'Far Ostle' })).toBe('Far Ostle');
});

test('a hold counts down by the second and ends at nought', () => {
  const until = Date.parse('2027-07-16T18:10:00Z');
  expect(countdown(until, until - 600_000)).toBe('10:00');
  expect(countdown(until, until - 59_001)).toBe('1:00');
  expect(countdown(until, until - 58_999)).toBe('0:59');
  expect(countdown(until, until + 5_000)).toBe('0:00');
});

test('what is open, to come and past follows from the state and the end', () => {
  const until = '2027-07-18T11:00:00Z';
  const before = Date.parse(until) - 1;
  expect(partOf({ status: 'confirmed', until }, before)).toBe('to come');
  expect(partOf({ status: 'confirmed', until }, Date.parse(until))).toBe('past');
  expect(partOf({ status: 'pending_payment', until }, before)).toBe('open');
  expect(partOf({ status: 'cancelled_by_angler', until }, before)).toBe('past');
});
