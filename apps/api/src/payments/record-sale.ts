import type { Payment } from '@mereward/db/entities/payments/payment';
import { partOfLines, type SaleLine } from '@mereward/shared/payments/line-parts';
import type { Ctx } from '../ctx';
import { partsByRate, writeDeed, type About } from './ledger';
import { issueReceipt, linesOf } from './receipts';

export type Sold = { of: About; lines: readonly SaleLine[]; description: string };

/**
 * Records money taken for a booking: ledger and receipt, once however often it is told. `lines` are the booking's
 * whole; a payment of a part takes its share of what earlier receipts left. Money beyond the whole (paid twice) is
 * recorded with the lines anew, since it was taken and will be given back.
 */
export async function recordSale(
  ctx: Ctx,
  payment: Payment,
  { of, lines, description }: Sold,
): Promise<void> {
  const { id: paymentId, method, amountPence } = payment;
  const had = await linesOf(ctx.tx, 'receipt', { bookingId: of.bookingId });
  const part = partOrAnew(lines, had, amountPence);
  const entry = { kind: 'sale', about: paymentId, of, paymentId } as const;
  if (!(await writeDeed(ctx, entry, partsByRate('sale', { method, lines: part, of })))) return;
  if (method === 'complimentary' || amountPence === 0) return;
  await issueReceipt(ctx, { of, paymentId, refundId: null, description, method, lines: part });
}

function partOrAnew(lines: readonly SaleLine[], had: readonly SaleLine[], amountPence: number): SaleLine[] {
  const pence = (some: readonly SaleLine[]) => some.reduce((sum, { grossPence }) => sum + grossPence, 0);
  const before = pence(had) + amountPence > pence(lines) ? [] : had;
  return partOfLines(lines, before, amountPence);
}
