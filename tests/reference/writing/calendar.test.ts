/**
 * Sources: fixtures/09_formats/ical, written from RFC 5545 and read there with python3-icalendar 4.0.3 (Europe/London’s
 * moves of the clock stand in tzid.ics as that RFC’s rules); RFC 5545 section 3.1 for the folded line and section
 * 3.3.11 for the text of a project’s review, from memory. Exact: every octet counts.
 */
import { calendarText, type CalendarEvent } from '@mereward/shared/writing/calendar';
import { zoneLines } from '@mereward/shared/writing/calendar-zone';
import { foldedLine, textValue } from '@mereward/shared/writing/content-lines';
import { readFileSync } from 'node:fs';
import { expect, test } from 'vitest';
import { z } from 'zod';

const fixtures = new URL('../fixtures/', import.meta.url);
const sample = (name: string): string => readFileSync(new URL(`09_formats/ical/${name}`, fixtures), 'utf8');
const manifest: unknown = JSON.parse(readFileSync(new URL('09_formats_manifest.json', fixtures), 'utf8'));

/** Every property line of a file, unfolded, those of a zone left out. */
const properties = (text: string): string[] =>
  text
    .replace(/\r\n[ \t]/g, '')
    .replace(/BEGIN:VTIMEZONE[\s\S]*END:VTIMEZONE\r\n/, '')
    .split('\r\n')
    .filter((line) => line !== '' && !line.startsWith('PRODID:'));

const event: CalendarEvent = {
  uid: '20260320-1@portal.example',
  sequence: 0,
  stampedAt: new Date('2026-01-01T12:00:00Z'),
  from: new Date('2026-03-20T17:00:00Z'),
  until: new Date('2026-03-22T09:00:00Z'),
  summary: 'Session',
  description: '',
  location: '',
  status: 'confirmed',
  url: '',
};
const write = (zone: string | null, more: Partial<CalendarEvent> = {}): string =>
  calendarText({ name: 'Sessions', method: 'PUBLISH', zone, events: [{ ...event, ...more }] });

test('every line of the sample in UTC is written', () => {
  expect(properties(write(null))).toEqual(expect.arrayContaining(properties(sample('utc.ics'))));
});

test('every line of the sample by London’s clock is written', () => {
  const times = { from: new Date('2026-03-20T18:00:00Z'), until: new Date('2026-03-22T10:00:00Z') };
  expect(properties(write('Europe/London', times))).toEqual(
    expect.arrayContaining(properties(sample('tzid.ics'))),
  );
});

test('London’s clock moves as the rules of the sample say: last Sundays of March and October at 01:00 UTC', () => {
  const lines = zoneLines(
    'Europe/London',
    new Date('2026-03-20T18:00:00Z'),
    new Date('2026-03-22T10:00:00Z'),
  );
  const moves = lines.join('|');
  expect(moves).toContain('DTSTART:20260329T010000|TZOFFSETFROM:+0000|TZOFFSETTO:+0100|END:DAYLIGHT');
  expect(moves).toContain('DTSTART:20261025T020000|TZOFFSETFROM:+0100|TZOFFSETTO:+0000|END:STANDARD');
});

test('the folded sample is folded at the very same octets', () => {
  const { files } = z.object({ files: z.array(z.looseObject({ file: z.string() })) }).parse(manifest);
  const row = files.find(({ file }) => file.endsWith('folded_escaped.ics'));
  const { summary } = z.object({ expect: z.object({ summary: z.string() }) }).parse(row).expect;
  const folded = foldedLine(`SUMMARY:${textValue(summary)}`);
  expect(sample('folded_escaped.ics')).toContain(folded);
});

test('a text with commas and line ends is written as the RFC’s own example', () => {
  expect(textValue('Project XYZ Final Review\nConference Room - 3B\nCome Prepared.')).toBe(
    'Project XYZ Final Review\\nConference Room - 3B\\nCome Prepared.',
  );
});

test('what the samples forbid is never written: no UID, no stamp, a zoned UTC time, a bare line feed', () => {
  for (const zone of [null, 'Europe/Dublin', 'Australia/Lord_Howe']) {
    const text = write(zone);
    expect(text).not.toMatch(/[^\r]\n/);
    expect(text).not.toMatch(/TZID=[^:]*:\d{8}T\d{6}Z/);
    for (const property of ['PRODID:', 'VERSION:2.0', 'UID:', 'DTSTAMP:'])
      expect(
        properties(text)
          .concat(text.split('\r\n'))
          .some((line) => line.startsWith(property)),
      ).toBe(true);
    const zones = [...text.matchAll(/TZID=([^:]*):/g)].map(([, name]) => name);
    for (const name of zones) expect(text).toContain(`\r\nTZID:${name}\r\n`);
  }
});
