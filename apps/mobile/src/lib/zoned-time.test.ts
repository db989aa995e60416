import { expect, test } from 'vitest';
import { civilTime, instantOf } from './zoned-time';

const ZONE = 'Europe/London';

test('summer and winter clocks are told apart', () => {
  expect(instantOf('2027-07-17T09:05', ZONE)).toBe('2027-07-17T08:05:00.000Z');
  expect(instantOf('2027-01-17T09:05', ZONE)).toBe('2027-01-17T09:05:00.000Z');
  expect(civilTime(Date.parse('2027-07-17T08:05:00Z'), ZONE)).toBe('2027-07-17T09:05');
});

test('the hour that comes twice is its first, the hour left out is read on', () => {
  expect(instantOf('2027-10-31T01:30', ZONE)).toBe('2027-10-31T00:30:00.000Z');
  expect(instantOf('2027-03-28T01:30', ZONE)).toBe('2027-03-28T01:30:00.000Z');
});

test('what is no time is none', () => {
  for (const civil of ['', '2027-07-17', '2027-13-01T09:00', 'noon'])
    expect(instantOf(civil, ZONE)).toBeNull();
});
