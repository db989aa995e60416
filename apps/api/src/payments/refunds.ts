import { Payment } from '@mereward/db/entities/payments/payment';
import { Refund } from '@mereward/db/entities/payments/refund';
import { moneyWords } from '@mereward/shared/money/money';
import { Problem } from '@mereward/shared/problems/problem';
import { randomUUID } from 'node:crypto';
import type { EntityManager } from 'typeorm';
import { z } from 'zod';
import { accountOrNull, type Ctx } from '../ctx';
import { currencyOf } from './currency';
import { askedByHand, firstOf, holdBooking } from './settle-refund';

/** A refund asked of the provider, outside any transaction. */
export const AskRefundJob = z.strictObject({ refundId: z.uuid() });

export type RefundWish = {
  bookingId: string;
  amountPence: number;
  cause: string; // the deed it belongs to: the same cause gives back once
  reason: string; // in words, for its reader
  paymentId?: string; // of one payment only
  proposed?: boolean; // waits until somebody else approves it
};

/**
 * Gives back money of a booking, from its newest payment first, and answers one refund for each payment it is taken
 * from; the same cause told again answers what it came to. A card's is asked of the provider once this deed is
 * committed; cash, bank and card machine wait for a person. More than is left is a conflict. Nought gives nothing.
 */
export async function queueRefund(ctx: Ctx, wish: RefundWish): Promise<Refund[]> {
  const { tx } = ctx;
  if (wish.amountPence === 0) return [];
  await holdBooking(tx, wish.bookingId);
  const payments = await lockPayments(tx, wish);
  const { bookingId, cause, paymentId } = wish;
  const before = await tx.findBy(Refund, {
    bookingId,
    cause,
    ...(paymentId === undefined ? {} : { paymentId }),
  });
  if (before.length > 0) return before;
  let left = await leftOf(tx, payments);
  if (!wish.proposed && sumOf(left) < wish.amountPence) {
    await declineProposals(ctx, wish.bookingId);
    left = await leftOf(tx, payments);
  }
  refuseMoreThanLeft(wish, sumOf(left), payments);
  let toGive = wish.amountPence;
  const made: Refund[] = [];
  for (const payment of payments) {
    const amountPence = Math.min(toGive, left.get(payment.id) ?? 0);
    if (amountPence === 0) continue;
    toGive -= amountPence;
    made.push(await insertRefund(ctx, { payment, amountPence, wish }));
  }
  return made;
}

async function lockPayments(
  tx: EntityManager,
  { bookingId, paymentId }: Pick<RefundWish, 'bookingId' | 'paymentId'>,
): Promise<Payment[]> {
  return tx.find(Payment, {
    where: { bookingId, status: 'captured', ...(paymentId === undefined ? {} : { id: paymentId }) },
    order: { takenAt: 'DESC', id: 'ASC' },
    lock: { mode: 'pessimistic_write' },
  });
}

const sumOf = (left: ReadonlyMap<string, number>): number => [...left.values()].reduce((a, b) => a + b, 0);

/** What may still go back of each payment, pence: neither given, on its way, proposed nor disputed. */
async function leftOf(tx: EntityManager, payments: readonly Payment[]): Promise<Map<string, number>> {
  const rows: { id: string; left: number }[] = await tx.query(
    `SELECT p.id, greatest(0, p.amount_pence
              - coalesce((SELECT sum(amount_pence) FROM refund WHERE payment_id = p.id AND status <> 'declined'), 0)
              - coalesce((SELECT sum(amount_pence) FROM dispute WHERE payment_id = p.id AND status <> 'won'), 0))::int AS left
       FROM payment p WHERE p.id = ANY ($1)`,
    [payments.map(({ id }) => id)],
  );
  return new Map(rows.map(({ id, left }) => [id, left]));
}

/** Money that goes back for a reason of its own comes before what was only proposed. */
async function declineProposals({ tx, now }: Ctx, bookingId: string): Promise<void> {
  await tx.query(
    `UPDATE refund SET status = 'declined', done_at = $2, fault = 'Given back for another reason meanwhile.'
      WHERE booking_id = $1 AND status = 'proposed'`,
    [bookingId, now],
  );
}

function refuseMoreThanLeft({ amountPence }: RefundWish, left: number, [first]: readonly Payment[]): void {
  if (amountPence <= left) return;
  const words = moneyWords(left, currencyOf(first?.currency));
  throw new Problem(
    'conflict',
    left === 0 ? 'Nothing is left to give back' : `At most ${words} is left to give back`,
    {
      detail:
        'Nothing was given back. Look at the booking’s payments and refunds, then choose the amount anew.',
      errors: [{ pointer: '/amountPence', detail: `At most ${words}.` }],
    },
  );
}

type ToInsert = { payment: Payment; amountPence: number; wish: RefundWish };

async function insertRefund(ctx: Ctx, { payment, amountPence, wish }: ToInsert): Promise<Refund> {
  const { tx, actor, now } = ctx;
  const by = accountOrNull(actor);
  const proposed = wish.proposed === true;
  const refund = tx.create(Refund, {
    id: randomUUID(),
    fisheryId: payment.fisheryId,
    bookingId: payment.bookingId,
    paymentId: payment.id,
    amountPence,
    cause: wish.cause,
    reason: wish.reason,
    status: proposed ? 'proposed' : 'queued',
    providerRef: null,
    askedBy: by,
    askedAt: now,
    approvedBy: proposed ? null : by,
    approvedAt: proposed ? null : now,
    doneAt: null,
    fault: '',
    seenBy: null,
    seenAt: null,
  });
  await tx.insert(Refund, refund);
  if (!proposed) await setOff(ctx, refund, payment);
  return refund;
}

/** Sets a queued refund on its way: a card's to the provider; what a person does waits in the office's queue. */
export async function setOff(ctx: Ctx, refund: Refund, payment: Payment): Promise<void> {
  if (!askedByHand(refund, payment)) await ctx.jobs.send(ctx.tx, 'refund.ask', { refundId: refund.id });
}

type Again = { refund: Refund; payment: Payment; by: 'card' | 'hand' };

/** Another refund in the place of a failed one, which is then declined; by card, or by hand. */
export async function putInPlace(ctx: Ctx, { refund, payment, by }: Again): Promise<Refund> {
  const { tx, now } = ctx;
  const first = firstOf(refund);
  const rows: { tries: number }[] = await tx.query(
    `SELECT count(*)::int AS tries FROM refund WHERE payment_id = $1 AND cause LIKE '%:' || $2 || ':%'`,
    [payment.id, first],
  );
  await tx.update(Refund, { id: refund.id }, { status: 'declined', doneAt: now });
  return insertRefund(ctx, {
    payment,
    amountPence: refund.amountPence,
    wish: {
      bookingId: refund.bookingId,
      amountPence: refund.amountPence,
      cause: `${by === 'card' ? 'again' : 'hand'}:${first}:${(rows[0]?.tries ?? 0) + 1}`,
      reason: refund.reason,
    },
  });
}
