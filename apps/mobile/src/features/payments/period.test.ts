import { expect, test } from 'vitest';
import { periodFault, periodOf } from './period';

test('last month is all of it, whatever its length', () => {
  expect(periodOf('last_month', '2027-03-31')).toEqual({ from: '2027-02-01', until: '2027-02-28' });
  expect(periodOf('last_month', '2027-01-04')).toEqual({ from: '2026-12-01', until: '2026-12-31' });
});

test('this month and the last seven days end today', () => {
  expect(periodOf('month', '2027-03-31')).toEqual({ from: '2027-03-01', until: '2027-03-31' });
  expect(periodOf('week', '2027-03-03')).toEqual({ from: '2027-02-25', until: '2027-03-03' });
});

test('a period is refused in words where it can’t be asked for', () => {
  expect(periodFault({ from: '2027-03-02', until: '2027-03-01' })).toBe(
    'The last day comes before the first.',
  );
  expect(periodFault({ from: '2026-01-01', until: '2027-03-01' })).toBe('At most 400 days at once.');
  expect(periodFault({ from: '', until: '2027-03-01' })).toBe('Choose both days.');
  expect(periodFault({ from: '2027-03-01', until: '2027-03-01' })).toBeNull();
});
