/**
 * Source: fixtures/08_sun.json, computed with PyEphem 4.1.4 (libastro, VSOP87) at −0.833° and −6°, level horizon.
 * Tolerance as stated there: 60 s, since true refraction varies by more than that; 300 s at 60° and above, where the
 * sun crosses the horizon at a shallow angle. Row 24 of the trade's numbers (52.6 N 1.5 W, 2027) is given to ± 2 min.
 */
import { sunTimes } from '@mereward/shared/time/sun';
import { civilTime } from '@mereward/shared/time/zoned';
import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { z } from 'zod';

const Case = z.object({
  place: z.string(),
  lat: z.number(),
  lon: z.number(),
  tz: z.string(),
  local_date: z.string(),
  civil_dawn_utc: z.string(),
  sunrise_utc: z.string(),
  sunset_utc: z.string(),
  civil_dusk_utc: z.string(),
});
const fixture: unknown = JSON.parse(
  readFileSync(new URL('../fixtures/08_sun.json', import.meta.url), 'utf8'),
);
const { cases } = z.object({ cases: z.array(Case) }).parse(fixture);

const offSeconds = (got: Date | null, wanted: string): number =>
  got ? Math.abs(got.getTime() - Date.parse(wanted)) / 1000 : Number.POSITIVE_INFINITY;

describe('sun times', () => {
  test('eighty-eight place-days are compared', () => {
    expect(cases).toHaveLength(88);
  });

  test.each(cases.map((each) => [each.place, each.local_date, each] as const))('%s on %s', (_, day, each) => {
    const sun = sunTimes(day, [each.lon, each.lat], each.tz);
    const limitS = Math.abs(each.lat) < 60 ? 60 : 300;
    const pairs = [
      [sun.dawn, each.civil_dawn_utc],
      [sun.sunrise, each.sunrise_utc],
      [sun.sunset, each.sunset_utc],
      [sun.dusk, each.civil_dusk_utc],
    ] as const;
    for (const [got, wanted] of pairs) {
      if (wanted === 'always_up' || wanted === 'never_up') expect(got).toBeNull();
      else expect(offSeconds(got, wanted)).toBeLessThanOrEqual(limitS);
    }
    const state = /^(always|never)_up$/.test(each.sunrise_utc) ? each.sunrise_utc : 'rises_and_sets';
    expect(sun.state).toBe(state);
  });
});

test.each([
  ['2027-01-09', '08:14', '16:10'],
  ['2027-04-03', '06:36', '19:42'],
  ['2027-07-17', '05:02', '21:21'],
  ['2027-11-06', '07:11', '16:28'],
])('at 52.6 N 1.5 W on %s the sun rises about %s and sets about %s', (day, rise, set) => {
  const { sunrise, sunset } = sunTimes(day, [-1.5, 52.6], 'Europe/London');
  const minute = (clock: string): number => Number(clock.slice(0, 2)) * 60 + Number(clock.slice(3, 5));
  const shown = (at: Date | null): number =>
    at ? minute(civilTime(at, 'Europe/London').slice(11)) : Number.NaN;
  expect(Math.abs(shown(sunrise) - minute(rise))).toBeLessThanOrEqual(2);
  expect(Math.abs(shown(sunset) - minute(set))).toBeLessThanOrEqual(2);
});
