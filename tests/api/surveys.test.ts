import { Mark } from '@mereward/db/entities/lakes/mark';
import { SurveyCast } from '@mereward/db/entities/surveys/survey-cast';
import { ProblemBody } from '@mereward/shared/problems/problem';
import {
  CastView,
  VisitList,
  VisitView,
  VisitWithCasts,
  type CorrectKit,
} from '@mereward/shared/surveys/contract';
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { aSurveyGround } from '../support/grounds';
import { aKit } from '../support/kit';
import { aStranger, type Person } from '../support/people';
import type { TestServer } from '../support/server';
import {
  aCastBody,
  aLongWater,
  aVisitBody,
  closedVisit,
  keptCast,
  openedVisit,
  type TestWater,
} from '../support/surveys';
import { aBoard, type TestFishery } from '../support/waters';

let server: TestServer;
let here: TestFishery;
let elsewhere: TestFishery;
let water: TestWater;
let joan: Person;

beforeAll(async () => {
  ({ server, here, elsewhere, water, joan } = await aSurveyGround());
});
afterAll(() => server.close());

const problem = (body: unknown) => ProblemBody.parse(body);
const visitOf = async (id: string, person = joan) =>
  VisitWithCasts.parse((await person.get(`/visits/${id}`)).body);

describe('a visit', () => {
  const path = () => `/lakes/${water.lake.id}/visits`;

  test('is opened by a bailiff and listed newest first', async () => {
    const first = await openedVisit(here.people.bailiff, water, {
      title: 'First',
      startedAt: '2027-04-01T08:00:00.000Z',
    });
    const second = await openedVisit(joan, water, { title: 'Second', startedAt: '2027-04-02T08:00:00.000Z' });
    const list = VisitList.parse((await joan.get(path())).body);
    const ids = list.visits.map(({ id }) => id).filter((id) => id === first || id === second);
    expect(ids).toEqual([second, first]);
    expect(list.visits.find(({ id }) => id === first)).toMatchObject({
      status: 'open',
      surveyor: { name: 'The bailiff' },
      datumM: 0.62,
      castCount: 0,
      soundingCount: 0,
      may: { addCasts: true, correct: true },
    });
    expect(list.may.open).toBe(true);
  });

  test('sent twice at once is opened once', async () => {
    const body = aVisitBody(water);
    const answers = await Promise.all([joan.post(path()).send(body), joan.post(path()).send(body)]);
    expect(answers.map(({ status }) => status)).toEqual([201, 201]);
    const other = await joan.post(path()).send({ ...body, title: 'Other words' });
    expect(other.status).toBe(409);
    expect((await here.people.bailiff.post(path()).send(body)).status).toBe(409);
  });

  test('needs the board that datum is read on, and a start that has been', async () => {
    const side = await aBoard(server, water.lake, { code: 'FO-G2', isDatumBoard: false });
    const wrong = await joan.post(path()).send(aVisitBody(water, { boardId: side.id }));
    expect(problem(wrong.body).errors?.[0]?.pointer).toBe('/boardId');
    const stranger = await joan.post(path()).send(aVisitBody(water, { boardId: randomUUID() }));
    expect(stranger.status).toBe(400);
    const early = await joan.post(path()).send(aVisitBody(water, { startedAt: '2027-04-09T08:00:00.000Z' }));
    expect(problem(early.body).errors?.[0]?.pointer).toBe('/startedAt');
  });

  test('names every wrong field of a request', async () => {
    const { kit, ...rest } = aVisitBody(water);
    const answer = await joan
      .post(path())
      .send({ ...rest, kit: { ...kit, stickSpacingM: 0 }, gaugeStartM: 'high' });
    expect(
      problem(answer.body)
        .errors?.map(({ pointer }) => pointer)
        .sort(),
    ).toEqual(['/gaugeStartM', '/kit/stickSpacingM']);
  });

  test('is opened by nobody else', async () => {
    const body = aVisitBody(water);
    const { owner, office, member, angler } = here.people;
    for (const person of [owner, office, member, angler])
      expect((await person.post(path()).send(body)).status).toBe(403);
    expect((await elsewhere.people.manager.post(path()).send(body)).status).toBe(404);
    expect((await aStranger(server).post(path()).send(body)).status).toBe(401);
    expect((await joan.post(`/lakes/${randomUUID()}/visits`).send(body)).status).toBe(404);
  });

  test('is read by staff of the water and its owner only', async () => {
    const id = await openedVisit(joan, water);
    for (const person of [joan, here.people.owner, here.people.manager, here.people.bailiff])
      expect((await person.get(`/visits/${id}`)).status).toBe(200);
    expect((await visitOf(id, here.people.owner)).visit.may).toEqual({ addCasts: false, correct: false });
    for (const person of [here.people.office, here.people.member, here.people.angler])
      expect((await person.get(`/visits/${id}`)).status).toBe(403);
    for (const at of [`/visits/${id}`, `/visits/${id}/casts.csv`, path()]) {
      expect((await elsewhere.people.manager.get(at)).status).toBe(404);
      expect((await aStranger(server).get(at)).status).toBe(401);
    }
    expect((await joan.get('/visits/not-an-id')).status).toBe(404);
  });
});

