import { Payment } from '@mereward/db/entities/payments/payment';
import type { EntityManager } from 'typeorm';
import type { Ctx } from '../ctx';

/** A card's payment that may still come to something; one that failed can be tried with another card. */
export const isOpen = ({ method, status }: Payment): boolean =>
  method === 'card_online' && status !== 'captured' && status !== 'cancelled';

/** Payments of cards that have not ended, of one booking or of all; those longest not looked at first. */
export const openPayments = (
  tx: EntityManager,
  { bookingId, most }: { bookingId: string | null; most: number },
): Promise<Payment[]> =>
  tx
    .createQueryBuilder(Payment, 'p')
    .where(`p.method = 'card_online' AND p.status NOT IN ('captured', 'cancelled')`)
    .andWhere(bookingId === null ? 'TRUE' : 'p.bookingId = :bookingId', { bookingId })
    .orderBy('p.lookedAt', 'ASC', 'NULLS FIRST')
    .addOrderBy('p.madeAt')
    .limit(most)
    .getMany();

/** Has the pages of a booking closed once this deed is committed. */
export async function closePages({ tx, jobs }: Ctx, bookingId: string): Promise<void> {
  for (const { id } of await openPayments(tx, { bookingId, most: 10 }))
    await jobs.send(tx, 'payment.close', { paymentId: id });
}
