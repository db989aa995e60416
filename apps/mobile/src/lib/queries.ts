import { QueryClient } from '@tanstack/react-query';
import type { PersistQueryClientOptions } from '@tanstack/react-query-persist-client';
import { Problem } from '@mereward/shared/problems/problem';
import { persister } from '@/lib/persister';
import { KEEP_MS } from '@/lib/read-rows';

/** A refusal is final; a failed fetch or a server in trouble is worth two more tries. */
const mayTryAgain = (failures: number, fault: Error): boolean =>
  failures < 2 && (!(fault instanceof Problem) || fault.kind === 'internal');

export const queryClient = new QueryClient({
  defaultOptions: {
    queries: { retry: mayTryAgain, staleTime: 20_000, gcTime: KEEP_MS, networkMode: 'offlineFirst' },
    mutations: { retry: false, networkMode: 'offlineFirst' },
  },
});

/**
 * Last known readings outlive a reload. A query with `meta: { keep: false }` is too private to keep; of those with
 * `meta: { large: true }` the newest few are kept.
 */
export const persistence: Omit<PersistQueryClientOptions, 'queryClient'> = {
  persister,
  maxAge: KEEP_MS,
  buster: '2', // raise when a kept reading's shape changes
  dehydrateOptions: {
    // A failed try to read afresh does not undo what was read.
    shouldDehydrateQuery: (query) => query.state.data !== undefined && query.meta?.keep !== false,
  },
};

/** Forgets all that was read, on the device too; what is on the screen now is read anew. */
export async function forgetEverythingRead(): Promise<void> {
  queryClient.removeQueries({ type: 'inactive' });
  await Promise.all([persister.removeClient(), queryClient.resetQueries()]);
}
