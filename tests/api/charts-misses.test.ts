import { ChartReview } from '@mereward/shared/charts/contract';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { draftedChart } from '../support/charts';
import { aServer, type TestServer } from '../support/server';
import { aLongWater, aSurvey, closedVisit, keptCast, openedVisit, type TestWater } from '../support/surveys';
import { aFishery, type TestFishery } from '../support/waters';

let server: TestServer;
let here: TestFishery;
let water: TestWater;
let slipId: string;
let slipVisit: string;
let chartId: string;

beforeAll(async () => {
  server = await aServer();
  server.setNow('2027-04-03T12:00:00Z');
  here = await aFishery(server, { name: 'Ostlemere Waters' });
  water = await aLongWater(server, here);
  const joan = here.people.head_bailiff;
  const visitId = await aSurvey(joan, water);
  slipVisit = await openedVisit(joan, water, { title: 'One cast more' });
  // Twice the pulls the fan counted round about.
  const slip = await keptCast(
    { person: joan, water, visitId: slipVisit },
    {
      aim: { by: 'mark', markId: water.mark.id, offsetDeg: 1 },
      wrapsWhole: 13,
      lineText: '13 + 0',
      pulls: 14,
    },
  );
  slipId = slip.id;
  await closedVisit({ person: joan, visitId: slipVisit });
  chartId = await draftedChart(server, {
    person: joan,
    lakeId: water.lake.id,
    visitIds: [visitId, slipVisit],
  });
});
afterAll(() => server.close());

const review = async () =>
  ChartReview.parse((await here.people.manager.get(`/charts/${chartId}/review`)).body);

test('a slipped count is flagged with its cast, its place and by how much, and stays in the chart', async () => {
  const { quality, misses, may } = await review();
  expect(quality?.flagged).toContain(slipId);
  const slip = misses.find(({ id }) => id === slipId);
  expect(slip).toMatchObject({
    flagged: true,
    visitId: slipVisit,
    visitTitle: 'One cast more',
    castNumber: 1,
    pegNumber: 'FO7',
    bearingDeg: expect.closeTo(1, 0),
  });
  expect(slip!.rangeM).toBeCloseTo(13 * 3.6576, 2);
  expect(slip!.errorM).toBeLessThan(-1);
  expect(slip!.foretoldM).toBeCloseTo(slip!.depthM + slip!.errorM, 9);
  expect(quality?.soundings).toBeGreaterThan(50);
  expect(may.submit).toBe(true); // a person weighs it: it doesn't stand against publishing
});

test('the misses come worst first and hold the flagged and the worst ten', async () => {
  const { quality, misses } = await review();
  const sigmas = misses.map(({ standardised }) => standardised);
  expect(sigmas).toEqual([...sigmas].sort((a, b) => b - a));
  const ids = misses.map(({ id }) => id);
  expect(ids).toEqual(expect.arrayContaining([...quality!.flagged, ...quality!.worst.map(({ id }) => id)]));
});
