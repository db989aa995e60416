import { expect, test } from 'vitest';
import { ago, clockTime, dayAndTime, dayName, dayRange } from './format-time';

test('a civil day is the same day everywhere', () => {
  expect(dayName('2026-07-04')).toBe('Sat 4 July 2026');
  expect(dayName('2026-09-01')).toBe('Tue 1 September 2026');
});

test('a range of days says no part twice', () => {
  expect(dayRange('2027-04-03', '2027-04-11')).toBe('3 to 11 April 2027');
  expect(dayRange('2027-03-30', '2027-04-02')).toBe('30 March to 2 April 2027');
  expect(dayRange('2026-12-30', '2027-01-02')).toBe('30 December 2026 to 2 January 2027');
  expect(dayRange('2027-04-03', '2027-04-03')).toBe('Sat 3 April 2027');
});

test('an instant is told by the fishery’s clock, over the change to summer time too', () => {
  expect(clockTime('2026-07-04T06:00:00Z', 'Europe/London', 'Europe/London')).toBe('07:00');
  expect(clockTime('2026-01-04T07:00:00Z', 'Europe/London', 'Europe/London')).toBe('07:00');
  expect(dayAndTime('2026-07-03T23:30:00Z', 'Europe/London', 'Europe/London')).toBe('Sat 4 July 2026, 00:30');
});

test('a reader whose clock shows another time is told whose time it is', () => {
  expect(clockTime('2026-07-04T06:00:00Z', 'Europe/London', 'Europe/Paris')).toBe('07:00 at the fishery');
  expect(clockTime('2026-01-04T07:00:00Z', 'Europe/London', 'Africa/Abidjan')).toBe('07:00');
  expect(clockTime('2026-07-04T06:00:00Z', 'America/New_York', 'Europe/London')).toBe('02:00 at the fishery');
});

test('age is told in the largest whole unit', () => {
  const minute = 60_000;
  expect(ago(0, 30_000)).toBe('just now');
  expect(ago(0, minute)).toBe('1 minute ago');
  expect(ago(0, 59 * minute)).toBe('59 minutes ago');
  expect(ago(0, 47 * 60 * minute)).toBe('47 hours ago');
  expect(ago(0, 72 * 60 * minute)).toBe('3 days ago');
});
