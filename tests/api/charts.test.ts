import { Chart } from '@mereward/db/entities/charts/chart';
import { ChartBuild } from '@mereward/db/entities/charts/chart-build';
import { buildSource } from '@mereward/api/charts/build-source';
import { LIGHT } from '@mereward/api/charts/find-chart';
import { CHART_BUILDS } from '@mereward/api/charts/jobs';
import { takeUpLost } from '@mereward/api/jobs/claimed-run';
import { makeChart } from '@mereward/api/charts/make-chart';
import { ChartList, ChartReview, ChartView } from '@mereward/shared/charts/contract';
import { ProblemBody } from '@mereward/shared/problems/problem';
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { draftedChart } from '../support/charts';
import { aSurveyGround } from '../support/grounds';
import { aStranger, type Person } from '../support/people';
import type { TestServer } from '../support/server';
import {
  aCastBody,
  aLongWater,
  aSurvey,
  closedVisit,
  keptCast,
  openedVisit,
  type TestWater,
} from '../support/surveys';
import type { TestFishery } from '../support/waters';

let server: TestServer;
let here: TestFishery;
let elsewhere: TestFishery;
let water: TestWater;
let surveyVisit: string;
let joan: Person;

beforeAll(async () => {
  ({ server, here, elsewhere, water, joan } = await aSurveyGround());
  surveyVisit = await aSurvey(joan, water);
});
afterAll(() => server.close());

const problem = (body: unknown) => ProblemBody.parse(body);
const review = async (id: string, person = joan) =>
  ChartReview.parse((await person.get(`/charts/${id}/review`)).body);
const buildOf = (id: string) => server.server.source.manager.findOneByOrFail(ChartBuild, { chartId: id });
const rowOf = (id: string) =>
  server.server.source.manager.findOneOrFail(Chart, { where: { id }, select: LIGHT });
/** Every byte of a chart's row, or of some columns of it, as a digest. */
async function digestOf(id: string, columns = 'c'): Promise<string> {
  const rows = await server.server.source.query(
    `SELECT md5((${columns})::text) AS digest FROM chart c WHERE id = $1`,
    [id],
  );
  return rows[0].digest;
}
const drafting = (wishes: Partial<Parameters<typeof draftedChart>[1]> = {}) =>
  draftedChart(server, { person: joan, lakeId: water.lake.id, visitIds: [surveyVisit], ...wishes });

