import type { BookingState } from '@mereward/shared/bookings/booking-state';
import type { BookingListItem } from '@mereward/shared/bookings/contract';
import type { ShapeName } from '@/components/shape';

type Look = { shape: ShapeName; tone: 'reed' | 'amber' | 'brick' | 'water' | 'inkSoft'; word: string };

/** How a booking stands for those who work with it, by shape and word. */
export const STAFF_LOOKS = {
  hold: { shape: 'diamond', tone: 'amber', word: 'held' },
  pending_payment: { shape: 'diamond', tone: 'amber', word: 'being paid' },
  confirmed: { shape: 'square', tone: 'water', word: 'expected' },
  checked_in: { shape: 'triangle', tone: 'reed', word: 'on the bank' },
  completed: { shape: 'bar', tone: 'inkSoft', word: 'over' },
  choosing: { shape: 'diamond', tone: 'amber', word: 'closed: choosing' },
  expired: { shape: 'bar', tone: 'inkSoft', word: 'hold ran out' },
  cancelled_by_angler: { shape: 'cross', tone: 'brick', word: 'cancelled' },
  cancelled_by_fishery: { shape: 'cross', tone: 'brick', word: 'cancelled by us' },
  no_show: { shape: 'ring', tone: 'amber', word: 'nobody came' },
} as const satisfies Record<BookingState, Look>;

/** "FO7, FO8"; "on arrival" where a peg is chosen then. */
export const pegsOf = ({ pegs }: Pick<BookingListItem, 'pegs'>): string =>
  pegs.length === 0 ? 'on arrival' : pegs.map(({ number }) => number).join(', ');

export const STATE_FILTERS = [
  { key: 'all', label: 'All' },
  { key: 'expected', label: 'Expected' },
  { key: 'here', label: 'On the bank' },
  { key: 'to_pay', label: 'To be paid' },
  { key: 'not_good', label: 'Not good yet' },
  { key: 'off', label: 'Cancelled, ran out' },
] as const;
export type StateFilter = (typeof STATE_FILTERS)[number]['key'];

const LIVE: ReadonlySet<BookingState> = new Set([
  'hold',
  'pending_payment',
  'confirmed',
  'checked_in',
  'choosing',
]);
const OFF: ReadonlySet<BookingState> = new Set(['expired', 'cancelled_by_angler', 'cancelled_by_fishery']);

type Filtered = Pick<BookingListItem, 'status' | 'grossPence' | 'paidPence' | 'notYet'>;

/** Whether a booking stands under a filter. */
export function passes({ status, grossPence, paidPence, notYet }: Filtered, filter: StateFilter): boolean {
  switch (filter) {
    case 'all':
      return true;
    case 'expected':
      return status === 'confirmed';
    case 'here':
      return status === 'checked_in';
    case 'to_pay':
      return LIVE.has(status) && paidPence < grossPence;
    case 'not_good':
      return LIVE.has(status) && notYet.length > 0;
    case 'off':
      return OFF.has(status);
  }
}
