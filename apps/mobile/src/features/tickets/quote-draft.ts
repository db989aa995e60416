import type { TicketType } from '@mereward/shared/tickets/contract';
import type { QuoteDraft } from '@mereward/shared/tickets/quote-contract';
import { allowedStarts } from '@mereward/shared/tickets/ticket-interval';
import { addDays, clockMovedSeconds, startOfDay } from '@mereward/shared/time/zoned';

/** The first Saturday on or after a day: what most people ask for. */
export function saturdayFrom(day: string): string {
  const weekday = new Date(`${day}T00:00:00Z`).getUTCDay();
  return addDays(day, (6 - weekday + 7) % 7);
}

const A_YEAR_DAYS = 370;

/** The day before the next one on which the zone's clock is moved, within a year; null where it never is. */
export function eveOfClockChange(from: string, zone: string): string | null {
  for (let day = from, left = A_YEAR_DAYS; left > 0; left -= 1, day = addDays(day, 1)) {
    const next = addDays(day, 1);
    const moved = clockMovedSeconds(startOfDay(next, zone), startOfDay(addDays(next, 1), zone), zone);
    if (moved !== 0) return day;
  }
  return null;
}

const NOON = '12:00';

/** The starts a kind leaves to pick; none where its hours are given. */
export const startsOfKind = ({ duration }: TicketType): string[] =>
  duration.kind === 'elapsed' ? allowedStarts(duration) : [];

type Asked = { lakeId: string; day: string; start: string; rods: number };

/** What is asked of a kind still being written: a start it does not have is read as noon, or its last. */
export function quoteDraft(details: TicketType, { lakeId, day, start, rods }: Asked): QuoteDraft {
  const starts = startsOfKind(details);
  const usual = starts.includes(NOON) ? NOON : (starts.at(-1) ?? null);
  return {
    details,
    lakeId: details.lakeIds.includes(lakeId) ? lakeId : (details.lakeIds[0] ?? lakeId),
    choice: { day, start: starts.includes(start) ? start : usual, rods, people: 1 },
  };
}
