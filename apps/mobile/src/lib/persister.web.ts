import type { DehydratedState } from '@tanstack/react-query';
import type { PersistedClient, Persister } from '@tanstack/react-query-persist-client';
import type { DeviceDb, ReadRow } from '@/lib/device-rows';
import { deviceStore } from '@/lib/device-store';
import { onLeaving } from '@/lib/on-leaving';
import { droppable, KEEP_MS, keptState } from '@/lib/read-rows';
import { sessionStore } from '@/lib/session-store';

const WRITE_AFTER_MS = 400; // readings come in bursts as a screen opens, and a page may be gone soon after
type KeptQuery = DehydratedState['queries'][number];

const written = new Map<string, string>(); // which reading of each lies on the device
let waiting: PersistedClient | null = null;
let timer: ReturnType<typeof setTimeout> | undefined;
let writing: Promise<void> = Promise.resolve();
let store: DeviceDb | null = null; // once it is open

/** Tells one reading of a query from the next, on a clock that stands still too. */
const readingOf = ({ state }: KeptQuery): string =>
  `${String(state.dataUpdatedAt)} ${String(state.dataUpdateCount)}`;

const whose = (): string => sessionStore.get().account?.id ?? '';

/**
 * Writes the readings that are newer than on the device, and takes away those that are gone: all asked for at once, so
 * that a page about to end has still asked for all of it.
 */
async function write(db: DeviceDb, { buster, clientState: { queries } }: PersistedClient): Promise<void> {
  const there = new Set(queries.map(({ queryHash }) => queryHash));
  const gone = [...written.keys()].filter((hash) => !there.has(hash));
  const over = droppable(
    queries.map(({ queryHash: hash, state, meta }) => ({
      hash,
      at: state.dataUpdatedAt,
      large: meta?.['large'] === true,
    })),
  );
  const fresh = queries.filter(
    (query) => !over.has(query.queryHash) && written.get(query.queryHash) !== readingOf(query),
  );
  const stale = [...gone, ...over].filter((hash) => written.delete(hash));
  if (fresh.length + stale.length === 0) return;
  const work = db.transaction(['read', 'terms'], 'readwrite', { durability: 'relaxed' });
  const read = work.objectStore('read');
  const terms = work.objectStore('terms');
  const asked = [
    ...stale.map((hash) => read.delete(hash)),
    ...fresh.map((query) =>
      read.put({ hash: query.queryHash, at: query.state.dataUpdatedAt, query: keptState(query) }),
    ),
    terms.put(buster, 'buster'),
    terms.put(whose(), 'whose'),
  ];
  for (const query of fresh) written.set(query.queryHash, readingOf(query));
  work.commit();
  await Promise.all([...asked, work.done]).catch(() => {
    for (const { queryHash } of fresh) written.delete(queryHash); // no room: it stays in memory, and is tried again
  });
}

function writeWaiting(): void {
  clearTimeout(timer);
  timer = undefined;
  if (!store || !waiting) return;
  writing = write(store, waiting).catch(() => undefined);
  waiting = null;
}

async function readAll(): Promise<PersistedClient | undefined> {
  const db = (store = await deviceStore());
  if (!db) return undefined;
  const all: ReadRow[] = await db.getAll('read');
  if ((await db.get('terms', 'whose')) !== whose()) {
    await db.clear('read'); // somebody else's, left by a page that ended in the act
    return undefined;
  }
  for (const { hash, query } of all) written.set(hash, readingOf(query as KeptQuery)); // what is too old is taken away at the next writing
  const rows = all.filter(({ at }) => at > Date.now() - KEEP_MS);
  if (rows.length === 0) return undefined;
  const queries = rows.map(({ query }) => toBeReadAgain(query as KeptQuery));
  return {
    timestamp: Math.max(...rows.map(({ at }) => at)),
    buster: (await db.get('terms', 'buster')) ?? '',
    clientState: { mutations: [], queries },
  };
}

/** Shown at once, and read afresh as soon as a screen shows it. */
const toBeReadAgain = (query: KeptQuery): KeptQuery => ({
  ...query,
  state: { ...query.state, isInvalidated: true },
});

/** Where kept readings lie in a browser: one row each, written when it has been read anew. */
export const persister: Persister = {
  persistClient: (client) => {
    waiting = client;
    timer ??= setTimeout(writeWaiting, WRITE_AFTER_MS);
  },
  restoreClient: readAll,
  removeClient: async () => {
    waiting = null;
    written.clear();
    await writing;
    await (await deviceStore())?.clear('read');
  },
};

onLeaving(writeWaiting);
