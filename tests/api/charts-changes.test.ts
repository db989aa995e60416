import { ChartChanges, SimilarPegs } from '@mereward/shared/charts/chart-answers';
import { fromPlane } from '@mereward/shared/geometry/plane';
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { publishedChart } from '../support/charts';
import { aFan, castsFile } from '../support/long-water';
import { aStranger, type Asker } from '../support/people';
import { aServer, type TestServer } from '../support/server';
import { aLongWater, closedVisit, openedVisit, type TestWater } from '../support/surveys';
import { aFishery, aLake, aPeg, type TestFishery, type TestPeg } from '../support/waters';

let server: TestServer;
let here: TestFishery;
let open: TestWater;
let neighbour: TestPeg;
let first: string;
let second: string;

const OPEN = { depth: 'public', bottom: 'public', spots: 'public', soundings: 'public' } as const;

/** The fan of casts with every float reading beyond ten wraps so many pulls shorter. */
async function surveyed(water: TestWater, siltedPulls: number): Promise<string> {
  const { bailiff, head_bailiff: person, owner: approver } = here.people;
  const visitId = await openedVisit(bailiff, water);
  const fan = aFan().map((cast) => ({
    ...cast,
    pulls: (cast.pulls ?? 0) - ((cast.wrapsWhole ?? 0) >= 10 ? siltedPulls : 0),
  }));
  const file = { filename: 'fan.csv', text: castsFile(fan), mapping: null };
  const answer = await bailiff.post(`/visits/${visitId}/imports`).send(file);
  expect(answer.status).toBe(200);
  await closedVisit({ person: bailiff, visitId });
  return publishedChart(server, { person, approver, lakeId: water.lake.id, visitIds: [visitId] });
}

beforeAll(async () => {
  server = await aServer();
  here = await aFishery(server);
  open = await aLongWater(server, here, { audiences: OPEN });
  const [lon, lat] = fromPlane(open.lake.origin, { xM: 40, yM: -59 });
  neighbour = await aPeg(server, open.lake, {
    ...open.peg.details,
    number: 'FO8',
    position: [lon, lat],
    origin: [lon, lat],
    access: { ...open.peg.details.access, steps: 9 },
  });
  first = await surveyed(open, 0);
  second = await surveyed(open, 3);
}, 120_000);
afterAll(() => server.close());

const get = async (who: Asker, path: string) => {
  const answer = await who.get(path);
  expect([path, answer.status]).toEqual([path, 200]);
  expect(Buffer.byteLength(answer.text)).toBeLessThan(60_000);
  return answer.body as unknown;
};

describe('what changed', () => {
  test('since the version before is told by area, height and volume', async () => {
    const changes = ChartChanges.parse(await get(aStranger(server), `/charts/${second}/changes`));
    expect(changes.since?.id).toBe(first);
    expect(changes.comparedM2).toBeGreaterThan(1000);
    const silted = changes.areas?.find(({ kind }) => kind === 'shallower');
    // Three pulls of a foot are 0.91 m; the surface lets the edge of it run out over a gap between casts.
    expect(silted?.meanChangeM).toBeLessThan(-0.5);
    expect(silted?.meanChangeM).toBeGreaterThan(-1.1);
    const { areaM2 = 0, meanChangeM, volumeM3 } = silted ?? {};
    expect(Math.abs((volumeM3 ?? 0) - areaM2 * (meanChangeM ?? 0))).toBeLessThan(0.006 * areaM2); // the mean is told to a centimetre
    expect(silted?.words).toMatch(/silting/);
    // Beside the step of 0.9 m the two surfaces swing past one another; the soundings of both don't.
    expect(changes.areas?.filter(({ kind }) => kind === 'deeper')).toEqual([]);
    expect(changes.areas?.[0]?.kind).toBe('shallower');
  });

  test('a first version has nothing to be held against, in words', async () => {
    const changes = ChartChanges.parse(await get(aStranger(server), `/charts/${first}/changes`));
    expect(changes).toMatchObject({ since: null, areas: null, earlier: [] });
    expect(changes.whyNot).toMatch(/no earlier version/);
  });

  test('since a later or another lake’s version finds nothing, and a torn id is invalid', async () => {
    const ask = async (since: string) =>
      (await aStranger(server).get(`/charts/${second}/changes?since=${since}`)).status;
    expect([await ask(second), await ask(randomUUID()), await ask('x')]).toEqual([404, 404, 400]);
    expect((await aStranger(server).get(`/charts/${first}/changes?since=${second}`)).status).toBe(404);
  });

  test('depths kept for staff are not told of by their change', async () => {
    const lake = await here.people.owner.get(`/lakes/${open.lake.id}`);
    const { details, version } = lake.body as { details: typeof open.lake.details; version: number };
    const hide = (audiences: typeof details.audiences, at: number) =>
      here.people.owner
        .put(`/lakes/${open.lake.id}`)
        .send({ details: { ...details, audiences }, version: at });
    expect((await hide({ ...OPEN, depth: 'staff' }, version)).status).toBe(200);
    const partly = ChartChanges.parse(await get(aStranger(server), `/charts/${second}/changes`));
    expect(partly.areas?.every(({ meanChangeM }) => meanChangeM === null)).toBe(true);
    expect((await hide({ ...OPEN, depth: 'staff', bottom: 'staff' }, version + 1)).status).toBe(200);
    const none = ChartChanges.parse(await get(aStranger(server), `/charts/${second}/changes`));
    expect(none).toMatchObject({
      areas: null,
      comparedM2: null,
      whyNot: 'Kept by the fishery for its staff.',
    });
    const staffs = ChartChanges.parse(await get(here.people.bailiff, `/charts/${second}/changes`));
    expect(staffs.areas?.length).toBeGreaterThan(0);
    expect((await hide(OPEN, version + 2)).status).toBe(200);
  });
});

describe('pegs like this one', () => {
  test('come from its own lake first, with reasons in words, closed ones left out', async () => {
    const other = await aLake(server, here, { name: 'Ostle Pool' });
    const twin = await aPeg(server, other, { ...open.peg.details, number: 'OP1' });
    await aPeg(server, other, {
      ...open.peg.details,
      number: 'OP2',
      status: 'closed',
      statusReason: 'Works',
    });
    const { pegs, compared } = SimilarPegs.parse(
      await get(aStranger(server), `/pegs/${open.peg.id}/similar`),
    );
    expect(pegs.map(({ number, sameLake }) => [number, sameLake])).toEqual([
      ['FO8', true],
      ['OP1', false],
    ]);
    expect(pegs[0]?.pegId).toBe(neighbour.id);
    expect(pegs[0]?.distanceM).toBe(40);
    expect(pegs[0]?.differs).toContain('9 steps; this peg has no steps.');
    expect(pegs[1]).toMatchObject({ pegId: twin.id, lakeName: 'Ostle Pool', likeness: 1 });
    expect(compared).toMatch(/no published source/);
  });

  test('of no peg are not found', async () => {
    expect((await aStranger(server).get(`/pegs/${randomUUID()}/similar`)).status).toBe(404);
  });
});