describe('a draft', () => {
  const path = () => `/lakes/${water.lake.id}/charts`;
  const body = (wishes: object = {}) => ({
    id: randomUUID(),
    title: 'Spring',
    visitIds: [surveyVisit],
    contourStepM: 0.5,
    ...wishes,
  });

  test('is made with its build queued, and built by the job with every figure', async () => {
    const id = await drafting();
    const { chart, quality, may, checks } = await review(id);
    expect(chart).toMatchObject({
      status: 'draft',
      version: null,
      surveyedFrom: '2027-04-03',
      build: { state: 'done', share: 1 },
    });
    expect(quality?.soundings).toBeGreaterThan(50);
    expect(checks.filter(({ state }) => state === 'failed')).toEqual([]);
    expect(may).toMatchObject({
      submit: true,
      approve: false,
      rebuild: true,
      discard: true,
      withdraw: false,
    });
    const view = ChartView.parse((await joan.get(`/charts/${id}`)).body);
    expect(view.isobaths?.length).toBeGreaterThan(3);
    expect(view.soundings?.length).toBe(72);
  });

  test('sent twice at once is made once', async () => {
    const sent = body();
    const answers = await Promise.all([joan.post(path()).send(sent), joan.post(path()).send(sent)]);
    expect(answers.map(({ status }) => status)).toEqual([202, 202]);
    expect((await joan.post(path()).send({ ...sent, title: 'Other' })).status).toBe(409);
    expect(await server.settle()).toBeGreaterThan(0);
    await joan.delete(`/charts/${sent.id}`);
  });

  test('is refused to others, and with visits that are not this lake’s', async () => {
    const foreign = await openedVisit(elsewhere.people.manager, await aLongWater(server, elsewhere));
    const answer = await joan.post(path()).send(body({ visitIds: [surveyVisit, foreign] }));
    expect(answer.status).toBe(400);
    expect(problem(answer.body).errors).toHaveLength(1);
    expect(
      problem((await joan.post(path()).send(body({ contourStepM: 0.7 }))).body).errors?.[0]?.pointer,
    ).toBe('/contourStepM');
    for (const person of [here.people.bailiff, here.people.owner, here.people.member])
      expect((await person.post(path()).send(body())).status).toBe(403);
    expect((await elsewhere.people.manager.post(path()).send(body())).status).toBe(404);
    expect((await aStranger(server).post(path()).send(body())).status).toBe(401);
  });

  test('is seen by staff alone', async () => {
    const id = await drafting({ settle: false });
    for (const at of [`/charts/${id}`, `/charts/${id}/geojson`]) {
      expect((await here.people.bailiff.get(at)).status).toBe(200);
      for (const reader of [
        here.people.member,
        here.people.angler,
        elsewhere.people.manager,
        aStranger(server),
      ])
        expect((await reader.get(at)).status).toBe(404);
    }
    expect((await here.people.member.get(`/charts/${id}/review`)).status).toBe(403);
    expect((await elsewhere.people.manager.get(`/charts/${id}/review`)).status).toBe(404);
    expect((await aStranger(server).get(`/charts/${id}/review`)).status).toBe(401);
    const listed = async (reader: { get: Person['get'] }) =>
      ChartList.parse((await reader.get(path())).body).charts.some((chart) => chart.id === id);
    expect([await listed(joan), await listed(here.people.member), await listed(aStranger(server))]).toEqual([
      true,
      false,
      false,
    ]);
    await joan.delete(`/charts/${id}`);
  });

  test('is discarded by its builders and leaves its visits', async () => {
    const id = await drafting({ settle: false });
    expect((await here.people.bailiff.delete(`/charts/${id}`)).status).toBe(403);
    expect((await elsewhere.people.manager.delete(`/charts/${id}`)).status).toBe(404);
    expect((await joan.delete(`/charts/${id}`)).status).toBe(204);
    expect((await joan.delete(`/charts/${id}`)).status).toBe(404);
    expect((await joan.get(`/visits/${surveyVisit}`)).status).toBe(200);
  });
});

