import { ChartReview, ChartView } from '@mereward/shared/charts/contract';
import {
  DisagreementForReview,
  DisagreementList,
  DisagreementReviewList,
  DisagreementView,
  type Disagree,
} from '@mereward/shared/charts/disagreement';
import { Lake } from '@mereward/db/entities/lakes/lake';
import { ProblemBody } from '@mereward/shared/problems/problem';
import { VisitWithCasts } from '@mereward/shared/surveys/contract';
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { draftedChart, publishedChart } from '../support/charts';
import { aSurveyGround } from '../support/grounds';
import { aTicket } from '../support/tickets';
import { aPerson, aStranger, type Person } from '../support/people';
import type { TestServer } from '../support/server';
import { aSurvey, type TestWater } from '../support/surveys';
import { aReading, type TestFishery } from '../support/waters';

let server: TestServer;
let here: TestFishery;
let elsewhere: TestFishery;
let water: TestWater;
let joan: Person;
let chartId: string;
let visitId: string;
let spotId: string;
let sofia: Person;

const DAY = '2027-07-17';

beforeAll(async () => {
  ({ server, here, elsewhere, water, joan } = await aSurveyGround());
  visitId = await aSurvey(joan, water);
  chartId = await publishedChart(server, {
    person: joan,
    approver: here.people.manager,
    lakeId: water.lake.id,
    visitIds: [visitId],
  });
  const { casts } = VisitWithCasts.parse((await joan.get(`/visits/${visitId}`)).body);
  const cast = casts.find(({ observation: { wrapsWhole } }) => wrapsWhole === 14);
  if (!cast?.reduced.ok) throw new Error('The fan has no cast at fourteen wraps');
  spotId = randomUUID();
  const details = { name: 'The bar', position: cast.reduced.sounding.position, usableRadiusM: 1, note: '' };
  await joan.put(`/pegs/${water.peg.id}/spots/${spotId}`).send({ details, version: null });
  sofia = await aPerson(server, { name: 'Sofia Marsh' });
  await aTicket(server, {
    pegId: water.peg.id,
    holder: sofia,
    from: `${DAY}T06:00:00Z`,
    until: '2027-07-18T06:00:00Z',
  });
  await aReading(server, water.board, { levelM: 0.38, at: `${DAY}T05:00:00Z` });
  server.setNow(`${DAY}T15:00:00Z`);
});
afterAll(() => server.close());

const problem = (body: unknown) => ProblemBody.parse(body);

const told = (wishes: Partial<Disagree> = {}, found: Partial<Disagree['found']> = {}): Disagree => ({
  id: randomUUID(),
  day: DAY,
  at: {
    by: 'count',
    markId: water.mark.id,
    offsetDeg: 0,
    wrapsWhole: 14,
    remainderM: 0,
    stickSpacingM: 3.6576,
    wrapReference: 'lead_to_clip',
  },
  found: { depthM: 1.2, depthBy: 'float', bottom: null, snag: false, weed: null, note: '', ...found },
  ...wishes,
});
const send = (person: Person, body: object) => person.post(`/pegs/${water.peg.id}/disagreements`).send(body);
const mine = async (person: Person) =>
  DisagreementList.parse((await person.get('/disagreements/mine')).body).disagreements;
const listed = async (person: Person) =>
  DisagreementReviewList.parse((await person.get(`/lakes/${water.lake.id}/disagreements`)).body)
    .disagreements;
const decide = (person: Person, id: string, body: object) =>
  person.post(`/disagreements/${id}/decide`).send(body);
const ACCEPT = { decision: 'accept', remeasured: null, reason: '' };

async function sent(wishes: Partial<Disagree> = {}, found: Partial<Disagree['found']> = {}, by = sofia) {
  const body = told(wishes, found);
  const answer = await send(by, body);
  expect(answer.status, answer.text).toBe(201);
  return body.id;
}

