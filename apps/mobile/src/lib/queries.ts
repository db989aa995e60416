import { createAsyncStoragePersister } from '@tanstack/query-async-storage-persister';
import { QueryClient } from '@tanstack/react-query';
import { removeOldestQuery, type PersistQueryClientOptions } from '@tanstack/react-query-persist-client';
import { Problem } from '@mereward/shared/problems/problem';
import { storage } from '@/lib/storage';

const DAY_MS = 24 * 60 * 60 * 1000;

/** A refusal is final; a failed fetch or a server in trouble is worth two more tries. */
const mayTryAgain = (failures: number, fault: Error): boolean =>
  failures < 2 && (!(fault instanceof Problem) || fault.kind === 'internal');

export const queryClient = new QueryClient({
  defaultOptions: {
    queries: { retry: mayTryAgain, staleTime: 20_000, gcTime: 14 * DAY_MS, networkMode: 'offlineFirst' },
    mutations: { retry: false, networkMode: 'offlineFirst' },
  },
});

const persister = createAsyncStoragePersister({
  storage: { getItem: storage.get, setItem: storage.set, removeItem: storage.remove },
  key: 'mereward.read',
  throttleTime: 2000,
  retry: removeOldestQuery, // a full store loses its oldest reading first
});

/** Last known readings outlive a reload. A query with `meta: { keep: false }` is too large or too private to keep. */
export const persistence: Omit<PersistQueryClientOptions, 'queryClient'> = {
  persister,
  maxAge: 14 * DAY_MS,
  buster: '1', // raise when a kept reading's shape changes
  dehydrateOptions: {
    shouldDehydrateQuery: (query) => query.state.status === 'success' && query.meta?.keep !== false,
  },
};

/** Forgets all that was read, on the device too; what is on the screen now is read anew. */
export async function forgetEverythingRead(): Promise<void> {
  queryClient.removeQueries({ type: 'inactive' });
  await Promise.all([persister.removeClient(), queryClient.resetQueries()]);
}