describe('a cast', () => {
  let visitId: string;
  beforeAll(async () => {
    visitId = await openedVisit(joan, water);
  });
  const path = () => `/visits/${visitId}/casts`;

  test('is kept exactly as observed and answered with its reduction and every step', async () => {
    const body = aCastBody(water);
    const answer = await joan.post(path()).send(body);
    expect(answer.status).toBe(201);
    const cast = CastView.parse(answer.body);
    expect(cast.observation).toEqual(body.observation);
    expect(cast.reduced.ok).toBe(true);
    expect(cast.reduced.steps.map(({ key }) => key)).toEqual(
      expect.arrayContaining(['line', 'range', 'bearing', 'datum']),
    );
    const listed = (await visitOf(visitId)).casts.find(({ id }) => id === cast.id);
    expect(listed).toEqual({ ...cast, reduced: { ...cast.reduced, steps: [] } });
  });

  test('that can’t be reduced is kept all the same and says why', async () => {
    const cast = await keptCast({ person: joan, water, visitId }, { wrapsWhole: 36, lineText: '36 + 0' });
    expect(cast.reduced).toMatchObject({ ok: false, reason: expect.stringMatching(/beyond the far bank/) });
    const short = await keptCast(
      { person: joan, water, visitId },
      { wrapsWhole: 1, lineText: '1 + 0', pulls: 20 },
    );
    expect(short.reduced).toMatchObject({ ok: false, reason: expect.stringMatching(/too short/) });
    const nowhere = await keptCast(
      { person: joan, water, visitId },
      { aim: { by: 'mark', markId: randomUUID(), offsetDeg: 0 } },
    );
    expect(nowhere.reduced).toMatchObject({ ok: false, reason: expect.stringMatching(/mark/) });
    const { casts } = await visitOf(visitId);
    expect(casts.filter(({ reduced }) => !reduced.ok)).toHaveLength(3);
  });

  test('sent twice, or twice at once, is kept once', async () => {
    const body = aCastBody(water);
    const [one, other] = await Promise.all([joan.post(path()).send(body), joan.post(path()).send(body)]);
    expect([one.status, other.status]).toEqual([201, 201]);
    expect(CastView.parse(one.body)).toEqual(CastView.parse(other.body));
    const again = await joan.post(path()).send(body);
    expect(CastView.parse(again.body).seq).toBe(CastView.parse(one.body).seq);
    const changed = await joan.post(path()).send({ ...body, observation: { ...body.observation, pulls: 9 } });
    expect(changed.status).toBe(409);
  });

  test('of two sent at once each gets a number of its own', async () => {
    const answers = await Promise.all(
      Array.from({ length: 6 }, () => joan.post(path()).send(aCastBody(water))),
    );
    expect(answers.every(({ status }) => status === 201)).toBe(true);
    const seqs = answers.map(({ body }) => CastView.parse(body).seq);
    expect(new Set(seqs).size).toBe(6);
  });

  test('is refused from a peg of another lake, in strange words and by the wrong people', async () => {
    const foreign = await aLongWater(server, elsewhere);
    const wrongPeg = await joan.post(path()).send(aCastBody(water, {}, { pegId: foreign.peg.id }));
    expect(problem(wrongPeg.body).errors?.[0]?.pointer).toBe('/pegId');
    const body = aCastBody(water);
    const strange = await joan
      .post(path())
      .send({ ...body, observation: { ...body.observation, drop: 'clonk' } });
    expect(problem(strange.body).errors?.[0]?.pointer).toBe('/observation/drop');
    expect((await here.people.owner.post(path()).send(body)).status).toBe(403);
    expect((await elsewhere.people.bailiff.post(path()).send(body)).status).toBe(404);
    expect((await aStranger(server).post(path()).send(body)).status).toBe(401);
  });

  test('of another fishery under the same id is not found', async () => {
    const foreign = await aLongWater(server, elsewhere, { name: 'Near Sallow' });
    const theirs = await openedVisit(elsewhere.people.bailiff, foreign);
    const kept = await keptCast({ person: elsewhere.people.bailiff, water: foreign, visitId: theirs }, {});
    const answer = await joan.post(path()).send(aCastBody(water, {}, { id: kept.id }));
    expect(answer.status).toBe(404);
  });

  test('is taken back only when it is the last, and stays in the record', async () => {
    const first = await keptCast({ person: joan, water, visitId }, {});
    const last = await keptCast({ person: joan, water, visitId }, {});
    const early = await joan.delete(`${path()}/${first.id}`);
    expect(early.status).toBe(409);
    expect(problem(early.body).title).toContain(`Cast ${last.seq}`);
    expect((await joan.delete(`${path()}/${last.id}`)).status).toBe(204);
    expect((await joan.delete(`${path()}/${last.id}`)).status).toBe(204);
    expect((await joan.delete(`${path()}/${first.id}`)).status).toBe(204);
    expect((await joan.delete(`${path()}/${randomUUID()}`)).status).toBe(404);
    expect((await here.people.owner.delete(`${path()}/${first.id}`)).status).toBe(403);
    const { casts } = await visitOf(visitId);
    expect(casts.map(({ id }) => id)).not.toContain(last.id);
    const row = await server.server.source.manager.findOneByOrFail(SurveyCast, { id: last.id });
    expect(row.undoneAt).not.toBeNull();
    expect(row.observation).toEqual(last.observation);
    const again = await joan.post(path()).send(aCastBody(water, {}, { id: last.id, lineId: last.lineId }));
    expect(again.status).toBe(409);
  });
});

