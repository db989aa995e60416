import { ProblemBody } from '@mereward/shared/problems/problem';
import { takeUpLost } from '@mereward/api/jobs/claimed-run';
import { LOG_READINGS } from '@mereward/api/surveys/log-queue';
import { LogList, LogView, USUAL_LOG_OPTIONS, type LogOptions } from '@mereward/shared/surveys/log-contract';
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { aSurveyGround } from '../support/grounds';
import { aStranger, type Person } from '../support/people';
import type { TestServer } from '../support/server';
import { aBoatTrack, boatDepthM, nmeaLog } from '../support/sounding-log';
import { closedVisit, openedVisit, type TestWater } from '../support/surveys';
import type { TestFishery } from '../support/waters';

let server: TestServer;
let here: TestFishery;
let elsewhere: TestFishery;
let water: TestWater;
let joan: Person;

beforeAll(async () => {
  ({ server, here, elsewhere, water, joan } = await aSurveyGround());
});
afterAll(() => server.close());

const problem = (body: unknown) => ProblemBody.parse(body);
type Files = Record<string, string | Buffer>;

async function bring(visitId: string, files: Files, { person = joan, id = randomUUID() } = {}) {
  let sending = person.post(`/visits/${visitId}/logs`).field('id', id);
  for (const [name, text] of Object.entries(files))
    sending = sending.attach('files', Buffer.from(text), name);
  return sending;
}
const logOf = async (id: string) => LogView.parse((await joan.get(`/logs/${id}`)).body);
const count = async (id: string): Promise<number> => {
  const rows = await server.server.source.query(
    'SELECT count(*)::int AS n FROM sounding WHERE import_id = $1',
    [id],
  );
  return rows[0].n;
};

/** Brings a log and looks at it. */
async function looked(
  files: Files,
  { visitId = '', options }: { visitId?: string; options?: Partial<LogOptions> } = {},
) {
  const visit = visitId || (await openedVisit(joan, water));
  const brought = await bring(visit, files);
  expect(brought.status).toBe(202);
  const { id } = LogView.parse(brought.body);
  await server.settle();
  if (options) {
    const again = await joan.post(`/logs/${id}/look`).send({ options: { ...USUAL_LOG_OPTIONS, ...options } });
    expect(again.status).toBe(202);
    await server.settle();
  }
  return { visitId: visit, log: await logOf(id) };
}

const track = aBoatTrack({ linesM: 30 });
const boatLog = nmeaLog(track);

