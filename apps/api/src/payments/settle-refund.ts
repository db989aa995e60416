import { Payment } from '@mereward/db/entities/payments/payment';
import { Refund } from '@mereward/db/entities/payments/refund';
import { partOfLines } from '@mereward/shared/payments/line-parts';
import type { PaymentMethod } from '@mereward/shared/payments/payment-state';
import type { EntityManager } from 'typeorm';
import type { Ctx } from '../ctx';
import { partsByRate, writeDeed, type About } from './ledger';
import { postRefundLetter } from './refund-letters';
import { issueReceipt, linesOf } from './receipts';

/** What became of a refund: told by the provider, or by whoever handed it over. */
export type RefundOutcome =
  | { kind: 'done'; method: PaymentMethod; providerRef: string | null }
  | { kind: 'failed'; fault: string; providerRef: string | null };

/** A cause names the refund it takes the place of: `again:<first refund>:<which>`, `hand:…`. */
const FOLLOWS = /^(again|hand):([0-9a-f-]{36}):\d+$/;
export const firstOf = ({ id, cause }: Pick<Refund, 'id' | 'cause'>): string =>
  FOLLOWS.exec(cause)?.[2] ?? id;

/** A person hands it over; the provider is not asked. */
export const askedByHand = ({ cause }: Pick<Refund, 'cause'>, { method }: Pick<Payment, 'method'>): boolean =>
  method !== 'card_online' || cause.startsWith('hand:');

/**
 * Ends a refund, once however often it is told: given, with the ledger and a credit note in the row of receipts; or
 * failed, for the office. What was told as given and came back later is owed to the angler again.
 */
export async function settleRefund(ctx: Ctx, refundId: string, outcome: RefundOutcome): Promise<void> {
  const { tx } = ctx;
  const found = await tx.findOneBy(Refund, { id: refundId });
  if (!found) return;
  await holdBooking(tx, found.bookingId);
  const payment = await tx.findOneOrFail(Payment, {
    where: { id: found.paymentId },
    lock: { mode: 'pessimistic_write' },
  });
  const refund = await tx.findOneOrFail(Refund, {
    where: { id: refundId },
    lock: { mode: 'pessimistic_write' },
  });
  const { status } = refund;
  if (outcome.kind === 'done') {
    if (status !== 'queued') return;
    await tx.update(
      Refund,
      { id: refundId },
      { status: 'done', doneAt: ctx.now, ...refOf(outcome), fault: '' },
    );
    await recordRefund(ctx, { refund, payment, method: outcome.method });
  } else {
    if (status !== 'queued' && status !== 'done') return;
    if (status === 'done') await owedAgain(ctx, refund, payment);
    await tx.update(Refund, { id: refundId }, { status: 'failed', ...refOf(outcome), fault: outcome.fault });
  }
  await postRefundLetter(ctx, refund, outcome.kind);
}

const refOf = ({ providerRef }: RefundOutcome) => (providerRef === null ? {} : { providerRef });

type Given = { refund: Refund; payment: Payment; method: PaymentMethod };

async function recordRefund(ctx: Ctx, { refund, payment, method }: Given): Promise<void> {
  const of = await aboutBooking(ctx.tx, refund.bookingId);
  const entry = { about: refund.id, of, paymentId: payment.id, refundId: refund.id };
  if (await isCredited(ctx.tx, firstOf(refund))) {
    const deed = { kind: 'refund_again', method, amountPence: refund.amountPence } as const;
    await writeDeed(ctx, { ...entry, kind: 'refund_again' }, [{ deed, tags: { method } }]);
    return;
  }
  const sold = await linesOf(ctx.tx, 'receipt', { paymentId: payment.id });
  const back = await linesOf(ctx.tx, 'credit_note', { paymentId: payment.id });
  const lines = partOfLines(sold, back, refund.amountPence);
  await writeDeed(ctx, { ...entry, kind: 'refund' }, partsByRate('refund', { method, lines, of }));
  await issueReceipt(ctx, {
    of,
    paymentId: payment.id,
    refundId: refund.id,
    description: refund.reason,
    method,
    lines,
  });
}

/** The sale was undone by a credit note, so what came back is owed, and no sale again. */
async function owedAgain(ctx: Ctx, { id, bookingId, amountPence }: Refund, payment: Payment): Promise<void> {
  const of = await aboutBooking(ctx.tx, bookingId);
  const deed = { kind: 'refund_returned', amountPence } as const;
  await writeDeed(ctx, { kind: 'refund_returned', about: id, of, paymentId: payment.id, refundId: id }, [
    { deed, tags: { method: payment.method } },
  ]);
}

async function isCredited(tx: EntityManager, refundId: string): Promise<boolean> {
  const rows: unknown[] = await tx.query('SELECT 1 FROM receipt WHERE refund_id = $1', [refundId]);
  return rows.length > 0;
}

/**
 * Holds a booking for this deed before its payments and refunds: whoever writes about its money locks in that order,
 * for each row written refers to the booking, and two orders would wait for each other.
 */
export async function holdBooking(tx: EntityManager, bookingId: string): Promise<void> {
  await tx.query('SELECT 1 FROM booking WHERE id = $1 FOR UPDATE', [bookingId]);
}

/** What of a booking stands on its postings. */
export async function aboutBooking(tx: EntityManager, bookingId: string): Promise<About> {
  const rows: About[] = await tx.query(
    `SELECT fishery_id AS "fisheryId", id AS "bookingId", lake_id AS "lakeId", ticket_type_id AS "ticketTypeId", currency
       FROM booking WHERE id = $1`,
    [bookingId],
  );
  const [about] = rows;
  if (!about) throw new Error('Money of a booking that is not there');
  return about;
}
