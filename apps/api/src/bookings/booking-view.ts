import type { BookedPeg, BookingDetails, BookingView } from '@mereward/shared/bookings/contract';
import { ticketQr } from '@mereward/shared/bookings/booking-code';
import type { BookingState } from '@mereward/shared/bookings/booking-state';
import type { Jurisdiction } from '@mereward/shared/fisheries/contract';
import type { EntityManager } from 'typeorm';
import type { Ctx } from '../ctx';
import { notFound } from '../http/deny';
import { moneyOf } from '../payments/money-of';
import { isFilledIn } from './fill-in';
import { notYetOf } from './not-yet';
import { standingTo, type Standing } from './policy';
import { termsOf } from './terms';
import { ranOut } from './stay';

/** A booking with everything its view is made of. */
export type BookingRow = {
  id: string;
  code: string;
  fisheryId: string;
  fisheryName: string;
  jurisdiction: Jurisdiction;
  gateCode: string;
  zone: string;
  lakeId: string | null;
  lakeName: string | null;
  accountId: string | null;
  pegs: BookedPeg[];
  roving: number; // tickets that choose a peg on arrival and have none yet
  from: Date;
  until: Date;
  status: BookingState;
  holder: string;
  people: number;
  rods: number;
  details: BookingDetails;
  grossPence: number;
  paidPence: number;
  refundedPence: number;
  currency: string;
  holdUntil: Date | null;
  version: number;
};

/** Money taken and money that has gone back, or is on its way. */
export const PAID = `
  coalesce((SELECT sum(y.amount_pence) FROM payment y WHERE y.booking_id = b.id AND y.status = 'captured'), 0)::int`;
export const REFUNDED = `
  coalesce((SELECT sum(r.amount_pence) FROM refund r WHERE r.booking_id = b.id AND r.status <> 'declined'), 0)::int`;

/** To be followed by a WHERE over `b`. */
export const BOOKING_ROWS = `
  SELECT b.id, b.code, b.fishery_id AS "fisheryId", f.name AS "fisheryName", f.zone, b.lake_id AS "lakeId",
         f.details->>'jurisdiction' AS jurisdiction, coalesce(f.details->>'gateCode', '') AS "gateCode", l.name AS "lakeName", b.account_id AS "accountId",
         coalesce((SELECT jsonb_agg(jsonb_build_object('pegId', p.id, 'number', p.number, 'name', p.details->>'name')
                                    ORDER BY p.walking_order)
                     FROM peg_time t JOIN peg p ON p.id = t.peg_id WHERE t.booking_id = b.id), '[]') AS pegs,
         (SELECT count(*) FROM peg_time t WHERE t.booking_id = b.id AND t.peg_id IS NULL)::int AS roving,
         lower(b.during) AS "from", upper(b.during) AS until, b.status, b.holder_name AS holder, b.people, b.rods,
         b.details, b.gross_pence AS "grossPence", ${PAID} AS "paidPence", ${REFUNDED} AS "refundedPence", b.currency,
         b.hold_until AS "holdUntil", b.version
    FROM booking b JOIN fishery f ON f.id = b.fishery_id LEFT JOIN lake l ON l.id = b.lake_id`;

export async function bookingRow(tx: EntityManager, bookingId: string): Promise<BookingRow> {
  const [row]: BookingRow[] = await tx.query(`${BOOKING_ROWS} WHERE b.id = $1`, [bookingId]);
  if (!row) throw notFound('booking');
  return row;
}

/** How it stands for a reader: a hold that has run out is over, and so is a ticket whose time is. */
export function shownStatus(
  row: Pick<BookingRow, 'status' | 'holdUntil' | 'until'>,
  now: Date,
): BookingState {
  if (row.status === 'hold' && ranOut(row, now)) return 'expired';
  const good = row.status === 'confirmed' || row.status === 'checked_in';
  return good && row.until <= now ? 'completed' : row.status;
}

/** One booking as its holder or the staff see it. */
export async function bookingView(ctx: Ctx, bookingId: string): Promise<BookingView> {
  const { tx, actor, now, publicUrl } = ctx;
  const row = await bookingRow(tx, bookingId);
  const standing = standingTo(actor, row, now);
  if (!standing) throw notFound('booking');
  const [yet] = await notYetOf(ctx, [row]);
  const { payAtLodge } = await termsOf(tx, row.fisheryId);
  const { payments, refunds, receipts } = await moneyOf(tx, bookingId);
  const money = standing.money ? { payments, refunds, receipts } : NO_MONEY;
  const { accountId, roving, jurisdiction, gateCode, ...rest } = row;
  return {
    ...rest,
    ...money,
    qr: ticketQr(publicUrl, row.code),
    from: row.from.toISOString(),
    until: row.until.toISOString(),
    holdUntil: row.holdUntil?.toISOString() ?? null,
    status: shownStatus(row, now),
    details: standing.contacts ? row.details : withoutContacts(row.details),
    notYet: yet?.words ?? [],
    rulesToRead: yet?.rules ?? false,
    gateCode: opensGate(row, now) && !yet?.rules ? gateCode : '',
    may: mayOf({ row, standing, now, payAtLodge, takesCards: ctx.takesCards }),
  };
}

/** The gate is told inside the hours of a ticket that counts, and at no other time. */
const opensGate = ({ status, from, until }: BookingRow, now: Date): boolean =>
  (status === 'confirmed' || status === 'checked_in') && from <= now && now < until;

const NO_MONEY = { payments: [], refunds: [], receipts: [] };

/** A bailiff is told who, which ticket and which car, not how to reach them nor when they were born. */
const withoutContacts = (details: BookingDetails): BookingDetails => ({
  ...details,
  tickets: details.tickets.map((ticket) => ({ ...ticket, bornOn: null })),
  guardian: details.guardian && { ...details.guardian, phone: '' },
  emergencyContact: '',
});

type MayAsked = { row: BookingRow; standing: Standing; now: Date; payAtLodge: boolean; takesCards: boolean };

function mayOf({ row, standing, now, payAtLodge, takesCards }: MayAsked): BookingView['may'] {
  const { holder, writes, moves, checks } = standing;
  const status = shownStatus(row, now);
  const held = (status === 'hold' || status === 'pending_payment') && !ranOut(row, now);
  const good = status === 'confirmed' || status === 'checked_in';
  const running = row.from <= now && now < row.until;
  const filled = isFilledIn(row.details);
  const due = row.grossPence - row.paidPence;
  return {
    fillIn: held && (holder || writes),
    pay: takesCards && held && holder && filled && due > 0,
    confirm: held && holder && filled && (due <= 0 || payAtLodge),
    cancel:
      (status === 'confirmed' && (writes || (holder && now < row.from))) ||
      (writes && (good || status === 'no_show')),
    move: (good && moves) || (status === 'confirmed' && holder && now < row.from),
    finish: good && running && (holder || checks),
    claimPeg: good && running && row.roving > 0 && (holder || checks),
    checkIn: (status === 'confirmed' || status === 'no_show') && running && (holder || checks),
    noShow: status === 'confirmed' && checks && !holder && running,
    letGo: status === 'no_show' && checks && !holder && row.pegs.length > 0,
    takeMoney: writes && (held || good) && due > 0,
    refund: writes && row.paidPence > row.refundedPence,
  };
}
