const formats = new Map<string, Intl.DateTimeFormat>();

function formatFor(zone: string): Intl.DateTimeFormat {
  const known = formats.get(zone);
  if (known) return known;
  const made = new Intl.DateTimeFormat('en-GB', {
    timeZone: zone,
    hourCycle: 'h23',
    year: 'numeric',
    month: '2-digit',
    day: '2-digit',
    hour: '2-digit',
    minute: '2-digit',
    second: '2-digit',
  });
  formats.set(zone, made);
  return made;
}

const SECOND_MS = 1000;
export const HOUR_MS = 3_600_000;
export const DAY_MS = 24 * HOUR_MS;

/** The clock and calendar of an instant in an IANA zone, YYYY-MM-DDTHH:MM:SS. Throws RangeError for no such zone. */
export function civilTime(at: Date, zone: string): string {
  const parts = new Map(
    formatFor(zone)
      .formatToParts(at)
      .map(({ type, value }) => [type, value]),
  );
  const part = (type: Intl.DateTimeFormatPartTypes): string => parts.get(type) ?? '';
  return `${part('year').padStart(4, '0')}-${part('month')}-${part('day')}T${part('hour')}:${part('minute')}:${part('second')}`;
}

/** How far a zone's clock is ahead of UTC at an instant, seconds. */
export function offsetSeconds(at: Date, zone: string): number {
  const shown = Date.parse(`${civilTime(at, zone)}Z`);
  return (shown - Math.floor(at.getTime() / SECOND_MS) * SECOND_MS) / SECOND_MS;
}

/** `gap`: the clock jumped over this time; `overlap`: it showed this time twice. */
export type ZonedInstant = { at: Date; kind: 'unique' | 'gap' | 'overlap' };

const CIVIL = /^\d{4}-\d\d-\d\dT\d\d:\d\d(:\d\d)?$/;

/**
 * The instant at which a zone's clock shows a civil time (YYYY-MM-DDTHH:MM or with seconds). A time in a gap is read
 * with the offset before it, so 01:30 in the hour that is left out means 02:30; one that comes twice is the first.
 * Throws RangeError for what is no time or no zone. Source: RFC 5545 section 3.3.5.
 */
export function instantOf(civil: string, zone: string): ZonedInstant {
  const shown = CIVIL.test(civil) ? Date.parse(`${civil}Z`) : NaN;
  if (Number.isNaN(shown) || !new Date(shown).toISOString().startsWith(civil))
    throw new RangeError(`“${civil}” is no day and time, like 2027-03-28T12:00.`);
  const before = offsetSeconds(new Date(shown - DAY_MS), zone);
  const after = offsetSeconds(new Date(shown + DAY_MS), zone);
  const readings = [...new Set([before, after])]
    .map((offset) => ({ offset, at: new Date(shown - offset * SECOND_MS) }))
    .filter(({ offset, at }) => offsetSeconds(at, zone) === offset)
    .map(({ at }) => at)
    .sort((a, b) => a.getTime() - b.getTime());
  const [first, second] = readings;
  if (!first) return { at: new Date(shown - before * SECOND_MS), kind: 'gap' };
  return { at: first, kind: second ? 'overlap' : 'unique' };
}

/** The instant at which a civil day (YYYY-MM-DD) begins in a zone: its first, where midnight is left out or comes twice. */
export const startOfDay = (day: string, zone: string): Date => instantOf(`${day}T00:00`, zone).at;

/** A civil day so many days later (earlier when negative), YYYY-MM-DD. Throws RangeError for what is no day. */
export function addDays(day: string, days: number): string {
  const at = Date.parse(`${day}T00:00:00Z`);
  if (Number.isNaN(at) || !new Date(at).toISOString().startsWith(day))
    throw new RangeError(`“${day}” is no day, like 2027-03-28.`);
  return new Date(at + days * DAY_MS).toISOString().slice(0, 10);
}

/** Whole days from one civil day to another; negative when the other is earlier. */
export const daysBetween = (from: string, to: string): number =>
  Math.round((Date.parse(`${to}T00:00:00Z`) - Date.parse(`${from}T00:00:00Z`)) / DAY_MS);

/** The instant at which the clock next shows the same time `days` days on; a gap and an overlap as in `instantOf`. */
export function nextSameClockTime(at: Date, zone: string, days = 1): ZonedInstant {
  const [day = '', clock = ''] = civilTime(at, zone).split('T');
  return instantOf(`${addDays(day, days)}T${clock}`, zone);
}

/** How much the clock is moved between two instants, seconds: 3600 when it goes forward, −3600 back, 0 not at all. */
export const clockMovedSeconds = (from: Date, until: Date, zone: string): number =>
  offsetSeconds(until, zone) - offsetSeconds(from, zone);
