import fc from 'fast-check';
import { expect, test } from 'vitest';
import { elapsedHours, holds, overlaps, within } from './interval';
import { sunTimes } from './sun';
import { addDays, civilTime, clockMovedSeconds, daysBetween, instantOf, nextSameClockTime } from './zoned';

const zones = fc.constantFrom('Europe/London', 'Europe/Dublin', 'Europe/Paris', 'Australia/Lord_Howe', 'UTC');
const instants = fc
  .integer({ min: Date.UTC(2026, 0, 1) / 1000, max: Date.UTC(2029, 0, 1) / 1000 })
  .map((seconds) => new Date(seconds * 1000));

test('an instant told by its clock and read again is itself, or the first of two', () => {
  fc.assert(
    fc.property(instants, zones, (at, zone) => {
      const back = instantOf(civilTime(at, zone), zone);
      expect(back.kind).not.toBe('gap');
      if (back.kind === 'unique') expect(back.at).toEqual(at);
      else expect(at.getTime() - back.at.getTime()).toBeOneOf([0, 1_800_000, 3_600_000]);
    }),
  );
});

test('what is no time is refused', () => {
  for (const wrong of ['2027-02-30T12:00', '2027-03-28 12:00', '2027-03-28T24:00', ''])
    expect(() => instantOf(wrong, 'Europe/London')).toThrow(RangeError);
  expect(() => instantOf('2027-03-28T12:00', 'Vale/Of_Wend')).toThrow(RangeError);
  expect(() => addDays('2027-02-30', 1)).toThrow(RangeError);
});

test('from noon to noon is 23 hours when the clock goes forward and 25 when it goes back', () => {
  const noon = (day: string): Date => instantOf(`${day}T12:00`, 'Europe/London').at;
  const spring = {
    from: noon('2027-03-27'),
    until: nextSameClockTime(noon('2027-03-27'), 'Europe/London').at,
  };
  const autumn = {
    from: noon('2027-10-30'),
    until: nextSameClockTime(noon('2027-10-30'), 'Europe/London').at,
  };
  expect([elapsedHours(spring), elapsedHours(autumn)]).toEqual([23, 25]);
  expect(clockMovedSeconds(spring.from, spring.until, 'Europe/London')).toBe(3600);
  expect(clockMovedSeconds(autumn.from, autumn.until, 'Europe/London')).toBe(-3600);
});

test('days are counted over the ends of months and years', () => {
  expect(addDays('2027-12-31', 1)).toBe('2028-01-01');
  expect(addDays('2028-03-01', -1)).toBe('2028-02-29');
  expect(daysBetween('2027-03-27', '2027-03-29')).toBe(2);
});

test('stretches that only touch do not overlap', () => {
  const hour = (from: number, until: number) => ({ from: new Date(from), until: new Date(until) });
  expect(overlaps(hour(0, 2), hour(2, 4))).toBe(false);
  expect(overlaps(hour(0, 3), hour(2, 4))).toBe(true);
  expect([holds(hour(0, 2), new Date(0)), holds(hour(0, 2), new Date(2))]).toEqual([true, false]);
  expect([within(hour(1, 2), hour(0, 2)), within(hour(1, 3), hour(0, 2))]).toEqual([true, false]);
});

test('the sun’s day is in order wherever it rises and sets', () => {
  fc.assert(
    fc.property(
      fc.integer({ min: 0, max: 364 }),
      fc.double({ min: -50, max: 50, noNaN: true }),
      (days, lat) => {
        const sun = sunTimes(addDays('2027-01-01', days), [0, lat], 'UTC');
        const order = [sun.dawn, sun.sunrise, sun.sunset, sun.dusk].map(
          (each) => each?.getTime() ?? Number.NaN,
        );
        expect([...order].sort((a, b) => a - b)).toEqual(order);
        expect(order.every(Number.isFinite)).toBe(true);
      },
    ),
    { numRuns: 60 },
  );
});

test('beyond the circle the sun is up all day or not at all', () => {
  expect(sunTimes('2027-06-21', [18.8, 78], 'UTC')).toEqual({
    dawn: null,
    sunrise: null,
    sunset: null,
    dusk: null,
    state: 'always_up',
  });
  expect(sunTimes('2027-12-21', [18.8, 78], 'UTC').state).toBe('never_up');
});
