import { expect, test } from 'vitest';
import { chartAge } from './chart-age';

test('a chart ages by the day of its last cast', () => {
  expect(chartAge('2027-04-03', '2028-04-02', false)).toBe('current');
  expect(chartAge('2027-04-03', '2028-04-03', false)).toBe('ageing');
  expect(chartAge('2027-04-03', '2029-04-02', false)).toBe('ageing');
  expect(chartAge('2027-04-03', '2029-04-03', false)).toBe('old');
});

test('what moved the bottom since outweighs the date', () => {
  expect(chartAge('2027-04-03', '2027-05-01', true)).toBe('changed');
});
