import type { Duration, TicketType } from '@mereward/shared/tickets/contract';
import { allowedStarts } from '@mereward/shared/tickets/ticket-interval';
import { priceOn } from '@mereward/shared/tickets/ticket-price';
import { money } from '@/lib/format';

/** When a kind of ticket runs: "07:00 to 19:00", "24 hours", "dawn to dusk". */
export function durationWords(duration: Duration): string {
  switch (duration.kind) {
    case 'fixed_hours':
    case 'night':
    case 'match':
      return `${duration.starts} to ${duration.ends}`;
    case 'dawn_dusk':
      return 'dawn to dusk';
    case 'elapsed':
      return `${String(duration.hours)} hours`;
    case 'season':
      return 'all season';
  }
}

/** "Day ticket, 07:00 to 19:00, £12.00": what a kind is for a day; without a price that day it says so. */
export function kindLine(details: TicketType, day: string): string {
  const price = priceOn(details.prices, day);
  const cost = price === null ? 'no price yet' : money(price.pricePence, details.currency);
  const hours = durationWords(details.duration);
  return details.name.toLowerCase().includes(hours.toLowerCase())
    ? `${details.name}, ${cost}`
    : `${details.name}, ${hours}, ${cost}`;
}

/** The clock times a ticket may start at; none where it leaves no choice. */
export const startsOf = ({ duration }: Pick<TicketType, 'duration'>): string[] =>
  duration.kind === 'elapsed' ? allowedStarts(duration) : [];
