import { fromPlane, toPlane } from '@mereward/shared/geometry/plane';
import { LakeWaters, type WaterAreaDetails } from '@mereward/shared/lakes/peg-water-contract';
import { ProblemBody } from '@mereward/shared/problems/problem';
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { aStranger, type Asker } from '../support/people';
import { aServer, type TestServer } from '../support/server';
import { aFishery, aLake, aPeg, type TestFishery, type TestLake, type TestPeg } from '../support/waters';

let server: TestServer;
let here: TestFishery;
let elsewhere: TestFishery;
let lake: TestLake;
let west: TestPeg;
let east: TestPeg;

beforeAll(async () => {
  server = await aServer();
  here = await aFishery(server);
  elsewhere = await aFishery(server, { name: 'Upper Sallow' });
});
afterAll(() => server.close());

async function aFreshLake(name: string): Promise<void> {
  lake = await aLake(server, here, { name });
  west = await aPeg(server, lake, { number: 'W', thetaDeg: 200 });
  east = await aPeg(server, lake, { number: 'E', thetaDeg: 340 });
}

const read = async (who: Asker): Promise<LakeWaters> => {
  const answer = await who.get(`/lakes/${lake.id}/waters`);
  expect(answer.status).toBe(200);
  return LakeWaters.parse(answer.body);
};

/** A square of the lake's plane about a place, metres. */
function square(xM: number, yM: number, halfM: number): WaterAreaDetails['ring'] {
  const corners = [
    [-1, -1],
    [1, -1],
    [1, 1],
    [-1, 1],
  ] as const;
  return corners.map(([e, n]) => {
    const [lon, lat] = fromPlane(lake.origin, { xM: xM + e * halfM, yM: yM + n * halfM });
    return [lon, lat];
  });
}

const put = (
  who: Asker,
  details: WaterAreaDetails,
  id: string = randomUUID(),
  version: number | null = null,
) => who.put(`/lakes/${lake.id}/water-areas/${id}`).send({ details, version });

test('a stranger reads whose water is whose, small enough for one bar of signal', async () => {
  await aFreshLake('Read Waters');
  const answer = await aStranger(server).get(`/lakes/${lake.id}/waters`);
  const waters = LakeWaters.parse(answer.body);
  expect(waters.pegs.map(({ number }) => number)).toEqual(['W', 'E']);
  for (const { areaM2, rings } of waters.pegs) {
    expect(areaM2).toBeGreaterThan(1000);
    expect(rings.length).toBeGreaterThan(0);
  }
  expect(waters.may.change).toBe(false);
  expect(Buffer.byteLength(answer.text)).toBeLessThan(60_000);
  expect((await aStranger(server).get(`/lakes/${randomUUID()}/waters`)).status).toBe(404);
});

test('the manager gives an area to a peg, then to nobody, and takes it back', async () => {
  await aFreshLake('Drawn Waters');
  const { manager } = here.people;
  const before = await read(manager);
  const id = randomUUID();
  const details = { pegId: east.id, ring: square(-30, -10, 8), note: 'to the dead oak' };
  const given = LakeWaters.parse((await put(manager, details, id)).body);
  expect(given.areas).toEqual([{ id, details, takesM2: expect.closeTo(256, -1), version: 1 }]);
  const areaOf = (waters: LakeWaters, peg: TestPeg) =>
    waters.pegs.find(({ pegId }) => pegId === peg.id)?.areaM2 ?? 0;
  expect(areaOf(given, east)).toBeGreaterThan(areaOf(before, east));
  expect(areaOf(given, west)).toBeLessThan(areaOf(before, west));
  const again = await put(manager, details, id);
  expect(LakeWaters.parse(again.body).areas).toHaveLength(1);
  const kept = await put(manager, { ...details, pegId: null }, id, 1);
  expect(LakeWaters.parse(kept.body).nobodysM2).toBeGreaterThanOrEqual(before.nobodysM2 + 250);
  const gone = await manager.delete(`/lakes/${lake.id}/water-areas/${id}`);
  expect(LakeWaters.parse(gone.body).pegs).toEqual(before.pegs);
});

