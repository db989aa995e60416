import { clockIn, dayName } from '@mereward/shared/time/day-names';

export { dayName, dayRange } from '@mereward/shared/time/day-names';

const READER_ZONE = Intl.DateTimeFormat().resolvedOptions().timeZone;
const MINUTE_MS = 60_000;

/** Minutes that a zone is ahead of UTC at an instant. */
function aheadMin(zone: string, at: Date): number {
  const parts = new Intl.DateTimeFormat('en-GB', {
    timeZone: zone,
    timeZoneName: 'longOffset',
  }).formatToParts(at);
  const name = parts.find(({ type }) => type === 'timeZoneName')?.value ?? 'GMT';
  const [, sign, hours, minutes] = /GMT([+-])(\d\d):(\d\d)/.exec(name) ?? [];
  return sign === undefined ? 0 : (sign === '-' ? -1 : 1) * (Number(hours) * 60 + Number(minutes));
}

/** Said after a time when the reader's clock shows another: " at the fishery". Empty when both show the same. */
export function zoneNote(at: string, zone: string, readerZone = READER_ZONE): string {
  const instant = new Date(at);
  return aheadMin(zone, instant) === aheadMin(readerZone, instant) ? '' : ' at the fishery';
}

/** An instant's clock time at the fishery: "07:00", or "07:00 at the fishery" to a reader elsewhere. */
export const clockTime = (at: string, zone: string, readerZone = READER_ZONE): string =>
  clockIn(zone).format(new Date(at)) + zoneNote(at, zone, readerZone);

const READER_DAY = new Intl.DateTimeFormat('en-CA', { timeZone: READER_ZONE });

/** An instant by this device's own clock: "21:20", or "Fri 3 July 2026, 21:20" when that was not today. */
export function clockHere(at: string, nowMs = Date.now()): string {
  const day = READER_DAY.format(new Date(at));
  const time = clockIn(READER_ZONE).format(new Date(at));
  return day === READER_DAY.format(nowMs) ? time : `${dayName(day)}, ${time}`;
}

/** An instant's day and time at the fishery: "Sat 4 July 2026, 07:00". */
export function dayAndTime(at: string, zone: string, readerZone = READER_ZONE): string {
  const day = new Intl.DateTimeFormat('en-CA', { timeZone: zone }).format(new Date(at));
  return `${dayName(day)}, ${clockTime(at, zone, readerZone)}`;
}

/** How long ago, in the largest whole unit: "just now", "12 minutes ago", "3 days ago". */
export function ago(atMs: number, nowMs: number): string {
  const minutes = Math.floor((nowMs - atMs) / MINUTE_MS);
  if (minutes < 1) return 'just now';
  const said = (count: number, unit: string): string =>
    `${String(count)} ${unit}${count === 1 ? '' : 's'} ago`;
  if (minutes < 60) return said(minutes, 'minute');
  if (minutes < 48 * 60) return said(Math.floor(minutes / 60), 'hour');
  return said(Math.floor(minutes / (24 * 60)), 'day');
}
