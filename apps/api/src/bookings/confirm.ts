import { Problem } from '@mereward/shared/problems/problem';
import type { Ctx } from '../ctx';
import { allow, lockBooking } from './access';
import { refuseIncomplete, refuseOver } from './fill-in';
import { postConfirmed } from './post-ticket';
import { lockStay, step } from './stay';
import { tellTomorrowLater } from './tell-ahead';
import { termsOf } from './terms';

/** Makes a hold a ticket where nothing is to be paid now. Done once, however often it is asked. */
export async function confirmFree(ctx: Ctx, bookingId: string): Promise<void> {
  const { stay, standing } = await lockBooking(ctx, bookingId);
  allow(standing.holder, 'whoever holds the ticket');
  if (stay.status === 'confirmed') return;
  refuseOver(stay, ctx.now);
  await refuseIncomplete(ctx, stay, false);
  const { payAtLodge } = await termsOf(ctx.tx, stay.fisheryId);
  if (stay.grossPence > 0 && !payAtLodge)
    throw new Problem('conflict', 'This ticket is to be paid first', {
      detail: 'Pay by card on this page, or ask the fishery’s office.',
    });
  await confirmBooking(ctx, bookingId);
  await postConfirmed(ctx, bookingId);
}

/**
 * A hold becomes a ticket: its pegs are taken for good. For what is paid as much as for what is free. A hold that has
 * run out but whose pegs nobody took is confirmed all the same; one that was let go of is `too_late`.
 */
export async function confirmBooking(ctx: Ctx, bookingId: string): Promise<'confirmed' | 'was' | 'too_late'> {
  const stay = await lockStay(ctx.tx, bookingId);
  if (stay.status === 'confirmed' || stay.status === 'checked_in') return 'was';
  if (stay.status !== 'hold' && stay.status !== 'pending_payment') return 'too_late';
  await step(ctx, stay, { to: 'confirmed', kind: 'confirmed', change: { holdUntil: null } });
  await ctx.tx.query(`UPDATE peg_time SET state = 'taken' WHERE booking_id = $1`, [bookingId]);
  await tellTomorrowLater(ctx, bookingId);
  return 'confirmed';
}
