import { ProblemBody } from '@mereward/shared/problems/problem';
import { BottomEvents, BottomEventView } from '@mereward/shared/surveys/bottom-event-contract';
import {
  BottomLearning,
  BottomTableThen,
  BottomTableView,
  type BottomFeel,
} from '@mereward/shared/surveys/bottom-table-contract';
import { ConfirmedBottoms, ConfirmedBottomView } from '@mereward/shared/surveys/confirmed-contract';
import { VisitWithCasts } from '@mereward/shared/surveys/contract';
import { LeadList, LeadView } from '@mereward/shared/surveys/lead-contract';
import { Reducing } from '@mereward/shared/surveys/reducing-contract';
import { USUAL_FEEL } from '@mereward/shared/surveys/usual-feel';
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { aSurveyGround } from '../support/grounds';
import { aKit } from '../support/kit';
import { aStranger, type Person } from '../support/people';
import type { TestServer } from '../support/server';
import { aVisitBody, keptCast, openedVisit, type TestWater } from '../support/surveys';
import type { TestFishery } from '../support/waters';

let server: TestServer;
let here: TestFishery;
let elsewhere: TestFishery;
let water: TestWater;
let joan: Person;
let owner: Person;

beforeAll(async () => {
  ({ server, here, elsewhere, water, joan } = await aSurveyGround());
  owner = here.people.owner;
});
afterAll(() => server.close());

const problem = (body: unknown) => ProblemBody.parse(body);
const pointers = (body: unknown) => problem(body).errors?.map(({ pointer }) => pointer);

/** Gravel that is felt as stones are: coarse, and seldom fine. */
const coarser = (): BottomFeel => {
  const feel = structuredClone(USUAL_FEEL);
  const drag = { ...feel.substrate.of.gravel.drag, fine_rattle: 0.15, coarse_rattle: 0.6 };
  return {
    ...feel,
    substrate: {
      ...feel.substrate,
      source: 'Our own casts',
      of: { ...feel.substrate.of, gravel: { ...feel.substrate.of.gravel, drag } },
    },
  };
};

