const READER_ZONE = Intl.DateTimeFormat().resolvedOptions().timeZone;
const MINUTE_MS = 60_000;

const clock = (zone: string) =>
  new Intl.DateTimeFormat('en-GB', { hour: '2-digit', minute: '2-digit', hourCycle: 'h23', timeZone: zone });

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
  clock(zone).format(new Date(at)) + zoneNote(at, zone, readerZone);

/** An instant's day and time at the fishery: "Sat 4 July 2026, 07:00". */
export function dayAndTime(at: string, zone: string, readerZone = READER_ZONE): string {
  const day = new Intl.DateTimeFormat('en-CA', { timeZone: zone }).format(new Date(at));
  return `${dayName(day)}, ${clockTime(at, zone, readerZone)}`;
}

/** A civil day, YYYY-MM-DD: "Sat 4 July 2026". It has no zone: it is the same day everywhere. */
export function dayName(day: string): string {
  const parts = new Intl.DateTimeFormat('en-GB', {
    weekday: 'short',
    day: 'numeric',
    month: 'long',
    year: 'numeric',
    timeZone: 'UTC',
  }).formatToParts(new Date(`${day}T00:00:00Z`));
  const part = (type: string): string => parts.find((one) => one.type === type)?.value ?? '';
  return `${part('weekday')} ${part('day')} ${part('month')} ${part('year')}`;
}

/** From one civil day to another, saying no part twice: "3 to 11 April 2027". */
export function dayRange(from: string, to: string): string {
  if (from === to) return dayName(from);
  const long = (day: string): string[] => dayName(day).split(' ').slice(1);
  const [fromDay = '', fromMonth = '', fromYear = ''] = long(from);
  const [toDay = '', toMonth = '', toYear = ''] = long(to);
  if (fromYear !== toYear) return `${fromDay} ${fromMonth} ${fromYear} to ${toDay} ${toMonth} ${toYear}`;
  if (fromMonth !== toMonth) return `${fromDay} ${fromMonth} to ${toDay} ${toMonth} ${toYear}`;
  return `${fromDay} to ${toDay} ${toMonth} ${toYear}`;
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
