import { chartContent, layersOf } from '@mereward/api/charts/chart-layers';
import { readChart } from '@mereward/shared/charts/chart-reading';
import { ChartReview, ChartView, PegPageView } from '@mereward/shared/charts/contract';
import { pointAlong, toPlane, fromPlane } from '@mereward/shared/geometry/plane';
import { USUAL_FEEL } from '@mereward/shared/surveys/usual-feel';
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { draftedChart, publishedChart } from '../support/charts';
import { aFan, castsFile } from '../support/long-water';
import { aStranger, type Person } from '../support/people';
import { aServer, type TestServer } from '../support/server';
import { aLongWater, closedVisit, keptCast, openedVisit, type TestWater } from '../support/surveys';
import { aFishery, type TestFishery } from '../support/waters';

let server: TestServer;
let here: TestFishery;
let water: TestWater;
let joan: Person;
let manager: Person;
let visitId: string;
let snags: string[];

beforeAll(async () => {
  server = await aServer();
  server.setNow('2027-04-03T12:00:00Z');
  here = await aFishery(server, { name: 'Ostlemere Waters' });
  water = await aLongWater(server, here);
  joan = here.people.head_bailiff;
  manager = here.people.manager;
  visitId = await openedVisit(joan, water);
  const file = { filename: 'fan.csv', text: castsFile(aFan()), mapping: null };
  await joan.post(`/visits/${visitId}/imports`).send(file);
  const stop = {
    drop: 'firm_thud',
    drag: 'solid_stop',
    cameBack: ['twig'],
    wrapsWhole: 11,
    lineText: '11 + 0',
  } as const;
  const stops = [0, 1].map(() =>
    keptCast(
      { person: joan, water, visitId },
      { ...stop, cameBack: ['twig'], pulls: null, floatSight: null },
    ),
  );
  snags = (await Promise.all(stops)).map(({ id }) => id);
  await closedVisit({ person: joan, visitId });
});
afterAll(() => server.close());

const lake = () => water.lake.id;
const drafting = () => draftedChart(server, { person: joan, lakeId: lake(), visitIds: [visitId] });
const review = async (id: string) => ChartReview.parse((await joan.get(`/charts/${id}/review`)).body);
const view = async (id: string, person: { get: Person['get'] } = joan) =>
  ChartView.parse((await person.get(`/charts/${id}`)).body);
const builtOf = async (id: string) => (await chartContent(server.server.source.manager, id))?.built;
const stateOf = async (id: string, key: string) =>
  (await review(id)).checks.find((check) => check.key === key)?.state;

/** A place out from the peg, on the lake's plane and in degrees. */
function outFromPeg(bearingDeg: number, rangeM: number) {
  const point = pointAlong(toPlane(water.lake.origin, water.peg.details.origin), bearingDeg, rangeM);
  const [lon, lat] = fromPlane(water.lake.origin, point);
  return { point, position: [lon, lat] as [number, number] };
}
function boxAbout(bearingDeg: number, rangeM: number, halfM: number) {
  const { point } = outFromPeg(bearingDeg, rangeM);
  const corners = [
    [-halfM, -halfM],
    [halfM, -halfM],
    [halfM, halfM],
    [-halfM, halfM],
    [-halfM, -halfM],
  ].map(([dx = 0, dy = 0]) => {
    const [lon, lat] = fromPlane(water.lake.origin, { xM: point.xM + dx, yM: point.yM + dy });
    return [lon, lat];
  });
  return { type: 'Polygon', coordinates: [corners] };
}
const happened = (wishes: object) =>
  joan.post(`/lakes/${lake()}/bottom-events`).send({
    id: randomUUID(),
    kind: 'other',
    area: null,
    happenedOn: '2027-04-03',
    ends: ['cover'],
    note: '',
    ...wishes,
  });

describe('casts that read no depth', () => {
  test('are points of the chart and evidence of its bottom, snags among them', async () => {
    const id = await drafting();
    const built = await builtOf(id);
    expect(built?.points.map((point) => point.id).sort()).toEqual([...snags].sort());
    expect(built?.points.every(({ bottom, grade }) => bottom === 'snag' && grade === 'C')).toBe(true);
    expect(built?.leftOut).toEqual([]);
    const { quality } = await review(id);
    expect(quality?.bottom?.cover.casts).toBe(72 + 2);
    expect(quality?.bottom?.cover.logScore).toBeGreaterThan(quality?.bottom?.cover.evenLogScore ?? 0);
    const { bottomPoints } = await view(id);
    expect(bottomPoints?.map(({ bottom }) => bottom)).toEqual(['snag', 'snag']);
    const { features } = (await joan.get(`/charts/${id}/geojson`)).body;
    const felt = features.filter(
      ({ id: each }: { id?: string }) => each !== undefined && snags.includes(each),
    );
    expect(felt).toHaveLength(2);
    expect(felt[0].properties.depth_at_datum_m).toBeNull();
  });
});