describe('the table of feels', () => {
  const path = () => `/fisheries/${here.id}/bottom-table`;
  const body = (wishes: object = {}) => ({
    id: randomUUID(),
    after: 0,
    feel: coarser(),
    reason: 'Our gravel is coarse',
    ...wishes,
  });
  const tableNow = async (person = owner) => BottomTableView.parse((await person.get(path())).body);

  test('is the built-in one until a fishery makes its own, and says so', async () => {
    const view = await tableNow();
    expect(view).toMatchObject({
      inForce: { version: 0, kind: 'usual', madeBy: null },
      may: { change: true },
    });
    expect(view.feel).toEqual(USUAL_FEEL);
    expect((await tableNow(joan)).may.change).toBe(false);
  });

  test('is read by the owner, a manager and the head bailiff, and changed by the first two only', async () => {
    const { bailiff, office, member } = here.people;
    for (const person of [bailiff, office, member]) expect((await person.get(path())).status).toBe(403);
    for (const person of [joan, bailiff, office])
      expect((await person.post(path()).send(body())).status).toBe(403);
    expect((await elsewhere.people.owner.get(path())).status).toBe(404);
    expect((await elsewhere.people.owner.post(path()).send(body())).status).toBe(404);
    expect((await aStranger(server).get(path())).status).toBe(401);
    expect((await owner.get(`/fisheries/${randomUUID()}/bottom-table`)).status).toBe(404);
  });

  test('refuses a row that does not add up, and a feel that could never be', async () => {
    const off = coarser();
    off.cover.of.snag.drop = { ...off.cover.of.snag.drop, dull: 0.5 };
    const answer = await owner.post(path()).send(body({ feel: off }));
    expect(answer.status).toBe(400);
    expect(pointers(answer.body)).toEqual(['/feel/cover/of/snag/drop']);
    const never = coarser();
    never.substrate.of.silt.smell = { none: 1, bad_eggs: 0 };
    expect((await owner.post(path()).send(body({ feel: never }))).status).toBe(400);
    expect((await tableNow()).inForce.version).toBe(0);
  });

  test('of two people saving at once one wins and the other is told', async () => {
    const [one, other] = await Promise.all([
      owner.post(path()).send(body()),
      here.people.manager.post(path()).send(body({ reason: 'The other way' })),
    ]);
    expect([one.status, other.status].sort()).toEqual([201, 409]);
    const view = await tableNow();
    expect(view.inForce).toMatchObject({ version: 1, kind: 'edited' });
    expect(view.history.map(({ version }) => version)).toEqual([1, 0]);
  });

  test('sent again by the same person is kept once, and with another content refused', async () => {
    const again = body({ after: 1, reason: 'Again' });
    const [one, other] = await Promise.all([owner.post(path()).send(again), owner.post(path()).send(again)]);
    expect([one.status, other.status].filter((status) => status === 201).length).toBeGreaterThan(0);
    expect((await owner.post(path()).send(again)).status).toBe(201);
    expect((await tableNow()).inForce.version).toBe(2);
    expect((await owner.post(path()).send({ ...again, reason: 'Else' })).status).toBe(409);
  });

  test('changes how casts are read from then on, kept ones too, and travels with the visit', async () => {
    const visitId = await openedVisit(joan, water);
    const felt = { drop: 'sharp_crack', drag: 'coarse_rattle', cameBack: ['none'] } as const;
    const read = async () => VisitWithCasts.parse((await joan.get(`/visits/${visitId}`)).body);
    const gravel = (visit: VisitWithCasts) => {
      const reduced = visit.casts[0]?.reduced;
      return reduced?.ok ? (reduced.sounding.substrate?.gravel ?? 0) : 0;
    };
    await keptCast({ person: joan, water, visitId }, { ...felt, cameBack: [...felt.cameBack] });
    const own = await read();
    expect(Reducing.parse(own.reducing)).toMatchObject({
      tableVersion: 2,
      feel: { substrate: { source: 'Our own casts' } },
    });
    await owner.post(path()).send(body({ after: 2, feel: null, reason: 'Back to the built-in' }));
    const usual = await read();
    expect(Reducing.parse(usual.reducing)).toEqual({ tableVersion: 3, feel: null, lead: null });
    expect(gravel(own)).toBeGreaterThan(gravel(usual) + 0.1);
  });

  test('keeps every version as it was', async () => {
    const then = BottomTableThen.parse((await joan.get(`${path()}/1`)).body);
    expect(then.made).toMatchObject({ version: 1, kind: 'edited' });
    expect(then.feel.substrate.of.gravel.drag.coarse_rattle).toBe(0.6);
    expect(BottomTableThen.parse((await joan.get(`${path()}/0`)).body).feel).toEqual(USUAL_FEEL);
    expect((await joan.get(`${path()}/99`)).status).toBe(404);
    expect((await joan.get(`${path()}/x`)).status).toBe(404);
  });
});

