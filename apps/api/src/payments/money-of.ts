import { Payment } from '@mereward/db/entities/payments/payment';
import { Receipt } from '@mereward/db/entities/payments/receipt';
import { Refund } from '@mereward/db/entities/payments/refund';
import type { PaymentView, ReceiptView, RefundView } from '@mereward/shared/payments/contract';
import { receiptNumber } from '@mereward/shared/payments/receipt';
import { sumPence } from '@mereward/shared/money/money';
import type { EntityManager } from 'typeorm';

/** All the money of one booking, the oldest first. `refundedPence` is what went back or is on its way. */
export type BookingMoney = {
  payments: PaymentView[];
  refunds: RefundView[];
  receipts: ReceiptView[];
  paidPence: number;
  refundedPence: number;
};

export async function moneyOf(tx: EntityManager, bookingId: string): Promise<BookingMoney> {
  const payments = await tx.find(Payment, { where: { bookingId }, order: { madeAt: 'ASC', id: 'ASC' } });
  const refunds = await tx.find(Refund, { where: { bookingId }, order: { askedAt: 'ASC', id: 'ASC' } });
  const receipts = await tx.find(Receipt, {
    where: { bookingId },
    order: { issuedAt: 'ASC', number: 'ASC' },
  });
  const currencyById = new Map(payments.map(({ id, currency }) => [id, currency]));
  const shown = refunds.filter(({ status }) => status !== 'declined');
  return {
    payments: payments.map(paymentView),
    refunds: shown.map((refund) => refundView(refund, currencyById.get(refund.paymentId) ?? 'GBP')),
    receipts: receipts.map(receiptView),
    paidPence: sumPence(payments.flatMap((each) => (each.status === 'captured' ? [each.amountPence] : []))),
    refundedPence: sumPence(
      refunds.flatMap(({ status, amountPence }) =>
        status === 'done' || status === 'queued' ? [amountPence] : [],
      ),
    ),
  };
}

const open = ({ status }: Payment): boolean => status !== 'captured' && status !== 'cancelled';

const paymentView = (payment: Payment): PaymentView => ({
  id: payment.id,
  method: payment.method,
  amountPence: payment.amountPence,
  currency: payment.currency,
  status: payment.status,
  pageUrl: open(payment) ? payment.pageUrl : null,
  fault: payment.fault,
  madeAt: payment.madeAt.toISOString(),
  takenAt: payment.takenAt?.toISOString() ?? null,
});

export const refundView = (refund: Refund, currency: string): RefundView => ({
  id: refund.id,
  bookingId: refund.bookingId,
  amountPence: refund.amountPence,
  currency,
  reason: refund.reason,
  status: refund.status,
  askedAt: refund.askedAt.toISOString(),
  doneAt: refund.doneAt?.toISOString() ?? null,
  fault: refund.fault,
});

export const receiptView = ({ id, year, number, kind, taxPoint, issuedAt, told }: Receipt): ReceiptView => ({
  id,
  number: receiptNumber(year, number),
  kind,
  taxPoint,
  issuedAt: issuedAt.toISOString(),
  told,
});