describe('telling that it isn’t like that', () => {
  test('is kept once however often it is sent, and waits', async () => {
    const body = told();
    const [first, second] = await Promise.all([send(sofia, body), send(sofia, body)]);
    expect([first.status, second.status]).toEqual([201, 201]);
    expect(DisagreementView.parse(first.body)).toMatchObject({
      status: 'waiting',
      placeWords: '14 wraps (12 ft) over pump-house chimney',
      grade: null,
      charts: [],
    });
    expect((await mine(sofia)).filter(({ id }) => id === body.id)).toHaveLength(1);
    const other = await send(sofia, { ...body, day: '2027-07-18' });
    expect(other.status).toBe(409);
  });

  test('is for the day of one’s ticket, for members and for staff', async () => {
    expect((await send(here.people.member, told())).status).toBe(201);
    expect((await send(here.people.bailiff, told())).status).toBe(201);
    const outsider = await aPerson(server, { name: 'Nobody here' });
    const refused = await send(outsider, told());
    expect(refused.status).toBe(403);
    expect(problem(refused.body).title).toBe('You had no ticket for peg FO7 on 17 Jul 2027');
    expect((await send(sofia, told({ day: '2027-07-12' }))).status).toBe(403);
    expect((await send(elsewhere.people.manager, told())).status).toBe(403);
    const stranger = await aStranger(server).post(`/pegs/${water.peg.id}/disagreements`).send(told());
    expect(stranger.status).toBe(401);
    expect((await sofia.post(`/pegs/${randomUUID()}/disagreements`).send(told())).status).toBe(404);
  });

  test('says nothing of the depth to somebody who may not see it, and takes the report all the same', async () => {
    const { manager } = server.server.source;
    const lake = await manager.findOneByOrFail(Lake, { id: water.lake.id });
    const audiences = { depth: 'staff', bottom: 'staff', spots: 'staff', soundings: 'staff' } as const;
    await manager.update(Lake, { id: lake.id }, { details: { ...lake.details, audiences } });
    const kept = await send(sofia, told());
    expect(kept.status).toBe(201);
    expect(kept.text).not.toMatch(/apart|nearest|foundDepthM|xM/);
    const hidden = await send(sofia, told({ at: { by: 'spot', spotId } }));
    expect(hidden.status).toBe(400);
    expect(problem(hidden.body).errors?.[0]?.pointer).toBe('/at/spotId');
    await manager.update(Lake, { id: lake.id }, { details: lake.details });
  });

  test('refuses what cannot be: no finding, a day to come, a place on land, another lake’s mark', async () => {
    const faults = async (body: object, pointer: string) => {
      const answer = await send(sofia, body);
      expect(answer.status, answer.text).toBe(400);
      expect(problem(answer.body).errors?.map((error) => error.pointer)).toContain(pointer);
    };
    await faults(told({}, { depthM: null, depthBy: null }), '/found/depthM');
    await faults(told({}, { depthBy: null }), '/found/depthBy');
    await faults(told({ day: '2027-07-19' }), '/day');
    await faults(told({ day: '2027-04-03' }), '/day');
    const at = told().at;
    if (at.by !== 'count') throw new Error('A count was meant');
    await faults(told({ at: { ...at, wrapsWhole: 110 } }), '/at');
    await faults(told({ at: { ...at, markId: randomUUID() } }), '/at/markId');
    await faults(told({ at: { by: 'place', position: water.mark.details.position } }), '/at');
  });

  test('takes twenty a day from one person, and keeps what was sent', async () => {
    const keen = await aPerson(server, { roles: [{ fisheryId: here.id, role: 'member' }] });
    for (let i = 0; i < 20; i++) await sent({}, {}, keen);
    expect((await send(keen, told())).status).toBe(429);
    expect(await mine(keen)).toHaveLength(20);
    expect(await mine(elsewhere.people.member)).toEqual([]);
  });
});

