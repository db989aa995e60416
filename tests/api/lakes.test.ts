import { OutlineRead, LakeView, LevelRecorded, PegView } from '@mereward/shared/lakes/contract';
import { ProblemBody } from '@mereward/shared/problems/problem';
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { aStranger } from '../support/people';
import { aServer, type TestServer } from '../support/server';
import {
  aBoard,
  aFishery,
  aLake,
  aMark,
  aPeg,
  boardDetails,
  lakeDetails,
  lakeOutline,
  markDetails,
  pegDetails,
  type TestFishery,
  type TestLake,
} from '../support/waters';

let server: TestServer;
let here: TestFishery;
let elsewhere: TestFishery;
let lake: TestLake;

beforeAll(async () => {
  server = await aServer();
  here = await aFishery(server);
  elsewhere = await aFishery(server, { name: 'Upper Sallow' });
  lake = await aLake(server, here);
});
afterAll(() => server.close());

const problem = (body: unknown) => ProblemBody.parse(body);

describe('a lake', () => {
  const path = () => `/fisheries/${here.id}/lakes`;

  test('is made by the owner with its area and the origin of its plane', async () => {
    const id = randomUUID();
    const answer = await here.people.owner
      .post(path())
      .send({ id, details: lakeDetails({ name: 'Short Wend' }) });
    expect(answer.status).toBe(201);
    const view = LakeView.parse(answer.body);
    expect(view).toMatchObject({ id, fisheryId: here.id, version: 1, pegs: [], levelNow: null });
    expect(view.areaM2).toBeGreaterThan(15_000);
    expect(view.areaM2).toBeLessThan(20_000);
    expect(view.may).toMatchObject({ change: true, changePegs: true, survey: false, approveCharts: true });
  });

  test('sent twice with the same id is made once', async () => {
    const made = { id: randomUUID(), details: lakeDetails({ name: 'Twice Sent' }) };
    const answers = await Promise.all([
      here.people.manager.post(path()).send(made),
      here.people.manager.post(path()).send(made),
    ]);
    expect(answers.map(({ status }) => status)).toEqual([201, 201]);
    const other = { ...made, details: lakeDetails({ name: 'Another Content' }) };
    const refused = await here.people.manager.post(path()).send(other);
    expect(problem(refused.body)).toMatchObject({ status: 409, kind: 'conflict' });
    const theirs = await elsewhere.people.owner.post(`/fisheries/${elsewhere.id}/lakes`).send(made);
    expect(theirs.status).toBe(404);
  });

  test('of two with one name at the same fishery exactly one is made', async () => {
    const make = () =>
      here.people.owner.post(path()).send({ id: randomUUID(), details: lakeDetails({ name: 'One Name' }) });
    const answers = await Promise.all([make(), make()]);
    expect(answers.map(({ status }) => status).sort()).toEqual([201, 409]);
  });

  test('is refused to a stranger, to a bailiff, to another fishery, and in a fishery there is none of', async () => {
    const body = { id: randomUUID(), details: lakeDetails({ name: 'Never Made' }) };
    expect((await aStranger(server).post(path()).send(body)).status).toBe(401);
    expect((await here.people.bailiff.post(path()).send(body)).status).toBe(403);
    expect((await elsewhere.people.owner.post(path()).send(body)).status).toBe(404);
    expect((await here.people.owner.post(`/fisheries/${randomUUID()}/lakes`).send(body)).status).toBe(404);
  });

  test('with a shore that crosses itself is refused with the place of the crossing', async () => {
    const outline = lakeOutline();
    const shore = [...(outline.coordinates[0] ?? [])];
    const [tenth, fortieth] = [shore[10], shore[40]];
    if (!tenth || !fortieth) throw new Error('the test shore is too short');
    shore[10] = fortieth;
    shore[40] = tenth;
    const details = lakeDetails({ name: 'Knotted', outline: { ...outline, coordinates: [shore] } });
    const answer = await here.people.owner.post(path()).send({ id: randomUUID(), details });
    expect(answer.status).toBe(400);
    expect(problem(answer.body).errors?.[0]).toMatchObject({ pointer: '/details/outline' });
    expect(problem(answer.body).title).toMatch(/crosses or touches itself.*° N, .*° E/);
  });

  test('drawn the wrong way round and left open is mended, and its repeat is still a repeat', async () => {
    const outline = lakeOutline();
    const shore = (outline.coordinates[0] ?? []).slice(0, -1).reverse();
    const details = lakeDetails({ name: 'Backwards', outline: { ...outline, coordinates: [shore] } });
    const id = randomUUID();
    const answer = await here.people.owner.post(path()).send({ id, details });
    const kept = LakeView.parse(answer.body).details.outline.coordinates[0] ?? [];
    expect(kept[0]).toEqual(kept.at(-1));
    expect(kept).toHaveLength(shore.length + 1);
    expect((await here.people.owner.post(path()).send({ id, details })).status).toBe(201);
  });

  test('changed keeps the origin of its plane, and a stale version is refused', async () => {
    const before = LakeView.parse((await aStranger(server).get(`/lakes/${lake.id}`)).body);
    const moved = lakeOutline();
    const shore = (moved.coordinates[0] ?? []).map(([lon, lat]): [number, number] => [lon + 0.002, lat]);
    const details = { ...before.details, outline: { ...moved, coordinates: [shore] }, datumM: 0.5 };
    const answer = await here.people.manager
      .put(`/lakes/${lake.id}`)
      .send({ details, version: before.version });
    const after = LakeView.parse(answer.body);
    expect(after.origin).toEqual(before.origin);
    expect(after.version).toBe(before.version + 1);
    expect(after.details.datumM).toBe(0.5);
    const stale = await here.people.owner.put(`/lakes/${lake.id}`).send({ details, version: before.version });
    expect(problem(stale.body)).toMatchObject({ kind: 'conflict', title: 'Someone changed this meanwhile' });
    const back = { details: before.details, version: after.version };
    expect((await here.people.owner.put(`/lakes/${lake.id}`).send(back)).status).toBe(200);
  });

  test('of two changes of one version exactly one is kept', async () => {
    const { details, version } = LakeView.parse((await aStranger(server).get(`/lakes/${lake.id}`)).body);
    const change = (phoneSignal: string) =>
      here.people.owner.put(`/lakes/${lake.id}`).send({ details: { ...details, phoneSignal }, version });
    const answers = await Promise.all([change('one bar'), change('two bars')]);
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409]);
  });

  test('is changed by no head bailiff, no other fishery and no stranger', async () => {
    const body = { details: lake.details, version: 1 };
    expect((await here.people.head_bailiff.put(`/lakes/${lake.id}`).send(body)).status).toBe(403);
    expect((await elsewhere.people.owner.put(`/lakes/${lake.id}`).send(body)).status).toBe(404);
    expect((await aStranger(server).put(`/lakes/${lake.id}`).send(body)).status).toBe(401);
    expect((await here.people.owner.put(`/lakes/not-an-id`).send(body)).status).toBe(404);
  });

  test('that is sent half names every missing field', async () => {
    const { name: _, datumM: __, ...half } = lakeDetails();
    const answer = await here.people.owner.post(path()).send({ id: randomUUID(), details: half });
    const pointers = problem(answer.body).errors?.map(({ pointer }) => pointer);
    expect(pointers).toEqual(expect.arrayContaining(['/details/name', '/details/datumM']));
  });
});

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

