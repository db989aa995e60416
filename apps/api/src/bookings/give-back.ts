import { Refund } from '@mereward/db/entities/payments/refund';
import { Payment } from '@mereward/db/entities/payments/payment';
import type {
  AskRefund,
  AskRefundAgain,
  DecideRefund,
  GiveByHand,
} from '@mereward/shared/payments/refund-contract';
import type { RefundView } from '@mereward/shared/payments/contract';
import { Problem } from '@mereward/shared/problems/problem';
import { accountOf, holdsAny, type Ctx } from '../ctx';
import { allowOnly, notFound } from '../http/deny';
import { refundView } from '../payments/money-of';
import { mayDecide, mayGiveAlone, MONEY_HANDLERS, REFUND_PROPOSERS } from '../payments/policy';
import { putInPlace, queueRefund, setOff } from '../payments/refunds';
import { askedByHand, holdBooking, settleRefund } from '../payments/settle-refund';
import { allow, lockBooking } from './access';
import { termsOf } from './terms';

/**
 * Money back outside the fishery's own terms. The office gives up to its limit at once; more than that, and whatever a
 * holder or the head bailiff asks for, is proposed and waits for somebody else.
 */
export async function askForRefund(ctx: Ctx, bookingId: string, input: AskRefund): Promise<RefundView[]> {
  const { tx, actor } = ctx;
  const { stay, standing } = await lockBooking(ctx, bookingId);
  const proposes = standing.holder || holdsAny(actor, stay.fisheryId, REFUND_PROPOSERS);
  allow(proposes, 'the ticket’s holder, the head bailiff, the office, a manager or the owner');
  const { amountPence, reason, id } = input;
  const { officeRefundPence } = await termsOf(tx, stay.fisheryId);
  const asked = { fisheryId: stay.fisheryId, amountPence, askedBy: accountOf(actor) };
  const proposed = standing.holder || !mayGiveAlone(actor, asked, officeRefundPence);
  const made = await queueRefund(ctx, { bookingId, amountPence, cause: `asked:${id}`, reason, proposed });
  const total = made.reduce((sum, each) => sum + each.amountPence, 0);
  if (total !== amountPence || made.some((each) => each.reason !== reason || each.askedBy !== asked.askedBy))
    throw new Problem('conflict', 'Something else is kept under this id already', {
      detail: 'Nothing was given back. Reload to see what is kept, then ask anew.',
    });
  return made.map((refund) => refundView(refund, stay.currency));
}

type Reached = { refund: Refund; payment: Payment; limitPence: number };

/** A refund held for this deed, for those who handle the fishery's money. */
async function reachRefund(ctx: Ctx, refundId: string): Promise<Reached> {
  const { tx, actor } = ctx;
  accountOf(actor);
  const found = await tx.findOneBy(Refund, { id: refundId });
  if (!found) throw notFound('refund');
  allowOnly(actor, { fisheryId: found.fisheryId, what: 'refund' }, MONEY_HANDLERS);
  await holdBooking(tx, found.bookingId);
  const lock = { mode: 'pessimistic_write' } as const;
  const payment = await tx.findOneOrFail(Payment, { where: { id: found.paymentId }, lock });
  const refund = await tx.findOneOrFail(Refund, { where: { id: refundId }, lock });
  const { officeRefundPence } = await termsOf(tx, refund.fisheryId);
  return { refund, payment, limitPence: officeRefundPence };
}

async function shown({ tx }: Ctx, refundId: string): Promise<RefundView> {
  const refund = await tx.findOneByOrFail(Refund, { id: refundId });
  const { currency } = await tx.findOneByOrFail(Payment, { id: refund.paymentId });
  return refundView(refund, currency);
}

/** Gives or declines what somebody else has proposed. The same answer twice is one. */
export async function decideRefund(ctx: Ctx, refundId: string, input: DecideRefund): Promise<RefundView> {
  const { tx, actor, now } = ctx;
  const { refund, payment, limitPence } = await reachRefund(ctx, refundId);
  if (!mayDecide(actor, refund, limitPence))
    throw new Problem('forbidden', 'Somebody else decides this refund', {
      detail:
        refund.askedBy === accountOf(actor)
          ? 'You asked for it yourself. Ask another who may give money back.'
          : 'It is above the office’s limit: a manager or the owner decides it.',
    });
  const approvedBy = accountOf(actor);
  if (refund.status !== 'proposed') {
    const same = refund.approvedBy === approvedBy && (refund.status === 'declined') === !input.approve;
    if (!same)
      throw new Problem('conflict', 'This refund has been decided already', {
        detail: 'Reload to see how it stands.',
      });
    return shown(ctx, refundId);
  }
  const decided = { approvedBy, approvedAt: now };
  if (!input.approve) {
    await tx.update(Refund, { id: refundId }, { ...decided, status: 'declined', fault: input.words });
    return shown(ctx, refundId);
  }
  await tx.update(Refund, { id: refundId }, { ...decided, status: 'queued' });
  await setOff(ctx, refund, payment);
  return shown(ctx, refundId);
}

/** A refund the provider refused, once more by card, or to be handed over by a person. */
export async function askAgain(ctx: Ctx, refundId: string, { by }: AskRefundAgain): Promise<RefundView> {
  const { refund, payment } = await reachRefund(ctx, refundId);
  if (refund.status !== 'failed')
    throw new Problem('conflict', 'This refund has not failed', { detail: 'Reload to see how it stands.' });
  const next = await putInPlace(ctx, { refund, payment, by });
  return refundView(next, payment.currency);
}

/** Handed over in cash, by the card machine or from the bank, as whoever did it says. */
export async function giveByHand(ctx: Ctx, refundId: string, { method }: GiveByHand): Promise<RefundView> {
  const { refund, payment } = await reachRefund(ctx, refundId);
  if (!askedByHand(refund, payment) || (refund.status !== 'queued' && refund.status !== 'done'))
    throw new Problem('conflict', 'This refund is not given by hand', {
      detail:
        'Reload to see how it stands. A card’s refund that failed can be turned into one given by hand.',
    });
  await settleRefund(ctx, refundId, { kind: 'done', method, providerRef: null });
  return shown(ctx, refundId);
}

/** A payment that came too late was noted by somebody. */
export async function seeRefund(ctx: Ctx, refundId: string): Promise<RefundView> {
  const { refund } = await reachRefund(ctx, refundId);
  if (refund.seenAt === null)
    await ctx.tx.update(Refund, { id: refundId }, { seenBy: accountOf(ctx.actor), seenAt: ctx.now });
  return shown(ctx, refundId);
}
