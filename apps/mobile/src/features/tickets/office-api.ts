import {
  TicketTypeList,
  TicketTypeView,
  type ChangeTicketType,
  type SaveTicketType,
} from '@mereward/shared/tickets/contract';
import { TicketQuoteAnswer, type QuoteDraft } from '@mereward/shared/tickets/quote-contract';
import { keepPreviousData, useMutation, useQuery } from '@tanstack/react-query';
import { api, nothing } from '@/lib/api';
import { queryClient } from '@/lib/queries';

const ticketKeys = {
  all: ['tickets'] as const,
  kinds: (fisheryId: string) => ['tickets', 'kinds', fisheryId] as const,
};

/** What a fishery sells, with what this reader may change. */
export const useTicketTypes = (fisheryId: string) =>
  useQuery({
    queryKey: ticketKeys.kinds(fisheryId),
    queryFn: ({ signal }) => api.get(`/fisheries/${fisheryId}/ticket-types`, TicketTypeList, signal),
    enabled: fisheryId !== '',
  });

const changed = () => queryClient.invalidateQueries({ queryKey: ticketKeys.all });

export async function makeTicketType(fisheryId: string, input: SaveTicketType): Promise<TicketTypeView> {
  const made = await api.post(`/fisheries/${fisheryId}/ticket-types`, input, TicketTypeView);
  await changed();
  return made;
}

/** Refused or kept, the list is read again: somebody may have been faster, and their change is to be seen. */
export async function changeTicketType(id: string, input: ChangeTicketType): Promise<TicketTypeView> {
  try {
    return await api.put(`/ticket-types/${id}`, input, TicketTypeView);
  } finally {
    void changed();
  }
}

export const useWithdrawTicketType = () =>
  useMutation({
    mutationFn: (id: string) => api.del(`/ticket-types/${id}`, nothing),
    onSuccess: changed,
  });

/** What a kind of ticket that is still being written would cost and when it would end. Null while there is nothing to ask. */
export const useDraftQuote = (fisheryId: string, draft: QuoteDraft | null) =>
  useQuery({
    queryKey: ['tickets', 'quote', fisheryId, JSON.stringify(draft)],
    queryFn: () => api.post(`/fisheries/${fisheryId}/ticket-quote`, draft, TicketQuoteAnswer),
    enabled: draft !== null,
    placeholderData: keepPreviousData,
    gcTime: 60_000,
    meta: { keep: false },
  });