describe('the review list', () => {
  test('holds a report against the chart and the soundings it doubts', async () => {
    const id = await sent();
    const review = (await listed(here.people.office)).find((each) => each.id === id);
    expect(review).toMatchObject({
      reporter: 'Sofia Marsh',
      status: 'waiting',
      chart: { version: '2027.1' },
      gradeIfAccepted: 'C',
      may: { decide: true, whyNot: null },
    });
    // Board 0.38 that day, datum 0.62: the water was 0.24 m lower, so 1.20 m found is 1.44 m below datum.
    expect(review?.foundDepthM).toBeCloseTo(1.2 + 0.62 - 0.38, 9);
    expect(review?.levelWords).toContain('FO-G1 stood at 0.38 m');
    expect(review?.nearest[0]).toMatchObject({ surveyor: 'The head bailiff', grade: expect.any(String) });
    expect(review?.nearest[0]?.label).toMatch(/^FO7, cast \d+$/);
    expect(review?.nearest[0]?.awayM).toBeLessThan(1);
    const { apartM, foundDepthM, foundSigmaM, chart } = review ?? {};
    expect(apartM).toBeCloseTo((foundDepthM ?? 0) - (chart?.depthM ?? 0), 9);
    const spread = Math.hypot(foundSigmaM ?? 0, chart?.sigmaM ?? 0);
    expect(review?.apartSigmas).toBeCloseTo((apartM ?? 0) / spread, 9);
    expect(review?.apartSigmas).toBeLessThan(-1.96);
  });

  test('is for the office, the head bailiff, the manager and the owner', async () => {
    const path = `/lakes/${water.lake.id}/disagreements`;
    for (const role of ['office', 'head_bailiff', 'manager', 'owner'] as const)
      expect((await here.people[role].get(path)).status).toBe(200);
    expect((await here.people.bailiff.get(path)).status).toBe(403);
    expect((await here.people.member.get(path)).status).toBe(403);
    expect((await sofia.get(path)).status).toBe(404);
    expect((await elsewhere.people.manager.get(path)).status).toBe(404);
    expect((await aStranger(server).get(path)).status).toBe(401);
  });
});

describe('deciding', () => {
  test('is for those who review, never for one’s own, and never from another fishery', async () => {
    const id = await sent();
    expect((await decide(here.people.bailiff, id, ACCEPT)).status).toBe(403);
    expect((await decide(sofia, id, ACCEPT)).status).toBe(404);
    expect((await decide(elsewhere.people.manager, id, ACCEPT)).status).toBe(404);
    expect((await decide(here.people.office, randomUUID(), ACCEPT)).status).toBe(404);
    const own = await sent({}, {}, here.people.head_bailiff);
    const refused = await decide(here.people.head_bailiff, own, ACCEPT);
    expect(refused.status).toBe(403);
    expect(problem(refused.body).title).toContain('You reported this yourself');
    expect((await listed(here.people.head_bailiff)).find((each) => each.id === own)?.may.decide).toBe(false);
  });

  test('of two reviewers at once one is heard, and the same decision sent twice is one', async () => {
    const id = await sent();
    const decline = { decision: 'decline', reason: 'The float was on the margin shelf.' };
    const answers = await Promise.all([
      decide(here.people.office, id, ACCEPT),
      decide(here.people.manager, id, decline),
    ]);
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409]);
    const [accepted] = answers;
    const again =
      accepted.status === 200
        ? await decide(here.people.office, id, ACCEPT)
        : await decide(here.people.manager, id, decline);
    expect(again.status).toBe(200);
  });

  test('declining wants a reason, and the reporter reads it', async () => {
    const id = await sent();
    expect((await decide(here.people.office, id, { decision: 'decline', reason: ' ' })).status).toBe(400);
    const reason = 'Measured again: 2.4 m, twice.';
    const answer = await decide(here.people.office, id, { decision: 'decline', reason });
    expect(DisagreementForReview.parse(answer.body)).toMatchObject({ status: 'declined', grade: null });
    expect((await mine(sofia)).find((each) => each.id === id)).toMatchObject({ status: 'declined', reason });
  });

  test('a depth measured again needs the gauge board of that day', async () => {
    const id = await sent();
    const remeasured = { day: DAY, depthM: 1.3 };
    expect((await decide(here.people.office, id, { ...ACCEPT, remeasured })).status).toBe(200);
    const late = await sent();
    const without = { ...ACCEPT, remeasured: { day: DAY, depthM: null } };
    const bare = await decide(here.people.office, late, without);
    expect(problem(bare.body).errors?.[0]?.pointer).toBe('/remeasured/depthM');
    const snag = await sent({}, { depthM: null, depthBy: null, snag: true });
    expect((await decide(here.people.office, snag, without)).body).toMatchObject({ grade: 'B' });
    const early = { day: '2027-07-01', depthM: 1.3 };
    const refused = await decide(here.people.office, late, { ...ACCEPT, remeasured: early });
    expect(problem(refused.body).errors?.[0]?.pointer).toBe('/remeasured/day');
  });
});

