import { z } from 'zod';
import { createPreference } from '@/lib/preference';

const KEPT = 40; // tickets; older ones are let go of

const ticked = createPreference({
  key: 'mereward.cleaned',
  schema: z.array(z.string()).max(KEPT),
  fallback: [],
});

/** For which tickets its holder ticked that the tackle is clean. A reminder to oneself; nobody else is told. */
export const cleanTackle = {
  use: (bookingId: string): boolean => ticked.use().includes(bookingId),
  set: (bookingId: string, on: boolean): void => {
    const others = ticked.get().filter((id) => id !== bookingId);
    ticked.set(on ? [...others, bookingId].slice(-KEPT) : others);
  },
};
