import { PegView, LevelRecorded, type RecordLevel } from '@mereward/shared/lakes/contract';
import {
  CastView,
  ImportDone,
  ImportPreview,
  VisitList,
  VisitView,
  VisitWithCasts,
  type CloseVisit,
  type CorrectKit,
  type ImportCasts,
  type KeepCast,
  type OpenVisit,
} from '@mereward/shared/surveys/contract';
import { queryOptions, useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { lakeKeys } from '@/features/lakes/api';
import { api, nothing } from '@/lib/api';

export const surveyKeys = {
  ofLake: (lakeId: string) => ['surveys', 'lake', lakeId] as const,
  one: (visitId: string) => ['surveys', 'visit', visitId] as const,
  peg: (pegId: string) => ['surveys', 'peg', pegId] as const,
};

export const visitsQuery = (lakeId: string) =>
  queryOptions({
    queryKey: surveyKeys.ofLake(lakeId),
    queryFn: ({ signal }) => api.get(`/lakes/${lakeId}/visits`, VisitList, signal),
    enabled: lakeId !== '', // no lake chosen yet
  });

/** The visits of a lake, newest first. */
export const useVisits = (lakeId: string) => useQuery(visitsQuery(lakeId));

/** A visit, its casts in order, and how much of each peg's arc they cover. */
export const useVisit = (visitId: string) =>
  useQuery({
    queryKey: surveyKeys.one(visitId),
    queryFn: ({ signal }) => api.get(`/visits/${visitId}`, VisitWithCasts, signal),
  });

/** The peg stood on: its origin mark and arc are what a cast is reduced from. */
export const useStance = (pegId: string | null) =>
  useQuery({
    queryKey: surveyKeys.peg(pegId ?? ''),
    queryFn: ({ signal }) => api.get(`/pegs/${pegId ?? ''}/details`, PegView, signal),
    enabled: pegId !== null,
  });

export const openVisit = (lakeId: string, visit: OpenVisit) =>
  api.post(`/lakes/${lakeId}/visits`, visit, VisitView);

/** Keeps a cast. The id is made here, so sending it again after a lost answer keeps it once. */
export function useKeepCast(visitId: string) {
  const queries = useQueryClient();
  return useMutation({
    mutationFn: (cast: KeepCast) => api.post(`/visits/${visitId}/casts`, cast, CastView),
    onSuccess: (cast) =>
      queries.setQueryData<VisitWithCasts>(surveyKeys.one(visitId), (known) =>
        known && !known.casts.some(({ id }) => id === cast.id)
          ? { ...known, casts: [...known.casts, cast] }
          : known,
      ),
    // Coverage follows by itself; one bar of signal need not wait for it before the next cast.
    onSettled: () => void queries.invalidateQueries({ queryKey: surveyKeys.one(visitId) }),
  });
}

export function useUndoCast(visitId: string) {
  const queries = useQueryClient();
  return useMutation({
    mutationFn: (castId: string) => api.del(`/visits/${visitId}/casts/${castId}`, nothing),
    onSuccess: () => queries.invalidateQueries({ queryKey: surveyKeys.one(visitId) }),
  });
}

export const correctKit = (visitId: string, input: CorrectKit) =>
  api.patch(`/visits/${visitId}/kit`, input, VisitView);

export const closeVisit = (visitId: string, input: CloseVisit) =>
  api.post(`/visits/${visitId}/close`, input, VisitView);

/** The casts of a visit as CSV, with the mark that tells spreadsheets it is UTF-8: reading a file takes it off. */
export const castsText = async (visitId: string): Promise<string> =>
  `\uFEFF${await (await api.file(`/visits/${visitId}/casts.csv`)).text()}`;

/** Reads a visit and its lake's list anew after anything that touches every cast. */
export function useReadVisitAnew({ visitId, lakeId }: { visitId: string; lakeId: string }) {
  const queries = useQueryClient();
  return async (): Promise<VisitWithCasts> => {
    void queries.invalidateQueries({ queryKey: surveyKeys.ofLake(lakeId) });
    await queries.invalidateQueries({ queryKey: surveyKeys.one(visitId), refetchType: 'none' });
    return queries.fetchQuery({
      queryKey: surveyKeys.one(visitId),
      queryFn: ({ signal }) => api.get(`/visits/${visitId}`, VisitWithCasts, signal),
    });
  };
}

export const previewImport = (visitId: string, input: ImportCasts) =>
  api.post(`/visits/${visitId}/imports/preview`, input, ImportPreview);

export function useImportCasts(visitId: string) {
  const queries = useQueryClient();
  return useMutation({
    mutationFn: (input: ImportCasts) => api.post(`/visits/${visitId}/imports`, input, ImportDone),
    onSuccess: () => queries.invalidateQueries({ queryKey: surveyKeys.one(visitId) }),
  });
}

export const recordLevel = (boardId: string, input: RecordLevel) =>
  api.post(`/boards/${boardId}/readings`, input, LevelRecorded);

/** Takes a misread reading back. */
export function useTakeBackLevel(lakeId: string) {
  const queries = useQueryClient();
  return useMutation({
    mutationFn: (readingId: string) => api.del(`/readings/${readingId}`, nothing),
    onSuccess: () => queries.invalidateQueries({ queryKey: lakeKeys.one(lakeId) }),
  });
}
