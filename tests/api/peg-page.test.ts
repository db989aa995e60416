import { ChartReview, ChartView, PegPageView, SectionView, SpotKept } from '@mereward/shared/charts/contract';
import { layersFor } from '@mereward/api/charts/chart-view';
import { chartContent } from '@mereward/api/charts/chart-layers';
import { ProblemBody } from '@mereward/shared/problems/problem';
import { Lake } from '@mereward/db/entities/lakes/lake';
import { Audience, type LayerAudiences } from '@mereward/shared/lakes/contract';
import { randomUUID } from 'node:crypto';
import fc from 'fast-check';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { z } from 'zod';
import { publishedChart } from '../support/charts';
import { aSurveyGround } from '../support/grounds';
import { aTicket } from '../support/tickets';
import { aPerson, aStranger, type Asker, type Person } from '../support/people';
import type { TestServer } from '../support/server';
import { aSurvey, type TestWater } from '../support/surveys';
import { aReading, type TestFishery } from '../support/waters';
import { VisitWithCasts } from '@mereward/shared/surveys/contract';

let server: TestServer;
let here: TestFishery;
let elsewhere: TestFishery;
let water: TestWater;
let chartId: string;
let spotId: string;
let joan: Person;
let sofia: Person;

beforeAll(async () => {
  ({ server, here, elsewhere, water, joan } = await aSurveyGround());
  sofia = await aPerson(server, { name: 'Sofia Marsh' });
  const visitId = await aSurvey(joan, water);
  const lakeId = water.lake.id;
  chartId = await publishedChart(server, {
    person: joan,
    approver: here.people.manager,
    lakeId,
    visitIds: [visitId],
  });
  const { casts } = VisitWithCasts.parse((await joan.get(`/visits/${visitId}`)).body);
  const cast = casts.find(
    ({ observation: { aim, wrapsWhole } }) => aim.by === 'mark' && aim.offsetDeg === 0 && wrapsWhole === 14,
  );
  if (!cast?.reduced.ok) throw new Error('The fan has no cast at fourteen wraps');
  spotId = randomUUID();
  await joan
    .put(`/pegs/${water.peg.id}/spots/${spotId}`)
    .send({ details: spotAt(cast.reduced.sounding.position), version: null });
  await ticketFor(sofia, '2027-07-17T06:00:00Z', '2027-07-18T06:00:00Z');
  await aReading(server, water.board, { levelM: 0.38, at: '2027-07-17T05:00:00Z' });
});
afterAll(() => server.close());

const problem = (body: unknown) => ProblemBody.parse(body);
const spotAt = (position: [number, number]) => ({ name: 'The bar', position, usableRadiusM: 1, note: '' });
const pageFor = async (reader: Asker) =>
  PegPageView.parse((await reader.get(`/pegs/${water.peg.id}/page`)).body);
const chartFor = async (reader: Asker) => ChartView.parse((await reader.get(`/charts/${chartId}`)).body);

const ticketFor = (holder: Person, from: string, until: string): Promise<string> =>
  aTicket(server, { pegId: water.peg.id, holder, from, until });

async function setAudiences(audiences: LayerAudiences): Promise<void> {
  const lake = await server.server.source.manager.findOneByOrFail(Lake, { id: water.lake.id });
  await server.server.source.manager.update(
    Lake,
    { id: lake.id },
    { details: { ...lake.details, audiences } },
  );
}

