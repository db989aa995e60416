import {
  CastReading,
  ChartFeatures,
  NextCasts,
  SameSpotView,
  StandOutPatches,
} from '@mereward/shared/charts/chart-answers';
import { PegPageView } from '@mereward/shared/charts/contract';
import { fromPlane } from '@mereward/shared/geometry/plane';
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { draftedChart, publishedChart } from '../support/charts';
import { madeUpDepthM } from '../support/long-water';
import { aPerson, aStranger, type Asker } from '../support/people';
import { aTicket } from '../support/tickets';
import { aServer, type TestServer } from '../support/server';
import { aLongWater, aSurvey, type TestWater } from '../support/surveys';
import { aFishery, aPeg, type TestFishery, type TestPeg } from '../support/waters';

let server: TestServer;
let here: TestFishery;
let elsewhere: TestFishery;
let open: TestWater;
let neighbour: TestPeg;
let chartId: string;
let kept: TestWater; // the same water, its layers for staff alone
let keptChartId: string;

const OPEN = { depth: 'public', bottom: 'public', spots: 'public', soundings: 'public' } as const;
const KEPT = { depth: 'staff', bottom: 'staff', spots: 'staff', soundings: 'staff' } as const;

async function surveyed(water: TestWater): Promise<string> {
  const { head_bailiff: person, owner: approver } = here.people;
  const visitId = await aSurvey(here.people.bailiff, water);
  return publishedChart(server, { person, approver, lakeId: water.lake.id, visitIds: [visitId] });
}

beforeAll(async () => {
  server = await aServer();
  here = await aFishery(server);
  elsewhere = await aFishery(server, { name: 'Upper Sallow' });
  open = await aLongWater(server, here, { audiences: OPEN });
  const [lon, lat] = fromPlane(open.lake.origin, { xM: 40, yM: -59 });
  neighbour = await aPeg(server, open.lake, {
    ...open.peg.details,
    number: 'FO8',
    name: '',
    position: [lon, lat],
    origin: [lon, lat],
  });
  kept = await aLongWater(server, here, { name: 'Near Ostle', audiences: KEPT });
  chartId = await surveyed(open);
  keptChartId = await surveyed(kept);
}, 120_000);
afterAll(() => server.close());

const get = async (who: Asker, path: string) => {
  const answer = await who.get(path);
  expect([path, answer.status]).toEqual([path, 200]);
  expect(Buffer.byteLength(answer.text)).toBeLessThan(60_000);
  return answer.body as unknown;
};

