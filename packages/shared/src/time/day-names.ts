import { civilDay } from './civil-day';

const DAY_FORMAT = new Intl.DateTimeFormat('en-GB', {
  weekday: 'short',
  day: 'numeric',
  month: 'long',
  year: 'numeric',
  timeZone: 'UTC',
});

/** A civil day, YYYY-MM-DD: "Sat 4 July 2026". It has no zone: it is the same day everywhere. */
export function dayName(day: string): string {
  const parts = DAY_FORMAT.formatToParts(new Date(`${day}T00:00:00Z`));
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

/** An instant's day and clock time in a zone: "Sat 4 July 2026, 07:00". */
export function dayAndClock(at: string, zone: string): string {
  const instant = new Date(at);
  return `${dayName(civilDay(instant, zone))}, ${clockIn(zone).format(instant)}`;
}

const clocks = new Map<string, Intl.DateTimeFormat>();

/** Writes an instant's clock time in a zone: "07:00". Making one is slow, so each zone's is kept. */
export function clockIn(zone: string): Intl.DateTimeFormat {
  const known = clocks.get(zone);
  if (known) return known;
  const made = new Intl.DateTimeFormat('en-GB', {
    hour: '2-digit',
    minute: '2-digit',
    hourCycle: 'h23',
    timeZone: zone,
  });
  clocks.set(zone, made);
  return made;
}