describe('a peg’s page', () => {
  test('is light enough for one bar of signal', async () => {
    server.setNow('2027-07-17T09:00:00Z');
    const answer = await joan.get(`/pegs/${water.peg.id}/page`);
    expect(Buffer.byteLength(answer.text)).toBeLessThanOrEqual(60_000);
    const page = PegPageView.parse(answer.body);
    expect(page.extract?.isobaths.length).toBeGreaterThan(2);
    expect(page.spots?.[0]?.section?.length).toBeGreaterThan(30);
  });

  test('shows a stranger the way, the hazards and the depth, and says why the rest is missing', async () => {
    server.setNow('2027-07-17T09:00:00Z');
    const page = await pageFor(aStranger(server));
    expect(page).toMatchObject({
      number: 'FO7',
      spots: null,
      ticket: null,
      chart: { version: '2027.1', age: 'current' },
    });
    expect(page.details).toMatchObject({ hazards: ['deep margin'], notesMembers: '', notesStaff: '' });
    expect(page.layerNotes).toMatchObject({
      depth: null,
      spots: expect.stringMatching(/ticket for this peg/),
    });
    expect(page.cautions.at(-1)).toContain('Not for boating, wading, swimming or diving');
  });

  test('counts a spot in the survey’s own sticks and quotes the cast made there', async () => {
    server.setNow('2027-07-17T09:00:00Z');
    const [spot] = (await pageFor(sofia)).spots ?? [];
    expect(spot).toMatchObject({
      wrapsWhole: 14,
      remainderM: 0,
      wrapReference: 'lead_to_clip',
      mark: { code: 'M3', name: 'pump-house chimney', offsetDeg: 0 },
      quotedFrom: 'cast',
      surveyedOn: '2027-04-03',
    });
    expect(spot?.presentation).toContain('bottom bait');
    expect(spot?.lineOutM).toBeCloseTo(51.2064, 9);
  });

  test('quotes the surface, and says so, where no cast was made within the usable radius', async () => {
    const page = await pageFor(joan);
    const [spot] = page.spots ?? [];
    const aside: [number, number] = [
      water.peg.details.origin[0] + 0.00004,
      water.peg.details.origin[1] + 0.0004,
    ];
    const id = randomUUID();
    const details = { ...spotAt(aside), name: 'Between casts', usableRadiusM: 0.3 };
    expect(
      (await joan.put(`/pegs/${water.peg.id}/spots/${id}`).send({ details, version: null })).status,
    ).toBe(200);
    const found = (await pageFor(joan)).spots?.find((each) => each.id === id);
    expect(found).toMatchObject({ quotedFrom: 'chart', grade: null, surveyLevelM: null });
    expect(found?.depthM).toBeGreaterThan(1);
    expect(spot?.quotedFrom).toBe('cast');
    expect((await joan.delete(`/pegs/${water.peg.id}/spots/${id}`)).status).toBe(204);
  });

  test('has no peg of another id', async () => {
    for (const at of ['page', 'card.pdf', 'section?bearingDeg=0&toM=60'])
      expect((await aStranger(server).get(`/pegs/${randomUUID()}/${at}`)).status).toBe(404);
  });
});

describe('a section', () => {
  const at = (query: string) => `/pegs/${water.peg.id}/section?${query}`;

  test('gives depth and bottom under a drawn cast, gaps and all', async () => {
    const { points } = SectionView.parse((await joan.get(at('bearingDeg=0&toM=120'))).body);
    const over = points.filter(({ depthM }) => depthM !== null);
    expect(over.length).toBeGreaterThan(50);
    expect(points.at(-1)?.depthM).toBeNull();
    expect(over.some(({ bottom }) => bottom === 'gravel')).toBe(true);
    const line = points.find(({ rangeM }) => rangeM > 50);
    expect(line?.lineOutM).toBeGreaterThan(line?.rangeM ?? Infinity);
  });

  test('leaves out what this reader may not see', async () => {
    server.setNow('2027-06-01T09:00:00Z');
    const { points } = SectionView.parse((await sofia.get(at('bearingDeg=0&toM=60'))).body);
    expect(points.some(({ depthM }) => depthM !== null)).toBe(true);
    expect(points.every(({ bottom }) => bottom === null)).toBe(true);
    await setAudiences({ depth: 'staff', bottom: 'staff', spots: 'staff', soundings: 'staff' });
    const refused = await sofia.get(at('bearingDeg=0&toM=60'));
    await setAudiences(water.lake.details.audiences);
    expect(refused.status).toBe(403);
  });

  test('needs a bearing and a length that can be', async () => {
    const answer = await joan.get(at('bearingDeg=400&toM=2'));
    expect(problem(answer.body).errors?.map(({ pointer }) => pointer)).toEqual(['/bearingDeg', '/toM']);
  });
});