describe('what a chart was found to tell', () => {
  test('the bar that was cast over is found, named and sized', async () => {
    const { features, whyNot } = ChartFeatures.parse(
      await get(aStranger(server), `/charts/${chartId}/features`),
    );
    expect(whyNot).toBeNull();
    const bar = features?.find(({ kind }) => kind === 'bar');
    expect(bar?.name).toBe('Bar 1');
    expect(bar?.words).toMatch(
      /^Bar 1: \d+ m long, \d+ m wide, top at \d\.\d m, \d\.\d m above what lies round it/,
    );
    // Casts two wraps (7 m) apart cut the crest of a bar 14 m wide by up to a third of its 0.8 m; a float is read to half a foot.
    expect(Math.abs((bar?.depthM ?? 0) - madeUpDepthM(51, 0))).toBeLessThan(0.5);
    expect(bar?.rings.length).toBeGreaterThan(0);
  });

  test('patches come with who reaches them, and with what is never promised', async () => {
    const body = await get(aStranger(server), `/charts/${chartId}/patches`);
    const { patches, caution } = StandOutPatches.parse(body);
    expect(caution).toMatch(/never promised/);
    expect(patches?.map(({ rank }) => rank)).toEqual(patches?.map((_, i) => i + 1));
    for (const { reach } of patches ?? [])
      for (const { cast } of reach) expect(cast.rangeM).toBeLessThanOrEqual(70);
  });

  test('the casts to make next are told to staff, within each peg’s own reach', async () => {
    const { pegs, meanSigmaM } = NextCasts.parse(
      await get(here.people.bailiff, `/charts/${chartId}/next-casts`),
    );
    expect(meanSigmaM).toBeGreaterThan(0);
    expect(pegs?.map(({ number }) => number)).toEqual(['FO7', 'FO8']);
    const casts = pegs?.flatMap((peg) => peg.casts) ?? [];
    expect(casts.length).toBeGreaterThan(1);
    for (const { cast, gainShare } of casts) {
      expect(cast.rangeM).toBeLessThanOrEqual(70);
      expect(cast.remainderM).toBe(0);
      expect(gainShare).toBeGreaterThan(0);
    }
    // Nobody has cast from FO8 yet: its water is what the chart knows least of.
    expect(pegs?.[1]?.gainShare).toBeGreaterThan(pegs?.[0]?.gainShare ?? 1);
  });

  test('a draft’s is for its staff, as the draft is', async () => {
    const visitId = await aSurvey(here.people.bailiff, open);
    const person = here.people.head_bailiff;
    const draft = await draftedChart(server, { person, lakeId: open.lake.id, visitIds: [visitId] });
    expect((await aStranger(server).get(`/charts/${draft}/features`)).status).toBe(404);
    expect((await person.get(`/charts/${draft}/features`)).status).toBe(200);
  });

  test('a kept layer is told of in words and shown to staff alone', async () => {
    const strangers = ChartFeatures.parse(await get(aStranger(server), `/charts/${keptChartId}/features`));
    expect(strangers.features).toBeNull();
    expect(strangers.whyNot).toBe('Kept by the fishery for its staff.');
    const patches = StandOutPatches.parse(await get(here.people.member, `/charts/${keptChartId}/patches`));
    expect(patches).toMatchObject({ patches: null, whyNot: 'Kept by the fishery for its staff.' });
    const staffs = ChartFeatures.parse(await get(here.people.office, `/charts/${keptChartId}/features`));
    expect(staffs.features?.length).toBeGreaterThan(0);
  });

  test('where to cast next is refused to whoever is not of the staff', async () => {
    const path = `/charts/${chartId}/next-casts`;
    expect((await aStranger(server).get(path)).status).toBe(401);
    expect((await here.people.member.get(path)).status).toBe(403);
    expect((await elsewhere.people.owner.get(path)).status).toBe(404);
    expect((await here.people.bailiff.get(`/charts/${randomUUID()}/next-casts`)).status).toBe(404);
  });

  test('a chart from before says that it has none', async () => {
    const { source } = server.server;
    await source.query('ALTER TABLE chart DISABLE TRIGGER chart_frozen');
    await source.query(
      `UPDATE chart SET built = built - 'tellings', built_at = built_at + interval '1 second' WHERE id = $1`,
      [keptChartId],
    );
    await source.query('ALTER TABLE chart ENABLE TRIGGER chart_frozen');
    const { features, whyNot } = ChartFeatures.parse(
      await get(here.people.owner, `/charts/${keptChartId}/features`),
    );
    expect([features, whyNot]).toEqual([null, expect.stringMatching(/built before/)]);
  });
});

