import {
  DisagreementForReview,
  DisagreementList,
  DisagreementReviewList,
  DisagreementView,
  type DecideDisagreement,
  type Disagree,
  type TakeBackDisagreement,
} from '@mereward/shared/charts/disagreement';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { api } from '@/lib/api';
import { queryClient } from '@/lib/queries';

export const disagreementKeys = {
  mine: ['charts', 'disagreements', 'mine'] as const,
  ofLake: (lakeId: string) => ['charts', 'disagreements', 'lake', lakeId] as const,
};

/** What the reader told of, newest first. */
export const useMyDisagreements = (signedIn: boolean) =>
  useQuery({
    queryKey: disagreementKeys.mine,
    queryFn: ({ signal }) => api.get('/disagreements/mine', DisagreementList, signal),
    enabled: signedIn,
    staleTime: 0, // the fishery may have decided a moment ago
  });

export async function disagree(pegId: string, told: Disagree): Promise<DisagreementView> {
  const kept = await api.post(`/pegs/${pegId}/disagreements`, told, DisagreementView);
  void queryClient.invalidateQueries({ queryKey: disagreementKeys.mine });
  return kept;
}

/** Names of those who told are not kept on the device. */
export const disagreementsOfLake = (lakeId: string) => ({
  queryKey: disagreementKeys.ofLake(lakeId),
  queryFn: ({ signal }: { signal: AbortSignal }) =>
    api.get(`/lakes/${lakeId}/disagreements`, DisagreementReviewList, signal),
  meta: { keep: false },
});

export const useLakeDisagreements = (lakeId: string) => useQuery(disagreementsOfLake(lakeId));

export function useDecide({ lakeId, id }: { lakeId: string; id: string }) {
  const queries = useQueryClient();
  return useMutation({
    mutationFn: (decision: DecideDisagreement) =>
      api.post(`/disagreements/${id}/decide`, decision, DisagreementForReview),
    onSuccess: () => queries.invalidateQueries({ queryKey: disagreementKeys.ofLake(lakeId) }),
  });
}

export function useTakeBack({ lakeId, id }: { lakeId: string; id: string }) {
  const queries = useQueryClient();
  return useMutation({
    mutationFn: (said: TakeBackDisagreement) =>
      api.post(`/disagreements/${id}/take-back`, said, DisagreementForReview),
    onSuccess: () => queries.invalidateQueries({ queryKey: disagreementKeys.ofLake(lakeId) }),
  });
}
