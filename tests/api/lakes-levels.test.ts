import { LakeView, LevelRecorded } from '@mereward/shared/lakes/contract';
import { ProblemBody } from '@mereward/shared/problems/problem';
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { aLakeGround } from '../support/grounds';
import { aStranger } from '../support/people';
import type { TestServer } from '../support/server';
import { aBoard, aLake, type TestFishery, type TestLake } from '../support/waters';

let server: TestServer;
let here: TestFishery;
let elsewhere: TestFishery;
let lake: TestLake;

beforeAll(async () => {
  ({ server, here, elsewhere, lake } = await aLakeGround());
});
afterAll(() => server.close());

const problem = (body: unknown) => ProblemBody.parse(body);

describe('a level', () => {
  const reading = (levelM: number, at: string, note = '') => ({
    id: randomUUID(),
    at,
    levelM,
    levelText: `${levelM} m`,
    note,
  });

  test('is recorded by a bailiff and becomes the level now', async () => {
    const own = await aLake(server, here, { name: 'Level Water' });
    const board = await aBoard(server, own);
    const body = reading(0.38, '2027-04-02T07:00:00Z', 'ice gone');
    const answer = await here.people.bailiff.post(`/boards/${board.id}/readings`).send(body);
    expect(answer.status).toBe(201);
    const recorded = LevelRecorded.parse(answer.body);
    expect(recorded.reading).toMatchObject({ levelM: 0.38, by: 'The bailiff', note: 'ice gone' });
    expect(recorded.warnings.map(({ kind }) => kind)).toEqual(['outside_normal']);
    expect((await here.people.bailiff.post(`/boards/${board.id}/readings`).send(body)).status).toBe(201);
    const seen = LakeView.parse((await aStranger(server).get(`/lakes/${own.id}`)).body);
    expect(seen.levelNow).toEqual({
      levelM: 0.38,
      boardReadsM: 0.38,
      at: '2027-04-02T07:00:00.000Z',
      boardCode: 'LW-G1',
    });
    expect(seen.boards[0]?.readings).toHaveLength(1);
    expect(seen.boards[0]?.readings[0]).toMatchObject({ by: '', note: '' });
    const jump = reading(1.15, '2027-04-03T07:00:00Z');
    const warned = LevelRecorded.parse(
      (await here.people.owner.post(`/boards/${board.id}/readings`).send(jump)).body,
    );
    expect(warned.warnings.map(({ kind }) => kind)).toEqual(['alarm_high', 'jump']);
  });

  test('on a board hung upside down rises with the water', async () => {
    const own = await aLake(server, here, { name: 'Hung Board', datumM: 0.6 });
    const board = await aBoard(server, own, {
      higherNumberHigherWater: false,
      normalLowM: null,
      normalHighM: null,
      alarmHighM: null,
    });
    await here.people.bailiff.post(`/boards/${board.id}/readings`).send(reading(0.8, '2027-04-02T07:00:00Z'));
    const seen = LakeView.parse((await aStranger(server).get(`/lakes/${own.id}`)).body);
    expect(seen.levelNow?.levelM).toBeCloseTo(0.4, 9); // water 0.20 m below datum
    expect(seen.levelNow?.boardReadsM).toBe(0.8);
  });

  test('is refused to office, members, strangers and other fisheries, and from the future', async () => {
    const board = await aBoard(server, lake, { code: 'RF', isDatumBoard: false });
    const path = `/boards/${board.id}/readings`;
    const body = reading(0.6, '2027-04-02T07:00:00Z');
    expect((await here.people.office.post(path).send(body)).status).toBe(403);
    expect((await here.people.member.post(path).send(body)).status).toBe(403);
    expect((await aStranger(server).post(path).send(body)).status).toBe(401);
    expect((await elsewhere.people.bailiff.post(path).send(body)).status).toBe(404);
    const late = await here.people.bailiff.post(path).send(reading(0.6, '2027-04-03T10:00:00Z'));
    expect(problem(late.body)).toMatchObject({ kind: 'invalid', title: expect.stringMatching(/future/) });
  });

  test('misread is taken back by its reader within a day, later by the manager', async () => {
    const board = await aBoard(server, lake, { code: 'TB', isDatumBoard: false });
    const record = async () => {
      const body = reading(6.2, '2027-04-02T07:00:00Z');
      await here.people.bailiff.post(`/boards/${board.id}/readings`).send(body);
      return `/readings/${body.id}`;
    };
    const fresh = await record();
    expect((await elsewhere.people.manager.delete(fresh)).status).toBe(404);
    expect((await here.people.head_bailiff.delete(fresh)).status).toBe(403);
    expect((await here.people.bailiff.delete(fresh)).status).toBe(204);
    expect((await here.people.bailiff.delete(fresh)).status).toBe(404);
    const old = await record();
    server.pass(90_000);
    expect((await here.people.bailiff.delete(old)).status).toBe(403);
    expect((await here.people.manager.delete(old)).status).toBe(204);
  });
});
