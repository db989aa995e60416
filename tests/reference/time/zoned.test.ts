/**
 * Source: fixtures/09_dates.json, computed with Python 3.11 zoneinfo over Debian 12's tzdata; the reading of a time in
 * a gap or an overlap is that of RFC 5545 section 3.3.5. Exact.
 */
import { instantOf, nextSameClockTime, startOfDay, addDays } from '@mereward/shared/time/zoned';
import { readFileSync } from 'node:fs';
import { expect, test } from 'vitest';
import { z } from 'zod';

const Dates = z.object({
  local_times: z.array(
    z.object({ zone: z.string(), local: z.string(), kind: z.string(), rfc5545_reading: z.string() }),
  ),
  day_lengths: z.array(
    z.object({
      zone: z.string(),
      date: z.string(),
      hours: z.number(),
      start_utc: z.string(),
      end_utc: z.string(),
    }),
  ),
  sessions: z.array(
    z.object({
      zone: z.string(),
      start_local: z.string(),
      end_local: z.string(),
      start_utc: z.string(),
      end_utc: z.string(),
    }),
  ),
});
const fixture: unknown = JSON.parse(
  readFileSync(new URL('../fixtures/09_dates.json', import.meta.url), 'utf8'),
);
const dates = Dates.parse(fixture);
const iso = (at: Date): string => at.toISOString().replace('.000Z', 'Z');

test.each(dates.local_times.map((each) => [each.zone, each.local, each] as const))(
  '%s at %s is the instant RFC 5545 reads it as',
  (zone, local, each) => {
    const { at, kind } = instantOf(local, zone);
    expect(iso(at)).toBe(each.rfc5545_reading);
    expect(each.kind).toContain(kind);
  },
);

test.each(dates.day_lengths.map((each) => [each.zone, each.date, each] as const))(
  '%s has its hours on %s',
  (zone, day, each) => {
    const [from, until] = [startOfDay(day, zone), startOfDay(addDays(day, 1), zone)];
    expect([iso(from), iso(until)]).toEqual([each.start_utc, each.end_utc]);
    expect((until.getTime() - from.getTime()) / 3_600_000).toBe(each.hours);
  },
);

test.each(dates.sessions.map((each) => [each.zone, each.start_local, each] as const))(
  '%s from %s ends when its clock says so',
  (zone, start, each) => {
    const from = instantOf(start, zone).at;
    expect([iso(from), iso(instantOf(each.end_local, zone).at)]).toEqual([each.start_utc, each.end_utc]);
    const days = (Date.parse(each.end_local) - Date.parse(each.start_local)) / 86_400_000;
    if (Number.isInteger(days)) expect(iso(nextSameClockTime(from, zone, days).at)).toBe(each.end_utc);
  },
);
