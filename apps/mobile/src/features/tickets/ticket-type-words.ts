import type { Duration, TicketPrice, TicketType } from '@mereward/shared/tickets/contract';
import { priceOn } from '@mereward/shared/tickets/ticket-price';
import { dayRange } from '@/lib/format-time';
import { money } from '@/lib/format';

/** The hours of a kind of ticket in a line of a table: "24 h from 08:00 to 12:00". */
export function hoursOfKind(duration: Duration): string {
  switch (duration.kind) {
    case 'fixed_hours':
    case 'night':
    case 'match':
      return `${duration.starts} to ${duration.ends}`;
    case 'dawn_dusk':
      return sunWords(duration);
    case 'elapsed':
      return duration.startsFrom === duration.startsUntil
        ? `${String(duration.hours)} h from ${duration.startsFrom}`
        : `${String(duration.hours)} h, starts ${duration.startsFrom} to ${duration.startsUntil}`;
    case 'season':
      return dayRange(duration.firstDay, duration.lastDay);
  }
}

function sunWords({
  beforeSunriseMinutes,
  afterSunsetMinutes,
}: Extract<Duration, { kind: 'dawn_dusk' }>): string {
  const before =
    beforeSunriseMinutes === 0 ? 'Sunrise' : `${String(beforeSunriseMinutes)} min before sunrise`;
  const after = afterSunsetMinutes === 0 ? 'sunset' : `${String(afterSunsetMinutes)} min after sunset`;
  return `${before} to ${after}`;
}

/** What a kind costs on a day, and what it will cost from the next change on. */
export function priceWords(
  { prices, currency }: Pick<TicketType, 'prices' | 'currency'>,
  day: string,
): string {
  const now = priceOn(prices, day);
  const next = nextPrice(prices, day);
  const today = now ? money(now.pricePence, currency) : 'no price yet';
  return next ? `${today}, ${money(next.pricePence, currency)} from ${next.fromDay}` : today;
}

const nextPrice = (prices: readonly TicketPrice[], day: string): TicketPrice | null =>
  [...prices].filter(({ fromDay }) => fromDay > day).sort((a, b) => (a.fromDay < b.fromDay ? -1 : 1))[0] ??
  null;
