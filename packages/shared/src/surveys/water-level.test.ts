import { describe, expect, test } from 'vitest';
import type { VisitGauge } from './cast-site';
import { levelAt } from './water-level';

const gauge: VisitGauge = {
  startAt: '2027-04-03T08:00:00Z',
  startM: 0.6,
  endAt: '2027-04-03T12:00:00Z',
  endM: 0.7,
  datumM: 0.5,
  higherNumberHigherWater: true,
};

describe('the water over chart datum', () => {
  test.each([
    ['2027-04-03T08:00:00Z', 0.6],
    ['2027-04-03T09:00:00Z', 0.625],
    ['2027-04-03T12:00:00Z', 0.7],
    ['2027-04-03T07:00:00Z', 0.6],
    ['2027-04-04T07:00:00Z', 0.7],
  ])('at %s the board reads %d', (at, readingM) => {
    const level = levelAt(gauge, at);
    expect(level.readingM).toBeCloseTo(readingM, 12);
    expect(level.aboveDatumM).toBeCloseTo(readingM - 0.5, 12);
    expect(level.warnings).toEqual([]);
  });

  test('a board whose numbers fall as the water rises is read the other way', () => {
    expect(levelAt({ ...gauge, higherNumberHigherWater: false }, gauge.startAt).aboveDatumM).toBeCloseTo(
      -0.1,
      12,
    );
  });

  test('an open visit stays at its first reading, a little less sure', () => {
    const open = levelAt({ ...gauge, endAt: null, endM: null }, '2027-04-03T10:00:00Z');
    expect(open.readingM).toBe(0.6);
    expect(open.sigmaM).toBeGreaterThan(levelAt(gauge, '2027-04-03T10:00:00Z').sigmaM);
  });

  test('a reading fourteen days away is known, fifteen days away is warned about', () => {
    expect(levelAt(gauge, '2027-04-17T12:00:00Z').known).toBe(true);
    const far = levelAt(gauge, '2027-04-18T12:00:01Z');
    expect(far.known).toBe(false);
    expect(far.warnings[0]).toMatch(/15 days from this cast/);
  });

  test('two readings a month apart know little of the middle', () => {
    const long = { ...gauge, endAt: '2027-05-05T08:00:00Z' };
    expect(levelAt(long, '2027-04-19T08:00:00Z').known).toBe(false);
  });
});