describe('a cast read back', () => {
  const path = (query: string, peg = open.peg) => `/pegs/${peg.id}/cast-reading?${query}`;
  const read = async (query: string, who: Asker = aStranger(server)) =>
    CastReading.parse(await get(who, path(query)));

  test('answers the depth and bottom where it lands, over a mark', async () => {
    const reading = await read(`wrapsWhole=14&markId=${open.mark.id}`);
    if (!reading.ok) throw new Error(reading.reason);
    expect(reading.place.depthM).toBeCloseTo(madeUpDepthM(51.2, 0), 0);
    expect(reading.place).toMatchObject({
      quotedFrom: 'cast',
      grade: expect.any(String),
      water: { own: true },
    });
    expect(reading.cast).toMatchObject({ wrapsWhole: 14, mark: { code: 'M3', offsetDeg: 0 } });
    expect(reading.words).toMatch(
      /^Peg FO7, 14 wraps \(12 ft\) over the pump-house chimney: .*m .*chart 2027\.1\.$/,
    );
    expect(reading.warnings).toEqual([]);
  });

  test('lands alike on other sticks and by a bearing', async () => {
    const line = 14 * 3.6576;
    const whole = Math.floor(line / 3.048);
    const other = `wrapsWhole=${whole}&remainderM=${line - whole * 3.048}&stickSpacingM=3.048&bearingDeg=0`;
    const [a, b] = [await read(`wrapsWhole=14&markId=${open.mark.id}`), await read(other)];
    if (!a.ok || !b.ok) throw new Error('One was refused');
    // The survey's kit taped its sticks along the line: one wrap is the spacing itself, to the metre both agree.
    expect(Math.hypot(a.place.xM - b.place.xM, a.place.yM - b.place.yM)).toBeLessThanOrEqual(0.2);
    expect(b.spreadM).toBeGreaterThan(a.spreadM); // a bearing is held less well than a mark
  });

  test('says whose water it lands in, and what stands against it', async () => {
    const reading = await read(`wrapsWhole=14&bearingDeg=40`);
    if (!reading.ok) throw new Error(reading.reason);
    expect(reading.place.water).toMatchObject({ own: false, number: 'FO8', words: 'In peg FO8’s water.' });
    expect(reading.warnings[0]).toMatch(/^In peg FO8’s water\. Ask/);
  });

  test('is refused in words on land, beyond the far bank and with too short a line', async () => {
    const refusals = await Promise.all(
      ['wrapsWhole=10&bearingDeg=180', 'wrapsWhole=40&bearingDeg=0', 'wrapsWhole=1&bearingDeg=0'].map(
        (query) => read(query),
      ),
    );
    expect(refusals.map((each) => (each.ok ? '' : each.reason))).toEqual([
      expect.stringMatching(/on land/),
      expect.stringMatching(/beyond the far bank/),
      expect.stringMatching(/too short/),
    ]);
  });

  test.each(['wrapsWhole=14', 'wrapsWhole=-1&bearingDeg=0', 'bearingDeg=0', 'wrapsWhole=14&bearingDeg=400'])(
    '%s is invalid',
    async (query) => {
      expect((await aStranger(server).get(path(query))).status).toBe(400);
    },
  );

  test('is not told where neither layer is this reader’s', async () => {
    const query = `wrapsWhole=14&markId=${kept.mark.id}`;
    expect((await aStranger(server).get(path(query, kept.peg))).status).toBe(403);
    expect((await here.people.bailiff.get(path(query, kept.peg))).status).toBe(200);
    expect((await aStranger(server).get(`/pegs/${randomUUID()}/cast-reading?${query}`)).status).toBe(404);
  });
});

