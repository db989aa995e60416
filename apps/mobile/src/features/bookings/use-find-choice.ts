import { useLocalSearchParams, useRouter } from 'expo-router';
import { z } from 'zod';
import { choiceOf, paramsOf, type FindChoice } from '@/features/bookings/find-choice';
import { createPreference } from '@/lib/preference';

/** The fishery, the kind of ticket and the rods of last time, so that the next search begins there. */
export const lastSearch = createPreference({
  key: 'mereward.last-search',
  schema: z.object({
    fisheryId: z.string().nullable(),
    kindId: z.string().nullable(),
    rods: z.number().nullable(),
  }),
  fallback: { fisheryId: null, kindId: null, rods: null },
});

/** What is searched for, as the address says it, and how to change it. A change stays in the address. */
export function useFindChoice(): [FindChoice, (change: Partial<FindChoice>) => void] {
  const params = useLocalSearchParams();
  const router = useRouter();
  const choice = choiceOf(params);
  const change = (to: Partial<FindChoice>): void => {
    const wanted = paramsOf({ ...choice, ...to });
    const gone = Object.fromEntries(Object.keys(params).map((name) => [name, undefined]));
    router.setParams({ ...gone, ...wanted });
    const { fisheryId, kindId, rods } = { ...choice, ...to };
    if (to.fisheryId ?? to.kindId ?? to.rods) {
      const last = lastSearch.get();
      lastSearch.set({
        fisheryId: fisheryId ?? last.fisheryId,
        kindId: kindId ?? last.kindId,
        rods: rods ?? last.rods,
      });
    }
  };
  return [choice, change];
}
