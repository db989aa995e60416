import { ChartView, PegPageView, SectionView } from '@mereward/shared/charts/contract';
import { useQuery } from '@tanstack/react-query';
import { api } from '@/lib/api';

export const chartKeys = {
  one: (chartId: string) => ['charts', 'one', chartId] as const,
  pegPage: (pegId: string) => ['charts', 'peg', pegId] as const,
  section: (pegId: string, bearingDeg: number, toM: number) =>
    ['charts', 'section', pegId, bearingDeg, toM] as const,
};

/** One chart with all its layers this reader may see. Large: the device keeps the newest few. */
export function useChart(chartId: string | null) {
  return useQuery({
    queryKey: chartKeys.one(chartId ?? ''),
    queryFn: ({ signal }) => api.get(`/charts/${chartId ?? ''}`, ChartView, signal),
    enabled: chartId !== null,
    meta: { large: true },
  });
}

/** What an angler reads of a peg before coming; kept for when there's no signal. */
export function usePegPage(pegId: string | null) {
  return useQuery({
    queryKey: chartKeys.pegPage(pegId ?? ''),
    queryFn: ({ signal }) => api.get(`/pegs/${pegId ?? ''}/page`, PegPageView, signal),
    enabled: pegId !== null,
  });
}

export type AskedSection = { pegId: string; bearingDeg: number; toM: number };

/** Depth and bottom along a bearing from a peg. */
export function useSection(asked: AskedSection | null) {
  const { pegId, bearingDeg, toM } = asked ?? { pegId: '', bearingDeg: 0, toM: 0 };
  return useQuery({
    queryKey: chartKeys.section(pegId, bearingDeg, toM),
    queryFn: ({ signal }) =>
      api.get(
        `/pegs/${pegId}/section?bearingDeg=${String(bearingDeg)}&toM=${String(toM)}`,
        SectionView,
        signal,
      ),
    enabled: asked !== null,
    staleTime: 10 * 60_000,
  });
}
