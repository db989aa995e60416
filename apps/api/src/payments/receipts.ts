import { Receipt } from '@mereward/db/entities/payments/receipt';
import type { ReceiptTold } from '@mereward/shared/payments/contract';
import type { SaleLine } from '@mereward/shared/payments/line-parts';
import type { PaymentMethod } from '@mereward/shared/payments/payment-state';
import { sumPence } from '@mereward/shared/money/money';
import { vatByRate } from '@mereward/shared/money/vat';
import { civilDay } from '@mereward/shared/time/civil-day';
import { randomUUID } from 'node:crypto';
import type { EntityManager } from 'typeorm';
import type { Ctx } from '../ctx';
import { fisheryFound } from '../fisheries/found';
import type { About } from './ledger';

export type ToReceipt = {
  of: About;
  paymentId: string | null; // a receipt's
  refundId: string | null; // a credit note's
  description: string;
  method: PaymentMethod;
  lines: readonly SaleLine[];
};

/** Gives out the next number and keeps what the receipt says, in the deed's own transaction: no number is skipped. */
export async function issueReceipt({ tx, now }: Pick<Ctx, 'tx' | 'now'>, asked: ToReceipt): Promise<void> {
  const { of, paymentId, refundId } = asked;
  const { details } = await fisheryFound(tx, of.fisheryId);
  const taxPoint = civilDay(now, details.zone);
  const year = Number(taxPoint.slice(0, 4));
  await tx.insert(Receipt, {
    id: randomUUID(),
    fisheryId: of.fisheryId,
    year,
    number: await nextNumber(tx, of.fisheryId, year),
    kind: refundId === null ? 'receipt' : 'credit_note',
    paymentId: refundId === null ? paymentId : null,
    refundId,
    bookingId: of.bookingId,
    taxPoint,
    issuedAt: now,
    told: toldOf(asked, {
      name: details.legalEntity || details.name,
      address: [details.address, details.postcode].filter((part) => part !== '').join(', '),
      vatNumber: details.vatStatus === 'registered' ? details.vatNumber : '',
    }),
  });
}

function toldOf({ description, of, lines, method }: ToReceipt, seller: ReceiptTold['seller']): ReceiptTold {
  return {
    seller,
    description,
    currency: of.currency,
    lines: [...lines],
    vat: vatByRate(lines.map((line) => ({ ...line, netPence: line.grossPence - line.vatPence }))),
    grossPence: sumPence(lines.map(({ grossPence }) => grossPence)),
    method,
  };
}

async function nextNumber(tx: EntityManager, fisheryId: string, year: number): Promise<number> {
  const rows: { last: number }[] = await tx.query(
    `INSERT INTO receipt_counter AS c (fishery_id, year, last) VALUES ($1, $2, 1)
     ON CONFLICT (fishery_id, year) DO UPDATE SET last = c.last + 1 RETURNING last`,
    [fisheryId, year],
  );
  const last = rows[0]?.last;
  if (last === undefined) throw new Error('A receipt got no number');
  return last;
}

/** Lines of the receipts of some payments, or of the credit notes over them. */
export async function linesOf(
  tx: EntityManager,
  kind: 'receipt' | 'credit_note',
  of: { bookingId: string } | { paymentId: string },
): Promise<SaleLine[]> {
  const [column, id] = 'bookingId' in of ? ['r.booking_id', of.bookingId] : ['p.id', of.paymentId];
  const rows: { lines: ReceiptTold['lines'] }[] = await tx.query(
    `SELECT r.told->'lines' AS lines FROM receipt r
       LEFT JOIN refund b ON b.id = r.refund_id
       JOIN payment p ON p.id = coalesce(r.payment_id, b.payment_id)
      WHERE r.kind = $1 AND ${column} = $2 ORDER BY r.issued_at, r.number`,
    [kind, id],
  );
  return rows.flatMap(({ lines }) => lines);
}
