import { clockValue, zoneLines } from './calendar-zone';
import { foldedLine, textValue } from './content-lines';

/** One thing in a calendar. `uid` never changes; `sequence` goes up by one with every change somebody must see. */
export type CalendarEvent = {
  uid: string;
  sequence: number;
  stampedAt: Date; // when what is written here was last changed
  from: Date;
  until: Date; // half-open, later than `from`
  summary: string;
  description: string;
  location: string;
  status: 'tentative' | 'confirmed' | 'cancelled';
  url: string; // ''
};

export type Calendar = {
  name: string;
  method: 'PUBLISH' | 'CANCEL'; // CANCEL only to take events back by letter; a feed keeps PUBLISH
  zone: string | null; // IANA: times by that clock, with its VTIMEZONE; null: in UTC
  events: readonly CalendarEvent[];
};

/** The UID of a row of ours for ever, unique in the world by the host that wrote it. Source: RFC 5545 section 3.8.4.7. */
export const calendarUid = (word: string, id: string, host: string): string => `${word}-${id}@${host}`;

const utcValue = (at: Date): string => `${clockValue(at, 'UTC')}Z`;

/**
 * A calendar as text/calendar, UTF-8, CRLF line ends. Throws RangeError for an event that does not end after it starts
 * or a UID that occurs twice. Source: RFC 5545 sections 3.1, 3.4, 3.6.1, 3.6.5, 3.8; RFC 7986 section 5.1 (NAME);
 * RFC 5546 sections 3.2.1 and 3.2.5 for what a published and a cancelled event carry.
 */
export function calendarText({ name, method, zone, events }: Calendar): string {
  const uids = new Set(events.map(({ uid }) => uid));
  if (uids.size < events.length) throw new RangeError('Two events of a calendar have the same UID.');
  if (events.some(({ from, until }) => until <= from)) throw new RangeError('An event ends after it starts.');
  const times = events.flatMap(({ from, until }) => [from.getTime(), until.getTime()]);
  const clock = zone !== null && times.length > 0;
  const lines = [
    'BEGIN:VCALENDAR',
    'VERSION:2.0',
    'PRODID:-//Mereward//Tickets and closures//EN',
    'CALSCALE:GREGORIAN',
    `METHOD:${method}`,
    `NAME:${textValue(name)}`,
    `X-WR-CALNAME:${textValue(name)}`,
    ...(clock ? zoneLines(zone, earliest(times), latest(times)) : []),
    ...events.flatMap((event) => eventLines(event, method, zone)),
    'END:VCALENDAR',
  ];
  return lines.map(foldedLine).join('');
}

const earliest = (times: readonly number[]): Date => new Date(times.reduce((a, b) => Math.min(a, b)));
const latest = (times: readonly number[]): Date => new Date(times.reduce((a, b) => Math.max(a, b)));

function eventLines(event: CalendarEvent, method: Calendar['method'], zone: string | null): string[] {
  const time = (property: string, at: Date): string =>
    zone === null ? `${property}:${utcValue(at)}` : `${property};TZID=${zone}:${clockValue(at, zone)}`;
  const text = (property: string, words: string): string[] =>
    words === '' ? [] : [`${property}:${textValue(words)}`];
  const status = method === 'CANCEL' ? 'cancelled' : event.status;
  return [
    'BEGIN:VEVENT',
    `UID:${textValue(event.uid)}`,
    `DTSTAMP:${utcValue(event.stampedAt)}`,
    `LAST-MODIFIED:${utcValue(event.stampedAt)}`,
    `SEQUENCE:${event.sequence}`,
    time('DTSTART', event.from),
    time('DTEND', event.until),
    ...text('SUMMARY', event.summary),
    ...text('DESCRIPTION', event.description),
    ...text('LOCATION', event.location),
    ...(event.url === '' ? [] : [`URL:${encodeURI(event.url)}`]),
    `STATUS:${status.toUpperCase()}`,
    `TRANSP:${status === 'cancelled' ? 'TRANSPARENT' : 'OPAQUE'}`,
    'END:VEVENT',
  ];
}
