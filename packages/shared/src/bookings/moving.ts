import { wholePence } from '../money/money';
import type { BookingState } from './booking-state';
import { tierAt, type CancellationPolicy } from './cancellation';

/** Who moves it: the angler by the policy, the fishery when it must close, staff on the bank. */
export type MoveCause = 'angler' | 'closure' | 'staff';
export type Moved = {
  state: BookingState;
  start: Date;
  until: Date;
  movesMade: number; // by the angler
  relet: boolean; // the peg and time left behind have been let again
};

/** Why a booking can’t be moved, in words; null when it can. Room at the new place is asked elsewhere. */
export function whyNotMove(
  policy: CancellationPolicy,
  cause: MoveCause,
  booking: Moved & { now: Date },
): string | null {
  const { state, start, until, movesMade, relet, now } = booking;
  if (state !== 'confirmed' && state !== 'checked_in') return 'Only a confirmed ticket can be moved.';
  if (now >= until) return 'This ticket is over.';
  if (cause !== 'angler') return null;
  if (state === 'checked_in' || now >= start) return 'It has begun. Ask the bailiff to move you.';
  if (movesMade >= policy.mostMoves) return `A ticket can be moved ${timesWords(policy.mostMoves)}.`;
  const move = tierAt(policy, start, now)?.freeMove ?? 'no';
  if (move === 'no') return 'So near to the start a ticket can’t be moved.';
  return move === 'if_relet' && !relet
    ? 'So near to the start it can be moved only once the peg is let again.'
    : null;
}

const timesWords = (times: number): string =>
  times === 0 ? 'by the fishery only' : times === 1 ? 'once' : `${times} times`;

/**
 * What a move costs or gives back, pence. The same kind of ticket keeps its price. Another kind gives the difference
 * back; a dearer one is to be paid up, unless the fishery had to close.
 */
export function moveMoney(
  cause: MoveCause,
  { paidPence, newPence, sameKind }: { paidPence: number; newPence: number; sameKind: boolean },
): { refundPence: number; owedPence: number } {
  const difference = sameKind ? 0 : wholePence(newPence) - wholePence(paidPence);
  return {
    refundPence: Math.max(0, -difference),
    owedPence: cause === 'closure' ? 0 : Math.max(0, difference),
  };
}
