import { TicketList, TicketView, type WriteTicket } from '@mereward/shared/bookings/contract';
import { useMutation, useQuery } from '@tanstack/react-query';
import { api, nothing } from '@/lib/api';
import { queryClient } from '@/lib/queries';

const bookingKeys = {
  all: ['bookings'] as const,
  ofPeg: (pegId: string) => ['bookings', 'peg', pegId] as const,
};

/** A peg's tickets, for those who write or check them. Names of visitors are not kept on the device. */
export const usePegTickets = (pegId: string) =>
  useQuery({
    queryKey: bookingKeys.ofPeg(pegId),
    queryFn: ({ signal }) => api.get(`/pegs/${pegId}/bookings`, TicketList, signal),
    meta: { keep: false },
  });

const changed = () => queryClient.invalidateQueries({ queryKey: bookingKeys.all });

export async function writeTicket(pegId: string, input: WriteTicket): Promise<TicketView> {
  const ticket = await api.post(`/pegs/${pegId}/bookings`, input, TicketView);
  void changed();
  return ticket;
}

export const useCancelTicket = () =>
  useMutation({
    mutationFn: (bookingId: string) => api.del(`/bookings/${bookingId}`, nothing),
    onSuccess: changed,
  });
