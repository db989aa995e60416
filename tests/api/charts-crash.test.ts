import { ChartBuild } from '@mereward/db/entities/charts/chart-build';
import { CHART_BUILDS } from '@mereward/api/charts/jobs';
import type { ChildProcess } from 'node:child_process';
import { Client } from 'pg';
import { afterAll, beforeAll, expect, inject, test } from 'vitest';
import { draftedChart } from '../support/charts';
import { aProcessOn, killed, letItBeLost, until } from '../support/killed-server';
import { aServer, type TestServer } from '../support/server';
import { aLongWater, aSurvey } from '../support/surveys';
import { aFishery } from '../support/waters';

let server: TestServer;
const running: ChildProcess[] = [];

beforeAll(async () => {
  server = await aServer();
  server.setNow('2027-04-03T12:00:00Z');
});
afterAll(async () => {
  for (const each of running) await killed(each);
  await server.close();
});

function aProcess(): ChildProcess {
  const child = aProcessOn(server);
  running.push(child);
  return child;
}

test('a chart whose server is killed outright while it builds is built by the next', async () => {
  const fishery = await aFishery(server);
  const water = await aLongWater(server, fishery);
  const visitId = await aSurvey(fishery.people.head_bailiff, water);
  const id = await draftedChart(server, {
    person: fishery.people.head_bailiff,
    lakeId: water.lake.id,
    visitIds: [visitId],
    settle: false,
  });
  const build = () => server.server.source.manager.findOneByOrFail(ChartBuild, { chartId: id });

  const first = aProcess();
  await until(async () => (await build()).state === 'running');
  await killed(first);
  const left = await build();
  expect(left.state).toBe('running');
  await letItBeLost(server, CHART_BUILDS);

  aProcess();
  await until(async () => (await build()).state === 'done');
  const done = await build();
  expect(done.attempt).not.toBe(left.attempt);
  expect(done.tries).toBe(2);
}, 120_000);

test('a server whose database goes away while it builds lives on and builds the chart when it is back', async () => {
  const fishery = await aFishery(server, { name: 'Upper Sallow' });
  const water = await aLongWater(server, fishery);
  const person = fishery.people.head_bailiff;
  const visitIds = [await aSurvey(person, water)];
  for (const each of running) await killed(each);
  const id = await draftedChart(server, { person, lakeId: water.lake.id, visitIds, settle: false });
  const state = async () =>
    (await server.server.source.manager.findOneByOrFail(ChartBuild, { chartId: id })).state;
  const child = aProcess();
  await until(async () => (await state()) === 'running');

  const name = new URL(server.server.config.databaseUrl).pathname.slice(1);
  const client = new Client({ connectionString: inject('clusterUrl') });
  await client.connect();
  await client.query(`ALTER DATABASE ${name} WITH ALLOW_CONNECTIONS false`);
  await client.query('SELECT pg_terminate_backend(pid) FROM pg_stat_activity WHERE datname = $1', [name]);
  const away = await person.get('/fisheries');
  expect([away.status, away.body.title]).toEqual([500, 'The database can’t be reached just now']);
  await new Promise((next) => setTimeout(next, 2000)); // long enough for the build to notice and to fail
  await client.query(`ALTER DATABASE ${name} WITH ALLOW_CONNECTIONS true`);
  await client.end();
  await letItBeLost(server, CHART_BUILDS);

  await until(async () => (await state()) === 'done');
  expect(child.exitCode).toBeNull();
}, 120_000);