describe('spots', () => {
  const at = (id: string) => `/pegs/${water.peg.id}/spots/${id}`;
  const inWater = (): [number, number] => [water.peg.details.origin[0], water.peg.details.origin[1] + 0.0003];

  test('are made and changed by the head bailiff and the manager, with one winner of two at once', async () => {
    const id = randomUUID();
    const made = await joan.put(at(id)).send({ details: spotAt(inWater()), version: null });
    expect(SpotKept.parse(made.body)).toEqual({ version: 1 });
    const again = await joan.put(at(id)).send({ details: spotAt(inWater()), version: null });
    expect(SpotKept.parse(again.body)).toEqual({ version: 1 });
    const changes = ['One', 'Other'].map((name) => ({ details: { ...spotAt(inWater()), name }, version: 1 }));
    const both = await Promise.all(changes.map((change) => here.people.manager.put(at(id)).send(change)));
    expect(both.map(({ status }) => status).sort()).toEqual([200, 409]);
    expect((await joan.delete(at(id))).status).toBe(204);
    expect((await joan.delete(at(id))).status).toBe(204);
    expect((await joan.put(at(id)).send({ details: spotAt(inWater()), version: 2 })).status).toBe(404);
  });

  test('lie on the water', async () => {
    const onLand: [number, number] = [water.peg.details.origin[0], water.peg.details.origin[1] - 0.001];
    const answer = await joan.put(at(randomUUID())).send({ details: spotAt(onLand), version: null });
    expect(problem(answer.body).errors?.[0]?.pointer).toBe('/details/position');
    const nameless = await joan
      .put(at(randomUUID()))
      .send({ details: { ...spotAt(inWater()), name: ' ' }, version: null });
    expect(problem(nameless.body).errors?.[0]?.pointer).toBe('/details/name');
  });

  test('are nobody else’s to make or take away', async () => {
    const body = { details: spotAt(inWater()), version: null };
    for (const person of [here.people.bailiff, here.people.owner, here.people.member, here.people.angler]) {
      expect((await person.put(at(randomUUID())).send(body)).status).toBe(403);
      expect((await person.delete(at(spotId))).status).toBe(403);
    }
    expect((await elsewhere.people.manager.put(at(randomUUID())).send(body)).status).toBe(404);
    expect((await elsewhere.people.manager.delete(at(spotId))).status).toBe(404);
    expect((await aStranger(server).put(at(randomUUID())).send(body)).status).toBe(401);
    expect((await aStranger(server).delete(at(spotId))).status).toBe(401);
  });
});

describe('the card', () => {
  test('is a PDF of the reader’s own page', async () => {
    server.setNow('2027-07-17T09:00:00Z');
    const answer = await sofia.get(`/pegs/${water.peg.id}/card.pdf`).buffer(true);
    expect(answer.headers['content-type']).toBe('application/pdf');
    expect(answer.headers['cache-control']).toContain('no-store');
    expect(Buffer.from(answer.body).subarray(0, 5).toString()).toBe('%PDF-');
  });
});

describe('the chart’s age', () => {
  test('is changed once the water has stood half a metre lower since', async () => {
    server.setNow('2027-09-02T09:00:00Z');
    expect((await chartFor(joan)).age).toBe('current');
    const reading = await aReading(server, water.board, { levelM: 0.1, at: '2027-09-01T05:00:00Z' });
    expect((await chartFor(joan)).age).toBe('changed');
    await server.server.source.query('DELETE FROM level_reading WHERE id = $1', [reading]);
    server.setNow('2028-04-03T09:00:00Z');
    expect((await chartFor(joan)).age).toBe('ageing');
    server.setNow('2029-04-03T09:00:00Z');
    expect((await chartFor(joan)).age).toBe('old');
  });
});

const Geojson = z.object({
  features: z.array(
    z.object({ geometry: z.object({ type: z.string() }), properties: z.record(z.string(), z.unknown()) }),
  ),
});

