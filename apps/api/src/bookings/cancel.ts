import { refundFor, type CancellationCause, type Refund } from '@mereward/shared/bookings/cancellation';
import type { CancelAsked, CancellationQuote } from '@mereward/shared/bookings/contract';
import type { EntityManager } from 'typeorm';
import { Problem } from '@mereward/shared/problems/problem';
import { holdsAny, type Ctx } from '../ctx';
import { moneyOf } from '../payments/money-of';
import { queueRefund } from '../payments/refunds';
import { allow, lockBooking, reachBooking, type Reached } from './access';
import { letGoOfHold } from './let-go';
import { freePegs } from './peg-calendar';
import { postCancelled } from './post-ticket';
import { noStep, step, type Stay } from './stay';
import { termsOf } from './terms';

const SEASON_MS = 32 * 86_400_000;

/** What goes back of a booking's money when it is cancelled now, by the terms it was sold with. */
export async function refundNow(
  tx: EntityManager,
  stay: Stay,
  { cause, now }: { cause: CancellationCause; now: Date },
): Promise<Refund> {
  const { paidPence, refundedPence } = await moneyOf(tx, stay.id);
  const season = stay.until.getTime() - stay.from.getTime() > SEASON_MS;
  return refundFor(stay.details.cancellation, cause, {
    takenPence: paidPence,
    refundedPence,
    start: stay.from,
    now,
    seasonBoughtAt: season ? stay.writtenAt : null,
  });
}

/** One's own ticket is cancelled as an angler's, whatever one's roles; staff say on whose account. */
function causeOf({ standing }: Reached, asked: CancelAsked): 'angler' | 'fishery' {
  if (standing.holder) return 'angler';
  allow(standing.writes, 'its holder and the fishery’s office');
  return asked.cause ?? 'fishery';
}

export async function cancellationQuote(
  ctx: Ctx,
  bookingId: string,
  asked: CancelAsked,
): Promise<CancellationQuote> {
  const reached = await reachBooking(ctx, bookingId);
  const cause = causeOf(reached, asked);
  refuseCancel(reached, ctx.now);
  const { refundPence, shareBp, words } = await refundNow(ctx.tx, reached.stay, { cause, now: ctx.now });
  return { refundPence, percent: Math.round(shareBp / 100), words };
}

/** Cancels a ticket and gives back what is due. Asked again, it is cancelled already. */
export async function cancelBooking(ctx: Ctx, bookingId: string, asked: CancelAsked): Promise<void> {
  const reached = await lockBooking(ctx, bookingId);
  const { stay } = reached;
  const cause = causeOf(reached, asked);
  if (stay.status === 'cancelled_by_angler' || stay.status === 'cancelled_by_fishery') return;
  if (stay.status === 'hold' || stay.status === 'pending_payment') return letGoOfHold(ctx, stay);
  refuseCancel(reached, ctx.now);
  const refund = await refundNow(ctx.tx, stay, { cause, now: ctx.now });
  const to =
    cause === 'angler' && stay.status !== 'checked_in' ? 'cancelled_by_angler' : 'cancelled_by_fishery';
  const told = { cause, refundPence: refund.refundPence };
  await step(ctx, stay, { to, kind: 'cancelled', told });
  const proposed = await needsManager(ctx, stay, {
    refundPence: refund.refundPence,
    byHolder: reached.standing.holder,
  });
  await postCancelled(ctx, bookingId, { ...refund, proposed, byHolder: reached.standing.holder });
  await freePegs(ctx.tx, bookingId);
  await queueRefund(ctx, {
    bookingId,
    amountPence: refund.refundPence,
    cause: 'cancellation',
    reason: refund.words,
    proposed,
  });
}

/** What the office gives back by itself has a limit; above it somebody else approves. */
async function needsManager(
  { tx, actor }: Ctx,
  { fisheryId }: Stay,
  { refundPence, byHolder }: { refundPence: number; byHolder: boolean },
): Promise<boolean> {
  if (byHolder || holdsAny(actor, fisheryId, ['owner', 'manager'])) return false;
  const { officeRefundPence } = await termsOf(tx, fisheryId);
  return refundPence > officeRefundPence;
}

function refuseCancel({ stay, standing }: Reached, now: Date): void {
  const { status } = stay;
  if (status === 'choosing' && standing.holder)
    throw new Problem('conflict', 'A closure lies over this ticket', {
      detail: 'Choose what becomes of it by the link in your letter: its money goes back in full.',
    });
  if (status !== 'confirmed' && !standing.writes) throw noStep(status);
  if (!['confirmed', 'checked_in', 'no_show', 'choosing'].includes(status)) throw noStep(status);
  if (standing.holder && !standing.writes && now >= stay.from)
    throw new Problem('forbidden', 'This ticket has started', { detail: 'Ask the fishery’s office.' });
}
