import { ChartReview } from '@mereward/shared/charts/contract';
import { ChartCastList, type LeaveOut } from '@mereward/shared/charts/left-out-contract';
import { useMutation, useQuery } from '@tanstack/react-query';
import { api } from '@/lib/api';
import { queryClient } from '@/lib/queries';
import { reviewKeys } from './review-api';

export const leftOutKeys = { casts: (chartId: string) => ['charts', 'casts', chartId] as const };

/** Every cast of a chart's visits, and how it stands in the chart. */
export const useChartCasts = (chartId: string) =>
  useQuery({
    queryKey: leftOutKeys.casts(chartId),
    queryFn: ({ signal }) => api.get(`/charts/${chartId}/casts`, ChartCastList, signal),
    staleTime: 0, // another may have left a cast out a moment ago
  });

function took(chartId: string, review: ChartReview): void {
  queryClient.setQueryData(reviewKeys.one(chartId), review);
  void queryClient.invalidateQueries({ queryKey: leftOutKeys.casts(chartId) });
}

export async function leaveOut(chartId: string, asked: LeaveOut): Promise<void> {
  took(chartId, await api.post(`/charts/${chartId}/left-out`, asked, ChartReview));
}

export const usePutBack = (chartId: string) =>
  useMutation({
    mutationFn: (leftOutId: string) =>
      api.post(`/charts/${chartId}/left-out/${leftOutId}/put-back`, undefined, ChartReview),
    onSuccess: (review) => took(chartId, review),
  });
