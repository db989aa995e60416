import { SoundingImport } from '@mereward/db/entities/surveys/sounding-import';
import { LogView } from '@mereward/shared/surveys/log-contract';
import { LOG_READINGS } from '@mereward/api/surveys/log-queue';
import type { ChildProcess } from 'node:child_process';
import { randomUUID } from 'node:crypto';
import { writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { aProcessOn, killed, letItBeLost, until } from '../support/killed-server';
import { aServer, type TestServer } from '../support/server';
import { aBoatTrack, nmeaLog } from '../support/sounding-log';
import { aLongWater, openedVisit } from '../support/surveys';
import { aFishery } from '../support/waters';

const NOW = '2027-04-03T12:00:00Z';
let server: TestServer;
const running: ChildProcess[] = [];

beforeAll(async () => {
  server = await aServer();
  server.setNow(NOW);
});
afterAll(async () => {
  for (const each of running) await killed(each);
  await server.close();
});

function aProcess(): void {
  const clock = join(server.server.config.filesDir, 'clock');
  writeFileSync(clock, NOW);
  running.push(aProcessOn(server, { CLOCK_FILE: clock }));
}

/** Lets the writing of a log come no further than its first five thousand soundings. */
const STICKS = `
  CREATE FUNCTION sticks() RETURNS trigger LANGUAGE plpgsql AS $$ BEGIN PERFORM pg_sleep(600); RETURN NEW; END $$;
  CREATE TRIGGER sticks BEFORE INSERT ON sounding FOR EACH ROW WHEN (NEW.seq = 6000) EXECUTE FUNCTION sticks()`;

const query = (sql: string) => server.server.source.query(sql);

test('a log whose server is killed outright while it is written is taken in whole by the next', async () => {
  const fishery = await aFishery(server);
  const person = fishery.people.head_bailiff;
  const visitId = await openedVisit(person, await aLongWater(server, fishery));
  const track = aBoatTrack({ linesM: 2, speedMS: 1 }); // some thirteen thousand soundings, in three writings
  const brought = await person
    .post(`/visits/${visitId}/logs`)
    .field('id', randomUUID())
    .attach('files', Buffer.from(nmeaLog(track)), 'boat.log');
  const { id } = LogView.parse(brought.body);
  await server.settle();
  expect((await person.post(`/logs/${id}/start`)).status).toBe(202);
  const log = () => server.server.source.manager.findOneByOrFail(SoundingImport, { id });
  const count = async (): Promise<number> =>
    (
      await server.server.source.query('SELECT count(*)::int AS n FROM sounding WHERE import_id = $1', [id])
    )[0].n;

  await query(STICKS);
  aProcess();
  await until(async () => (await log()).step === 'Writing the soundings'); // some are written, and none is told
  for (const each of running) await killed(each);
  await query(
    `SELECT pg_terminate_backend(pid) FROM pg_stat_activity
      WHERE datname = current_database() AND query LIKE 'INSERT INTO sounding %'`,
  );
  await query('DROP TRIGGER sticks ON sounding');
  expect((await log()).state).toBe('running');
  expect(await count()).toBe(0);
  await letItBeLost(server, LOG_READINGS);

  aProcess();
  await until(async () => (await log()).state === 'done');
  const done = await log();
  expect(done.tries).toBe(2);
  expect(await count()).toBe(done.report?.kept);
  expect(done.report?.kept).toBe(track.length);
}, 240_000);
