import { seed } from '@mereward/api/demo/seed';
import { makeDataSource } from '@mereward/db/data-source';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { freshDatabase } from '../support/fresh-database';
import type { Database } from '../support/test-cluster';

const NOW = new Date('2026-12-01T09:00:00Z');

let databases: [Database, Database];

beforeAll(async () => {
  databases = await Promise.all([freshDatabase(), freshDatabase()]);
  for (const { url } of databases) await seed(url, NOW, null);
}, 120_000);

afterAll(() => Promise.all(databases.map(({ drop }) => drop())));

async function rows<Row>({ url }: Database, sql: string): Promise<Row[]> {
  const source = await makeDataSource(url, 1).initialize();
  try {
    return await source.query<Row[]>(sql);
  } finally {
    await source.destroy();
  }
}

test('Far Ostle is published by another than its surveyors, and Ostle Pool waits as a draft', async () => {
  const charts = await rows<{ lake: string; status: string; version: string | null; other: boolean | null }>(
    databases[0],
    `SELECT l.name AS lake, c.status, c.version,
            c.approved_by NOT IN (SELECT surveyor_id FROM survey_visit WHERE id = ANY (c.visit_ids)) AS other
       FROM chart c JOIN lake l ON l.id = c.lake_id ORDER BY l.name`,
  );
  expect(charts).toEqual([
    { lake: 'Far Ostle', status: 'published', version: '2026.1', other: true },
    { lake: 'Ostle Pool', status: 'draft', version: null, other: null },
  ]);
});

test('two demos of one day are alike to the byte', async () => {
  const sql = `SELECT md5(string_agg(md5(c.depth) || md5(c.sigma) || md5(c.substrate) || md5(c.built::text), '' ORDER BY c.id)) AS sum,
                      (SELECT md5(string_agg(observation::text || reduced::text, '' ORDER BY id)) FROM survey_cast) AS casts
                 FROM chart c`;
  const [one, other] = await Promise.all(databases.map((database) => rows<{ sum: string }>(database, sql)));
  expect(one?.[0]?.sum).toHaveLength(32);
  expect(one).toEqual(other);
});

test('a second start leaves the demo as it is', async () => {
  const count = `SELECT (SELECT count(*) FROM survey_cast)::int AS casts, (SELECT count(*) FROM booking)::int AS tickets`;
  const before = await rows<{ casts: number; tickets: number }>(databases[0], count);
  await seed(databases[0].url, new Date('2026-12-09T09:00:00Z'), null);
  expect(before[0]?.casts).toBeGreaterThan(1000);
  expect(await rows(databases[0], count)).toEqual(before);
});