describe('an accepted report', () => {
  test(
    'leaves the published chart as it is and stands in the next one by its own grade',
    { timeout: 90_000 },
    async () => {
      const before = await sofia.get(`/charts/${chartId}`);
      const point = await sent();
      const touched = await sent({ at: { by: 'spot', spotId } }, { depthBy: 'lead_count' });
      const declined = await sent();
      const pattern = await sent({ at: { by: 'spot', spotId } }, { depthM: 4, depthBy: 'other' });
      await decide(here.people.office, point, ACCEPT);
      await decide(here.people.office, touched, ACCEPT);
      await decide(here.people.office, declined, { decision: 'decline', reason: 'No.' });
      await decide(here.people.office, pattern, { ...ACCEPT, remeasured: { day: DAY, depthM: 2.2 } });
      expect((await sofia.get(`/charts/${chartId}`)).body).toEqual(before.body);

      const joan = here.people.head_bailiff;
      const draft = await draftedChart(server, { person: joan, lakeId: water.lake.id, visitIds: [visitId] });
      const seen = ChartView.parse((await joan.get(`/charts/${draft}`)).body);
      const gradeOf = (id: string) => seen.soundings?.find((sounding) => sounding.id === id)?.grade ?? null;
      expect([point, touched, declined, pattern].map(gradeOf)).toEqual(['C', 'D', null, 'B']);
      expect(seen.soundings?.find(({ id }) => id === point)?.depthM).toBeCloseTo(1.44, 9);
      const review = ChartReview.parse((await joan.get(`/charts/${draft}/review`)).body);
      expect(review.checks.find(({ key }) => key === 'built')?.state).toBe('passed');
      expect((await listed(joan)).find(({ id }) => id === point)?.charts.map(({ id }) => id)).toContain(
        draft,
      );
      expect((await mine(sofia)).find(({ id }) => id === point)?.charts).toEqual([]); // a draft is the staff's own

      const later = await sent();
      await decide(here.people.office, later, ACCEPT);
      const stale = ChartReview.parse((await joan.get(`/charts/${draft}/review`)).body);
      expect(stale.checks.find(({ key }) => key === 'built')?.state).toBe('failed');
    },
  );

  test('moves the surface only from grade B up', { timeout: 90_000 }, async () => {
    const joan = here.people.head_bailiff;
    const lakeId = water.lake.id;
    const drafted = async () => {
      const id = await draftedChart(server, { person: joan, lakeId, visitIds: [visitId] });
      return ChartView.parse((await joan.get(`/charts/${id}`)).body);
    };
    const before = await drafted();
    const at = told().at;
    if (at.by !== 'count') throw new Error('A count was meant');
    const aside = { ...at, wrapsWhole: 10, remainderM: 1.5, offsetDeg: 3 };
    await decide(here.people.office, await sent({ at: aside }, { depthM: 6 }), ACCEPT);
    const withPoint = await drafted();
    expect(withPoint.depth).toBe(before.depth);
    expect(withPoint.isobaths).toEqual(before.isobaths);
    const again = await sent({ at: aside }, { depthM: 6 });
    await decide(here.people.office, again, { ...ACCEPT, remeasured: { day: DAY, depthM: 6 } });
    expect((await drafted()).depth).not.toBe(before.depth);
  });
});

