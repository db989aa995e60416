import { draftKey, readDraft } from '@/lib/draft-text';
import { sessionStore } from '@/lib/session-store';
import { storage } from '@/lib/storage';
import type { BookingView } from '@mereward/shared/bookings/contract';
import { detailsStart } from '@/features/bookings/details-fields';

/** The name of a booking's draft among its person's. */
export const detailsDraft = (bookingId: string): string => `booking:${bookingId}`;

const keyOf = (bookingId: string): string =>
  draftKey(sessionStore.get().account?.id ?? null, detailsDraft(bookingId));

/** Whoever holds again after a hold ran out finds what they had filled in or typed. */
export async function carryDetails(from: BookingView, to: BookingView): Promise<void> {
  const start = detailsStart(from);
  const typed = { ...start, ...readDraft(await storage.get(keyOf(from.id)), start) };
  await storage.set(keyOf(to.id), JSON.stringify(typed));
}
