import { readBookingCode } from '@mereward/shared/bookings/booking-code';
import type {
  BookingList,
  BookingListItem,
  BookingsOfDay,
  BookingView,
} from '@mereward/shared/bookings/contract';
import { addDays, startOfDay } from '@mereward/shared/time/zoned';
import { accountOf, holdsAny, type Ctx } from '../ctx';
import { fisheryFound } from '../fisheries/found';
import { allowOnly, notFound } from '../http/deny';
import { BOOKING_ROWS, bookingView, shownStatus, type BookingRow } from './booking-view';
import { notYetOf } from './not-yet';
import { standingTo, TICKET_READERS } from './policy';

const LONG_AGO_DAYS = 366;

/** The reader's own bookings, the newest first; holds that came to nothing and what ended over a year ago left out. */
export async function myBookings(ctx: Ctx): Promise<BookingList> {
  const rows: BookingRow[] = await ctx.tx.query(
    `${BOOKING_ROWS} WHERE b.account_id = $1 AND upper(b.during) > $2::timestamptz - make_interval(days => $3)
        AND b.status <> 'expired' AND NOT (b.status IN ('hold', 'pending_payment') AND b.hold_until <= $2)
        AND NOT (b.status = 'cancelled_by_angler' AND NOT EXISTS (
          SELECT 1 FROM booking_event e WHERE e.booking_id = b.id AND e.kind = 'confirmed'))
      ORDER BY lower(b.during) DESC, b.id LIMIT 500`,
    [accountOf(ctx.actor), ctx.now, LONG_AGO_DAYS],
  );
  return { bookings: await items(ctx, rows) };
}

/** Tickets that run on any part of a day at the lake, for staff; bailiffs see yesterday, today and tomorrow. */
export async function bookingsOfDay(ctx: Ctx, fisheryId: string, asked: BookingsOfDay): Promise<BookingList> {
  const { tx, actor, now } = ctx;
  const { zone } = await fisheryFound(tx, fisheryId);
  allowOnly(actor, { fisheryId, what: 'fishery' }, TICKET_READERS);
  const from = startOfDay(asked.day, zone);
  const until = startOfDay(addDays(asked.day, 1), zone);
  const rows: BookingRow[] = await tx.query(
    `${BOOKING_ROWS} WHERE b.fishery_id = $1 AND b.during && tstzrange($2, $3) AND lower(b.during) < $3
        AND ($4::uuid IS NULL OR b.lake_id = $4) AND b.status <> 'expired'
        AND NOT (b.status IN ('hold', 'pending_payment') AND b.hold_until <= $5)
      ORDER BY (SELECT min(p.walking_order) FROM peg_time t JOIN peg p ON p.id = t.peg_id WHERE t.booking_id = b.id),
               lower(b.during), b.id`,
    [fisheryId, from, until, asked.lakeId ?? null, now],
  );
  return {
    bookings: await items(
      ctx,
      rows.filter((row) => standingTo(actor, row, now)?.checks),
    ),
  };
}

async function items(ctx: Ctx, rows: readonly BookingRow[]): Promise<BookingListItem[]> {
  const yet = await notYetOf(ctx, rows);
  return rows.map((row, index) => ({
    id: row.id,
    code: row.code,
    fisheryName: row.fisheryName,
    lakeName: row.lakeName,
    zone: row.zone,
    pegs: row.pegs,
    from: row.from.toISOString(),
    until: row.until.toISOString(),
    status: shownStatus(row, ctx.now),
    holder: row.holder,
    people: row.people,
    rods: row.rods,
    grossPence: row.grossPence,
    paidPence: row.paidPence,
    currency: row.currency,
    ticketName: row.details.ticketName,
    notYet: yet[index]?.words ?? [],
  }));
}

/**
 * The booking behind a code as it was read aloud or off a ticket: for its holder and the staff who may see it. Codes
 * come round again: the one that still counts is meant, else the latest.
 */
export async function bookingByCode(
  ctx: Ctx,
  typed: string,
  fisheryId: string | null = null,
): Promise<BookingView> {
  const { tx, actor } = ctx;
  accountOf(actor);
  if (fisheryId !== null) {
    await fisheryFound(tx, fisheryId);
    allowOnly(actor, { fisheryId, what: 'fishery' }, TICKET_READERS);
  }
  const code = readBookingCode(typed);
  if (code === null) throw notFound('ticket: look at the code again');
  const rows: BookingRow[] = await tx.query(
    `${BOOKING_ROWS} WHERE b.code = $1 AND ($2::uuid IS NULL OR b.fishery_id = $2)
      ORDER BY (b.status IN ('hold', 'pending_payment', 'confirmed', 'checked_in', 'choosing')) DESC, b.written_at DESC`,
    [code, fisheryId],
  );
  const row = rows.find((each) => {
    const standing = standingTo(actor, each, ctx.now);
    return standing !== null && (fisheryId === null || holdsAny(actor, fisheryId, TICKET_READERS));
  });
  if (!row) throw notFound('ticket');
  return bookingView(ctx, row.id);
}
