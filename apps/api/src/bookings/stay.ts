import type { Booking } from '@mereward/db/entities/bookings/booking';
import { BOOKING_STATE_WORDS, mayGo, type BookingState } from '@mereward/shared/bookings/booking-state';
import type { BookingDetails } from '@mereward/shared/bookings/contract';
import { Problem } from '@mereward/shared/problems/problem';
import type { EntityManager } from 'typeorm';
import type { Ctx } from '../ctx';
import { notFound } from '../http/deny';

/** A booking with its fishing time as two instants, half-open. */
export type Stay = Omit<Booking, 'during'> & { from: Date; until: Date };

const SELECT = `
  SELECT id, fishery_id AS "fisheryId", lake_id AS "lakeId", ticket_type_id AS "ticketTypeId", code,
         account_id AS "accountId", holder_name AS "holderName", holder_email AS "holderEmail",
         lower(during) AS "from", upper(during) AS until, status, people, rods, gross_pence AS "grossPence", currency,
         hold_until AS "holdUntil", source, details, written_by AS "writtenBy", written_at AS "writtenAt", version
    FROM booking`;

export async function findStay(tx: EntityManager, id: string): Promise<Stay> {
  const [stay]: Stay[] = await tx.query(`${SELECT} WHERE id = $1`, [id]);
  if (!stay) throw notFound('booking');
  return stay;
}

/** A booking held for this transaction: whoever else would change it waits, and sees what was done. */
export async function lockStay(tx: EntityManager, id: string): Promise<Stay> {
  const [stay]: Stay[] = await tx.query(`${SELECT} WHERE id = $1 FOR UPDATE`, [id]);
  if (!stay) throw notFound('booking');
  return stay;
}

/** A hold or an unpaid booking whose time has run out: it keeps its pegs only until somebody looks. */
export const ranOut = ({ status, holdUntil }: Pick<Stay, 'status' | 'holdUntil'>, now: Date): boolean =>
  (status === 'hold' || status === 'pending_payment') && holdUntil !== null && holdUntil <= now;

/** A line of a booking's history. Letters are written from these. */
export async function tell(
  { tx, actor, now }: Pick<Ctx, 'tx' | 'actor' | 'now'>,
  bookingId: string,
  { kind, ...told }: { kind: string; [more: string]: unknown },
): Promise<void> {
  const byAccount = actor.kind === 'account' ? actor.id : null;
  await tx.query(
    'INSERT INTO booking_event (booking_id, at, by_account, kind, told) VALUES ($1, $2, $3, $4, $5)',
    [bookingId, now, byAccount, kind, told],
  );
}

type Change = Partial<{
  holdUntil: Date | null;
  details: BookingDetails;
  from: Date;
  until: Date;
  lakeId: string;
  people: number;
  rods: number;
}>;

/** Takes a step of a locked booking and writes it down. What isn't one of `BOOKING_STEPS` is refused in words. */
export async function step(
  ctx: Pick<Ctx, 'tx' | 'actor' | 'now'>,
  stay: Stay,
  { to, kind, change = {}, told = {} }: { to: BookingState; kind: string; change?: Change; told?: object },
): Promise<Stay> {
  if (to !== stay.status && !mayGo(stay.status, to)) throw noStep(stay.status);
  const next: Stay = { ...stay, ...change, status: to, version: stay.version + 1 };
  await ctx.tx.query(
    `UPDATE booking SET status = $2, version = $3, hold_until = $4, details = $5, during = tstzrange($6, $7, '[)'),
            lake_id = $8, people = $9, rods = $10
      WHERE id = $1`,
    [
      next.id,
      next.status,
      next.version,
      next.holdUntil,
      next.details,
      next.from,
      next.until,
      next.lakeId,
      next.people,
      next.rods,
    ],
  );
  await tell(ctx, stay.id, { kind, ...told });
  return next;
}

const NOW_WHAT = 'Nothing was changed. Reload to see how it stands.';

export const noStep = (status: BookingState): Problem =>
  new Problem('conflict', `That can’t be done any more: ${BOOKING_STATE_WORDS[status].toLowerCase()}`, {
    detail: NOW_WHAT,
  });
