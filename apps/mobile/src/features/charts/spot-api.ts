import { SpotKept, type PutSpot } from '@mereward/shared/charts/contract';
import { useMutation } from '@tanstack/react-query';
import { chartKeys } from '@/features/charts/api';
import { api, nothing } from '@/lib/api';
import { queryClient } from '@/lib/queries';

type At = { pegId: string; spotId: string };

const changed = (pegId: string) => queryClient.invalidateQueries({ queryKey: chartKeys.pegPage(pegId) });

/** Makes a spot of a peg, or changes it; what is shown is read again either way, for somebody may have been faster. */
export async function putSpot({ pegId, spotId }: At, input: PutSpot): Promise<SpotKept> {
  try {
    return await api.put(`/pegs/${pegId}/spots/${spotId}`, input, SpotKept);
  } finally {
    void changed(pegId);
  }
}

export const useRemoveSpot = (pegId: string) =>
  useMutation({
    mutationFn: (spotId: string) => api.del(`/pegs/${pegId}/spots/${spotId}`, nothing),
    onSuccess: () => changed(pegId),
  });