test('an area needs a peg of this lake, some water and a manager', async () => {
  await aFreshLake('Refused Waters');
  const details = { pegId: west.id, ring: square(0, 0, 5), note: '' };
  expect((await put(aStranger(server), details)).status).toBe(401);
  expect((await put(here.people.bailiff, details)).status).toBe(403);
  expect((await put(elsewhere.people.owner, details)).status).toBe(404);
  const { manager } = here.people;
  const pointersOf = (body: unknown) => ProblemBody.parse(body).errors?.map(({ pointer }) => pointer);
  const noPeg = await put(manager, { ...details, pegId: randomUUID() });
  expect([noPeg.status, pointersOf(noPeg.body)]).toEqual([400, ['/details/pegId']]);
  const dry = await put(manager, { ...details, ring: square(400, 0, 5) });
  expect([dry.status, pointersOf(dry.body)]).toEqual([400, ['/details/ring']]);
  expect((await put(manager, { ...details, ring: details.ring.slice(0, 2) })).status).toBe(400);
  const id = randomUUID();
  await put(manager, details, id);
  expect((await put(manager, { ...details, note: 'other' }, id)).status).toBe(409);
  expect((await put(manager, details, id, 7)).status).toBe(409);
  expect((await put(manager, details, randomUUID(), 1)).status).toBe(404);
});

test('of two areas drawn over one another at once the later one has the water, all of it', async () => {
  await aFreshLake('Raced Waters');
  const { manager, owner } = here.people;
  const details = (peg: TestPeg): WaterAreaDetails => ({ pegId: peg.id, ring: square(0, 0, 6), note: '' });
  const answers = await Promise.all([put(manager, details(west)), put(owner, details(east))]);
  expect(answers.map(({ status }) => status)).toEqual([200, 200]);
  const { areas } = await read(manager);
  expect(areas.map(({ takesM2 }) => takesM2 > 130)).toEqual([false, true]);
  expect(areas[0]?.takesM2).toBe(0);
});

test('of two changes of one area at once exactly one is made', async () => {
  await aFreshLake('Changed Waters');
  const { manager } = here.people;
  const id = randomUUID();
  const details = (note: string): WaterAreaDetails => ({ pegId: west.id, ring: square(0, 0, 6), note });
  await put(manager, details(''), id);
  const answers = await Promise.all([put(manager, details('a'), id, 1), put(manager, details('b'), id, 1)]);
  expect(answers.map(({ status }) => status).sort()).toEqual([200, 409]);
});

test('a changed arc changes the waters at once', async () => {
  await aFreshLake('Turned Waters');
  const { manager } = here.people;
  const before = await read(manager);
  const narrow = { ...west.details, arcToDeg: (west.details.arcFromDeg + 10) % 360 };
  // The middle of the arc must look over water: from the left limit it still does.
  const changed = await manager.put(`/pegs/${west.id}`).send({ details: narrow, version: 1 });
  expect(changed.status).toBe(200);
  const after = await read(manager);
  expect(after.pegs[0]?.areaM2).toBeLessThan((before.pegs[0]?.areaM2 ?? 0) / 2);
});

test('the plane of the rings is the lake’s own', async () => {
  await aFreshLake('Plane Waters');
  const { pegs } = await read(aStranger(server));
  const stance = toPlane(lake.origin, west.details.origin);
  const [ring = []] = pegs[0]?.rings ?? [];
  const away = ring
    .filter((_, i) => i % 2 === 0)
    .map((xM, i) => Math.hypot(xM - stance.xM, (ring[2 * i + 1] ?? 0) - stance.yM));
  expect(Math.min(...away)).toBeLessThan(2); // the peg stands at its own water
});
