import { bookingEvent, type CalendarBooking } from '@mereward/shared/bookings/booking-calendar';
import { calendarText, calendarUid, type CalendarEvent } from '@mereward/shared/writing/calendar';
import { addDays, startOfDay } from '@mereward/shared/time/zoned';
import type { Ctx } from '../ctx';
import { notFound } from '../http/deny';

/** What a calendar program is told of: the last three months, and everything to come. */
const BACK = `interval '92 days'`;
const MOST_EVENTS = 2000;

const OWN = `
  SELECT b.id, b.code, b.version, lower(b.during) AS "from", upper(b.during) AS until, b.status, f.zone,
         coalesce((SELECT max(e.at) FROM booking_event e WHERE e.booking_id = b.id), b.written_at) AS "changedAt",
         b.details->>'ticketName' AS "ticketName", l.name AS "lakeName", f.name AS "fisheryName",
         ARRAY (SELECT p.number FROM peg_time t JOIN peg p ON p.id = t.peg_id WHERE t.booking_id = b.id
                 ORDER BY p.walking_order) AS pegs
    FROM booking b JOIN fishery f ON f.id = b.fishery_id LEFT JOIN lake l ON l.id = b.lake_id
   WHERE b.account_id = $1 AND upper(b.during) > $2::timestamptz - ${BACK}
     AND (b.status IN ('confirmed', 'checked_in', 'completed', 'choosing', 'no_show')
          OR b.status IN ('cancelled_by_angler', 'cancelled_by_fishery')
             AND EXISTS (SELECT 1 FROM booking_event e WHERE e.booking_id = b.id AND e.kind = 'confirmed'))
   ORDER BY lower(b.during) DESC LIMIT ${MOST_EVENTS}`;

/** Somebody’s own bookings. One that is cancelled stays in for a while, so that calendars take it away. */
export async function ownCalendar({ tx, now, publicUrl }: Ctx, accountId: string): Promise<string> {
  const rows: (CalendarBooking & { zone: string })[] = await tx.query(OWN, [accountId, now]);
  const zones = new Set(rows.map(({ zone }) => zone));
  const [zone = null] = zones;
  return calendarText({
    name: 'My fishing',
    method: 'PUBLISH',
    zone: zones.size === 1 ? zone : null, // places with clocks of their own are told in UTC
    events: rows.map((row) => bookingEvent(row, publicUrl)),
  });
}

const LAKE = `SELECT l.name, f.zone, f.name AS "fisheryName" FROM lake l JOIN fishery f ON f.id = l.fishery_id WHERE l.id = $1`;

/** Each stretch of a peg, and closures once for all the pegs they close. */
const SPANS = `
  SELECT t.id, t.state, lower(t.during) AS "from", upper(t.during) - t.turnaround AS until, p.number,
         coalesce(b.written_at, k.made_at) AS "changedAt", coalesce(b.version, 0) AS sequence, k.title AS words
    FROM peg_time t LEFT JOIN peg p ON p.id = t.peg_id LEFT JOIN booking b ON b.id = t.booking_id
    LEFT JOIN peg_block k ON k.id = t.block_id
   WHERE t.lake_id = $1 AND t.state IN ('taken', 'blocked') AND upper(t.during) > $2::timestamptz - ${BACK}
  UNION ALL
  SELECT c.id, 'closed', lower(c.during), least(upper(c.during), c.lifted_at), NULL, coalesce(c.lifted_at, c.decided_at),
         c.version, c.details->>'publicWords'
    FROM closure c
   WHERE $1 = ANY (c.lake_ids) AND coalesce(least(upper(c.during), c.lifted_at) > $2::timestamptz - ${BACK}, true)
   ORDER BY 3 DESC LIMIT ${MOST_EVENTS}`;

type SpanRow = {
  id: string;
  state: 'taken' | 'blocked' | 'closed';
  from: Date;
  until: Date | null;
  number: string | null;
  changedAt: Date;
  sequence: number;
  words: string | null;
};

/** How far ahead a closure without an end is drawn. */
const OPEN_END_DAYS = 366;

/** A lake’s calendar for those who work there: pegs, what is kept back and closed. No names: the address may be passed on. */
export async function lakeCalendar({ tx, now, publicUrl }: Ctx, lakeId: string): Promise<string> {
  const lakes: { name: string; zone: string; fisheryName: string }[] = await tx.query(LAKE, [lakeId]);
  const [lake] = lakes;
  if (!lake) throw notFound('calendar');
  const rows: SpanRow[] = await tx.query(SPANS, [lakeId, now]);
  const far = startOfDay(addDays(now.toISOString().slice(0, 10), OPEN_END_DAYS), lake.zone);
  const host = new URL(publicUrl).hostname;
  const events = rows.flatMap((row): CalendarEvent[] => {
    const until = row.until ?? far;
    if (until <= row.from) return [];
    const { id, from, changedAt, sequence } = row;
    return [
      {
        ...{ uid: calendarUid('peg-time', id, host), sequence, stampedAt: changedAt, from, until },
        ...{ summary: summaryOf(row), description: '', location: `${lake.name}, ${lake.fisheryName}` },
        ...{ status: 'confirmed' as const, url: '' },
      },
    ];
  });
  return calendarText({ name: `${lake.name}: pegs`, method: 'PUBLISH', zone: lake.zone, events });
}

function summaryOf({ state, number, words }: SpanRow): string {
  const peg = number === null ? 'A peg on arrival' : `Peg ${number}`;
  switch (state) {
    case 'taken':
      return `${peg}: taken`;
    case 'blocked':
      return `${peg}: kept back`;
    case 'closed':
      return `Closed: ${words ?? ''}`;
  }
}
