import { expect, test } from 'vitest';
import { ageWords, chartAge, gradeNow, type AgeNow } from './chart-age';

test('a chart ages by the day of its last cast', () => {
  expect(chartAge('2027-04-03', '2028-04-02', false)).toBe('current');
  expect(chartAge('2027-04-03', '2028-04-03', false)).toBe('ageing');
  expect(chartAge('2027-04-03', '2029-04-02', false)).toBe('ageing');
  expect(chartAge('2027-04-03', '2029-04-03', false)).toBe('old');
});

test('what moved the bottom since outweighs the date', () => {
  expect(chartAge('2027-04-03', '2027-05-01', true)).toBe('changed');
});

const cut = (wishes: Partial<AgeNow['changes'][number]> = {}): AgeNow['changes'][number] => ({
  kind: 'weed_cut',
  happenedOn: '2027-06-01',
  words: 'Weed was cut on 1 Jun 2027',
  rings: [[0, 0, 10, 0, 10, 10, 0, 10]],
  ...wishes,
});
const now = (wishes: Partial<AgeNow> = {}): AgeNow => ({
  age: 'changed',
  changes: [cut()],
  levelsMoved: false,
  ...wishes,
});

test('a changed chart names what happened, the newest two, and how much more', () => {
  expect(ageWords('changed', [cut()])).toBe('Changed since survey: weed was cut on 1 Jun 2027');
  expect(ageWords('changed', [cut(), cut(), cut()])).toMatch(/; and 1 more$/);
  expect(ageWords('changed')).toMatch(/very low or in flood/);
  expect(ageWords('current', [cut()])).toMatch(/twelve months/);
});

test('a grade drops by one where the bottom changed, everywhere when it all did, and never to D', () => {
  const inside = { xM: 5, yM: 5 };
  const outside = { xM: 15, yM: 5 };
  expect(gradeNow('A', inside, now())).toBe('B');
  expect(gradeNow('A', outside, now())).toBe('A');
  expect(gradeNow('A', outside, now({ changes: [cut({ rings: null })] }))).toBe('B');
  expect(gradeNow('B', outside, now({ levelsMoved: true }))).toBe('C');
  expect(gradeNow('B', outside, now({ age: 'old', changes: [] }))).toBe('C');
  expect(gradeNow('C', inside, now())).toBe('C');
  expect(gradeNow('D', inside, now())).toBe('D');
});

test('a hole in an area is left as it was', () => {
  const hole = [4, 4, 6, 4, 6, 6, 4, 6];
  const changes = [cut({ rings: [[0, 0, 10, 0, 10, 10, 0, 10], hole] })];
  expect(gradeNow('A', { xM: 5, yM: 5 }, now({ changes }))).toBe('A');
  expect(gradeNow('A', { xM: 2, yM: 2 }, now({ changes }))).toBe('B');
});
