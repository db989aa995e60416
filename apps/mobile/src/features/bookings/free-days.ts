import type { BoardView } from '@mereward/shared/bookings/availability-contract';
import type { TicketType } from '@mereward/shared/tickets/contract';
import { ticketInterval } from '@mereward/shared/tickets/ticket-interval';

const MINUTE_MS = 60_000;

type Wish = {
  kind: Pick<TicketType, 'duration' | 'pegIds' | 'turnaroundMinutes'>;
  day: string;
  start: string | null;
  /** Where the sun is looked at, [longitude, latitude]. */
  position: readonly [number, number];
};

/**
 * How many pegs of these lakes are free for the hours of a ticket on a day, for the strip of days. A peg that is let
 * place by place counts while it is neither closed nor kept back. Null where there are no such hours that day.
 */
export function freeOnDay(boards: readonly BoardView[], { kind, day, start, position }: Wish): number | null {
  const counts = boards.map(({ zone, pegs }) => {
    const hours = ticketInterval(kind.duration, { day, start }, { position, zone });
    if ('refused' in hours) return null;
    const from = hours.from.getTime();
    const until = hours.until.getTime() + kind.turnaroundMinutes * MINUTE_MS;
    return pegs.filter(
      ({ pegId, shut, shared, spans }) =>
        shut === null &&
        (kind.pegIds === null || kind.pegIds.includes(pegId)) &&
        !spans.some(
          (span) =>
            (!shared || span.state === 'closed' || span.state === 'blocked') &&
            Date.parse(span.from) < until &&
            (span.until === null || Date.parse(span.until) > from),
        ),
    ).length;
  });
  const told = counts.filter((count) => count !== null);
  return told.length === 0 ? null : told.reduce((sum, count) => sum + count, 0);
}