describe('a build', () => {
  test('tells each step in words and a share that only rises, to the end', async () => {
    const chart = {
      id: randomUUID(),
      lakeId: water.lake.id,
      visitIds: [surveyVisit],
      contourStepM: 0.5,
      draftedAt: new Date('2027-04-03T12:00:00Z'),
    };
    const told: { step: string; share: number }[] = [];
    makeChart(await buildSource(server.server.source.manager, chart), (step, share) =>
      told.push({ step, share }),
    );
    const shares = told.map(({ share }) => share);
    expect(shares).toEqual([...shares].sort((a, b) => a - b));
    expect(shares.at(-1)).toBe(1);
    expect(new Set(told.map(({ step }) => step)).size).toBeGreaterThan(4);
  });

  test('of the same casts gives the same chart to the byte', async () => {
    const [one, other] = [await drafting(), await drafting()];
    const made = 'c.input_sha256, c.frame, c.depth, c.sigma, c.substrate, c.cover, c.built';
    expect(await digestOf(one, made)).toBe(await digestOf(other, made));
    expect((await rowOf(one)).inputSha256).toHaveLength(32);
  });

  test('that can’t be made says why in words for the surveyor', async () => {
    const visitId = await openedVisit(joan, water);
    await keptCast({ person: joan, water, visitId }, {});
    await closedVisit({ person: joan, visitId });
    const id = await drafting({ visitIds: [visitId] });
    const { chart, may } = await review(id);
    expect(chart.build).toMatchObject({ state: 'failed', error: expect.stringMatching(/needs at least 12/) });
    expect(may).toMatchObject({ submit: false, rebuild: true });
  });

  test('waiting for its turn is cancelled at once, and does nothing when its turn comes', async () => {
    const id = await drafting({ settle: false });
    const answer = await joan.post(`/charts/${id}/cancel-build`);
    expect(ChartReview.parse(answer.body).chart.build).toMatchObject({ state: 'cancelled' });
    await server.settle();
    expect((await buildOf(id)).state).toBe('cancelled');
    expect((await rowOf(id)).builtAt).toBeNull();
    expect((await joan.post(`/charts/${id}/cancel-build`)).status).toBe(409);
    const again = await joan.post(`/charts/${id}/rebuild`);
    expect(ChartReview.parse(again.body).chart.build).toMatchObject({ state: 'queued' });
    expect((await joan.post(`/charts/${id}/rebuild`)).status).toBe(409);
    await server.settle();
    expect((await buildOf(id)).state).toBe('done');
  });

  test('under way is stopped by cancelling and leaves nothing', async () => {
    const id = await drafting({ settle: false });
    const done = server.settle();
    await until(async () => (await buildOf(id)).state === 'running');
    expect((await joan.post(`/charts/${id}/cancel-build`)).status).toBe(200);
    await done;
    expect((await buildOf(id)).state).toBe('cancelled');
    expect((await rowOf(id)).builtAt).toBeNull();
  });

  test('whose process died is taken up again, and the dead one’s run writes nothing', async () => {
    const id = await drafting({ settle: false });
    const { source, jobs } = server.server;
    await source.query(
      `UPDATE chart_build SET attempt = $2, state = 'running', tries = 1, updated_at = now() - interval '1 minute' WHERE chart_id = $1`,
      [id, randomUUID()],
    );
    await server.settle(); // the job of the run that died finds another attempt and lets be
    expect((await buildOf(id)).state).toBe('running');
    expect(await takeUpLost({ source, jobs }, CHART_BUILDS)).toBe(1);
    expect(await takeUpLost({ source, jobs }, CHART_BUILDS)).toBe(0);
    await server.settle();
    expect((await buildOf(id)).state).toBe('done');
  });

  test('that takes the process down time after time is given up', async () => {
    const id = await drafting({ settle: false });
    const { source, jobs } = server.server;
    await source.query(
      `UPDATE chart_build SET state = 'running', tries = 3, updated_at = now() - interval '1 minute' WHERE chart_id = $1`,
      [id],
    );
    await takeUpLost({ source, jobs }, CHART_BUILDS);
    expect(await buildOf(id)).toMatchObject({
      state: 'failed',
      error: expect.stringMatching(/cut short 3 times/),
    });
    await server.settle();
    expect((await buildOf(id)).state).toBe('failed');
  });

  test('is asked for and cancelled by builders only', async () => {
    const id = await drafting({ settle: false });
    for (const deed of ['rebuild', 'cancel-build', 'submit']) {
      expect((await here.people.owner.post(`/charts/${id}/${deed}`)).status).toBe(403);
      expect((await elsewhere.people.manager.post(`/charts/${id}/${deed}`)).status).toBe(404);
      expect((await aStranger(server).post(`/charts/${id}/${deed}`)).status).toBe(401);
    }
    await joan.delete(`/charts/${id}`);
  });
});

async function until(holds: () => Promise<boolean>): Promise<void> {
  for (let i = 0; i < 400; i++) {
    if (await holds()) return;
    await new Promise((again) => setTimeout(again, 25));
  }
  throw new Error('It never came to be');
}

describe('the checks', () => {
  test('stand against a cast that falls off the water, and say how far', async () => {
    const visitId = await openedVisit(joan, water);
    await keptCast({ person: joan, water, visitId }, { wrapsWhole: 35, lineText: '35 + 0' });
    await closedVisit({ person: joan, visitId });
    const id = await drafting({ visitIds: [surveyVisit, visitId] });
    const { checks, may } = await review(id);
    const failed = checks.filter(({ state }) => state === 'failed');
    expect(failed).toHaveLength(1);
    expect(failed[0]).toMatchObject({ key: 'casts_reduced', blocks: true });
    expect(failed[0]?.words).toMatch(
      /Cast 1 \(FO7\): The spot falls beyond the far bank: .* m outside the water/,
    );
    expect(may.submit).toBe(false);
    const answer = await joan.post(`/charts/${id}/submit`);
    expect(answer.status).toBe(409);
    expect(problem(answer.body).detail).toMatch(/outside the water/);
  });

  test('stand against visits without consent, without a last reading, and against a chart older than its casts', async () => {
    const kept = await openedVisit(joan, water, { consentToPublish: false });
    const id = await drafting({ visitIds: [surveyVisit, kept] });
    const failed = async () =>
      (await review(id)).checks.filter(({ state }) => state === 'failed').map(({ key }) => key);
    expect(await failed()).toEqual(['consent', 'levels_read']);
    await joan.post(`/visits/${kept}/casts`).send(aCastBody(water));
    expect(await failed()).toEqual(['built', 'consent', 'levels_read']);
    expect((await joan.post(`/charts/${id}/submit`)).status).toBe(409);
  });
});
