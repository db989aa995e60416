import type { Payment } from '@mereward/db/entities/payments/payment';
import { moneyWords, sumPence } from '@mereward/shared/money/money';
import { saleLines } from '@mereward/shared/payments/line-parts';
import type { Ctx } from '../ctx';
import { recordSale } from '../payments/record-sale';
import { queueRefund } from '../payments/refunds';
import { aboutBooking } from '../payments/settle-refund';
import { currencyOf } from '../payments/currency';
import { confirmBooking } from './confirm';
import { postTooLate } from './paid-letters';
import { postConfirmed } from './post-ticket';
import { saleWords } from './sale-words';
import { tell, type Stay } from './stay';

/**
 * What follows when money was taken for a locked booking, all in one deed: ledger, receipt, and the ticket. Money
 * that comes after the hold was let go of goes back in full; so does what is over when somebody paid twice.
 */
export async function paid(ctx: Ctx, stay: Stay, payment: Payment): Promise<void> {
  const { tx } = ctx;
  const of = await aboutBooking(tx, stay.id);
  const lines = saleLines(
    stay.details.lines.map(({ words, count, grossPence, vatRateBp, vatPence }) => ({
      words,
      count,
      grossPence,
      rateBp: vatRateBp,
      vatPence,
    })),
  );
  await recordSale(ctx, payment, { of, lines, description: await saleWords(tx, stay) });
  const amount = moneyWords(payment.amountPence, currencyOf(payment.currency));
  await tell(ctx, stay.id, { kind: 'paid', paymentId: payment.id, amountPence: payment.amountPence });
  const end = await confirmBooking(ctx, stay.id);
  if (end === 'too_late') {
    await queueRefund(ctx, {
      bookingId: stay.id,
      paymentId: payment.id,
      amountPence: payment.amountPence,
      cause: 'paid_too_late',
      reason: 'The payment came after the hold had run out.',
    });
    await tell(ctx, stay.id, { kind: 'paid-too-late', paymentId: payment.id });
    await postTooLate(ctx, stay, amount);
    return;
  }
  const overPence = Math.min(payment.amountPence, (await keptPence(ctx, stay.id)) - stay.grossPence);
  if (overPence > 0)
    await queueRefund(ctx, {
      bookingId: stay.id,
      paymentId: payment.id,
      amountPence: overPence,
      cause: 'paid_twice',
      reason: 'It was paid more than once.',
    });
  if (end === 'confirmed') await postConfirmed(ctx, stay.id);
}

/** Taken for a booking, less what went back or is on its way back. */
async function keptPence({ tx }: Ctx, bookingId: string): Promise<number> {
  const rows: { pence: number }[] = await tx.query(
    `SELECT amount_pence AS pence FROM payment WHERE booking_id = $1 AND status = 'captured'
     UNION ALL
     SELECT -amount_pence FROM refund WHERE booking_id = $1 AND status IN ('queued', 'done', 'failed')`,
    [bookingId],
  );
  return sumPence(rows.map(({ pence }) => pence));
}