describe('a log of soundings', { timeout: 60_000 }, () => {
  test('is looked at first, and then taken in with its places, depths and times', async () => {
    const { log } = await looked({ 'boat.log': boatLog });
    expect(log).toMatchObject({ state: 'looked', error: null, filenames: ['boat.log'] });
    expect(log.preview).toMatchObject({
      format: 'nmea',
      found: track.length,
      kept: track.length,
      leftOut: [],
      faultCount: 0,
      grade: 'B',
      asks: [],
    });
    expect(log.preview?.first[0]?.where).toBe('boat.log, line 3');
    expect(await count(log.id)).toBe(0);

    expect((await joan.post(`/logs/${log.id}/start`)).status).toBe(202);
    await server.settle();
    const done = await logOf(log.id);
    expect(done).toMatchObject({ state: 'done', share: 1, report: { kept: track.length } });
    const [first] = await server.server.source.query(
      'SELECT * FROM sounding WHERE import_id = $1 ORDER BY seq LIMIT 1',
      [log.id],
    );
    expect(first.depth_as_read_m).toBe(Number(boatDepthM(track[0] ?? { xM: 0, yM: 0 }).toFixed(2)));
    expect(first.observed_at).toEqual(new Date('2027-04-03T08:10:00Z'));
    expect(await count(log.id)).toBe(track.length);
  });

  test('can be brought to a closed visit, since loggers are read at home', async () => {
    const visitId = await openedVisit(joan, water);
    await closedVisit({ person: joan, visitId });
    expect((await looked({ 'boat.log': boatLog }, { visitId })).log.state).toBe('looked');
  });

  test('brought twice at once, in another order and under other names, is kept once', async () => {
    const visitId = await openedVisit(joan, water);
    const positions = boatLog.replace(/^\$SDDPT.*\r\n/gm, '');
    const depths = boatLog.replace(/^\$GNGGA.*\r\n/gm, '');
    const answers = await Promise.all([
      bring(visitId, { 'a.log': positions, 'b.log': depths }),
      bring(visitId, { 'depths.txt': depths, 'track.txt': positions }),
    ]);
    expect(answers.map(({ status }) => status)).toEqual([202, 202]);
    expect(new Set(answers.map(({ body }) => body.id)).size).toBe(1);
    const list = LogList.parse((await joan.get(`/visits/${visitId}/logs`)).body);
    expect(list.logs).toHaveLength(1);

    await server.settle();
    const id = list.logs[0]?.id ?? '';
    await Promise.all([joan.post(`/logs/${id}/start`), joan.post(`/logs/${id}/start`)]);
    await server.settle();
    const again = await bring(visitId, { 'a.log': positions, 'b.log': depths });
    expect(LogView.parse(again.body)).toMatchObject({ id, state: 'done' });
    await server.settle();
    expect(await count(id)).toBe((await logOf(id)).report?.kept);
  });

  test('with the id of another is a conflict', async () => {
    const visitId = await openedVisit(joan, water);
    const id = randomUUID();
    await bring(visitId, { 'a.log': boatLog }, { id });
    const other = await bring(visitId, { 'a.log': boatLog + boatLog }, { id });
    expect(problem(other.body).kind).toBe('conflict');
  });

  test('says what is wrong with each line it leaves out, and why soundings are not taken', async () => {
    const damaged = boatLog.replace('$SDDPT,', '$SDDPT,9');
    const faraway = '$GPGGA,120000.00,5221.9060,N,00108.5620,W,4,12,0.6,62.31,M,47.2,M,,*43';
    const { log } = await looked({ 'boat.log': `${damaged}${faraway}\r\nnoise\r\n` });
    expect(log.preview?.faultCount).toBe(3);
    expect(log.preview?.faults[0]).toMatchObject({ file: 'boat.log', unit: 'line', at: 3 });
    expect(log.preview?.faults[0]?.detail).toMatch(/checksum should be [0-9A-F]{2}: the line was damaged/);
    expect(log.preview?.faults[2]).toMatchObject({ value: 'noise' });
    expect(log.preview?.kept).toBe(track.length - 1);
  });

  test('that is ambiguous asks, and is taken in once that is answered', async () => {
    const rows = oneRow('1,234');
    const { log } = await looked({ 'table.csv': rows });
    expect(log.preview?.asks).toEqual([
      {
        option: 'decimal',
        words:
          '“1,234” may be 1.234 or 1234. Say whether the comma stands before decimals or between thousands.',
      },
    ]);
    const refused = await joan.post(`/logs/${log.id}/start`);
    expect(problem(refused.body)).toMatchObject({
      kind: 'conflict',
      detail: expect.stringContaining('1.234 or 1234'),
    });
    const options = { ...USUAL_LOG_OPTIONS, decimal: 'comma' };
    await joan.post(`/logs/${log.id}/look`).send({ options });
    await server.settle();
    expect((await logOf(log.id)).preview).toMatchObject({ asks: [], kept: 1, deepestM: 1.234 });
  });

  test('that can’t be read at all fails in words and takes nothing in', async () => {
    const { log } = await looked({ 'walk.gpx': '<gpx version="1.1"><wpt lat="1" lon="2">' });
    expect(log.state).toBe('failed');
    expect(log.error).toMatch(/^walk\.gpx, line 1: It is not whole XML .* Export it again\.$/);
    expect(problem((await joan.post(`/logs/${log.id}/start`)).body).kind).toBe('conflict');
  });

  test('taken back is gone with its soundings, and can be brought again', async () => {
    const { log, visitId } = await looked({ 'boat.log': boatLog });
    await joan.post(`/logs/${log.id}/start`);
    await server.settle();
    expect((await joan.delete(`/logs/${log.id}`)).status).toBe(204);
    expect(await count(log.id)).toBe(0);
    expect((await joan.get(`/logs/${log.id}`)).status).toBe(404);
    const again = await looked({ 'boat.log': boatLog }, { visitId });
    expect(again.log.id).not.toBe(log.id);
  });

  test('cancelled while it waits takes nothing in and can be started again', async () => {
    const { log } = await looked({ 'boat.log': boatLog });
    await joan.post(`/logs/${log.id}/start`);
    expect((await joan.post(`/logs/${log.id}/cancel`)).status).toBe(202);
    await server.settle();
    expect((await logOf(log.id)).state).toBe('cancelled');
    expect(await count(log.id)).toBe(0);
    expect(problem((await joan.post(`/logs/${log.id}/cancel`)).body).kind).toBe('conflict');
    expect((await joan.post(`/logs/${log.id}/start`)).status).toBe(202);
    await server.settle();
    expect((await logOf(log.id)).state).toBe('done');
  });

  test('whose run was lost is taken up again, and after three tries has failed in words', async () => {
    const { log } = await looked({ 'boat.log': boatLog });
    await joan.post(`/logs/${log.id}/start`);
    const lose = (tries: number) =>
      server.server.source.query(
        `UPDATE sounding_import SET state = 'running', tries = $2, updated_at = clock_timestamp() - interval '1 minute' WHERE id = $1`,
        [log.id, tries],
      );
    await lose(3);
    expect(await takeUpLost(server.server, LOG_READINGS)).toBe(1);
    expect(await logOf(log.id)).toMatchObject({
      state: 'failed',
      error: expect.stringContaining('Nothing was taken in'),
    });
    await server.settle();
    expect(await count(log.id)).toBe(0);
    await lose(1);
    expect(await takeUpLost(server.server, LOG_READINGS)).toBe(1);
    await server.settle();
    expect(await logOf(log.id)).toMatchObject({ state: 'done' });
    expect(await count(log.id)).toBe(track.length);
  });

  test('is for the people who survey; those of another fishery find nothing', async () => {
    const { log, visitId } = await looked({ 'boat.log': boatLog });
    const answers = await Promise.all([
      aStranger(server).get(`/logs/${log.id}`),
      here.people.member.get(`/logs/${log.id}`),
      elsewhere.people.manager.get(`/logs/${log.id}`),
      elsewhere.people.manager.post(`/logs/${log.id}/start`),
      bring(visitId, { 'boat.log': boatLog }, { person: elsewhere.people.manager }),
      here.people.owner.delete(`/logs/${log.id}`),
    ]);
    expect(answers.map(({ status }) => status)).toEqual([401, 403, 404, 404, 404, 403]);
  });

  test('without a file, or with other options than there are, is refused', async () => {
    const visitId = await openedVisit(joan, water);
    const none = await joan.post(`/visits/${visitId}/logs`).field('id', randomUUID());
    expect(problem(none.body)).toMatchObject({
      kind: 'invalid',
      title: 'There was no file in what was sent',
    });
    const thirteen = Object.fromEntries(Array.from({ length: 13 }, (_, i) => [`${i}.log`, 'x']));
    expect(problem((await bring(visitId, thirteen)).body)).toMatchObject({
      kind: 'invalid',
      detail: expect.stringContaining('at most 12 files'),
    });
    const { log } = await looked({ 'boat.log': boatLog });
    const wrong = await joan
      .post(`/logs/${log.id}/look`)
      .send({ options: { ...USUAL_LOG_OPTIONS, transducerM: -1 } });
    expect(problem(wrong.body).errors?.map(({ pointer }) => pointer)).toEqual(['/options/transducerM']);
  });
});

/** A table whose one depth is written `depth`, on the long water. */
function oneRow(depth: string): string {
  const line = /GNGGA,[\d.]+,(\d\d)([\d.]+),N,(\d{3})([\d.]+),([EW])/.exec(boatLog.split('\r\n')[1] ?? '');
  const [, lat = '', latMin = '', lon = '', lonMin = '', side = ''] = line ?? [];
  return `lat;lon;depth\n${Number(lat) + Number(latMin) / 60};${side === 'W' ? '-' : ''}${Number(lon) + Number(lonMin) / 60};${depth}\n`;
}
