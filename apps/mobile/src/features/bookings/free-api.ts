import { BoardView, FreePegs } from '@mereward/shared/bookings/availability-contract';
import { TicketQuoteAnswer } from '@mereward/shared/tickets/quote-contract';
import { useQueries, useQuery } from '@tanstack/react-query';
import { bookingKeys } from '@/features/bookings/booking-api';
import { api } from '@/lib/api';

/** Which pegs are free for what is asked (`freeQuery`); what was last seen stays until the new answer is here. */
export const useFreePegs = (fisheryId: string, query: string | null) =>
  useQuery({
    queryKey: [...bookingKeys.free(fisheryId), 'pegs', query],
    queryFn: ({ signal }) => api.get(`/fisheries/${fisheryId}/free?${query ?? ''}`, FreePegs, signal),
    enabled: query !== null,
    meta: { keep: false }, // minutes old it would send somebody to a peg that is gone
  });

/** The calendars of lakes for the days of the strip. */
export const useDayBoards = (
  fisheryId: string,
  lakeIds: readonly string[],
  { from, days }: { from: string; days: number },
) =>
  useQueries({
    queries: lakeIds.map((lakeId) => ({
      queryKey: [...bookingKeys.free(fisheryId), 'board', lakeId, from, days],
      queryFn: ({ signal }: { signal: AbortSignal }) =>
        api.get(`/lakes/${lakeId}/board?from=${from}&days=${String(days)}`, BoardView, signal),
      meta: { keep: false },
    })),
    combine: (results) => results.flatMap(({ data }) => (data ? [data] : [])),
  });

export type QuoteWish = {
  kindId: string;
  lakeId: string;
  day: string;
  start: string | null;
  rods: number;
  people: number;
};

/** What a ticket would cost this reader, line by line, and every reason why they could not have it. */
export const useQuote = ({ kindId, lakeId, day, start, rods, people }: QuoteWish) => {
  const query = new URLSearchParams({ lakeId, day, rods: String(rods), people: String(people) });
  if (start !== null) query.set('start', start);
  return useQuery({
    queryKey: ['tickets', 'quote', kindId, query.toString()],
    queryFn: ({ signal }) =>
      api.get(`/ticket-types/${kindId}/quote?${query.toString()}`, TicketQuoteAnswer, signal),
    enabled: kindId !== '',
    meta: { keep: false },
  });
};
