import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { aServer, type TestServer } from '../support/server';

let server: TestServer;

beforeAll(async () => {
  server = await aServer();
});
afterAll(() => server.close());

/** How the database would read, were the tables too large to be read whole. */
async function planOf(sql: string, values: unknown[]): Promise<string> {
  return server.server.source.transaction(async (tx) => {
    await tx.query('SET LOCAL enable_seqscan = off');
    const rows = await tx.query<Record<string, string>[]>(`EXPLAIN ${sql}`, values);
    return rows.map((row) => row['QUERY PLAN']).join('\n');
  });
}

test('the casts of many visits are counted from an index alone', async () => {
  const plan = await planOf(
    'SELECT visit_id, count(*) FROM survey_cast WHERE visit_id = ANY ($1) AND undone_at IS NULL GROUP BY visit_id',
    [[randomUUID(), randomUUID()]],
  );
  expect(plan).toContain('survey_cast_kept');
});

test('the newest reading of a board is found without sorting the others', async () => {
  const plan = await planOf(
    'SELECT * FROM level_reading WHERE board_id = $1 ORDER BY at DESC, received_at DESC LIMIT 1',
    [randomUUID()],
  );
  expect(plan).toContain('level_reading_board_at');
});
