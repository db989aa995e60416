import { Problem } from '@mereward/shared/problems/problem';
import { holdInChallenge } from '@mereward/shared/bookings/hold';
import { STRANGER, type Ctx } from '../ctx';
import { closePages } from '../payments/open-payments';
import { freePegs } from './peg-calendar';
import { lockStay, ranOut, step, type Stay } from './stay';
import { warnLater } from './tell-ahead';
import { termsOf } from './terms';

/**
 * Lets go of every hold on a lake that has run out, so that its pegs can be taken in the same deed. One that somebody
 * else is just dealing with is left to them.
 */
export async function letGoOfExpired(ctx: Ctx, lakeId: string): Promise<void> {
  const rows: { id: string }[] = await ctx.tx.query(
    `SELECT id FROM booking
      WHERE lake_id = $1 AND status IN ('hold', 'pending_payment') AND hold_until <= $2
      ORDER BY id FOR UPDATE SKIP LOCKED`,
    [lakeId, ctx.now],
  );
  for (const { id } of rows) await expire(ctx, await lockStay(ctx.tx, id));
}

async function expire(ctx: Ctx, stay: Stay): Promise<void> {
  await step({ ...ctx, actor: STRANGER }, stay, { to: 'expired', kind: 'expired' });
  await freePegs(ctx.tx, stay.id);
  await closePages(ctx, stay.id);
}

/** Ends one hold if it has run out by now; answers whether it did. */
export async function expireHold(ctx: Ctx, bookingId: string): Promise<boolean> {
  const stay = await lockStay(ctx.tx, bookingId);
  if (!ranOut(stay, ctx.now)) return false;
  await expire(ctx, stay);
  return true;
}

/** Looks at a hold again once it must have run out; its holder is told shortly before. */
export async function expireLater(ctx: Ctx, bookingId: string, until: Date): Promise<void> {
  const afterSeconds = (until.getTime() - ctx.now.getTime()) / 1000 + 1;
  await ctx.jobs.later(ctx.tx, { name: 'booking.expire', payload: { bookingId }, afterSeconds });
  await warnLater(ctx, bookingId, until);
}

/**
 * A card's bank has begun to ask its owner: the hold runs on to so many minutes from its start. As often as this is
 * told it lasts no longer; one that has run out stays so. Answers until when it is held, null when it no longer is.
 */
export async function extendHold(ctx: Ctx, bookingId: string): Promise<Date | null> {
  const stay = await lockStay(ctx.tx, bookingId);
  if (stay.status !== 'hold' && stay.status !== 'pending_payment') return null;
  if (stay.holdUntil === null || ranOut(stay, ctx.now)) return null;
  const { challengeMinutes } = await termsOf(ctx.tx, stay.fisheryId);
  const hold = { heldAt: stay.writtenAt, until: stay.holdUntil };
  const { until } = holdInChallenge(hold, ctx.now, challengeMinutes);
  if (until.getTime() === stay.holdUntil.getTime()) return until;
  await step(ctx, stay, { to: stay.status, kind: 'hold-extended', change: { holdUntil: until } });
  await expireLater(ctx, bookingId, until);
  return until;
}

/** The holder gives a hold up; a second time changes nothing. */
export async function letGoOfHold(ctx: Ctx, stay: Stay): Promise<void> {
  if (stay.status === 'expired' || stay.status === 'cancelled_by_angler') return;
  if (stay.status !== 'hold' && stay.status !== 'pending_payment')
    throw new Problem('conflict', 'This is no hold any more', {
      detail: 'Nothing was changed. A confirmed ticket is cancelled on its own page.',
    });
  await step(ctx, stay, { to: 'cancelled_by_angler', kind: 'hold-let-go' });
  await freePegs(ctx.tx, stay.id);
  await closePages(ctx, stay.id);
}
