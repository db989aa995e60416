import { ReadingMode, type SheetNumber } from '@mereward/shared/rules/contract';
import {
  goodFrom,
  isLater,
  readingNeeded,
  type PublishedSheet,
  type Reading,
} from '@mereward/shared/rules/reading';
import type { ReadingView } from '@mereward/shared/rules/sheet-contract';
import type { EntityManager } from 'typeorm';

/** What is to be read for a booking, what was, and from when its ticket is good (null while it isn't). */
export type BookingReading = Reading & {
  mode: ReadingMode;
  readings: ReadingView[]; // the newest first
  read: SheetNumber | null;
  goodFrom: Date | null;
};

type BookingRow = { id: string; fisheryId: string; bookedAt: Date; start: Date; mode: string | null };
type SheetRow = PublishedSheet & { fisheryId: string };
type AckRow = SheetNumber & {
  bookingId: string;
  id: string;
  method: ReadingView['method'];
  witness: string | null;
  language: string;
  deviceAt: Date;
  at: Date;
};

const BOOKINGS = `
  SELECT b.id, b.fishery_id AS "fisheryId", b.written_at AS "bookedAt", lower(b.during) AS start,
         t.details->>'rulesMode' AS mode
    FROM booking b LEFT JOIN letting_terms t ON t.fishery_id = b.fishery_id
   WHERE b.id = ANY ($1)`;

const SHEETS = `
  SELECT fishery_id AS "fisheryId", major, minor, weight, published_at AS "publishedAt"
    FROM rule_sheet WHERE status = 'published' AND fishery_id = ANY ($1)`;

// What a person read counts for all their bookings there; what was read for one booking without an account, for it.
const READINGS = `
  SELECT b.id AS "bookingId", r.id, s.major, s.minor, r.method, w.name AS witness, r.language,
         r.device_at AS "deviceAt", r.at
    FROM booking b
    JOIN rule_acknowledgement r ON r.booking_id = b.id OR r.account_id = b.account_id
    JOIN rule_sheet s ON s.id = r.rule_sheet_id AND s.fishery_id = b.fishery_id
    LEFT JOIN account w ON w.id = r.witness
   WHERE b.id = ANY ($1)
   ORDER BY s.major DESC, s.minor DESC, r.device_at`;

/** The readings of bookings, by their ids; bookings that aren't there are left out. */
export async function readingsOf(
  tx: EntityManager,
  bookingIds: readonly string[],
): Promise<Map<string, BookingReading>> {
  const bookings: BookingRow[] = await tx.query(BOOKINGS, [bookingIds]);
  const fisheries = [...new Set(bookings.map(({ fisheryId }) => fisheryId))];
  const sheets: SheetRow[] = await tx.query(SHEETS, [fisheries]);
  const rows: AckRow[] = await tx.query(READINGS, [bookingIds]);
  return new Map(
    bookings.map((booking) => [
      booking.id,
      readingOf(
        booking,
        sheets.filter(({ fisheryId }) => fisheryId === booking.fisheryId),
        rows.filter(({ bookingId }) => bookingId === booking.id),
      ),
    ]),
  );
}

function readingOf(
  booking: BookingRow,
  sheets: readonly SheetRow[],
  rows: readonly AckRow[],
): BookingReading {
  const mode = ReadingMode.catch('must_ack_before_ticket_valid').parse(booking.mode);
  const newest = rows[0];
  const read = newest ? { major: newest.major, minor: newest.minor } : null;
  const { bookedAt } = booking;
  const reading = readingNeeded(sheets, { read, bookedAt }, mode);
  const when = reading.needed ? null : readWhen(booking, sheets, rows);
  const good = reading.blocks === 'ticket' ? null : goodFrom(booking.start, when ?? booking.start, mode);
  return { ...reading, mode, read, readings: rows.map(readingView), goodFrom: good };
}

/** When enough had been read for the first time that nothing is wanted any more. */
function readWhen(
  { bookedAt }: BookingRow,
  sheets: readonly SheetRow[],
  rows: readonly AckRow[],
): Date | null {
  const inTime = [...rows].sort((a, b) => a.deviceAt.getTime() - b.deviceAt.getTime());
  let read: SheetNumber | null = null;
  for (const { major, minor, deviceAt } of inTime) {
    if (read === null || isLater({ major, minor }, read)) read = { major, minor };
    if (!readingNeeded(sheets, { read, bookedAt }, 'must_ack_before_ticket_valid').needed) return deviceAt;
  }
  return null;
}

const readingView = (row: AckRow): ReadingView => ({
  id: row.id,
  version: { major: row.major, minor: row.minor },
  method: row.method,
  witness: row.witness,
  deviceAt: row.deviceAt.toISOString(),
  at: row.at.toISOString(),
  language: row.language,
});
