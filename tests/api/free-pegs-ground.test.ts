import { Lake } from '@mereward/db/entities/lakes/lake';
import { FreePegs } from '@mereward/shared/bookings/availability-contract';
import { VisitWithCasts } from '@mereward/shared/surveys/contract';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { publishedChart } from '../support/charts';
import { aSurveyGround } from '../support/grounds';
import { aStranger, type Asker, type Person } from '../support/people';
import type { TestServer } from '../support/server';
import { aSurvey, type TestWater } from '../support/surveys';
import type { TestFishery } from '../support/waters';

let server: TestServer;
let here: TestFishery;
let water: TestWater;
let joan: Person;
let deepestCastM: number;

beforeAll(async () => {
  ({ server, here, water, joan } = await aSurveyGround());
  const visitId = await aSurvey(joan, water);
  const { casts } = VisitWithCasts.parse((await joan.get(`/visits/${visitId}`)).body);
  deepestCastM = Math.max(
    ...casts.flatMap(({ reduced }) => (reduced.ok ? [reduced.sounding.depthM ?? 0] : [])),
  );
  const approver = here.people.manager;
  await publishedChart(server, { person: joan, approver, lakeId: water.lake.id, visitIds: [visitId] });
});
afterAll(() => server.close());

async function pegFor(reader: Asker, filters = '') {
  const answer = await reader.get(`/fisheries/${here.id}/free?day=2027-07-17${filters}`);
  expect(answer.status).toBe(200);
  return FreePegs.parse(answer.body).pegs.find(({ pegId }) => pegId === water.peg.id);
}

async function setAudiences(change: Partial<Lake['details']['audiences']>): Promise<void> {
  const { manager } = server.server.source;
  const { id, details } = await manager.findOneByOrFail(Lake, { id: water.lake.id });
  await manager.update(
    Lake,
    { id },
    { details: { ...details, audiences: { ...details.audiences, ...change } } },
  );
}

test('a peg tells how deep its water is and what lies on its bottom, as far as the reader sees the chart', async () => {
  const stranger = aStranger(server);
  await setAudiences({ depth: 'public', bottom: 'public' });
  const ground = (await pegFor(stranger))?.ground;
  expect(ground?.shallowestM).toBeGreaterThanOrEqual(0);
  // The surface is drawn through the casts with their errors, so it need not reach the deepest to the centimetre.
  expect(Math.abs((ground?.deepestM ?? 0) - deepestCastM)).toBeLessThan(0.5);
  expect(ground?.bottoms.length).toBeGreaterThan(0);
  await setAudiences({ bottom: 'ticket' });
  expect((await pegFor(stranger))?.ground).toEqual({ ...ground, bottoms: [] });
  expect((await pegFor(here.people.bailiff))?.ground).toEqual(ground);
  await setAudiences({ depth: 'staff' });
  expect((await pegFor(stranger))?.ground).toBeNull();
});

test('a filter on depth or bottom finds nothing for those who may not see it', async () => {
  await setAudiences({ depth: 'public', bottom: 'public' });
  const stranger = aStranger(server);
  const { deepestM = 0, bottoms = [] } = (await pegFor(stranger))?.ground ?? {};
  expect(await pegFor(stranger, `&leastDepthM=${deepestM - 0.1}`)).toBeDefined();
  expect(await pegFor(stranger, `&leastDepthM=${deepestM + 0.1}`)).toBeUndefined();
  expect(await pegFor(stranger, `&mostDepthM=${deepestM - 0.1}`)).toBeUndefined();
  expect(await pegFor(stranger, `&bottom=${bottoms[0] ?? ''}`)).toBeDefined();
  await setAudiences({ depth: 'staff', bottom: 'staff' });
  expect(await pegFor(stranger, `&leastDepthM=${deepestM - 0.1}`)).toBeUndefined();
  expect(await pegFor(stranger, `&bottom=${bottoms[0] ?? ''}`)).toBeUndefined();
});
