import { LakeView, PegList, PegView } from '@mereward/shared/lakes/contract';
import { ProblemBody } from '@mereward/shared/problems/problem';
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { aLakeGround } from '../support/grounds';
import { aStranger } from '../support/people';
import type { TestServer } from '../support/server';
import { boardDetails, markDetails, pegDetails } from '../support/water-details';
import { aBoard, aLake, aMark, aPeg, type TestFishery, type TestLake } from '../support/waters';

let server: TestServer;
let here: TestFishery;
let elsewhere: TestFishery;
let lake: TestLake;

beforeAll(async () => {
  ({ server, here, elsewhere, lake } = await aLakeGround());
});
afterAll(() => server.close());

const problem = (body: unknown) => ProblemBody.parse(body);

describe('a peg', () => {
  const path = () => `/lakes/${lake.id}/pegs`;

  test('is made by the head bailiff, last in walking order, facing the middle of its arc', async () => {
    const own = await aLake(server, here, { name: 'Peg Walk' });
    await aPeg(server, own, { number: '1', thetaDeg: 90 });
    const details = pegDetails({ number: '2', thetaDeg: 180 });
    const id = randomUUID();
    const answer = await here.people.head_bailiff.post(`/lakes/${own.id}/pegs`).send({ id, details });
    expect(answer.status).toBe(201);
    expect(PegView.parse(answer.body).may).toEqual({ change: true, addPhotos: true });
    const { pegs } = LakeView.parse((await aStranger(server).get(`/lakes/${own.id}`)).body);
    expect(pegs.map(({ number }) => number)).toEqual(['1', '2']);
    expect(pegs[1]?.facingDeg).toBeCloseTo((details.arcFromDeg + 40) % 360, 6);
    const ids = pegs.map((peg) => peg.id).reverse();
    const order = await here.people.manager.put(`/lakes/${own.id}/peg-order`).send({ pegIds: ids });
    expect(LakeView.parse(order.body).pegs.map((peg) => peg.id)).toEqual(ids);
    const half = await here.people.manager.put(`/lakes/${own.id}/peg-order`).send({ pegIds: [id] });
    expect(problem(half.body)).toMatchObject({ kind: 'invalid' });
    const theirs = await elsewhere.people.owner.put(`/lakes/${own.id}/peg-order`).send({ pegIds: ids });
    expect(theirs.status).toBe(404);
  });

  test.each([
    ['far from the shore', { origin: [1.7, 53.6] as [number, number] }, 'origin', /from the shore/],
    ['looking over land', { arcFromDeg: 170, arcToDeg: 250, thetaDeg: 200 }, 'arcFromDeg', /looks over land/],
    ['with an arc of no width', { arcFromDeg: 40, arcToDeg: 40 }, 'arcToDeg', /are the same/],
    [
      'open to fishing under a line 29 m away',
      { overheadLine: { ...pegDetails().overheadLine, kind: 'present' as const, distanceM: 29 } },
      'overheadLine/fishing',
      /nearer than 30 m/,
    ],
    [
      'open to fishing under a line nobody measured',
      { overheadLine: { ...pegDetails().overheadLine, kind: 'present' as const } },
      'overheadLine/distanceM',
      /Measure how far/,
    ],
    ['closed without a reason', { status: 'closed' as const }, 'statusReason', /Say why/],
  ])('%s is refused in words', async (_, wishes, field, words) => {
    const details = pegDetails({ number: 'X1', ...wishes });
    const answer = await here.people.manager.post(path()).send({ id: randomUUID(), details });
    expect(answer.status).toBe(400);
    const named = problem(answer.body).errors?.find(({ pointer }) => pointer === `/details/${field}`);
    expect(named?.detail).toMatch(words);
  });

  test('30 m from a line may be fished', async () => {
    const line = { ...pegDetails().overheadLine, kind: 'present' as const, distanceM: 30 };
    const details = pegDetails({ number: 'OH30', overheadLine: line });
    const answer = await here.people.manager.post(path()).send({ id: randomUUID(), details });
    expect(answer.status).toBe(201);
  });

  test('of two with one number exactly one is made', async () => {
    const make = () =>
      here.people.manager.post(path()).send({ id: randomUUID(), details: pegDetails({ number: 'TW' }) });
    const answers = await Promise.all([make(), make()]);
    expect(answers.map(({ status }) => status).sort()).toEqual([201, 409]);
  });

  test('shows its notes to those they are for', async () => {
    const peg = await aPeg(server, lake, { number: 'N1' });
    const seen = async (who: { get: (path: string) => PromiseLike<{ body: unknown }> }) => {
      const { details } = PegView.parse((await who.get(`/pegs/${peg.id}/details`)).body);
      return [details.notesPublic, details.notesMembers, details.notesStaff].map((note) => note !== '');
    };
    expect(await seen(aStranger(server))).toEqual([true, false, false]);
    expect(await seen(here.people.angler)).toEqual([true, false, false]);
    expect(await seen(here.people.member)).toEqual([true, true, false]);
    expect(await seen(here.people.bailiff)).toEqual([true, true, true]);
    expect(await seen(elsewhere.people.owner)).toEqual([true, false, false]);
  });

  test('comes with the lake’s others in walking order, each as its own page of details has it', async () => {
    const own = await aLake(server, here, { name: 'Pegs In Full' });
    const one = await aPeg(server, own, { number: '1', thetaDeg: 90 });
    const two = await aPeg(server, own, { number: '2' });
    const ids = [one.id, two.id];
    for (const who of [aStranger(server), here.people.bailiff]) {
      const { pegs } = PegList.parse((await who.get(`/lakes/${own.id}/pegs`)).body);
      expect(pegs.map(({ details }) => details.number)).toEqual(['1', '2']);
      const each = await Promise.all(ids.map((id) => who.get(`/pegs/${id}/details`)));
      expect(pegs).toEqual(each.map(({ body }) => PegView.parse(body)));
    }
    expect((await aStranger(server).get(`/lakes/${randomUUID()}/pegs`)).status).toBe(404);
  });

  test('is changed once a version, by those who may', async () => {
    const peg = await aPeg(server, lake, { number: 'C1' });
    const details = { ...peg.details, name: 'The Point' };
    const send = (who: TestFishery['people']['owner']) =>
      who.put(`/pegs/${peg.id}`).send({ details, version: 1 });
    expect((await send(here.people.bailiff)).status).toBe(403);
    expect((await send(elsewhere.people.manager)).status).toBe(404);
    const answers = await Promise.all([send(here.people.head_bailiff), send(here.people.manager)]);
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409]);
    await aPeg(server, lake, { number: 'C2' });
    const taken = { details: { ...details, number: 'C2' }, version: 2 };
    const answer = await here.people.manager.put(`/pegs/${peg.id}`).send(taken);
    expect(problem(answer.body)).toMatchObject({
      kind: 'conflict',
      title: expect.stringMatching(/has this number/),
    });
  });
});