describe('no export shows more than the screen', () => {
  const audiences = fc.record({
    depth: fc.constantFrom(...Audience.options),
    bottom: fc.constantFrom(...Audience.options),
    spots: fc.constantFrom(...Audience.options),
    soundings: fc.constantFrom(...Audience.options),
  });
  const hours = fc.constantFrom('2027-07-17T09:00:00Z', '2027-07-19T09:00:00Z'); // within Sofia's ticket, and after it
  const readers = fc.constantFrom('stranger', 'sofia', 'member', 'angler', 'elsewhere', 'bailiff', 'owner');
  const reader = (who: string): Asker =>
    who === 'stranger'
      ? aStranger(server)
      : who === 'sofia'
        ? sofia
        : who === 'elsewhere'
          ? elsewhere.people.manager
          : here.people[z.enum(['member', 'angler', 'bailiff', 'owner']).parse(who)];

  test('whoever reads, whatever the lake shows, whenever', async () => {
    await fc.assert(
      fc.asyncProperty(audiences, hours, readers, async (shown, hour, who) => {
        await setAudiences(shown);
        server.setNow(hour);
        const person = reader(who);
        const view = await chartFor(person);
        const { features } = Geojson.parse((await person.get(`/charts/${chartId}/geojson`)).body);
        const kinds = new Set(features.map(({ properties }) => properties.kind));
        const staff = who === 'bailiff' || who === 'owner';
        const ticket = who === 'sofia' && hour === '2027-07-17T09:00:00Z';
        const may = (audience: Audience): boolean =>
          staff ||
          audience === 'public' ||
          (audience === 'ticket' && ticket) ||
          (audience === 'members' && who === 'member');
        const sees = {
          depth: may(shown.depth),
          bottom: may(shown.bottom),
          spots: may(shown.spots),
          soundings: may(shown.soundings),
        };
        expect(view.isobaths !== null).toBe(sees.depth);
        expect(view.depth !== null && view.figures !== null).toBe(sees.depth);
        expect(view.substrate !== null && view.cover !== null).toBe(sees.bottom);
        expect(view.soundings !== null).toBe(sees.soundings && sees.depth);
        expect(kinds.has('contour')).toBe(view.isobaths !== null);
        expect(kinds.has('cast')).toBe(view.soundings !== null);
        const bottoms = new Set(
          features.map(({ properties }) => properties.bottom).filter((bottom) => bottom !== undefined),
        );
        if (!sees.bottom) expect([...bottoms].every((bottom) => bottom === 'unknown')).toBe(true);
        const casts = features.filter(({ properties }) => properties.kind === 'cast');
        expect(casts).toHaveLength(view.soundings?.length ?? 0);
        if (!staff) expect(casts.every(({ properties }) => properties.grade !== 'D')).toBe(true);
        const page = await pageFor(person);
        expect(page.spots !== null).toBe(sees.spots);
        expect((page.extract?.isobaths.length ?? 0) > 0).toBe(sees.depth);
        const grid = page.extract?.grid ?? null;
        expect((grid?.depth ?? null) !== null).toBe(sees.depth);
        expect((grid?.substrate ?? null) !== null && (grid?.cover ?? null) !== null).toBe(sees.bottom);
        for (const spot of page.spots ?? []) {
          expect(spot.depthM !== null && spot.section !== null).toBe(sees.depth);
          expect(spot.bottom !== null && spot.presentation !== null).toBe(sees.bottom);
          if (!sees.depth) expect(spot.words).not.toMatch(/\d m (today|at)/);
          if (!sees.bottom) expect(spot.words).not.toMatch(/gravel/);
        }
      }),
      { numRuns: 40 },
    );
    await setAudiences(water.lake.details.audiences);
  }, 120_000);

  test('and nothing tells a hidden depth by the line that goes down to it', async () => {
    const public_ = { depth: 'public', bottom: 'public', spots: 'public', soundings: 'staff' } as const;
    server.setNow('2027-07-19T09:00:00Z');
    await setAudiences(public_);
    const at = `/pegs/${water.peg.id}/section?bearingDeg=0&toM=60`;
    const deep = SectionView.parse((await aStranger(server).get(at)).body).points;
    await setAudiences({ ...public_, depth: 'staff' });
    const hidden = SectionView.parse((await aStranger(server).get(at)).body).points;
    expect(deep.some(({ depthM }) => depthM !== null && depthM > 1)).toBe(true);
    expect(hidden.some(({ bottom }) => bottom !== null)).toBe(true);
    // As if the bottom lay at the water's face: the same line at a range whatever is under it.
    const near = deep.findIndex(({ depthM, rangeM }) => depthM !== null && depthM > 1 && rangeM < 30);
    expect(hidden[near]?.lineOutM).toBeLessThan(deep[near]?.lineOutM ?? 0);
    const [spot] = (await pageFor(aStranger(server))).spots ?? [];
    expect(spot?.depthM).toBeNull();
    for (const lengthM of [spot?.rangeM, spot?.xM, spot?.yM]) expect(Number.isInteger(lengthM)).toBe(true);
    await setAudiences(public_);
    expect(Number.isInteger((await pageFor(aStranger(server))).spots?.[0]?.rangeM)).toBe(false);
  });

  test('and a sounding graded D is kept from all but staff', async () => {
    const content = await chartContent(server.server.source.manager, chartId);
    const [first, ...rest] = content?.built.soundings ?? [];
    if (!content || !first) throw new Error('The chart holds no soundings');
    const built = { ...content.built, soundings: [{ ...first, grade: 'D' as const }, ...rest] };
    const all = { depth: true, bottom: true, spots: true, soundings: true };
    const notes = { depth: null, bottom: null, spots: null, soundings: null };
    const unmoved = { age: 'current' as const, changes: [], levelsMoved: false };
    const ids = (staff: boolean) =>
      layersFor({ ...content, built }, { staff, sees: all, notes }, unmoved).soundings?.map(({ id }) => id) ??
      [];
    expect(ids(true)).toContain(first.id);
    expect(ids(false)).not.toContain(first.id);
    expect(ids(false)).toHaveLength(rest.length);
  });
});

test('a chart of another fishery is reviewed by nobody here', async () => {
  expect((await elsewhere.people.owner.get(`/charts/${chartId}/review`)).status).toBe(404);
  expect(
    ChartReview.parse((await here.people.owner.get(`/charts/${chartId}/review`)).body).may.withdraw,
  ).toBe(true);
});