describe('a confirmed bottom', () => {
  const path = () => `/lakes/${water.lake.id}/confirmed-bottoms`;
  let visitId: string;
  let castId: string;
  beforeAll(async () => {
    visitId = await openedVisit(joan, water, { title: 'Grabs' });
    ({ id: castId } = await keptCast(
      { person: joan, water, visitId },
      { drop: 'soft_slow', drag: 'fine_rattle', cameBack: ['none'], lineText: '14 + 0' },
    ));
  });
  const body = (wishes: object = {}) => ({
    id: randomUUID(),
    castId,
    position: null,
    positionSigmaM: 1,
    substrate: 'gravel',
    cover: 'clear',
    method: 'grab',
    day: '2027-04-03',
    note: '',
    ...wishes,
  });
  const tapped = () => ({ castId: null, position: [...water.lake.origin] });

  test('is kept at a cast or at a place on the water, once however often it is sent', async () => {
    const first = body();
    const [one, other] = await Promise.all([joan.post(path()).send(first), joan.post(path()).send(first)]);
    expect([one.status, other.status]).toEqual([201, 201]);
    const view = ConfirmedBottomView.parse(one.body);
    expect(view).toMatchObject({ castId, substrate: 'gravel', by: 'The head bailiff', endedBy: null });
    expect((await joan.post(path()).send({ ...first, cover: 'snag' })).status).toBe(409);
    const place = await here.people.bailiff
      .post(path())
      .send(body({ ...tapped(), substrate: null, cover: 'low_weed', method: 'pronged_lead' }));
    expect(place.status).toBe(201);
    const list = ConfirmedBottoms.parse((await owner.get(path())).body);
    expect(list.confirmed).toHaveLength(2);
    expect(list.may.confirm).toBe(false);
  });

  test.each([
    ['nothing said', { substrate: null, cover: null }, '/substrate'],
    ['a cast and a place', { position: [0, 0] }, '/position'],
    ['neither', { castId: null }, '/position'],
    ['dry land', { castId: null, position: [0, 0] }, '/position'],
    ['another cast', { castId: randomUUID() }, '/castId'],
    ['tomorrow', { day: '2027-04-04' }, '/day'],
  ])('is refused with %s', async (_, wishes, pointer) => {
    const answer = await joan.post(path()).send(body(wishes));
    expect(answer.status).toBe(400);
    expect(pointers(answer.body)).toContain(pointer);
  });

  test('is kept by those who survey, read by them and the owner, and by nobody else', async () => {
    for (const person of [owner, here.people.office, here.people.member])
      expect((await person.post(path()).send(body())).status).toBe(403);
    expect((await here.people.office.get(path())).status).toBe(403);
    expect((await elsewhere.people.manager.get(path())).status).toBe(404);
    expect((await elsewhere.people.manager.post(path()).send(body())).status).toBe(404);
    expect((await aStranger(server).post(path()).send(body())).status).toBe(401);
  });

  test('is taken back by whoever kept it or a manager, and by no other bailiff', async () => {
    const kept = ConfirmedBottomView.parse((await joan.post(path()).send(body({ note: 'A slip' }))).body);
    const at = `/confirmed-bottoms/${kept.id}`;
    expect((await here.people.bailiff.delete(at)).status).toBe(403);
    expect((await elsewhere.people.manager.delete(at)).status).toBe(404);
    expect((await joan.delete(at)).status).toBe(204);
    const list = ConfirmedBottoms.parse((await joan.get(path())).body);
    expect(list.confirmed.some(({ id }) => id === kept.id)).toBe(false);
    expect((await joan.delete(`/confirmed-bottoms/${randomUUID()}`)).status).toBe(404);
  });

  test('teaches the table through the casts in its reach, and only when a person takes it up', async () => {
    const table = `/fisheries/${here.id}/bottom-table`;
    const proposal = BottomLearning.parse((await owner.get(`${table}/learning`)).body);
    const before = proposal.before.substrate.of.gravel.drop.soft_slow;
    expect(proposal.paired).toBeGreaterThan(0);
    expect(proposal.counts.find(({ name }) => name === 'gravel')?.casts).toBeGreaterThan(0);
    expect(proposal.learnt.substrate.of.gravel.drop.soft_slow).toBeGreaterThan(before);
    const inForce = BottomTableView.parse((await owner.get(table)).body).inForce.version;
    const accept = { id: randomUUID(), after: inForce, digest: proposal.digest, reason: 'Grabs of April' };
    expect((await joan.post(`${table}/learning`).send(accept)).status).toBe(403);
    expect((await owner.post(`${table}/learning`).send({ ...accept, digest: 'old' })).status).toBe(409);
    const [one, other] = await Promise.all([
      owner.post(`${table}/learning`).send(accept),
      here.people.manager.post(`${table}/learning`).send({ ...accept, id: randomUUID() }),
    ]);
    expect([one.status, other.status].sort()).toEqual([201, 409]);
    const view = BottomTableView.parse((await owner.get(table)).body);
    expect(view.inForce).toMatchObject({ version: inForce + 1, kind: 'learnt' });
    expect(view.feel.substrate.of.gravel.drop.soft_slow).toBeGreaterThan(before);
    const again = BottomLearning.parse((await owner.get(`${table}/learning`)).body);
    expect(again.learnt).toEqual(proposal.learnt); // taken up twice it teaches nothing twice
  });
});