describe('coverage', () => {
  test('tells how much of a peg’s arc was cast over, and how much twice', async () => {
    const visitId = await openedVisit(joan, water);
    const keep = (observed: Parameters<typeof keptCast>[1]) =>
      keptCast({ person: joan, water, visitId }, observed);
    await keep({});
    const once = (await visitOf(visitId)).coverage;
    await keep({});
    await keep({ aim: { by: 'mark', markId: water.mark.id, offsetDeg: 20 } });
    const after = (await visitOf(visitId)).coverage;
    expect(once).toMatchObject([{ pegId: water.peg.id, casts: 1, repeatsShare: 0 }]);
    expect(after[0]?.casts).toBe(3);
    expect(after[0]?.repeatsShare).toBeCloseTo(1 / 3);
    expect(after[0]?.share).toBeCloseTo(2 * (once[0]?.share ?? 0));
  });
});

describe('a corrected constant', () => {
  test('reduces every cast again and changes no observation', async () => {
    const visitId = await openedVisit(joan, water);
    const before = await keptCast({ person: joan, water, visitId }, {});
    const { visit } = await visitOf(visitId);
    const correct: CorrectKit = { kit: aKit({ stickSpacingM: 3.048 }), version: visit.version };
    const answer = await joan.patch(`/visits/${visitId}/kit`).send(correct);
    expect(answer.status).toBe(200);
    expect(VisitView.parse(answer.body)).toMatchObject({ version: 2, kit: { stickSpacingM: 3.048 } });
    const [after] = (await visitOf(visitId)).casts;
    expect(after?.observation).toEqual(before.observation);
    expect(after?.reduced.ok === true && after.reduced.sounding.lineOutM).toBeCloseTo(14 * 3.048, 9);
  });

  test('of two at once exactly one is taken', async () => {
    const visitId = await openedVisit(joan, water);
    const bodies = [aKit({ floatOffsetM: 0.3 }), aKit({ floatOffsetM: 0.35 })].map((kit) => ({
      kit,
      version: 1,
    }));
    const answers = await Promise.all(bodies.map((body) => joan.patch(`/visits/${visitId}/kit`).send(body)));
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409]);
  });

  test('is refused to others and when it makes no sense', async () => {
    const visitId = await openedVisit(joan, water);
    const good = { kit: aKit(), version: 1 };
    const bad = await joan.patch(`/visits/${visitId}/kit`).send({ kit: { ...aKit(), pullM: 0 }, version: 1 });
    expect(problem(bad.body).errors?.[0]?.pointer).toBe('/kit/pullM');
    expect((await here.people.owner.patch(`/visits/${visitId}/kit`).send(good)).status).toBe(403);
    expect((await elsewhere.people.manager.patch(`/visits/${visitId}/kit`).send(good)).status).toBe(404);
    expect((await aStranger(server).patch(`/visits/${visitId}/kit`).send(good)).status).toBe(401);
  });
});

