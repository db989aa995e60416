import { READING_WORDS, rulesAt } from '@mereward/shared/rules/reading';
import type { Rule } from '@mereward/shared/rules/contract';
import type { RulesToReadView } from '@mereward/shared/rules/sheet-contract';
import { holdsAny, type Ctx } from '../ctx';
import { notFound } from '../http/deny';
import { STAFF } from '../lakes/policy';
import { READING_WITNESSES } from './policy';
import { readingsOf } from './readings';
import { changesSince, sheetInForce, sheetView } from './sheet-view';

export type ReadBooking = {
  id: string;
  fisheryId: string;
  accountId: string | null;
  lakeId: string | null;
  ticketTypeId: string | null;
  pegIds: (string | null)[];
};

const BOOKING = `
  SELECT b.id, b.fishery_id AS "fisheryId", b.account_id AS "accountId", b.lake_id AS "lakeId",
         b.ticket_type_id AS "ticketTypeId",
         coalesce((SELECT jsonb_agg(t.peg_id) FROM peg_time t WHERE t.booking_id = b.id), '[]') AS "pegIds"
    FROM booking b WHERE b.id = $1`;

/** A booking as far as rules look at it: its holder's and the staff's; to others it isn't there. */
export async function bookingToRead({ tx, actor }: Ctx, bookingId: string): Promise<ReadBooking> {
  const [booking]: ReadBooking[] = await tx.query(BOOKING, [bookingId]);
  const theirs = actor.kind === 'account' && booking?.accountId === actor.id;
  if (!booking || (!theirs && !holdsAny(actor, booking.fisheryId, STAFF))) throw notFound('booking');
  return booking;
}

/** The rules that hold somewhere in a booking, in the order of their numbers. */
function rulesFor(rules: readonly Rule[], { lakeId, ticketTypeId, pegIds }: ReadBooking): Rule[] {
  if (lakeId === null) return [...rules].sort((a, b) => a.number - b.number);
  const spots = pegIds.length > 0 ? pegIds : [null];
  const held = new Set(
    spots.flatMap((pegId) => rulesAt(rules, { lakeId, pegId, ticketTypeId }).map(({ id }) => id)),
  );
  return [...rules].filter(({ id }) => held.has(id)).sort((a, b) => a.number - b.number);
}

/** What is to be read for a booking, or was, with what changed since its holder last read. */
export async function rulesToRead(ctx: Ctx, bookingId: string): Promise<RulesToReadView> {
  const { tx, actor } = ctx;
  const booking = await bookingToRead(ctx, bookingId);
  const reading = (await readingsOf(tx, [bookingId])).get(bookingId);
  const inForce = await sheetInForce(tx, booking.fisheryId);
  const needed = reading?.needed ?? false;
  return {
    bookingId,
    fisheryId: booking.fisheryId,
    needed,
    blocks: reading?.blocks ?? 'nothing',
    words: needed ? READING_WORDS[reading?.blocks ?? 'nothing'] : '',
    sheet: inForce && { ...sheetView(inForce), rules: rulesFor(inForce.rules, booking) },
    since: inForce && (await changesSince(tx, inForce, reading?.read ?? null)),
    readings: reading?.readings ?? [],
    goodFrom: reading?.goodFrom?.toISOString() ?? null,
    may: {
      acknowledge: actor.kind === 'account' && actor.id === booking.accountId && inForce !== null,
      witness: inForce !== null && holdsAny(actor, booking.fisheryId, READING_WITNESSES),
    },
  };
}
