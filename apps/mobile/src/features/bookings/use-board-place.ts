import { useLocalSearchParams, useRouter } from 'expo-router';
import { ZOOMS } from '@/features/bookings/board-cells';
import type { BoardPlace } from '@/features/bookings/board-bar';

type Terms = { lakeIds: readonly string[]; today: string };

/** Which board is looked at, as the address says it, so that a reload and a link come back to it. */
export function useBoardPlace({ lakeIds, today }: Terms) {
  const router = useRouter();
  const asked = useLocalSearchParams<{ lakeId?: string; from?: string; zoom?: string }>();
  const place: BoardPlace = {
    lakeId: lakeIds.find((id) => id === asked.lakeId) ?? lakeIds[0] ?? '',
    from: asked.from ?? today,
    zoom: ZOOMS.find(({ key }) => key === asked.zoom)?.key ?? 'week',
  };
  return { place, moveTo: (to: Partial<BoardPlace>) => router.setParams(to) };
}