describe('an event that ends old evidence', () => {
  const path = () => `/lakes/${water.lake.id}/bottom-events`;
  const body = (wishes: object = {}) => ({
    id: randomUUID(),
    kind: 'weed_cut',
    area: null,
    happenedOn: '2027-04-02',
    ends: ['cover'],
    note: 'By boat',
    ...wishes,
  });
  const box = (lon: number, lat: number, halfDeg = 0.0003) => ({
    type: 'Polygon',
    coordinates: [
      [
        [lon - halfDeg, lat - halfDeg],
        [lon + halfDeg, lat - halfDeg],
        [lon + halfDeg, lat + halfDeg],
        [lon - halfDeg, lat + halfDeg],
        [lon - halfDeg, lat - halfDeg],
      ],
    ],
  });

  test('is recorded once however often it is sent, listed newest first and taken back', async () => {
    const [lon, lat] = water.lake.origin;
    const first = body({ area: box(lon, lat) });
    const [one, other] = await Promise.all([joan.post(path()).send(first), joan.post(path()).send(first)]);
    expect([one.status, other.status]).toEqual([201, 201]);
    expect(BottomEventView.parse(one.body).words).toBe('Weed was cut in part of the lake on 2 Apr 2027');
    expect((await joan.post(path()).send({ ...first, note: 'Else' })).status).toBe(409);
    const newer = BottomEventView.parse(
      (await owner.post(path()).send(body({ kind: 'flood', happenedOn: '2027-04-03' }))).body,
    );
    const list = BottomEvents.parse((await here.people.office.get(path())).body);
    expect(list.events.map(({ kind }) => kind)).toEqual(['flood', 'weed_cut']);
    expect(list.may.record).toBe(false);
    expect((await here.people.office.delete(`/bottom-events/${newer.id}`)).status).toBe(403);
    expect((await elsewhere.people.owner.delete(`/bottom-events/${newer.id}`)).status).toBe(404);
    expect((await joan.delete(`/bottom-events/${newer.id}`)).status).toBe(204);
    expect(BottomEvents.parse((await joan.get(path())).body).events).toHaveLength(1);
  });

  test.each([
    ['a day to come', { happenedOn: '2027-04-04' }, '/happenedOn'],
    ['nothing that it ends', { ends: [] }, '/ends'],
    ['the same end twice', { ends: ['cover', 'cover'] }, '/ends'],
    ['an area that is not over the water', { area: box(10, 50) }, '/area'],
    ['a kind of its own', { kind: 'volcano' }, '/kind'],
  ])('is refused with %s', async (_, wishes, pointer) => {
    const answer = await joan.post(path()).send(body(wishes));
    expect(answer.status).toBe(400);
    expect(pointers(answer.body)).toContain(pointer);
  });

  test('is recorded by the head bailiff and up, and hidden from strangers and other fisheries', async () => {
    for (const person of [here.people.bailiff, here.people.office, here.people.member])
      expect((await person.post(path()).send(body())).status).toBe(403);
    expect((await here.people.member.get(path())).status).toBe(403);
    expect((await elsewhere.people.owner.get(path())).status).toBe(404);
    expect((await aStranger(server).get(path())).status).toBe(401);
  });
});

