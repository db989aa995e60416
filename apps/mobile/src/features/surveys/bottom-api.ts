import {
  BottomEvents,
  BottomEventView,
  type RecordBottomEvent,
} from '@mereward/shared/surveys/bottom-event-contract';
import {
  BottomLearning,
  BottomTableThen,
  BottomTableView,
  type AcceptLearning,
  type KeepBottomTable,
} from '@mereward/shared/surveys/bottom-table-contract';
import {
  ConfirmedBottoms,
  ConfirmedBottomView,
  type ConfirmBottom,
} from '@mereward/shared/surveys/confirmed-contract';
import { LeadList, LeadView, type CalibrateLead } from '@mereward/shared/surveys/lead-contract';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { api, nothing } from '@/lib/api';
import { queryClient } from '@/lib/queries';

export const bottomKeys = {
  table: (fisheryId: string) => ['surveys', 'bottom-table', fisheryId] as const,
  learning: (fisheryId: string) => ['surveys', 'bottom-learning', fisheryId] as const,
  then: (fisheryId: string, version: number) => ['surveys', 'bottom-table', fisheryId, version] as const,
  confirmed: (lakeId: string) => ['surveys', 'confirmed', lakeId] as const,
  events: (lakeId: string) => ['surveys', 'events', lakeId] as const,
  leads: (fisheryId: string) => ['surveys', 'leads', fisheryId] as const,
};

/** A fishery's table of feels in force, and its versions. */
export const useBottomTable = (fisheryId: string) =>
  useQuery({
    queryKey: bottomKeys.table(fisheryId),
    queryFn: ({ signal }) => api.get(`/fisheries/${fisheryId}/bottom-table`, BottomTableView, signal),
  });

/** One version of it as it was. */
export const useBottomTableThen = (fisheryId: string, version: number | null) =>
  useQuery({
    queryKey: bottomKeys.then(fisheryId, version ?? 0),
    queryFn: ({ signal }) =>
      api.get(`/fisheries/${fisheryId}/bottom-table/${String(version ?? 0)}`, BottomTableThen, signal),
    enabled: version !== null,
  });

/** What confirmed bottoms would make of the table. */
export const useBottomLearning = (fisheryId: string) =>
  useQuery({
    queryKey: bottomKeys.learning(fisheryId),
    queryFn: ({ signal }) => api.get(`/fisheries/${fisheryId}/bottom-table/learning`, BottomLearning, signal),
  });

/** The table as a deed answered it; every cast is read by it from now on, so visits are read anew. */
function tableKept(fisheryId: string, table: BottomTableView): BottomTableView {
  queryClient.setQueryData(bottomKeys.table(fisheryId), table);
  void queryClient.invalidateQueries({ queryKey: bottomKeys.learning(fisheryId) });
  void queryClient.invalidateQueries({ queryKey: ['surveys', 'visit'] });
  return table;
}

export const keepBottomTable = async (fisheryId: string, input: KeepBottomTable): Promise<BottomTableView> =>
  tableKept(fisheryId, await api.post(`/fisheries/${fisheryId}/bottom-table`, input, BottomTableView));

export const acceptLearning = async (fisheryId: string, input: AcceptLearning): Promise<BottomTableView> =>
  tableKept(
    fisheryId,
    await api.post(`/fisheries/${fisheryId}/bottom-table/learning`, input, BottomTableView),
  );

/** The confirmed bottoms of a lake. */
export const useConfirmed = (lakeId: string) =>
  useQuery({
    queryKey: bottomKeys.confirmed(lakeId),
    queryFn: ({ signal }) => api.get(`/lakes/${lakeId}/confirmed-bottoms`, ConfirmedBottoms, signal),
    enabled: lakeId !== '',
  });

export async function confirmBottom(lakeId: string, input: ConfirmBottom): Promise<ConfirmedBottomView> {
  const kept = await api.post(`/lakes/${lakeId}/confirmed-bottoms`, input, ConfirmedBottomView);
  void queryClient.invalidateQueries({ queryKey: bottomKeys.confirmed(lakeId) });
  return kept;
}

export function useTakeBackConfirmed(lakeId: string) {
  const queries = useQueryClient();
  return useMutation({
    mutationFn: (id: string) => api.del(`/confirmed-bottoms/${id}`, nothing),
    onSuccess: () => queries.invalidateQueries({ queryKey: bottomKeys.confirmed(lakeId) }),
  });
}

/** What happened to a lake's bottom. */
export const useBottomEvents = (lakeId: string) =>
  useQuery({
    queryKey: bottomKeys.events(lakeId),
    queryFn: ({ signal }) => api.get(`/lakes/${lakeId}/bottom-events`, BottomEvents, signal),
    enabled: lakeId !== '',
  });

export async function recordBottomEvent(lakeId: string, input: RecordBottomEvent): Promise<BottomEventView> {
  const kept = await api.post(`/lakes/${lakeId}/bottom-events`, input, BottomEventView);
  void queryClient.invalidateQueries({ queryKey: bottomKeys.events(lakeId) });
  return kept;
}

export function useTakeBackEvent(lakeId: string) {
  const queries = useQueryClient();
  return useMutation({
    mutationFn: (id: string) => api.del(`/bottom-events/${id}`, nothing),
    onSuccess: () => queries.invalidateQueries({ queryKey: bottomKeys.events(lakeId) }),
  });
}

/** A fishery's leads and their rates of fall. */
export const useLeads = (fisheryId: string) =>
  useQuery({
    queryKey: bottomKeys.leads(fisheryId),
    queryFn: ({ signal }) => api.get(`/fisheries/${fisheryId}/leads`, LeadList, signal),
    enabled: fisheryId !== '',
  });

export async function calibrateLead(fisheryId: string, input: CalibrateLead): Promise<LeadView> {
  const kept = await api.post(`/fisheries/${fisheryId}/leads`, input, LeadView);
  void queryClient.invalidateQueries({ queryKey: bottomKeys.leads(fisheryId) });
  return kept;
}

export function usePutLeadAway(fisheryId: string) {
  const queries = useQueryClient();
  return useMutation({
    mutationFn: (id: string) => api.post(`/leads/${id}/put-away`, {}, nothing),
    onSuccess: () => queries.invalidateQueries({ queryKey: bottomKeys.leads(fisheryId) }),
  });
}
