/**
 * A peg surveyed, its chart published by another, and read at another level: the whole way with exact figures. Expected
 * values are worked by hand: 7.5 × 0.3048 + 0.25 = 2.536 m; 14 × 3.6576 = 51.206 m; ranges from the slant triangle.
 */
import { ChartReview, PegPageView } from '@mereward/shared/charts/contract';
import { ProblemBody } from '@mereward/shared/problems/problem';
import type { CastObservation, CastView, SoundingView } from '@mereward/shared/surveys/contract';
import { convertWraps, metresToWraps } from '@mereward/shared/units/wraps';
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { draftedChart } from '../support/charts';
import { aKit } from '../support/kit';
import { aPerson, aStranger, type Person } from '../support/people';
import { aTicket } from '../support/tickets';
import { aServer, type TestServer } from '../support/server';
import { aFan } from '../support/long-water';
import { aLongWater, closedVisit, keptCast, openedVisit, type TestWater } from '../support/surveys';
import { aFishery, aReading, type TestFishery } from '../support/waters';

let server: TestServer;
let ostlemere: TestFishery;
let water: TestWater;
let joan: Person;
let idris: Person;
let visitId: string;
let chartId: string;
const casts = new Map<number, CastView>();

beforeAll(async () => {
  server = await aServer();
  server.setNow('2027-04-03T08:05:00Z');
  ostlemere = await aFishery(server, { name: 'Ostlemere Waters' });
  water = await aLongWater(server, ostlemere);
  joan = ostlemere.people.head_bailiff;
  idris = ostlemere.people.manager;
});
afterAll(() => server.close());

const soundingOf = (seq: number): SoundingView => {
  const reduced = casts.get(seq)?.reduced;
  if (!reduced?.ok) throw new Error(`Cast ${seq} was not reduced`);
  return reduced.sounding;
};
const stepOf = (seq: number, key: string) => casts.get(seq)?.reduced.steps.find((step) => step.key === key);

test('Joan opens a visit on FO7 and keeps her casts, numbers 17, 22, 23 and 30 among them', async () => {
  visitId = await openedVisit(joan, water);
  const told: Record<number, Partial<CastObservation>> = {
    17: {},
    22: {
      wrapsWhole: 17,
      lineText: '17 + 0',
      drop: 'soft_slow',
      drag: 'smooth_slow_heavy',
      cameBack: ['black_silt'],
      pulls: 10,
    },
    23: {
      wrapsWhole: 17,
      lineText: '17 + 0',
      remainderM: 0,
      drag: 'smooth_skim',
      cameBack: ['grey_clay'],
      pulls: 10,
      aim: offset(6),
    },
    30: { wrapsWhole: 11, lineText: '11 + 0', drag: 'stick_free_stick', aim: offset(-5) },
  };
  const fan = aFan().filter(
    ({ aim, wrapsWhole }) => !(aim?.by === 'mark' && aim.offsetDeg === 0 && wrapsWhole === 14),
  );
  for (let seq = 1; fan.length > 0 || seq <= 30; seq++) {
    const { aim, ...rest } = told[seq] ?? fan.shift() ?? {};
    const observed = { ...rest, aim: aim?.by === 'mark' ? offset(aim.offsetDeg) : offset(0) };
    const cast = await keptCast({ person: joan, water, visitId }, observed);
    expect(cast.seq).toBe(seq);
    casts.set(seq, cast);
  }
  await closedVisit({ person: joan, visitId });
});

const offset = (offsetDeg: number): CastObservation['aim'] => ({
  by: 'mark',
  markId: water.mark.id,
  offsetDeg,
});

test('cast 17 is 2.536 m deep by eight pulls, 51.206 m of line and 51.06 m out, gravel, grade A', () => {
  const sounding = soundingOf(17);
  expect(sounding.depthAsReadM).toBeCloseTo(2.536, 6);
  expect(stepOf(17, 'float')).toMatchObject({
    value: '2.536 m',
    inputs: expect.arrayContaining([{ name: 'counted', value: expect.stringMatching(/8 pulls/) }]),
  });
  expect(sounding.lineOutM).toBeCloseTo(51.2064, 6);
  expect(Math.abs(sounding.rangeM - 51.06)).toBeLessThanOrEqual(0.02);
  expect(sounding).toMatchObject({ bottom: 'gravel', grade: 'A', askAgain: false });
});

test('the same wraps read from lead to rod tip lie 54.07 m out', async () => {
  const tip = await openedVisit(joan, water, {
    kit: aKit({ wrapReference: 'lead_to_rod_tip' }),
    title: 'Read to the tip',
  });
  const cast = await keptCast({ person: joan, water, visitId: tip }, {});
  expect(cast.reduced.ok && Math.abs(cast.reduced.sounding.rangeM - 54.07)).toBeLessThanOrEqual(0.02);
});

