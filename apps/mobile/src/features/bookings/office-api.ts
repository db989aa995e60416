import {
  BookingList,
  BookingView,
  CancellationQuote,
  type BookForSomebody,
  type TakeMoney,
} from '@mereward/shared/bookings/contract';
import { FreePegs } from '@mereward/shared/bookings/availability-contract';
import { RefundList, type AskRefund } from '@mereward/shared/payments/refund-contract';
import { TicketQuoteAnswer } from '@mereward/shared/tickets/quote-contract';
import { keepPreviousData, useMutation, useQueries, useQuery } from '@tanstack/react-query';
import { boardKeys } from '@/features/bookings/board-api';
import { api, nothing } from '@/lib/api';
import { queryClient } from '@/lib/queries';

const officeKeys = {
  all: ['bookings'] as const,
  one: (bookingId: string) => ['bookings', 'one', bookingId] as const,
  ofDay: (fisheryId: string) => ['bookings', 'day', fisheryId] as const,
};

const AGAIN_MS = 30_000; // a list of the day stays open on a desk

/** The tickets that run on any part of a day. Names of visitors are not kept on the device. */
export const useBookingsOfDay = (fisheryId: string, day: string) =>
  useQuery({
    queryKey: [...officeKeys.ofDay(fisheryId), day],
    queryFn: ({ signal }) => api.get(`/fisheries/${fisheryId}/bookings?day=${day}`, BookingList, signal),
    enabled: fisheryId !== '' && day !== '',
    placeholderData: keepPreviousData,
    refetchInterval: AGAIN_MS,
    meta: { keep: false },
  });

/** One booking as staff see it. */
export const useOfficeBooking = (bookingId: string) =>
  useQuery({
    queryKey: officeKeys.one(bookingId),
    queryFn: ({ signal }) => api.get(`/bookings/${bookingId}`, BookingView, signal),
    enabled: bookingId !== '',
    staleTime: 0,
    meta: { keep: false },
  });

/** The booking of a code at this fishery; asked when a whole code was typed. */
export const findByCode = (fisheryId: string, code: string): Promise<BookingView> =>
  api.get(`/fisheries/${fisheryId}/bookings/by-code/${code}`, BookingView);

/** What is on the screen is the newest answer; lists and boards it stands in are read again. */
function changed(booking: BookingView): BookingView {
  queryClient.setQueryData(officeKeys.one(booking.id), booking);
  void queryClient.invalidateQueries({ queryKey: boardKeys.all });
  void queryClient.invalidateQueries({ queryKey: officeKeys.ofDay(booking.fisheryId) });
  void queryClient.invalidateQueries({ queryKey: ['payments'] });
  return booking;
}

export const bookForSomebody = async (fisheryId: string, input: BookForSomebody): Promise<BookingView> =>
  changed(await api.post(`/fisheries/${fisheryId}/bookings`, input, BookingView));

/** Paid at the lodge. */
export const takeMoney = async (bookingId: string, input: TakeMoney): Promise<BookingView> =>
  changed(await api.post(`/bookings/${bookingId}/taken`, input, BookingView));

export async function askRefund(bookingId: string, input: AskRefund): Promise<RefundList> {
  const asked = await api.post(`/bookings/${bookingId}/refunds`, input, RefundList);
  changed(await api.get(`/bookings/${bookingId}`, BookingView));
  return asked;
}

export type StaffDeed = 'check-in' | 'finish' | 'no-show' | 'let-go';

/** Deeds of staff that take nothing but the booking. */
export const useStaffDeed = (bookingId: string) =>
  useMutation({
    mutationFn: async (deed: StaffDeed) =>
      changed(await api.post(`/bookings/${bookingId}/${deed}`, undefined, BookingView)),
  });

/** What would go back if it were cancelled now. Never shown from memory: it changes by the hour. */
export const useWhatGoesBack = (bookingId: string, asked: boolean) =>
  useQuery({
    queryKey: [...officeKeys.one(bookingId), 'cancellation'],
    queryFn: ({ signal }) => api.get(`/bookings/${bookingId}/cancellation`, CancellationQuote, signal),
    enabled: asked,
    gcTime: 0,
    staleTime: 0,
    meta: { keep: false },
  });

export const useCancelFor = (bookingId: string) =>
  useMutation({
    mutationFn: async () => {
      await api.del(`/bookings/${bookingId}`, nothing);
      return changed(await api.get(`/bookings/${bookingId}`, BookingView));
    },
  });

type FreeWish = {
  fisheryId: string;
  lakeId: string;
  day: string;
  ticketTypeId: string;
  start: string | null;
};

/** How a lake's pegs stand for a ticket's hours. */
export const useFreeFor = ({ fisheryId, lakeId, day, ticketTypeId, start }: FreeWish) =>
  useQuery({
    queryKey: ['bookings', 'free', fisheryId, 'office', lakeId, day, ticketTypeId, start],
    queryFn: ({ signal }) => {
      const asked = new URLSearchParams({ day, lakeId, ticketTypeId, ...(start ? { start } : {}) });
      return api.get(`/fisheries/${fisheryId}/free?${asked.toString()}`, FreePegs, signal);
    },
    enabled: fisheryId !== '' && lakeId !== '' && day !== '' && ticketTypeId !== '',
    placeholderData: keepPreviousData,
    staleTime: 0,
    meta: { keep: false },
  });

export type QuoteWish = {
  ticketTypeId: string;
  lakeId: string;
  day: string;
  start: string | null;
  rods: number;
  people: number;
};

/** What each ticket of a party would cost, in its order. */
export const useQuotes = (wishes: readonly QuoteWish[]) =>
  useQueries({
    queries: wishes.map(({ ticketTypeId, lakeId, day, start, rods, people }) => ({
      queryKey: ['tickets', 'quote', ticketTypeId, lakeId, day, start, rods, people],
      queryFn: () => {
        const asked = new URLSearchParams({
          lakeId,
          day,
          rods: String(rods),
          people: String(people),
          ...(start ? { start } : {}),
        });
        return api.get(`/ticket-types/${ticketTypeId}/quote?${asked.toString()}`, TicketQuoteAnswer);
      },
      enabled: ticketTypeId !== '' && lakeId !== '' && day !== '',
      meta: { keep: false },
    })),
  });