describe('a confirmed bottom', () => {
  test('outweighs the casts about it, and the chart has to be built again for it', async () => {
    const id = await drafting();
    const { point, position } = outFromPeg(30, 62);
    const before = await chartContent(server.server.source.manager, id);
    expect(before && readChart(layersOf(before), point).substrate?.bottom).toBe('silt');
    const confirmed = {
      id: randomUUID(),
      castId: null,
      position,
      positionSigmaM: 0.5,
      substrate: 'clay',
      cover: null,
      method: 'drain_down',
      day: '2027-04-03',
      note: '',
    };
    expect((await joan.post(`/lakes/${lake()}/confirmed-bottoms`).send(confirmed)).status).toBe(201);
    expect(await stateOf(id, 'built')).toBe('failed');
    await joan.post(`/charts/${id}/rebuild`);
    await server.settle();
    expect(await stateOf(id, 'built')).toBe('passed');
    const after = await chartContent(server.server.source.manager, id);
    expect(after && readChart(layersOf(after), point).substrate?.bottom).toBe('clay');
    await joan.delete(`/confirmed-bottoms/${confirmed.id}`);
  });
});

describe('the table of feels', () => {
  test('that a chart was made with is kept with it', async () => {
    const path = `/fisheries/${here.id}/bottom-table`;
    const feel = structuredClone(USUAL_FEEL);
    feel.fadeMonths = { low_weed: 1, tall_weed: 1, leaf_litter: 1 };
    await manager.post(path).send({ id: randomUUID(), after: 0, feel, reason: 'Weed dies back soon here' });
    const id = await drafting();
    expect((await review(id)).bottomTable).toBe(1);
    await manager.post(path).send({ id: randomUUID(), after: 1, feel: null, reason: 'Back' });
    expect(await stateOf(id, 'built')).toBe('failed');
    expect((await review(id)).bottomTable).toBe(1);
  });
});

describe('an event after the survey', () => {
  let chartId: string;
  beforeAll(async () => {
    chartId = await publishedChart(server, {
      person: joan,
      approver: here.people.owner,
      lakeId: lake(),
      visitIds: [visitId],
    });
    server.setNow('2027-06-10T12:00:00Z');
  });

  test('dates the published chart with its name and day, for strangers too, and drops the grades it touches', async () => {
    const before = await view(chartId);
    expect(before.age).toBe('current');
    const answer = await happened({
      kind: 'snag_removed',
      area: boxAbout(0, 40, 6),
      happenedOn: '2027-06-01',
    });
    expect(answer.status).toBe(201);
    const after = await view(chartId);
    expect(after.age).toBe('changed');
    expect(after.changes?.map(({ words }) => words)).toEqual([
      'A snag was taken out in part of the lake on 1 Jun 2027',
    ]);
    const stranger = await view(chartId, aStranger(server));
    expect(stranger.age).toBe('changed');
    expect(JSON.stringify(stranger.changes)).not.toContain('The head bailiff');
    const page = PegPageView.parse((await aStranger(server).get(`/pegs/${water.peg.id}/page`)).body);
    expect(page.chart?.age).toBe('changed');
    expect(page.cautions.join(' ')).toContain('a snag was taken out in part of the lake on 1 Jun 2027');
    const gradesIn = (chart: ChartView) => new Map(chart.soundings?.map(({ id, grade }) => [id, grade]));
    const was = gradesIn(before);
    const dropped = (after.soundings ?? []).filter(({ id, grade }) => grade !== was.get(id));
    const box = outFromPeg(0, 40).point;
    expect(dropped.length).toBeGreaterThan(0);
    for (const { xM, yM } of dropped) {
      expect(Math.abs(xM - box.xM)).toBeLessThanOrEqual(6.1);
      expect(Math.abs(yM - box.yM)).toBeLessThanOrEqual(6.1);
    }
  });

  test('ends what was felt there in the next chart, and a snag it took out is not shown as cast over', async () => {
    const id = await drafting();
    const built = await builtOf(id);
    expect(built?.ended).toMatchObject([
      { words: expect.stringMatching(/snag was taken out/), substrate: 0, depth: 0 },
    ]);
    expect(built?.ended[0]?.cover).toBeGreaterThan(2);
    expect(built?.points.map(({ bottom }) => bottom)).toEqual(['unknown', 'unknown']);
    const checks = (await review(id)).checks;
    expect(checks.find(({ key }) => key === 'snags_carried')).toMatchObject({ state: 'warning' });
  });

  test('that ends depths leaves the soundings in its area out, with the reason, and no others', async () => {
    const whole = await builtOf(await drafting());
    await happened({
      kind: 'dredged',
      area: boxAbout(0, 58, 8),
      happenedOn: '2027-06-02',
      ends: ['depth', 'cover', 'substrate'],
    });
    const built = await builtOf(await drafting());
    const box = outFromPeg(0, 58).point;
    const inside = (whole?.soundings ?? []).filter(
      ({ xM, yM }) => Math.abs(xM - box.xM) <= 8 && Math.abs(yM - box.yM) <= 8,
    );
    expect(inside.length).toBeGreaterThan(0);
    expect(built?.leftOut.map(({ id }) => id).sort()).toEqual(inside.map(({ id }) => id).sort());
    expect(built?.leftOut[0]?.why).toBe(
      'Its depth was read before: the bed was dredged in part of the lake on 2 Jun 2027.',
    );
    expect(built?.soundings).toHaveLength((whole?.soundings.length ?? 0) - inside.length);
  });

  test('that ends every depth leaves nothing to chart, and says so', async () => {
    await happened({ kind: 'dredged', happenedOn: '2027-06-03', ends: ['depth'] });
    const id = await drafting();
    const { chart } = await review(id);
    expect(chart.build).toMatchObject({ state: 'failed', error: expect.stringMatching(/Only 0 casts/) });
  });
});
