import { BlockView, BoardView, type BlockPegs } from '@mereward/shared/bookings/availability-contract';
import { keepPreviousData, useMutation, useQuery } from '@tanstack/react-query';
import { api, nothing } from '@/lib/api';
import { queryClient } from '@/lib/queries';

export const boardKeys = {
  all: ['bookings', 'board'] as const,
  ofLake: (lakeId: string) => ['bookings', 'board', lakeId] as const,
};

const AGAIN_MS = 30_000; // where no stream of changes comes through, the board is asked for this often

/** A lake's board from a day on. Names of visitors are not kept on the device. */
export const useBoard = (lakeId: string, from: string, days: number) =>
  useQuery({
    queryKey: [...boardKeys.ofLake(lakeId), from, days],
    queryFn: ({ signal }) =>
      api.get(`/lakes/${lakeId}/board?from=${from}&days=${String(days)}`, BoardView, signal),
    enabled: lakeId !== '' && from !== '',
    placeholderData: keepPreviousData,
    refetchInterval: AGAIN_MS,
    staleTime: 0,
    meta: { keep: false },
  });

const changed = () => queryClient.invalidateQueries({ queryKey: boardKeys.all });

export async function blockPegs(fisheryId: string, input: BlockPegs): Promise<BlockView> {
  const block = await api.post(`/fisheries/${fisheryId}/blocks`, input, BlockView);
  void changed();
  return block;
}

export const useRemoveBlock = (fisheryId: string) =>
  useMutation({
    mutationFn: (blockId: string) => api.del(`/fisheries/${fisheryId}/blocks/${blockId}`, nothing),
    onSuccess: changed,
  });