describe('a mark put right after the casts', () => {
  test('moves them on every page at once, and no observation changes', async () => {
    const visitId = await openedVisit(joan, water);
    const kept = await keptCast({ person: joan, water, visitId }, {});
    const { details } = await server.server.source.manager.findOneByOrFail(Mark, { id: water.mark.id });
    const moved = {
      ...details,
      position: [details.position[0] + 0.0005, details.position[1]] as [number, number],
    };
    await server.server.source.manager.update(Mark, { id: water.mark.id }, { details: moved });
    const bearing = async () => {
      const [cast] = (await visitOf(visitId)).casts;
      expect(cast?.observation).toEqual(kept.observation);
      return cast?.reduced.ok === true ? cast.reduced.sounding.bearingDeg : NaN;
    };
    const before = kept.reduced.ok ? kept.reduced.sounding.bearingDeg : NaN;
    expect(Math.abs((((await bearing()) - before + 540) % 360) - 180)).toBeGreaterThan(5);
    await keptCast({ person: joan, water, visitId }, {});
    await server.server.source.manager.update(Mark, { id: water.mark.id }, { details });
    expect(await bearing()).toBeCloseTo(before, 9);
  });
});

describe('a snag', () => {
  const jolt = { drag: 'solid_stop', drop: 'unsure', cameBack: null } as const;

  test('is called by two solid stops at one place, the first of them too, until one is taken back', async () => {
    const visitId = await openedVisit(joan, water);
    const bottoms = async () =>
      (await visitOf(visitId)).casts.map(({ reduced }) => reduced.ok && reduced.sounding.bottom);
    await keptCast({ person: joan, water, visitId }, jolt);
    expect(await bottoms()).toEqual(['unknown']);
    const second = await keptCast({ person: joan, water, visitId }, jolt);
    expect(await bottoms()).toEqual(['snag', 'snag']);
    await joan.delete(`/visits/${visitId}/casts/${second.id}`);
    expect(await bottoms()).toEqual(['unknown']);
  });
});

describe('closing', () => {
  const end = { endedAt: '2027-04-03T10:40:00.000Z', gaugeEndM: 0.66 };

  test('brings each cast to datum by the level of its hour', async () => {
    const visitId = await openedVisit(joan, water);
    await joan
      .post(`/visits/${visitId}/casts`)
      .send(aCastBody(water, {}, { observedAt: '2027-04-03T09:22:30.000Z' }));
    const answer = await joan.post(`/visits/${visitId}/close`).send(end);
    expect(VisitView.parse(answer.body)).toMatchObject({
      status: 'closed',
      gaugeEndM: 0.66,
      may: { addCasts: false },
    });
    const [cast] = (await visitOf(visitId)).casts;
    const sounding = cast?.reduced.ok === true ? cast.reduced.sounding : null;
    expect(sounding?.depthAsReadM).toBeCloseTo(2.536, 3);
    expect(sounding?.depthM).toBeCloseTo(2.536 - 0.02, 3);
    expect((await joan.post(`/visits/${visitId}/close`).send(end)).status).toBe(200);
    expect((await joan.post(`/visits/${visitId}/close`).send({ ...end, gaugeEndM: 0.7 })).status).toBe(409);
  });

  test('refuses an end before the start or before the last cast', async () => {
    const visitId = await openedVisit(joan, water);
    await joan.post(`/visits/${visitId}/casts`).send(aCastBody(water));
    for (const endedAt of ['2027-04-03T07:00:00.000Z', '2027-04-03T08:30:00.000Z']) {
      const answer = await joan.post(`/visits/${visitId}/close`).send({ ...end, endedAt });
      expect(problem(answer.body).errors?.[0]?.pointer).toBe('/endedAt');
    }
    expect((await here.people.office.post(`/visits/${visitId}/close`).send(end)).status).toBe(403);
    expect((await elsewhere.people.manager.post(`/visits/${visitId}/close`).send(end)).status).toBe(404);
    expect((await aStranger(server).post(`/visits/${visitId}/close`).send(end)).status).toBe(401);
  });

  test('lets in a cast that was made before it and came late, and none made after', async () => {
    const visitId = await openedVisit(joan, water);
    await closedVisit({ person: joan, visitId });
    const late = await joan.post(`/visits/${visitId}/casts`).send(aCastBody(water));
    expect(late.status).toBe(201);
    const after = await joan
      .post(`/visits/${visitId}/casts`)
      .send(aCastBody(water, {}, { observedAt: '2027-04-03T11:00:00.000Z' }));
    expect(after.status).toBe(409);
  });
});
