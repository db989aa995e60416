import { changesSince } from '@mereward/api/charts/changes';
import { chartPatches } from '@mereward/api/charts/tellings';
import { STRANGER, type Ctx } from '@mereward/api/ctx';
import { seed } from '@mereward/api/demo/seed';
import { FAR_OSTLE_CHART } from '@mereward/api/demo/seed-charts';
import { HARD_SPOT } from '@mereward/api/demo/bed';
import { FAR_OSTLE } from '@mereward/api/demo/waters';
import { originOf } from '@mereward/shared/geometry/outline';
import { fromPlane, toPlane } from '@mereward/shared/geometry/plane';
import { distanceBetweenM, type Point } from '@mereward/shared/geometry/point';
import { insideRing } from '@mereward/shared/geometry/polygon';
import { makeDataSource } from '@mereward/db/data-source';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { freshDatabase } from '../support/fresh-database';
import type { Database } from '../support/test-cluster';

const NOW = new Date('2026-12-01T09:00:00Z');

let databases: [Database, Database];

beforeAll(async () => {
  databases = await Promise.all([freshDatabase(), freshDatabase()]);
  for (const { url } of databases) await seed(url, NOW, null);
}, 400_000);

afterAll(() => Promise.all(databases.map(({ drop }) => drop())));

async function rows<Row>({ url }: Database, sql: string): Promise<Row[]> {
  const source = await makeDataSource(url, 1).initialize();
  try {
    return await source.query<Row[]>(sql);
  } finally {
    await source.destroy();
  }
}

/** The invented bed has a plane of its own; a lake's begins at the middle of its outline. */
const inLakePlane = (point: Point): Point =>
  toPlane(originOf(FAR_OSTLE.polygon), fromPlane(FAR_OSTLE.centre, point));

const holds = (rings: readonly number[][], place: Point): boolean =>
  rings.some((line) =>
    insideRing(
      Array.from({ length: line.length / 2 }, (_, i) => ({ xM: line[2 * i] ?? 0, yM: line[2 * i + 1] ?? 0 })),
      place,
    ),
  );

/** Reads the demo as a stranger does. */
async function asStranger<T>(read: (ctx: Ctx) => Promise<T>): Promise<T> {
  const source = await makeDataSource(databases[0].url, 1).initialize();
  try {
    const jobs = { send: () => Promise.resolve(), later: () => Promise.resolve() };
    return await read({
      tx: source.manager,
      actor: STRANGER,
      now: NOW,
      jobs,
      publicUrl: 'http://127.0.0.1',
      takesCards: false,
    });
  } finally {
    await source.destroy();
  }
}

test('Far Ostle is published by another than its surveyors, and Ostle Pool waits as a draft', async () => {
  const charts = await rows<{ lake: string; status: string; version: string | null; other: boolean | null }>(
    databases[0],
    `SELECT l.name AS lake, c.status, c.version,
            c.approved_by NOT IN (SELECT surveyor_id FROM survey_visit WHERE id = ANY (c.visit_ids)) AS other
       FROM chart c JOIN lake l ON l.id = c.lake_id ORDER BY l.name, c.version`,
  );
  expect(charts).toEqual([
    { lake: 'Far Ostle', status: 'superseded', version: '2025.1', other: true },
    { lake: 'Far Ostle', status: 'published', version: '2026.1', other: true },
    { lake: 'Ostle Pool', status: 'draft', version: null, other: null },
  ]);
});

test('Far Ostle’s two charts differ where the gully was dug, and the works stand between them by their days', async () => {
  const changes = await asStranger((ctx) => changesSince(ctx, FAR_OSTLE_CHART, {}));
  expect(changes.since?.version).toBe('2025.1');
  const dug = changes.areas?.find(
    ({ kind, rings }) => kind === 'deeper' && holds(rings, inLakePlane({ xM: -72, yM: 17 })),
  );
  expect(dug?.meanChangeM).toBeGreaterThan(0.4); // 1.3 m at the middle of what was dug, nothing at its edge
  const events = await rows<{ day: string; kind: string; drawn: boolean }>(
    databases[0],
    `SELECT happened_on::text AS day, kind, area IS NOT NULL AS drawn FROM bottom_event e
       JOIN lake l ON l.id = e.lake_id WHERE l.name = 'Far Ostle' ORDER BY happened_on`,
  );
  expect(events).toEqual([
    { day: '2025-11-14', kind: 'weed_cut', drawn: true },
    { day: '2026-01-22', kind: 'dredged', drawn: true },
  ]);
});

test('the hard spot in the silt stands out, and FO18 is told how to reach it', async () => {
  const { patches } = await asStranger((ctx) => chartPatches(ctx, FAR_OSTLE_CHART));
  const hard = patches?.find(({ bottom, around }) => bottom === 'gravel' && around === 'silt');
  const there = inLakePlane(HARD_SPOT);
  expect(distanceBetweenM(hard ?? { xM: 0, yM: 0 }, there)).toBeLessThan(5); // its middle, by a few cells
  expect(hard?.reach.map(({ number }) => number)).toContain('FO18');
});

test('one report waits and one counts in the spring chart; a log was taken in with the autumn one', async () => {
  const [told] = await rows<{
    waiting: number;
    accepted: number;
    counted: number;
    logged: number;
    found: number;
  }>(
    databases[0],
    `SELECT (SELECT count(*) FROM disagreement WHERE status = 'waiting')::int AS waiting,
            (SELECT count(*) FROM disagreement WHERE status = 'accepted')::int AS accepted,
            (SELECT jsonb_array_length(built -> 'reports') FROM chart WHERE version = '2026.1') AS counted,
            (SELECT jsonb_array_length(built -> 'logs') FROM chart WHERE version = '2025.1') AS logged,
            (SELECT count(*) FROM sounding)::int AS found`,
  );
  expect(told).toMatchObject({ waiting: 1, accepted: 1, counted: 1, logged: 1 });
  expect(told?.found).toBeGreaterThan(150);
});

test('a year of tickets agrees with its money: takings, receipts and ledger', async () => {
  const [told] = await rows<Record<string, number>>(
    databases[0],
    `SELECT (SELECT count(*) FROM booking)::int AS tickets,
            (SELECT count(*) FROM booking WHERE lower(during) > '2026-12-01T12:00Z')::int AS ahead,
            (SELECT sum(amount_pence) FROM payment WHERE status = 'captured')::int
              - (SELECT coalesce(sum(amount_pence), 0) FROM refund)::int AS kept,
            (SELECT sum(CASE kind WHEN 'receipt' THEN 1 ELSE -1 END * (told->>'grossPence')::int) FROM receipt)::int AS receipted,
            (SELECT -sum(amount_pence) FROM ledger_posting WHERE account IN ('ticket_sales', 'vat_owed'))::int AS sold,
            (SELECT sum(amount_pence) FROM ledger_posting)::int AS balance,
            (SELECT count(*) FROM (SELECT year, max(number) - count(*) AS gap FROM receipt GROUP BY year) y WHERE gap <> 0)::int AS gaps,
            (SELECT count(*) FROM rule_sheet WHERE status = 'published')::int AS sheets`,
  );
  expect(told?.tickets).toBeGreaterThan(700);
  expect(told?.ahead).toBeGreaterThan(10);
  expect(told).toMatchObject({ receipted: told?.kept, sold: told?.kept, balance: 0, gaps: 0, sheets: 2 });
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