describe('the same spot from here', () => {
  const at = async (query: string, peg: TestPeg = open.peg, who: Asker = aStranger(server)) =>
    SameSpotView.parse(await get(who, `/pegs/${peg.id}/same-spot?${query}`));

  test('a place is told in the survey’s sticks and in the reader’s, and comes back to itself', async () => {
    const read = CastReading.parse(
      await get(aStranger(server), `/pegs/${open.peg.id}/cast-reading?wrapsWhole=12&markId=${open.mark.id}`),
    );
    if (!read.ok) throw new Error(read.reason);
    const [lon, lat] = read.place.position;
    const spot = await at(`lon=${lon}&lat=${lat}&stickSpacingM=3.048`);
    if (!spot.ok) throw new Error(spot.reason);
    expect(spot.surveySticks).toMatchObject({ wrapsWhole: 12, remainderM: 0, stickSpacingM: 3.6576 });
    const { wrapsWhole = 0, remainderM = 0 } = spot.yourSticks ?? {};
    expect(wrapsWhole * 3.048 + remainderM).toBeCloseTo(spot.surveySticks.lineOutM, 1);
    expect(spot.marks[0]).toEqual({ code: 'M3', name: 'pump-house chimney', offsetDeg: 0 });
    expect(spot.place.water.own).toBe(true);
  });

  test('a neighbour’s spot in this peg’s water is on this peg’s page, marked as theirs', async () => {
    const [lon, lat] = fromPlane(open.lake.origin, { xM: 2, yM: -15 });
    const id = randomUUID();
    const details = { name: 'Middle bar', position: [lon, lat], usableRadiusM: 2, note: '' };
    const put = await here.people.manager
      .put(`/pegs/${neighbour.id}/spots/${id}`)
      .send({ details, version: null });
    expect(put.status).toBe(200);
    const page = PegPageView.parse(await get(aStranger(server), `/pegs/${open.peg.id}/page`));
    expect(page.neighbourSpots?.map(({ peg, spot }) => [peg.number, spot.name, spot.water?.own])).toEqual([
      ['FO8', 'Middle bar', true],
    ]);
    const theirs = PegPageView.parse(await get(aStranger(server), `/pegs/${neighbour.id}/page`));
    expect(theirs.spots?.[0]?.water).toMatchObject({
      own: false,
      number: 'FO7',
      words: 'In peg FO7’s water.',
    });
    const seen = await at(`spotId=${id}`);
    expect(seen).toMatchObject({ ok: true, spot: { name: 'Middle bar', pegNumber: 'FO8' } });
    const hidden = await aStranger(server).get(`/pegs/${kept.peg.id}/same-spot?spotId=${id}`);
    expect(hidden.status).toBe(404); // another lake's, and kept besides
  });

  test('a ticket opens the peg’s own spots and no other’s', async () => {
    const water = await aLongWater(server, here, {
      name: 'Ticket Ostle',
      audiences: { ...OPEN, spots: 'ticket' },
    });
    const far = await aPeg(server, water.lake, { ...water.peg.details, number: 'FO9', longestCastM: 5 });
    const angler = await aPerson(server);
    const aSpot = async (peg: TestPeg, xM: number, yM: number): Promise<string> => {
      const [lon, lat] = fromPlane(water.lake.origin, { xM, yM });
      const id = randomUUID();
      const details = { name: 'A spot', position: [lon, lat], usableRadiusM: 2, note: '' };
      const put = await here.people.manager
        .put(`/pegs/${peg.id}/spots/${id}`)
        .send({ details, version: null });
      expect(put.status).toBe(200);
      return id;
    };
    const [own, others] = [await aSpot(water.peg, 0, -20), await aSpot(far, 120, 0)];
    const statusOf = async (spotId: string) =>
      (await angler.get(`/pegs/${water.peg.id}/same-spot?spotId=${spotId}`)).status;
    expect([await statusOf(own), await statusOf(others)]).toEqual([404, 404]);
    const hoursOff = (hours: number) =>
      new Date(server.server.clock().getTime() + hours * 3_600_000).toISOString();
    await aTicket(server, { pegId: water.peg.id, holder: angler, from: hoursOff(-2), until: hoursOff(2) });
    expect([await statusOf(own), await statusOf(others)]).toEqual([200, 404]);
  });

  test('a place on land is refused in words, and half a place is invalid', async () => {
    const [lon, lat] = fromPlane(open.lake.origin, { xM: 0, yM: -90 });
    expect(await at(`lon=${lon}&lat=${lat}`)).toMatchObject({
      ok: false,
      reason: expect.stringMatching(/on land/),
    });
    expect((await aStranger(server).get(`/pegs/${open.peg.id}/same-spot?lon=${lon}`)).status).toBe(400);
  });

  test('depths are kept from whoever may not see them, the way there is not', async () => {
    const [lon, lat] = fromPlane(kept.lake.origin, { xM: 0, yM: -20 });
    const someone = await aPerson(server);
    const spot = await at(`lon=${lon}&lat=${lat}`, kept.peg, someone);
    if (!spot.ok) throw new Error(spot.reason);
    expect(spot.place).toMatchObject({ depthM: null, bottom: null, depthTodayM: null, grade: null });
    expect(spot.whyNot).toBe('Kept by the fishery for its staff.');
    expect(spot.surveySticks.rangeM).toBe(42);
  });
});
