import type { BoardSpan } from '@mereward/shared/bookings/availability-contract';
import { expect, test } from 'vitest';
import { boardCells, darkParts, placedSpans, placeOf, spansIn } from './board-cells';

const ZONE = 'Europe/London';
const span = (from: string, until: string | null, fishingUntil: string | null = null): BoardSpan => ({
  from,
  until,
  fishingUntil,
  state: 'taken',
  words: '',
  closureId: null,
  blockId: null,
  booking: null,
});

test('a fortnight has fourteen columns, each as wide, though one has 23 hours', () => {
  const cells = boardCells('2027-03-21', 'fortnight', ZONE);
  expect(cells).toHaveLength(14);
  const hours = cells.map(({ fromMs, untilMs }) => (untilMs - fromMs) / 3_600_000);
  expect(hours.filter((each) => each === 24)).toHaveLength(13);
  expect(cells.find(({ day }) => day === '2027-03-28')).toMatchObject({ clock: null });
  expect(placeOf(Date.parse('2027-03-28T11:30:00Z'), cells)).toBeCloseTo(7.5, 9); // 11.5 of 23 hours
});

test('a day is looked at two hours at a time', () => {
  const cells = boardCells('2027-07-17', 'day', ZONE);
  expect(cells.map(({ clock }) => clock)).toEqual(
    ['00', '02', '04', '06', '08', '10', '12', '14', '16', '18', '20', '22'].map((hour) => `${hour}:00`),
  );
  expect(placeOf(Date.parse('2027-07-17T06:00:00Z'), cells)).toBe(3.5);
});

test('a span begun before the board and one with no end are cut off at its edges', () => {
  const cells = boardCells('2027-07-12', 'week', ZONE);
  const placed = placedSpans(
    [
      span('2027-07-11T12:00:00Z', '2027-07-12T23:00:00Z', '2027-07-12T11:00:00Z'),
      span('2027-07-16T23:00:00Z', null),
      span('2027-07-20T00:00:00Z', null),
    ],
    cells,
  );
  expect(placed.map(({ at, to, fishingTo, lane }) => [at, to, fishingTo, lane])).toEqual([
    [0, 1, 0.5, 0],
    [5, 7, 7, 0],
  ]);
});

test('spans over one another lie in lanes, and a lane is used again', () => {
  const cells = boardCells('2027-07-12', 'week', ZONE);
  const lanes = placedSpans(
    [
      span('2027-07-12T06:00:00Z', '2027-07-14T06:00:00Z'),
      span('2027-07-13T06:00:00Z', '2027-07-15T06:00:00Z'),
      span('2027-07-14T06:00:00Z', '2027-07-15T06:00:00Z'),
    ],
    cells,
  ).map(({ lane }) => lane);
  expect(lanes).toEqual([0, 1, 0]);
});

test('a span that ends as a column begins is not in it', () => {
  const [first, second] = boardCells('2027-07-12', 'week', ZONE);
  const night = span('2027-07-12T18:00:00Z', '2027-07-12T23:00:00Z');
  expect(first && spansIn([night], first)).toEqual([night]);
  expect(second && spansIn([night], second)).toEqual([]);
});

// tests/reference holds the sun itself against an almanac; here 21:21 and 05:02 are 17 July 2027 at 52.6 N 1.5 W (trade §4.2).
test('the dark of a day is before sunrise and after sunset', () => {
  const [cell] = boardCells('2027-07-17', 'week', ZONE);
  const parts = cell ? darkParts(cell, [-1.5, 52.6], ZONE) : [];
  expect(parts).toHaveLength(2);
  const [sunriseMin, sunsetMin] = [parts[0]?.[1] ?? 0, parts[1]?.[0] ?? 0].map((share) => share * 24 * 60);
  expect(Math.abs((sunriseMin ?? 0) - (5 * 60 + 2))).toBeLessThanOrEqual(2); // both to two minutes, as published
  expect(Math.abs((sunsetMin ?? 0) - (21 * 60 + 21))).toBeLessThanOrEqual(2);
});
