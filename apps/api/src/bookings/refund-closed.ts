import { ClosureChoice } from '@mereward/db/entities/bookings/closure-choice';
import { Booking } from '@mereward/db/entities/bookings/booking';
import { mayGo } from '@mereward/shared/bookings/booking-state';
import type { EntityManager } from 'typeorm';
import type { Ctx } from '../ctx';
import { queueRefund } from '../payments/refunds';
import { setState, writeEvent } from './closure-history';

/** What may still go back of a booking, pence: taken, less given or promised back, less what a bank disputes. */
export async function leftOfBooking(tx: EntityManager, bookingId: string): Promise<number> {
  const [row]: { left: number }[] = await tx.query(
    `SELECT coalesce(sum(greatest(0, p.amount_pence
        - coalesce((SELECT sum(amount_pence) FROM refund
                     WHERE payment_id = p.id AND status IN ('queued', 'done', 'failed')), 0)
        - coalesce((SELECT sum(amount_pence) FROM dispute WHERE payment_id = p.id AND status <> 'won'), 0))), 0)::int AS left
       FROM payment p WHERE p.booking_id = $1 AND p.status = 'captured'`,
    [bookingId],
  );
  return row?.left ?? 0;
}

export const refundCause = (closureId: string): string => `closure:${closureId}`;

/** Ends a booking a closure lay over with all its money back, and answers how much; nothing taken is a plain end. */
export async function endByRefund(
  ctx: Ctx,
  choice: ClosureChoice,
  by: NonNullable<ClosureChoice['chosenBy']>,
): Promise<number> {
  const { tx, now } = ctx;
  const { bookingId, closureId } = choice;
  const booking = await tx.findOneByOrFail(Booking, { id: bookingId });
  if (mayGo(booking.status, 'cancelled_by_fishery')) await setState(ctx, bookingId, 'cancelled_by_fishery');
  const backPence = await leftOfBooking(tx, bookingId);
  const made = await queueRefund(ctx, {
    bookingId,
    amountPence: backPence,
    cause: refundCause(closureId),
    reason: 'The fishery closed the water: all of it is given back.',
  });
  const settled = {
    choice: made.length > 0 ? ('refund' as const) : ('cancel' as const),
    chosenBy: by,
    chosenAt: now,
    outcome: { ...choice.outcome, backPence },
  };
  await tx.update(ClosureChoice, { id: choice.id }, settled);
  await writeEvent(ctx, bookingId, { kind: 'closed_and_ended', told: { closureId, by, backPence } });
  return backPence;
}
