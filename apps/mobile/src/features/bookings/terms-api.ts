import { LettingTermsView, type PutLettingTerms } from '@mereward/shared/bookings/letting-terms';
import { useQuery } from '@tanstack/react-query';
import { api } from '@/lib/api';
import { queryClient } from '@/lib/queries';

const termsKey = (fisheryId: string) => ['bookings', 'terms', fisheryId] as const;

/** How a fishery lets its pegs. */
export const useLettingTerms = (fisheryId: string) =>
  useQuery({
    queryKey: termsKey(fisheryId),
    queryFn: ({ signal }) => api.get(`/fisheries/${fisheryId}/letting-terms`, LettingTermsView, signal),
    enabled: fisheryId !== '',
  });

/** Refused or kept, the terms are read again: somebody may have been faster, and their change is to be seen. */
export async function putLettingTerms(fisheryId: string, input: PutLettingTerms): Promise<LettingTermsView> {
  try {
    return await api.put(`/fisheries/${fisheryId}/letting-terms`, input, LettingTermsView);
  } finally {
    void queryClient.invalidateQueries({ queryKey: termsKey(fisheryId) });
  }
}
