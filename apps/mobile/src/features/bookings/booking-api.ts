import {
  BookingList,
  BookingView,
  CancellationQuote,
  PaymentPage,
  type FillInBooking,
  type HoldPegs,
  type MoveBooking,
} from '@mereward/shared/bookings/contract';
import { useMutation, useQuery } from '@tanstack/react-query';
import { api, nothing } from '@/lib/api';
import { queryClient } from '@/lib/queries';

export const bookingKeys = {
  all: ['bookings'] as const,
  mine: ['bookings', 'mine'] as const,
  one: (bookingId: string) => ['bookings', 'one', bookingId] as const,
  byCode: (code: string) => ['bookings', 'code', code] as const,
  free: (fisheryId: string) => ['bookings', 'free', fisheryId] as const,
};

/** The reader's own bookings, those to come and those that were. */
export const useMyBookings = (signedIn: boolean) =>
  useQuery({
    queryKey: bookingKeys.mine,
    queryFn: ({ signal }) => api.get('/bookings/mine', BookingList, signal),
    enabled: signedIn,
  });

/** One booking; read again every so often while somebody waits for word of it. */
export const useBooking = (bookingId: string, everyMs: number | false = false) =>
  useQuery({
    queryKey: bookingKeys.one(bookingId),
    queryFn: ({ signal }) => api.get(`/bookings/${bookingId}`, BookingView, signal),
    refetchInterval: everyMs,
  });

/** The booking a code stands for: its holder's, or one at a fishery whose staff asks. */
export const useBookingByCode = (code: string, signedIn: boolean) =>
  useQuery({
    queryKey: bookingKeys.byCode(code),
    queryFn: ({ signal }) => api.get(`/bookings/by-code/${encodeURIComponent(code)}`, BookingView, signal),
    enabled: signedIn,
    meta: { keep: false }, // on a bailiff's phone it is somebody else's
  });

/** What is on the screen is the newest answer; what follows from it is read again. */
function changed(booking: BookingView): BookingView {
  queryClient.setQueryData(bookingKeys.one(booking.id), booking);
  void queryClient.invalidateQueries({ queryKey: bookingKeys.mine });
  void queryClient.invalidateQueries({ queryKey: bookingKeys.free(booking.fisheryId) });
  return booking;
}

export const holdPegs = async (input: HoldPegs): Promise<BookingView> =>
  changed(await api.post('/bookings', input, BookingView));

export const fillInBooking = async (bookingId: string, input: FillInBooking): Promise<BookingView> =>
  changed(await api.put(`/bookings/${bookingId}/details`, input, BookingView));

export const confirmBooking = async (bookingId: string): Promise<BookingView> =>
  changed(await api.post(`/bookings/${bookingId}/confirm`, undefined, BookingView));

/** Where to pay: the provider's own page. Asking again for the same payment gives the same page. */
export const paymentPage = async (bookingId: string): Promise<PaymentPage> => {
  const page = await api.post(`/bookings/${bookingId}/page`, undefined, PaymentPage);
  void queryClient.invalidateQueries({ queryKey: bookingKeys.one(bookingId) });
  return page;
};

/** Has the server ask the provider how a payment stands. */
export const lookAtPayment = async (bookingId: string): Promise<BookingView> =>
  changed(await api.post(`/bookings/${bookingId}/look`, undefined, BookingView));

export async function letGoOfHold(bookingId: string): Promise<void> {
  await api.del(`/bookings/${bookingId}/hold`, nothing);
  void queryClient.invalidateQueries({ queryKey: bookingKeys.all });
}

/** What goes back when it is cancelled now. Never shown from memory: it changes by the hour. */
export const useCancellationQuote = (bookingId: string, asked: boolean) =>
  useQuery({
    queryKey: [...bookingKeys.one(bookingId), 'cancellation'],
    queryFn: ({ signal }) => api.get(`/bookings/${bookingId}/cancellation`, CancellationQuote, signal),
    enabled: asked,
    gcTime: 0,
    staleTime: 0,
    meta: { keep: false },
  });

export const useCancelBooking = (bookingId: string) =>
  useMutation({
    mutationFn: () => api.del(`/bookings/${bookingId}`, nothing),
    onSuccess: () => queryClient.invalidateQueries({ queryKey: bookingKeys.all }),
  });

export const moveBooking = async (bookingId: string, input: MoveBooking): Promise<BookingView> =>
  changed(await api.post(`/bookings/${bookingId}/move`, input, BookingView));

/** Deeds that take nothing but the booking. */
export const useBookingDeed = (bookingId: string, deed: 'finish' | 'check-in' | 'confirm' | 'look') =>
  useMutation({
    mutationFn: async () => changed(await api.post(`/bookings/${bookingId}/${deed}`, undefined, BookingView)),
  });

export const useClaimPeg = (bookingId: string) =>
  useMutation({
    mutationFn: async (pegId: string) =>
      changed(await api.post(`/bookings/${bookingId}/claim`, { pegId }, BookingView)),
  });
