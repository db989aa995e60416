import { Booking } from '@mereward/db/entities/bookings/booking';
import type { BookingState } from '@mereward/shared/bookings/booking-state';
import { accountOrNull, type Ctx } from '../ctx';

/** Puts a locked booking into another state. */
export async function setState({ tx }: Ctx, bookingId: string, status: BookingState): Promise<void> {
  await tx.update(Booking, { id: bookingId }, { status, version: () => 'version + 1' });
}

/** A line of a booking's history about a closure. */
export async function writeEvent(
  { tx, actor, now }: Ctx,
  bookingId: string,
  { kind, told }: { kind: string; told: Record<string, unknown> },
): Promise<void> {
  await tx.query(
    'INSERT INTO booking_event (booking_id, at, by_account, kind, told) VALUES ($1, $2, $3, $4, $5)',
    [bookingId, now, accountOrNull(actor), kind, told],
  );
}