describe('taking back an accepted report', () => {
  const takeBack = (person: Person, id: string, reason = 'Sofia had mistaken the chimney.') =>
    person.post(`/disagreements/${id}/take-back`).send({ reason });
  const accepted = async (by = sofia): Promise<string> => {
    const id = await sent({}, {}, by);
    expect((await decide(here.people.office, id, ACCEPT)).status).toBe(200);
    return id;
  };

  test('keeps what it was accepted as, tells the angler why, and leaves no word for a second', async () => {
    const id = await accepted();
    const answer = await takeBack(here.people.head_bailiff, id);
    expect(answer.status, answer.text).toBe(200);
    expect(DisagreementForReview.parse(answer.body)).toMatchObject({
      status: 'taken_back',
      grade: 'C',
      decidedBy: 'The office',
      takenBackBy: 'The head bailiff',
      takenBack: { reason: 'Sofia had mistaken the chimney.' },
      may: { decide: false, takeBack: false },
    });
    expect((await mine(sofia)).find((each) => each.id === id)).toMatchObject({
      status: 'taken_back',
      takenBack: { reason: 'Sofia had mistaken the chimney.' },
    });
    expect((await takeBack(here.people.head_bailiff, id)).status).toBe(200); // sent twice
    const late = await takeBack(here.people.manager, id);
    expect(problem(late.body).title).toBe('This was taken back already, by The head bailiff');
    expect((await decide(here.people.manager, id, ACCEPT)).status).toBe(409);
  });

  test('is for those who decide, never for one’s own, and of an accepted one', async () => {
    const id = await accepted();
    expect((await takeBack(here.people.bailiff, id)).status).toBe(403);
    expect((await takeBack(sofia, id)).status).toBe(404);
    expect((await takeBack(elsewhere.people.manager, id)).status).toBe(404);
    expect((await takeBack(here.people.office, id, ' ')).status).toBe(400);
    expect((await takeBack(here.people.office, randomUUID())).status).toBe(404);
    const own = await sent({}, {}, here.people.head_bailiff);
    await decide(here.people.office, own, ACCEPT);
    expect((await takeBack(here.people.head_bailiff, own)).status).toBe(403);
    const waiting = await sent();
    expect((await takeBack(here.people.office, waiting)).status).toBe(409);
  });

  test('of two at once one is heard', async () => {
    const id = await accepted(here.people.member);
    const answers = await Promise.all([
      takeBack(here.people.office, id, 'One reason'),
      takeBack(here.people.manager, id, 'Another'),
    ]);
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409]);
  });

  test(
    'leaves the published chart, and asks a draft to be built without it',
    { timeout: 60_000 },
    async () => {
      const id = await accepted(here.people.bailiff);
      const joan = here.people.head_bailiff;
      const draft = await draftedChart(server, { person: joan, lakeId: water.lake.id, visitIds: [visitId] });
      const before = (await sofia.get(`/charts/${chartId}`)).body;
      await takeBack(here.people.manager, id);
      expect((await sofia.get(`/charts/${chartId}`)).body).toEqual(before);
      const stale = ChartReview.parse((await joan.get(`/charts/${draft}/review`)).body);
      expect(stale.checks.find(({ key }) => key === 'built')).toMatchObject({
        state: 'failed',
        blocks: true,
      });
      await joan.post(`/charts/${draft}/rebuild`);
      await server.settle();
      const seen = ChartView.parse((await joan.get(`/charts/${draft}`)).body);
      expect(seen.soundings?.some((sounding) => sounding.id === id)).toBe(false);
    },
  );
});
