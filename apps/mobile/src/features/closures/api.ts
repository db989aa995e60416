import {
  ClosureList,
  ClosurePreview,
  ClosureView,
  type CloseWater,
  type LiftClosure,
  type PreviewClosure,
} from '@mereward/shared/closures/deeds-contract';
import { useMutation, useQuery } from '@tanstack/react-query';
import { api } from '@/lib/api';
import { queryClient } from '@/lib/queries';

export const closureKeys = {
  all: ['closures'] as const,
  ofFishery: (fisheryId: string) => ['closures', fisheryId] as const,
};

/** Every closure of a fishery; those over are told to staff only. */
export const useClosures = (fisheryId: string) =>
  useQuery({
    queryKey: closureKeys.ofFishery(fisheryId),
    queryFn: ({ signal }) => api.get(`/fisheries/${fisheryId}/closures?all=yes`, ClosureList, signal),
  });

/** A closure moves bookings, notices and what is free. */
const changed = () =>
  Promise.all(
    [closureKeys.all, ['notices'], ['bookings']].map((queryKey) =>
      queryClient.invalidateQueries({ queryKey }),
    ),
  );

export const usePreviewClosure = (fisheryId: string) =>
  useMutation({
    mutationFn: (input: PreviewClosure) =>
      api.post(`/fisheries/${fisheryId}/closures/preview`, input, ClosurePreview),
  });

export async function closeWater(fisheryId: string, input: CloseWater): Promise<ClosureView> {
  const closure = await api.post(`/fisheries/${fisheryId}/closures`, input, ClosureView);
  void changed();
  return closure;
}

export const useLiftClosure = (closureId: string) =>
  useMutation({
    mutationFn: (input: LiftClosure) => api.post(`/closures/${closureId}/lift`, input, ClosureView),
    onSuccess: changed,
  });
