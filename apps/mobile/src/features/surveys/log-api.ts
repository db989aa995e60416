import { LogList, LogView, type LogOptions, type LogState } from '@mereward/shared/surveys/log-contract';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { surveyKeys } from '@/features/surveys/api';
import { api, nothing } from '@/lib/api';
import type { PickedFile } from '@/lib/picked';
import { sendFile } from '@/lib/send-file';

export const logKeys = {
  ofVisit: (visitId: string) => ['surveys', 'logs', visitId] as const,
  one: (logId: string) => ['surveys', 'log', logId] as const,
};

export const isBeingRead = (state: LogState | undefined): boolean =>
  state === 'queued' || state === 'running';

/** While a log is being read its progress is asked for every second. */
const EVERY_MS = 1000;

/** The logs of soundings of a visit, newest first. */
export const useLogs = (visitId: string) =>
  useQuery({
    queryKey: logKeys.ofVisit(visitId),
    queryFn: ({ signal }) => api.get(`/visits/${visitId}/logs`, LogList, signal),
    refetchInterval: ({ state }) =>
      state.data?.logs.some((log) => isBeingRead(log.state)) ? EVERY_MS : false,
  });

/** One log: how it would be read, how far it is, what was taken in. */
export const useLog = (logId: string) =>
  useQuery({
    queryKey: logKeys.one(logId),
    queryFn: ({ signal }) => api.get(`/logs/${logId}`, LogView, signal),
    refetchInterval: ({ state }) => (isBeingRead(state.data?.state) ? EVERY_MS : false),
    meta: { keep: false },
  });

type Bringing = {
  visitId: string;
  id: string;
  files: readonly PickedFile[];
  onShare: (share: number) => void;
};

/** Sends the files of a log. The id is made here, so sending them again after a lost answer keeps them once. */
export function sendLog({ visitId, id, files, onShare }: Bringing): Promise<LogView> {
  const form = new FormData();
  form.append('id', id);
  for (const { name, file } of files) form.append('files', file, name);
  return sendFile({ path: `/visits/${visitId}/logs`, form, schema: LogView, onShare });
}

/** What a deed on a log answers is the log as it then stands. */
function useKeeping() {
  const queries = useQueryClient();
  return (log: LogView) => {
    queries.setQueryData(logKeys.one(log.id), log);
    return queries.invalidateQueries({ queryKey: logKeys.ofVisit(log.visitId) });
  };
}

export type LogDeed = 'start' | 'cancel';

export function useLogDeed(logId: string) {
  return useMutation({
    mutationFn: (deed: LogDeed) => api.post(`/logs/${logId}/${deed}`, undefined, LogView),
    onSuccess: useKeeping(),
  });
}

/** Reads the files again in another way. */
export function useLookAgain(logId: string) {
  return useMutation({
    mutationFn: (options: LogOptions) => api.post(`/logs/${logId}/look`, { options }, LogView),
    onSuccess: useKeeping(),
  });
}

export function useUndoLog({ logId, visitId }: { logId: string; visitId: string }) {
  const queries = useQueryClient();
  return useMutation({
    mutationFn: () => api.del(`/logs/${logId}`, nothing),
    onSuccess: () => {
      queries.removeQueries({ queryKey: logKeys.one(logId) });
      void queries.invalidateQueries({ queryKey: surveyKeys.one(visitId) });
      return queries.invalidateQueries({ queryKey: logKeys.ofVisit(visitId) });
    },
  });
}
