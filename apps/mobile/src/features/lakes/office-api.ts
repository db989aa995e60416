import {
  LakeView,
  LevelRecorded,
  OutlineRead,
  PegView,
  type ChangeLake,
  type ChangePeg,
  type MakeLake,
  type MakePeg,
  type OrderPegs,
  type PutBoard,
  type PutMark,
  type ReadOutline,
  type RecordLevel,
} from '@mereward/shared/lakes/contract';
import { useMutation, useQuery } from '@tanstack/react-query';
import { fisheryKeys } from '@/features/fisheries/api';
import { lakeKeys } from '@/features/lakes/api';
import { api, nothing } from '@/lib/api';
import { queryClient } from '@/lib/queries';
import { Problem } from '@mereward/shared/problems/problem';

export const pegKeys = { one: (pegId: string) => ['lakes', 'peg', pegId] as const };

/** A peg with everything its fishery keeps about it. */
export const usePeg = (pegId: string) =>
  useQuery({
    queryKey: pegKeys.one(pegId),
    queryFn: ({ signal }) => api.get(`/pegs/${pegId}/details`, PegView, signal),
  });

/** A lake as a deed answered it: shown everywhere at once. */
function lakeKept(lake: LakeView): LakeView {
  queryClient.setQueryData(lakeKeys.one(lake.id), lake);
  void queryClient.invalidateQueries({ queryKey: fisheryKeys.all, exact: true });
  return lake;
}

function pegKept(peg: PegView): PegView {
  queryClient.setQueryData(pegKeys.one(peg.id), peg);
  void queryClient.invalidateQueries({ queryKey: lakeKeys.one(peg.lakeId) });
  void queryClient.invalidateQueries({ queryKey: ['charts', 'peg', peg.id] });
  return peg;
}

export const makeLake = async (fisheryId: string, input: MakeLake) =>
  lakeKept(await api.post(`/fisheries/${fisheryId}/lakes`, input, LakeView));

export const changeLake = async (lakeId: string, input: ChangeLake) =>
  lakeKept(await readAgainOnConflict(lakeKeys.one(lakeId), api.put(`/lakes/${lakeId}`, input, LakeView)));

export const readOutline = (input: ReadOutline) => api.post('/outlines/read', input, OutlineRead);

/** Refused because somebody was faster: what is shown is read again, so that their change can be seen. */
async function readAgainOnConflict<T>(queryKey: readonly unknown[], deed: Promise<T>): Promise<T> {
  try {
    return await deed;
  } catch (fault) {
    if (fault instanceof Problem && fault.kind === 'conflict')
      void queryClient.invalidateQueries({ queryKey });
    throw fault;
  }
}

type Part = { lakeId: string; id: string };

export const putBoard = async ({ lakeId, id }: Part, input: PutBoard) =>
  lakeKept(
    await readAgainOnConflict(
      lakeKeys.one(lakeId),
      api.put(`/lakes/${lakeId}/boards/${id}`, input, LakeView),
    ),
  );

export const putMark = async ({ lakeId, id }: Part, input: PutMark) =>
  lakeKept(
    await readAgainOnConflict(lakeKeys.one(lakeId), api.put(`/lakes/${lakeId}/marks/${id}`, input, LakeView)),
  );

export const makePeg = async (lakeId: string, input: MakePeg) =>
  pegKept(await api.post(`/lakes/${lakeId}/pegs`, input, PegView));

export const changePeg = async (pegId: string, input: ChangePeg) =>
  pegKept(await readAgainOnConflict(pegKeys.one(pegId), api.put(`/pegs/${pegId}`, input, PegView)));

export const useOrderPegs = (lakeId: string) =>
  useMutation({
    mutationFn: async (input: OrderPegs) =>
      lakeKept(await api.put(`/lakes/${lakeId}/peg-order`, input, LakeView)),
  });

const lakeChanged = (lakeId: string) => queryClient.invalidateQueries({ queryKey: lakeKeys.one(lakeId) });

export async function recordLevel({ lakeId, id }: Part, input: RecordLevel): Promise<LevelRecorded> {
  const recorded = await api.post(`/boards/${id}/readings`, input, LevelRecorded);
  void lakeChanged(lakeId);
  return recorded;
}

/** Takes a misread figure back. */
export const useTakeBackReading = (lakeId: string) =>
  useMutation({
    mutationFn: (readingId: string) => api.del(`/readings/${readingId}`, nothing),
    onSuccess: () => lakeChanged(lakeId),
  });
