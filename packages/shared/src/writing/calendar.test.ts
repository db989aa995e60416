import fc from 'fast-check';
import { expect, test } from 'vitest';
import { instantOf } from '../time/zoned';
import { calendarText, calendarUid, type CalendarEvent } from './calendar';
import { foldedLine, textValue } from './content-lines';

const zone = 'Europe/London';
const event = (more: Partial<CalendarEvent> = {}): CalendarEvent => ({
  uid: calendarUid('booking', '42', 'mereward.example'),
  sequence: 0,
  stampedAt: new Date('2027-07-01T09:00:00Z'),
  from: instantOf('2027-07-17T12:00', zone).at,
  until: instantOf('2027-07-18T12:00', zone).at,
  summary: 'Peg FO7, Far Ostle',
  description: '',
  location: '',
  status: 'confirmed',
  url: '',
  ...more,
});
const written = (events: CalendarEvent[], more: Partial<Parameters<typeof calendarText>[0]> = {}): string[] =>
  calendarText({ name: 'Tickets', method: 'PUBLISH', zone: null, events, ...more })
    .replace(/\r\n /g, '')
    .split('\r\n');

test('a line never has more than 75 octets nor half a letter, and unfolds to what it was', () => {
  fc.assert(
    fc.property(fc.string({ unit: 'grapheme', maxLength: 300 }), (words) => {
      const line = `SUMMARY:${textValue(words)}`;
      const folded = foldedLine(line);
      expect(folded.endsWith('\r\n')).toBe(true);
      const parts = folded.slice(0, -2).split('\r\n');
      for (const part of parts) expect(new TextEncoder().encode(part).length).toBeLessThanOrEqual(75);
      expect(parts.map((part, index) => (index === 0 ? part : part.slice(1))).join('')).toBe(line);
    }),
  );
});

test('words cannot break out of their line', () => {
  const lines = written([event({ summary: 'Peg\r\nEND:VEVENT\rX:1\u0007', description: 'a;b,c\\d' })]);
  expect(lines).toContain('SUMMARY:Peg\\nEND:VEVENT\\nX:1');
  expect(lines).toContain('DESCRIPTION:a\\;b\\,c\\\\d');
  expect(lines.filter((line) => line === 'END:VEVENT')).toHaveLength(1);
});

test('times are in UTC, or by the lake’s clock with every move of it', () => {
  expect(written([event()])).toContain('DTSTART:20270717T110000Z');
  const lines = written([event()], { zone });
  expect(lines).toContain('DTSTART;TZID=Europe/London:20270717T120000');
  expect(lines).toContain('DTEND;TZID=Europe/London:20270718T120000');
  expect(lines.join('|')).toContain(
    'BEGIN:DAYLIGHT|DTSTART:20270328T010000|TZOFFSETFROM:+0000|TZOFFSETTO:+0100|END:DAYLIGHT',
  );
  expect(written([], { zone }).some((line) => line.includes('VTIMEZONE'))).toBe(false);
});

test('a cancelled ticket keeps its UID and says so with a higher sequence', () => {
  const before = written([event()]);
  const after = written([event({ status: 'cancelled', sequence: 1 })], { method: 'CANCEL' });
  const uid = (lines: string[]): string | undefined => lines.find((line) => line.startsWith('UID:'));
  expect(uid(after)).toBe(uid(before));
  expect(after).toEqual(
    expect.arrayContaining(['METHOD:CANCEL', 'STATUS:CANCELLED', 'SEQUENCE:1', 'TRANSP:TRANSPARENT']),
  );
});

test('an event that ends as it starts, and one written twice, are refused', () => {
  expect(() => written([event({ until: event().from })])).toThrow(RangeError);
  expect(() => written([event(), event()])).toThrow('same UID');
});