describe('an outline file', () => {
  const read = (text: string) => here.people.owner.post('/outlines/read').send({ filename: 'lake', text });

  test('of GeoJSON is read to an outline and its area', async () => {
    const answer = OutlineRead.parse((await read(JSON.stringify(lakeOutline()))).body);
    expect(answer.findings).toEqual([]);
    expect(answer.outline?.coordinates).toHaveLength(2);
    expect(answer.areaM2).toBeGreaterThan(15_000);
  });

  test('of a GPX walk round the water is closed, with an island inside it', async () => {
    const segment = (ring: [number, number][]) =>
      `<trkseg>${ring.map(([lon, lat]) => `<trkpt lat="${lat}" lon="${lon}"/>`).join('')}</trkseg>`;
    const [shore = [], island = []] = lakeOutline().coordinates;
    const gpx = `<gpx version="1.1" creator="t"><trk>${segment(island)}${segment(shore.slice(0, -1))}</trk></gpx>`;
    const answer = OutlineRead.parse((await read(gpx)).body);
    expect(answer.outline?.coordinates).toHaveLength(2);
    expect(answer.findings.map(({ words }) => words).join('\n')).toMatch(/islands.*\n.*was not closed/s);
  });

  test('asks a stranger to sign in', async () => {
    const answer = await aStranger(server).post('/outlines/read').send({ filename: 'a', text: '{}' });
    expect(answer.status).toBe(401);
  });
});
