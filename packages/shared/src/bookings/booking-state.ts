import { z } from 'zod';

/**
 * Where a booking stands. A moved booking stays what it is, with a line in its history; money given back is told by
 * the payments, so that a booking can be completed and partly refunded.
 */
export const BookingState = z.enum([
  'hold',
  'pending_payment',
  'confirmed',
  'checked_in',
  'completed',
  'choosing', // a closure lies over it, and its angler has a choice to make
  'expired',
  'cancelled_by_angler',
  'cancelled_by_fishery',
  'no_show',
]);
export type BookingState = z.infer<typeof BookingState>;

/** Every step a booking may take. What is not here can't happen; a repeat of the same state is no step. */
export const BOOKING_STEPS: Readonly<Record<BookingState, readonly BookingState[]>> = {
  hold: ['pending_payment', 'confirmed', 'expired', 'cancelled_by_angler', 'cancelled_by_fishery'],
  pending_payment: ['confirmed', 'expired', 'cancelled_by_angler', 'cancelled_by_fishery'],
  confirmed: [
    'checked_in',
    'completed',
    'no_show',
    'choosing',
    'cancelled_by_angler',
    'cancelled_by_fishery',
  ],
  checked_in: ['completed', 'choosing', 'cancelled_by_fishery'],
  choosing: ['confirmed', 'cancelled_by_angler', 'cancelled_by_fishery'],
  no_show: ['checked_in', 'completed', 'cancelled_by_fishery'], // they came after all, or their time ran out
  completed: [],
  expired: [],
  cancelled_by_angler: [],
  cancelled_by_fishery: [],
};

export const mayGo = (from: BookingState, to: BookingState): boolean => BOOKING_STEPS[from].includes(to);

/** Nothing follows any more. */
export const isSettled = (state: BookingState): boolean => BOOKING_STEPS[state].length === 0;

/** Does it keep the peg from others? A no-show does until the fishery lets the peg go. */
export const takesPeg = (state: BookingState, pegLetGo = false): boolean =>
  state === 'no_show'
    ? !pegLetGo
    : state === 'hold' || state === 'pending_payment' || state === 'confirmed' || state === 'checked_in';

/** Is it a ticket to fish, rules and hours allowing? */
export const isGood = (state: BookingState): boolean => state === 'confirmed' || state === 'checked_in';

export const BOOKING_STATE_WORDS: Readonly<Record<BookingState, string>> = {
  hold: 'Held for you',
  pending_payment: 'Waiting for payment',
  confirmed: 'Confirmed',
  checked_in: 'On the bank',
  completed: 'Over',
  choosing: 'Closed: choose what becomes of it',
  expired: 'Ran out before it was paid',
  cancelled_by_angler: 'Cancelled',
  cancelled_by_fishery: 'Cancelled by the fishery',
  no_show: 'Nobody came',
};
