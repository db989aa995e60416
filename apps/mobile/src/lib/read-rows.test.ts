import { QueryClient, dehydrate, hydrate } from '@tanstack/react-query';
import { expect, test } from 'vitest';
import { droppable, keptState } from './read-rows';

test('a reading whose last try failed is kept as it was last read, and comes back as read', async () => {
  const here = new QueryClient();
  here.setQueryData(['lake'], { name: 'Far Ostle' }, { updatedAt: 1000 });
  await here
    .fetchQuery({
      queryKey: ['lake'],
      retry: false,
      queryFn: () => Promise.reject(new TypeError('no signal')),
    })
    .catch(() => undefined);
  expect(here.getQueryState(['lake'])?.status).toBe('error');
  const { queries } = dehydrate(here, { shouldDehydrateQuery: ({ state }) => state.data !== undefined });
  const later = new QueryClient();
  hydrate(later, { mutations: [], queries: structuredClone(queries.map(keptState)) });
  expect(later.getQueryState(['lake'])).toMatchObject({
    status: 'success',
    fetchStatus: 'idle',
    error: null,
    data: { name: 'Far Ostle' },
    dataUpdatedAt: 1000,
  });
});

test('of large readings the three newest stay, and small ones all', () => {
  const charts = [4, 1, 5, 2, 3].map((at) => ({ hash: `chart ${String(at)}`, at, large: true }));
  const small = Array.from({ length: 9 }, (_, at) => ({ hash: `peg ${String(at)}`, at, large: false }));
  expect(droppable([...charts, ...small])).toEqual(new Set(['chart 2', 'chart 1']));
});