describe('a calibrated lead', () => {
  const path = () => `/fisheries/${here.id}/leads`;
  const body = (wishes: object = {}) => ({
    id: randomUUID(),
    name: 'Three-ounce ball',
    leadG: 85,
    leadShape: 'smooth_ball',
    lineType: 'braid',
    falls: [
      { seconds: 1.3, depthM: 1.8 },
      { seconds: 2, depthM: 2.9 },
      { seconds: 2.9, depthM: 4.1 },
    ],
    calibratedOn: '2027-04-03',
    note: '',
    ...wishes,
  });

  test('turns its counts into depths of its own error, and those of no other lead', async () => {
    const kept = LeadView.parse((await joan.post(path()).send(body())).body);
    expect(kept.calibration.rateMPerS).toBeCloseTo(
      (1.3 * 1.8 + 2 * 2.9 + 2.9 * 4.1) / (1.3 ** 2 + 2 ** 2 + 2.9 ** 2),
      9,
    );
    const counted = { pulls: null, floatSight: null, dropCountS: 2 };
    const with_ = await openedVisit(joan, water, { title: 'With', kit: aKit({ leadId: kept.id }) });
    const without = await openedVisit(joan, water, { title: 'Without' });
    const one = await keptCast({ person: joan, water, visitId: with_ }, counted);
    const other = await keptCast({ person: joan, water, visitId: without }, counted);
    if (!one.reduced.ok || !other.reduced.ok) throw new Error('Not reduced');
    expect(one.reduced.sounding.depthM).toBeCloseTo(2 * kept.calibration.rateMPerS, 6);
    expect(one.reduced.sounding.depthSigmaM).toBeGreaterThan(kept.calibration.scatterM);
    expect(['C', 'D']).toContain(one.reduced.sounding.grade);
    expect(other.reduced.sounding.depthM).toBeNull();
    const visit = VisitWithCasts.parse((await joan.get(`/visits/${with_}`)).body);
    expect(Reducing.parse(visit.reducing).lead).toEqual(kept.calibration);
    const list = LeadList.parse((await owner.get(path())).body);
    expect(list.leads[0]?.usedBy.map(({ title }) => title)).toEqual(['With']);
  });

  test('is not taken for another weight, shape or line', async () => {
    const kept = LeadView.parse((await joan.post(path()).send(body({ name: 'Second' }))).body);
    const visits = `/lakes/${water.lake.id}/visits`;
    for (const kit of [aKit({ leadId: kept.id, leadG: 60 }), aKit({ leadId: randomUUID() })]) {
      const answer = await joan.post(visits).send(aVisitBody(water, { kit }));
      expect(answer.status).toBe(400);
      expect(pointers(answer.body)).toEqual(['/kit/leadId']);
    }
  });

  test('asks for three spots of different depth, and is kept once', async () => {
    const two = await joan.post(path()).send(body({ falls: body().falls.slice(0, 2) }));
    expect(two.status).toBe(400);
    expect(problem(two.body).title).toMatch(/at least three spots/);
    const lead = body({ name: 'Sent twice' });
    const answers = await Promise.all([joan.post(path()).send(lead), joan.post(path()).send(lead)]);
    expect(answers.map(({ status }) => status)).toEqual([201, 201]);
    expect((await joan.post(path()).send({ ...lead, name: 'Else' })).status).toBe(409);
    const at = `/leads/${lead.id}/put-away`;
    expect((await owner.post(at)).status).toBe(403);
    expect((await elsewhere.people.manager.post(at)).status).toBe(404);
    expect((await joan.post(at)).status).toBe(204);
    const { leads } = LeadList.parse((await joan.get(path())).body);
    expect(leads.at(-1)).toMatchObject({ id: lead.id, putAway: true });
  });

  test('is calibrated by those who survey', async () => {
    for (const person of [owner, here.people.office])
      expect((await person.post(path()).send(body())).status).toBe(403);
    expect((await here.people.office.get(path())).status).toBe(403);
    expect((await elsewhere.people.bailiff.get(path())).status).toBe(404);
    expect((await aStranger(server).get(path())).status).toBe(401);
  });
});
