import { TicketTypeList } from '@mereward/shared/tickets/contract';
import { useQuery } from '@tanstack/react-query';
import { api } from '@/lib/api';

/** The kinds of ticket a fishery sells, as anybody may read them. */
export const useTicketKinds = (fisheryId: string) =>
  useQuery({
    queryKey: ['tickets', 'kinds', fisheryId],
    queryFn: ({ signal }) => api.get(`/fisheries/${fisheryId}/ticket-types`, TicketTypeList, signal),
    enabled: fisheryId !== '', // not known yet
  });
