import {
  ChartList,
  ChartReview,
  type BuildView,
  type DraftChart,
  type WithdrawChart,
} from '@mereward/shared/charts/contract';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { api, nothing } from '@/lib/api';

export const reviewKeys = {
  ofLake: (lakeId: string) => ['charts', 'lake', lakeId] as const,
  one: (chartId: string) => ['charts', 'review', chartId] as const,
};

const isBuilding = (build: BuildView | null | undefined): boolean =>
  build?.state === 'queued' || build?.state === 'running';

/** While something is being built its progress is asked for every second. */
const EVERY_MS = 1000;

export const useLakeCharts = (lakeId: string) =>
  useQuery({
    queryKey: reviewKeys.ofLake(lakeId),
    queryFn: ({ signal }) => api.get(`/lakes/${lakeId}/charts`, ChartList, signal),
    refetchInterval: ({ state }) =>
      state.data?.charts.some(({ build }) => isBuilding(build)) ? EVERY_MS : false,
  });

export const useChartReview = (chartId: string) =>
  useQuery({
    queryKey: reviewKeys.one(chartId),
    queryFn: ({ signal }) => api.get(`/charts/${chartId}/review`, ChartReview, signal),
    refetchInterval: ({ state }) => (isBuilding(state.data?.chart.build) ? EVERY_MS : false),
  });

export const draftChart = (lakeId: string, draft: DraftChart) =>
  api.post(`/lakes/${lakeId}/charts`, draft, ChartReview);

export type ReviewDeed = 'submit' | 'approve' | 'rebuild' | 'cancel-build';

/** A deed on a chart; its answer is the chart as it then stands. */
export function useReviewDeed(chartId: string) {
  const queries = useQueryClient();
  return useMutation({
    mutationFn: (deed: ReviewDeed) => api.post(`/charts/${chartId}/${deed}`, undefined, ChartReview),
    onSuccess: (review) => {
      queries.setQueryData(reviewKeys.one(chartId), review);
      return queries.invalidateQueries(); // a published chart shows on every peg, lake and list
    },
  });
}

export function useWithdrawChart(chartId: string) {
  const queries = useQueryClient();
  return useMutation({
    mutationFn: (input: WithdrawChart) => api.post(`/charts/${chartId}/withdraw`, input, ChartReview),
    onSuccess: (review) => {
      queries.setQueryData(reviewKeys.one(chartId), review);
      return queries.invalidateQueries();
    },
  });
}

export function useDiscardChart({ chartId, lakeId }: { chartId: string; lakeId: string }) {
  const queries = useQueryClient();
  return useMutation({
    mutationFn: () => api.del(`/charts/${chartId}`, nothing),
    onSuccess: () => {
      queries.removeQueries({ queryKey: reviewKeys.one(chartId) });
      return queries.invalidateQueries({ queryKey: reviewKeys.ofLake(lakeId) });
    },
  });
}
