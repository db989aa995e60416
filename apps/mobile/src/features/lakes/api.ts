import { LakeView } from '@mereward/shared/lakes/contract';
import { useQuery } from '@tanstack/react-query';
import { api } from '@/lib/api';

export const lakeKeys = {
  one: (lakeId: string) => ['lakes', lakeId] as const,
};

/** A lake with its pegs, marks and boards, and what this reader may do there. */
export const useLake = (lakeId: string) =>
  useQuery({
    queryKey: lakeKeys.one(lakeId),
    queryFn: ({ signal }) => api.get(`/lakes/${lakeId}`, LakeView, signal),
    enabled: lakeId !== '', // not known yet
  });
