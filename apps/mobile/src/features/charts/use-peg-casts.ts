import { useMemo } from 'react';
import { BOTTOM_WORDS } from '@mereward/shared/charts/bottom-words';
import { VisitWithCasts } from '@mereward/shared/surveys/contract';
import { useQueries } from '@tanstack/react-query';
import { surveyKeys, useVisits } from '@/features/surveys/api';
import { useUnits } from '@/hooks/use-units';
import { api } from '@/lib/api';
import { length } from '@/lib/format';
import { dayName } from '@/lib/format-time';

/** A cast that could be reduced: where it fell in the lake's plane, and what it is called. */
export type ReducedCast = { id: string; xM: number; yM: number; words: string };

const MOST_VISITS = 6; // the newest closed ones; each is read whole

/** The casts made from a peg in the lake's newest closed visits. Null sides of a visit are left out. */
export function usePegCasts(lakeId: string, pegId: string): { casts: ReducedCast[]; waiting: boolean } {
  const { length: unit } = useUnits();
  const visits = useVisits(lakeId);
  const closed = (visits.data?.visits ?? [])
    .filter(({ status }) => status === 'closed')
    .slice(0, MOST_VISITS);
  const { value, waiting } = useQueries({
    queries: closed.map(({ id }) => ({
      queryKey: surveyKeys.one(id),
      queryFn: () => api.get(`/visits/${id}`, VisitWithCasts),
    })),
    combine: (answers) => ({
      value: answers.flatMap(({ data }) => (data ? [data] : [])),
      waiting: answers.some(({ isPending }) => isPending),
    }),
  });
  const casts = useMemo(
    () =>
      value.flatMap(({ casts: all }) =>
        all.flatMap(({ id, seq, pegId: from, observedAt, reduced }): ReducedCast[] => {
          if (from !== pegId || !reduced.ok) return [];
          const { xM, yM, rangeM, bearingDeg, bottom, grade } = reduced.sounding;
          const where = `${length(rangeM, { length: unit })} at ${String(Math.round(bearingDeg))}°`;
          const words = `Cast ${String(seq)}, ${dayName(observedAt.slice(0, 10))}: ${where}, ${BOTTOM_WORDS[bottom]}, grade ${grade}`;
          return [{ id, xM, yM, words }];
        }),
      ),
    [value, pegId, unit],
  );
  return { casts, waiting: visits.isPending || waiting };
}