test('cast 22 is deep silt and cast 23 clay, not gravel', () => {
  expect(soundingOf(22).bottom).toBe('silt_deep');
  expect(soundingOf(23).bottom).toBe('clay');
});

test('cast 30, where two of three disagree, is no better than C and asks for another cast', () => {
  const { grade, askAgain } = soundingOf(30);
  expect(['C', 'D']).toContain(grade);
  expect(askAgain).toBe(true);
});

test('a cast six metres outside the water stands against publishing, with its reason', async () => {
  const wrong = await openedVisit(joan, water, { title: 'With a slip' });
  // FO7 looks 124 m across; 130 m out along its middle line is 6 m beyond the far bank.
  const { whole, remainderM } = metresToWraps(130.05, aKit().stickSpacingM);
  const slip = await keptCast(
    { person: joan, water, visitId: wrong },
    { wrapsWhole: whole, remainderM, pulls: 8 },
  );
  expect(slip.reduced).toMatchObject({
    ok: false,
    reason: expect.stringMatching(/6\.0 m outside the water/),
  });
  await closedVisit({ person: joan, visitId: wrong });
  const draft = await draftedChart(server, {
    person: joan,
    lakeId: water.lake.id,
    visitIds: [visitId, wrong],
  });
  const refused = await joan.post(`/charts/${draft}/submit`);
  expect(refused.status).toBe(409);
  expect(ProblemBody.parse(refused.body).detail).toMatch(/Cast 1 \(FO7\): .*6\.0 m outside the water/);
  await joan.delete(`/charts/${draft}`);
});

test('Joan asks to publish, may not approve her own chart, and Idris approves 2027.1', async () => {
  chartId = await draftedChart(server, { person: joan, lakeId: water.lake.id, visitIds: [visitId] });
  const { checks } = ChartReview.parse((await joan.post(`/charts/${chartId}/submit`)).body);
  expect(checks.filter(({ state }) => state === 'failed')).toEqual([]);
  expect((await joan.post(`/charts/${chartId}/approve`)).status).toBe(403);
  const { chart } = ChartReview.parse((await idris.post(`/charts/${chartId}/approve`)).body);
  expect(chart).toMatchObject({ status: 'published', version: '2027.1', approvedBy: 'The manager' });
  const details = { name: 'Fourteen wraps', position: soundingOf(17).position, usableRadiusM: 1, note: '' };
  expect(
    (await joan.put(`/pegs/${water.peg.id}/spots/${randomUUID()}`).send({ details, version: null })).status,
  ).toBe(200);
});

test('on 17 July at 0.38 Sofia, with a ticket on FO7, reads the depth today beside the depth at the survey', async () => {
  const sofia = await aPerson(server, { name: 'Sofia Marsh' });
  await aReading(server, water.board, { levelM: 0.38, at: '2027-07-17T06:00:00Z' });
  server.setNow('2027-07-17T09:00:00Z');
  await aTicket(server, {
    pegId: water.peg.id,
    holder: sofia,
    from: '2027-07-17T06:00:00Z',
    until: '2027-07-18T06:00:00Z',
  });
  const read = async (reader: Pick<Person, 'get'>) =>
    PegPageView.parse((await reader.get(`/pegs/${water.peg.id}/page`)).body);
  const page = await read(sofia);
  expect(page.spots?.map(({ words }) => words)).toEqual([
    '14 wraps (12 ft): about 2.3 m today (2.5 m at survey level 0.62), gravel, grade A, surveyed 3 Apr 2027, chart 2027.1',
  ]);
  expect(page.levelNow?.levelM).toBe(0.38);
  expect(page.ticket).not.toBeNull();

  server.setNow('2027-07-18T09:00:00Z');
  const after = await read(sofia);
  expect(after.spots).toBeNull();
  expect(after.ticket).toBeNull();
  expect(after.layerNotes.bottom).toMatch(/ticket for this peg/);
  const stranger = await read(aStranger(server));
  expect(stranger.details).toMatchObject({ hazards: ['deep margin'], access: { fromParkingM: 120 } });
});

test('25 m on ten-foot sticks is eight wraps and 0.62 m', () => {
  const wraps = convertWraps({ whole: 0, remainderM: 25 }, aKit().stickSpacingM, 3.048);
  expect(wraps.whole).toBe(8);
  expect(wraps.remainderM).toBeCloseTo(0.616, 9);
});
