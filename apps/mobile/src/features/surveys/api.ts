import { PegList, PegView } from '@mereward/shared/lakes/contract';
import {
  ImportDone,
  ImportPreview,
  VisitList,
  VisitView,
  VisitWithCasts,
  type CorrectKit,
  type ImportCasts,
} from '@mereward/shared/surveys/contract';
import { queryOptions, useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useCallback, useMemo } from 'react';
import { ofVisit, openedHere, visitShown, visitsShown } from '@/features/surveys/shown-visit';
import { surveyKeys } from '@/features/surveys/survey-keys';
import { useWorkedOutHere } from '@/features/surveys/use-worked-out-here';
import { api } from '@/lib/api';
import { useOutbox } from '@/lib/outbox';
import type { OutboxEntry } from '@/lib/outbox-event';

export { surveyKeys };

/** The visits of a lake, newest first, with those in the queue laid over them. */
export const visitsQuery = (lakeId: string, queue: readonly OutboxEntry[]) =>
  queryOptions({
    queryKey: surveyKeys.ofLake(lakeId),
    queryFn: ({ signal }) => api.get(`/lakes/${lakeId}/visits`, VisitList, signal),
    enabled: lakeId !== '', // no lake chosen yet
    select: (known) => visitsShown(known, queue, lakeId),
  });

/** The visits of a lake, newest first. */
export function useVisits(lakeId: string) {
  const { entries } = useOutbox();
  return useQuery(visitsQuery(lakeId, entries));
}

/** A visit, its casts in order, those still to be sent among them, and how much of each peg's arc they cover. */
export function useVisit(visitId: string) {
  const { entries, looked } = useOutbox();
  const here = useWorkedOutHere();
  const queue = useMemo(() => ofVisit(entries, visitId), [entries, visitId]);
  const opened = openedHere(queue, visitId);
  return useQuery({
    queryKey: surveyKeys.one(visitId),
    queryFn: ({ signal }) => api.get(`/visits/${visitId}`, VisitWithCasts, signal),
    enabled: looked && opened === null, // the server does not know it yet
    ...(opened ? { initialData: opened } : {}),
    select: useCallback((known: VisitWithCasts) => visitShown(known, queue, here), [queue, here]),
  });
}

/** The peg stood on: its origin mark and arc are what a cast is reduced from. */
export const useStance = (pegId: string | null) =>
  useQuery({
    queryKey: surveyKeys.peg(pegId ?? ''),
    queryFn: ({ signal }) => api.get(`/pegs/${pegId ?? ''}/details`, PegView, signal),
    enabled: pegId !== null,
  });

/** Every peg of a lake in one reading, so that casts from any of them can be reduced once the signal is gone. */
export function useStances(lakeId: string) {
  const queries = useQueryClient();
  useQuery({
    queryKey: surveyKeys.pegs(lakeId),
    queryFn: async ({ signal }) => {
      const { pegs } = await api.get(`/lakes/${lakeId}/pegs`, PegList, signal);
      for (const peg of pegs) queries.setQueryData(surveyKeys.peg(peg.id), peg);
      return pegs.length;
    },
    enabled: lakeId !== '',
    staleTime: 10 * 60_000,
  });
}

export const correctKit = (visitId: string, input: CorrectKit) =>
  api.patch(`/visits/${visitId}/kit`, input, VisitView);

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
