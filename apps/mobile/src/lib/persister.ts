import { createAsyncStoragePersister } from '@tanstack/query-async-storage-persister';
import { removeOldestQuery, type Persister } from '@tanstack/react-query-persist-client';
import { storage } from '@/lib/storage';

/** Where kept readings lie on a phone's own system. */
export const persister: Persister = createAsyncStoragePersister({
  storage: { getItem: storage.get, setItem: storage.set, removeItem: storage.remove },
  key: 'mereward.read',
  throttleTime: 2000,
  retry: removeOldestQuery, // a full store loses its oldest reading first
});
