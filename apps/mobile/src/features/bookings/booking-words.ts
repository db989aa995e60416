import type { BookingState } from '@mereward/shared/bookings/booking-state';
import type { ShapeName } from '@/components/shape';

type Placed = { pegs: readonly { number: string; name: string }[]; lakeName: string | null };

/** "Peg FO7, Far Ostle"; "Pegs FO7 and FO8, Far Ostle"; "Far Ostle" where a peg is chosen on arrival. */
export function placeName({ pegs, lakeName }: Placed): string {
  const numbers = pegs.map(({ number }) => number);
  const last = numbers.at(-1);
  const named =
    last === undefined
      ? null
      : numbers.length === 1
        ? `Peg ${last}`
        : `Pegs ${numbers.slice(0, -1).join(', ')} and ${last}`;
  return [named, lakeName].filter(Boolean).join(', ');
}

type Look = { shape: ShapeName; tone: 'reed' | 'amber' | 'brick' | 'water' | 'inkSoft'; word: string };

/** How a booking stands, by shape and word. */
export const BOOKING_LOOKS = {
  hold: { shape: 'diamond', tone: 'amber', word: 'held' },
  pending_payment: { shape: 'diamond', tone: 'amber', word: 'to be paid' },
  confirmed: { shape: 'triangle', tone: 'reed', word: 'booked' },
  checked_in: { shape: 'triangle', tone: 'reed', word: 'arrived' },
  completed: { shape: 'bar', tone: 'inkSoft', word: 'over' },
  choosing: { shape: 'diamond', tone: 'amber', word: 'choose' },
  expired: { shape: 'bar', tone: 'inkSoft', word: 'hold ran out' },
  cancelled_by_angler: { shape: 'cross', tone: 'brick', word: 'cancelled' },
  cancelled_by_fishery: { shape: 'cross', tone: 'brick', word: 'cancelled by the fishery' },
  no_show: { shape: 'bar', tone: 'inkSoft', word: 'did not come' },
} as const satisfies Record<BookingState, Look>;

/** Which part of one's list a booking stands in. */
export type Part = 'open' | 'to come' | 'past';

export function partOf({ status, until }: { status: BookingState; until: string }, nowMs: number): Part {
  switch (status) {
    case 'hold':
    case 'pending_payment':
    case 'choosing':
      return Date.parse(until) > nowMs ? 'open' : 'past';
    case 'confirmed':
    case 'checked_in':
    case 'no_show':
      return Date.parse(until) > nowMs ? 'to come' : 'past';
    case 'completed':
    case 'expired':
    case 'cancelled_by_angler':
    case 'cancelled_by_fishery':
      return 'past';
  }
}

/** "9:41", and "0:00" once it is over. */
export function countdown(untilMs: number, nowMs: number): string {
  const left = Math.max(0, Math.ceil((untilMs - nowMs) / 1000));
  return `${String(Math.floor(left / 60))}:${String(left % 60).padStart(2, '0')}`;
}
