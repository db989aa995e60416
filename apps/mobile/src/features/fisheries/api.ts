import { FisheryList } from '@mereward/shared/fisheries/contract';
import { useQuery } from '@tanstack/react-query';
import { api } from '@/lib/api';

export const fisheryKeys = {
  all: ['fisheries'] as const,
  one: (fisheryId: string) => ['fisheries', fisheryId] as const,
};

/** Every fishery and its lakes: the front door. */
export const useFisheries = () =>
  useQuery({
    queryKey: fisheryKeys.all,
    queryFn: ({ signal }) => api.get('/fisheries', FisheryList, signal),
  });
