import { expect, test } from 'vitest';
import { civilDay, dayWords, monthsBetween } from './civil-day';

test('a day is the one at the lake, not at Greenwich', () => {
  expect(civilDay(new Date('2027-07-16T23:30:00Z'), 'Europe/London')).toBe('2027-07-17');
  expect(civilDay(new Date('2027-01-16T23:30:00Z'), 'Europe/London')).toBe('2027-01-16');
  expect(civilDay(new Date('2027-01-16T23:30:00Z'), 'Europe/Paris')).toBe('2027-01-17');
  expect(() => civilDay(new Date(0), 'Vale/Of_Wend')).toThrow(RangeError);
});

test('a day is printed with its month in letters', () => {
  expect(dayWords('2027-04-03')).toBe('3 Apr 2027');
});

test('months are counted by the calendar', () => {
  expect(monthsBetween('2027-04-03', '2028-04-02')).toBe(11);
  expect(monthsBetween('2027-04-03', '2028-04-03')).toBe(12);
  expect(monthsBetween('2027-01-31', '2027-02-28')).toBe(0);
});
