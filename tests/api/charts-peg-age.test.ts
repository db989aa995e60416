import { PegPageView } from '@mereward/shared/charts/contract';
import { fromPlane } from '@mereward/shared/geometry/plane';
import { randomUUID } from 'node:crypto';
import request from 'supertest';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { publishedChart } from '../support/charts';
import { longPegDetails } from '../support/long-water';
import { aStranger } from '../support/people';
import { aServer, type TestServer } from '../support/server';
import { aLongWater, aSurvey, type TestWater } from '../support/surveys';
import { WATER_CENTRE } from '../support/water-details';
import { aFishery, aPeg, type TestFishery, type TestPeg } from '../support/waters';

let server: TestServer;
let here: TestFishery;
let water: TestWater;
let west: TestPeg;

const place = (xM: number, yM: number): [number, number] => {
  const [lon, lat] = fromPlane(WATER_CENTRE, { xM, yM });
  return [lon, lat];
};

beforeAll(async () => {
  server = await aServer();
  server.setNow('2027-04-03T12:00:00Z');
  here = await aFishery(server, { name: 'Ostlemere Waters' });
  const audiences = { depth: 'public', bottom: 'public', spots: 'public', soundings: 'staff' } as const;
  water = await aLongWater(server, here, { audiences });
  const origin = place(-100, -62 * Math.sqrt(1 - (100 / 150) ** 2));
  west = await aPeg(server, water.lake, { ...longPegDetails(), number: 'FO9', position: origin, origin });
  const joan = here.people.head_bailiff;
  const visitId = await aSurvey(joan, water);
  await publishedChart(server, {
    person: joan,
    approver: here.people.manager,
    lakeId: water.lake.id,
    visitIds: [visitId],
  });
  server.setNow('2027-04-11T12:00:00Z');
});
afterAll(() => server.close());

/** A square of water, its middle so far from the lake's. */
const square = (xM: number, yM: number, halfM: number) => ({
  type: 'Polygon',
  coordinates: [
    [
      place(xM - halfM, yM - halfM),
      place(xM + halfM, yM - halfM),
      place(xM + halfM, yM + halfM),
      place(xM - halfM, yM + halfM),
      place(xM - halfM, yM - halfM),
    ],
  ],
});

async function happened(kind: string, area: object | null): Promise<void> {
  const body = { id: randomUUID(), kind, area, happenedOn: '2027-04-10', ends: ['cover'], note: '' };
  const answer = await here.people.head_bailiff.post(`/lakes/${water.lake.id}/bottom-events`).send(body);
  expect(answer.status, answer.text).toBe(201);
}
const pageOf = async (peg: TestPeg) =>
  PegPageView.parse((await aStranger(server).get(`/pegs/${peg.id}/page`)).body);

test('a peg’s page tells what happened in its own water or to the whole lake, and nothing of others’', async () => {
  await happened('snag_removed', square(2, -35, 1));
  const own = await pageOf(water.peg);
  expect(own.chart?.age).toBe('changed');
  expect(own.chart?.changes?.map(({ kind }) => kind)).toEqual(['snag_removed']);
  expect(own.cautions.join(' ')).toMatch(/Changed since survey: a snag/);
  const other = await pageOf(west);
  expect(other.chart).toMatchObject({ age: 'current', changes: [] });
  expect(other.cautions.join(' ')).not.toContain('Changed since');
  const light = async ({ shortUrl }: PegPageView) =>
    (await request(server.app).get(new URL(shortUrl).pathname).redirects(0)).text;
  expect(await light(own)).toContain('Changed since survey');
  expect(await light(other)).not.toContain('Changed since survey');

  // A spot of its own in another peg's water is cast at from here.
  const details = { name: 'Over the way', position: place(2, -35), usableRadiusM: 1, note: '' };
  const spot = `/pegs/${west.id}/spots/${randomUUID()}`;
  expect((await here.people.head_bailiff.put(spot).send({ details, version: null })).status).toBe(200);
  expect((await pageOf(west)).chart?.age).toBe('changed');
  await here.people.head_bailiff.delete(spot);
  expect((await pageOf(west)).chart?.age).toBe('current');

  await happened('leaf_fall', null);
  for (const peg of [water.peg, west]) {
    const { chart } = await pageOf(peg);
    expect(chart?.age).toBe('changed');
    expect(chart?.changes?.map(({ kind }) => kind)).toContain('leaf_fall');
  }
  expect((await pageOf(west)).chart?.changes).toHaveLength(1);
});
