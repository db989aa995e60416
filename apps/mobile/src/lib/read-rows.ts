import type { DehydratedState } from '@tanstack/react-query';

type KeptQuery = DehydratedState['queries'][number];

const MOST_LARGE = 3; // charts, near a megabyte each

/** How long a reading is kept without being read again, ms. */
export const KEEP_MS = 14 * 24 * 60 * 60 * 1000;

/** A reading as it is kept: what was last read well, whatever became of later tries to read it afresh. */
export const keptState = ({ queryHash, queryKey, dehydratedAt, state, meta }: KeptQuery): KeptQuery => ({
  queryHash,
  queryKey,
  dehydratedAt,
  ...(meta ? { meta } : {}),
  state: {
    ...state,
    status: 'success',
    fetchStatus: 'idle',
    error: null,
    errorUpdateCount: 0,
    errorUpdatedAt: 0,
    fetchFailureCount: 0,
    fetchFailureReason: null,
    fetchMeta: null,
  },
});

type Weighed = { hash: string; at: number; large: boolean };

/** The large readings there is no keeping: all but the newest few. */
export function droppable(readings: readonly Weighed[]): ReadonlySet<string> {
  const large = readings.filter((reading) => reading.large).sort((a, b) => b.at - a.at);
  return new Set(large.slice(MOST_LARGE).map(({ hash }) => hash));
}
