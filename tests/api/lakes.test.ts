import { OutlineRead, LakeView } from '@mereward/shared/lakes/contract';
import { ProblemBody } from '@mereward/shared/problems/problem';
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { aLakeGround } from '../support/grounds';
import { aStranger } from '../support/people';
import type { TestServer } from '../support/server';
import { lakeDetails, lakeOutline } from '../support/water-details';
import { aLake, type TestFishery, type TestLake } from '../support/waters';

let server: TestServer;
let here: TestFishery;
let elsewhere: TestFishery;
let lake: TestLake;

beforeAll(async () => {
  ({ server, here, elsewhere, lake } = await aLakeGround());
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

  test('changed in datum and outline leaves its published chart as it was', async () => {
    const own = await aLake(server, here, { name: 'Charted' });
    const { source } = server.server;
    const chartId = randomUUID();
    await source.query(
      `INSERT INTO chart (id, lake_id, title, visit_ids, contour_step_m, status, version, datum_m, built, frame, depth,
                          drafted_by, drafted_at, submitted_by, submitted_at, approved_by, published_at)
       VALUES ($1, $2, 'Spring', ARRAY[gen_random_uuid()], 0.5, 'published', '2027.1', 0.62, '{}', '{}', '\\x00',
               $3, now(), $3, now(), $4, now())`,
      [chartId, own.id, here.people.head_bailiff.id, here.people.manager.id],
    );
    const chart = () => source.query('SELECT * FROM chart WHERE id = $1', [chartId]);
    const before = await chart();
    const outline = { ...own.details.outline, coordinates: own.details.outline.coordinates.slice(0, 1) };
    const details = { ...own.details, outline, datumM: 0.4 };
    const answer = await here.people.owner.put(`/lakes/${own.id}`).send({ details, version: 1 });
    expect(LakeView.parse(answer.body).publishedChart).toEqual({ id: chartId, version: '2027.1' });
    expect(await chart()).toEqual(before);
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
