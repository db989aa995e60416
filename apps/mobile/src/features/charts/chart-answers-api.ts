import {
  CastReading,
  ChartChanges,
  ChartFeatures,
  NextCasts,
  SameSpotView,
  SimilarPegs,
  StandOutPatches,
} from '@mereward/shared/charts/chart-answers';
import type { Units } from '@mereward/shared/accounts/contract';
import { LakeWaters, type PutWaterArea } from '@mereward/shared/lakes/peg-water-contract';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { api } from '@/lib/api';

const keys = {
  features: (chartId: string) => ['charts', 'features', chartId] as const,
  patches: (chartId: string) => ['charts', 'patches', chartId] as const,
  changes: (chartId: string, since: string | null) => ['charts', 'changes', chartId, since] as const,
  nextCasts: (chartId: string) => ['charts', 'next-casts', chartId] as const,
  waters: (lakeId: string) => ['lakes', 'waters', lakeId] as const,
};

/** A published chart never changes, and nor does what was found in it. */
const STEADY_MS = 30 * 60_000;

export const useFeatures = (chartId: string, wanted: boolean) =>
  useQuery({
    queryKey: keys.features(chartId),
    queryFn: ({ signal }) => api.get(`/charts/${chartId}/features`, ChartFeatures, signal),
    enabled: wanted,
    staleTime: STEADY_MS,
  });

export const usePatches = (chartId: string, wanted: boolean) =>
  useQuery({
    queryKey: keys.patches(chartId),
    queryFn: ({ signal }) => api.get(`/charts/${chartId}/patches`, StandOutPatches, signal),
    enabled: wanted,
    staleTime: STEADY_MS,
  });

/** `since` null: against the version published before it. */
export const useChanges = (chartId: string, since: string | null, wanted: boolean) =>
  useQuery({
    queryKey: keys.changes(chartId, since),
    queryFn: ({ signal }) =>
      api.get(`/charts/${chartId}/changes${since === null ? '' : `?since=${since}`}`, ChartChanges, signal),
    enabled: wanted,
    staleTime: STEADY_MS,
  });

export const useNextCasts = (chartId: string | null) =>
  useQuery({
    queryKey: keys.nextCasts(chartId ?? ''),
    queryFn: ({ signal }) => api.get(`/charts/${chartId ?? ''}/next-casts`, NextCasts, signal),
    enabled: chartId !== null,
    staleTime: STEADY_MS,
  });

export const useWaters = (lakeId: string, wanted = true) =>
  useQuery({
    queryKey: keys.waters(lakeId),
    queryFn: ({ signal }) => api.get(`/lakes/${lakeId}/waters`, LakeWaters, signal),
    enabled: wanted,
  });

const query = (terms: Record<string, string | number | undefined>): string =>
  Object.entries(terms)
    .flatMap(([name, value]) => (value === undefined ? [] : [`${name}=${encodeURIComponent(String(value))}`]))
    .join('&');

export type AskedPlace = { spotId: string } | { lon: number; lat: number };

/** How a place is reached from a peg, on the survey's sticks and the reader's own. */
export function useSameSpot(pegId: string | null, place: AskedPlace | null, { stickSpacingM }: Units) {
  const asked = place === null ? '' : query({ ...place, stickSpacingM });
  return useQuery({
    queryKey: ['charts', 'same-spot', pegId, asked] as const,
    queryFn: ({ signal }) => api.get(`/pegs/${pegId ?? ''}/same-spot?${asked}`, SameSpotView, signal),
    enabled: pegId !== null && place !== null,
    meta: { keep: false },
  });
}

/** A cast as it is said: a count, over a mark or on a true bearing. */
export type SaidCast = { wrapsWhole: number; remainderM: number; stickSpacingM: number } & (
  { markId: string; offsetDeg: number } | { bearingDeg: number }
);

/** Where a cast from a peg lands and what lies there. */
export function useCastReading(pegId: string | null, cast: SaidCast | null) {
  const asked = cast === null ? '' : query(cast);
  return useQuery({
    queryKey: ['charts', 'cast-reading', pegId, asked] as const,
    queryFn: ({ signal }) => api.get(`/pegs/${pegId ?? ''}/cast-reading?${asked}`, CastReading, signal),
    enabled: pegId !== null && cast !== null,
    meta: { keep: false },
  });
}

export const useSimilarPegs = (pegId: string) =>
  useQuery({
    queryKey: ['charts', 'similar', pegId] as const,
    queryFn: ({ signal }) => api.get(`/pegs/${pegId}/similar`, SimilarPegs, signal),
  });

/** Draws an area for a peg, or takes one away; the answer is every water as it then lies. */
export function useWaterDeeds(lakeId: string) {
  const queries = useQueryClient();
  const onSuccess = (waters: LakeWaters) => queries.setQueryData(keys.waters(lakeId), waters);
  const put = useMutation({
    mutationFn: ({ areaId, area }: { areaId: string; area: PutWaterArea }) =>
      api.put(`/lakes/${lakeId}/water-areas/${areaId}`, area, LakeWaters),
    onSuccess,
  });
  const remove = useMutation({
    mutationFn: (areaId: string) => api.del(`/lakes/${lakeId}/water-areas/${areaId}`, LakeWaters),
    onSuccess,
  });
  return { put, remove };
}