describe('marks and boards', () => {
  test('are made, repeated and changed by their version', async () => {
    const markId = randomUUID();
    const path = `/lakes/${lake.id}/marks/${markId}`;
    const details = markDetails({ code: 'M9' });
    const make = () => here.people.head_bailiff.put(path).send({ details, version: null });
    expect((await make()).status).toBe(200);
    expect((await make()).status).toBe(200);
    const renamed = { details: { ...details, name: 'dead oak' }, version: 1 };
    const changed = LakeView.parse((await here.people.manager.put(path).send(renamed)).body);
    expect(changed.marks.find(({ id }) => id === markId)).toMatchObject({
      version: 2,
      details: { name: 'dead oak' },
    });
    expect((await here.people.manager.put(path).send(renamed)).status).toBe(409);
    const twin = await here.people.manager
      .put(`/lakes/${lake.id}/marks/${randomUUID()}`)
      .send({ details, version: null });
    expect(problem(twin.body)).toMatchObject({
      kind: 'conflict',
      title: expect.stringMatching(/has this code/),
    });
    expect((await here.people.bailiff.put(path).send(renamed)).status).toBe(403);
    expect((await elsewhere.people.owner.put(path).send(renamed)).status).toBe(404);
  });

  test('of another lake are not found under this one', async () => {
    const other = await aLake(server, elsewhere);
    const mark = await aMark(server, other);
    const board = await aBoard(server, other);
    const mine = here.people.manager;
    const asMark = { details: mark.details, version: 1 };
    const asBoard = { details: { ...board.details, isDatumBoard: false }, version: 1 };
    expect((await mine.put(`/lakes/${lake.id}/marks/${mark.id}`).send(asMark)).status).toBe(404);
    expect((await mine.put(`/lakes/${lake.id}/boards/${board.id}`).send(asBoard)).status).toBe(404);
    const anew = { ...asMark, version: null };
    expect((await mine.put(`/lakes/${lake.id}/marks/${mark.id}`).send(anew)).status).toBe(404);
  });

  test('with swapped longitude and latitude are refused', async () => {
    const details = markDetails({ code: 'SW', position: [53.6, 1.62] });
    const answer = await here.people.manager
      .put(`/lakes/${lake.id}/marks/${randomUUID()}`)
      .send({ details, version: null });
    expect(problem(answer.body).title).toMatch(/km from the lake/);
  });

  test('a second datum board is refused, and so are limits the wrong way round', async () => {
    const own = await aLake(server, here, { name: 'Two Boards' });
    const put = (id: string, body: object) =>
      here.people.manager.put(`/lakes/${own.id}/boards/${id}`).send(body);
    const first = randomUUID();
    expect((await put(first, { details: boardDetails(), version: null })).status).toBe(200);
    expect((await put(first, { details: boardDetails(), version: null })).status).toBe(200);
    const second = { details: boardDetails({ code: 'G2' }), version: null };
    expect(problem((await put(randomUUID(), second)).body)).toMatchObject({
      kind: 'conflict',
      title: expect.stringMatching(/datum/),
    });
    const turned = boardDetails({ code: 'G3', isDatumBoard: false, normalLowM: 0.7, normalHighM: 0.5 });
    expect((await put(randomUUID(), { details: turned, version: null })).status).toBe(400);
    const hung = { ...turned, higherNumberHigherWater: false, alarmHighM: null };
    expect((await put(randomUUID(), { details: hung, version: null })).status).toBe(200);
  });
});
