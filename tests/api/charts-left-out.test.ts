import { ChartReview } from '@mereward/shared/charts/contract';
import { ChartCastList, type LeaveOut, type LogMissView } from '@mereward/shared/charts/left-out-contract';
import { ProblemBody } from '@mereward/shared/problems/problem';
import { LogView } from '@mereward/shared/surveys/log-contract';
import { VisitWithCasts } from '@mereward/shared/surveys/contract';
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { draftedChart } from '../support/charts';
import type { Person } from '../support/people';
import { aServer, type TestServer } from '../support/server';
import { aBoatTrack, boatDepthM, nmeaOf, sentence } from '../support/sounding-log';
import { aLongWater, aSurvey, closedVisit, keptCast, openedVisit, type TestWater } from '../support/surveys';
import { aFishery, type TestFishery } from '../support/waters';

let server: TestServer;
let here: TestFishery;
let elsewhere: TestFishery;
let water: TestWater;
let visitId: string;
let slipVisit: string;
let slipId: string;
let joan: Person;

beforeAll(async () => {
  server = await aServer();
  server.setNow('2027-04-03T12:00:00Z');
  here = await aFishery(server, { name: 'Ostlemere Waters' });
  elsewhere = await aFishery(server, { name: 'Upper Sallow' });
  water = await aLongWater(server, here);
  joan = here.people.head_bailiff;
  visitId = await aSurvey(joan, water);
  slipVisit = await openedVisit(joan, water, { title: 'One cast more' });
  // Twice the pulls the fan counted round about.
  const aim = { by: 'mark', markId: water.mark.id, offsetDeg: 1 } as const;
  const slip = { aim, wrapsWhole: 13, lineText: '13 + 0', pulls: 14 };
  slipId = (await keptCast({ person: joan, water, visitId: slipVisit }, slip)).id;
  await closedVisit({ person: joan, visitId: slipVisit });
});
afterAll(() => server.close());

const draft = () =>
  draftedChart(server, { person: joan, lakeId: water.lake.id, visitIds: [visitId, slipVisit] });
const asked = (wishes: Partial<LeaveOut> = {}): LeaveOut => ({
  id: randomUUID(),
  what: { kind: 'cast', castId: slipId },
  reason: 'The float hung on the line: twice the pulls of its neighbours',
  ...wishes,
});
const out = (person: Person, chartId: string, body: object) =>
  person.post(`/charts/${chartId}/left-out`).send(body);
const back = (person: Person, chartId: string, id: string) =>
  person.post(`/charts/${chartId}/left-out/${id}/put-back`);
const reviewOf = async (chartId: string) =>
  ChartReview.parse((await joan.get(`/charts/${chartId}/review`)).body);
const castsOf = async (chartId: string) =>
  ChartCastList.parse((await joan.get(`/charts/${chartId}/casts`)).body);
const problem = (body: unknown) => ProblemBody.parse(body);
const digestOf = async (chartId: string): Promise<string> => {
  const [row] = await server.server.source.query<{ digest: string }[]>(
    `SELECT encode(input_sha256, 'hex') AS digest FROM chart WHERE id = $1`,
    [chartId],
  );
  return row?.digest ?? '';
};
const rebuilt = async (chartId: string) => {
  expect((await joan.post(`/charts/${chartId}/rebuild`)).status).toBe(200);
  await server.settle();
};

describe('a cast left out of a chart', { timeout: 60_000 }, () => {
  test('no longer counts once it is built again, and is told with who, why and when', async () => {
    const chartId = await draft();
    const before = await reviewOf(chartId);
    expect(before.may.leaveOut).toBe(true);
    expect(before.quality?.flagged).toContain(slipId);
    const digest = await digestOf(chartId);
    const observed = VisitWithCasts.parse((await joan.get(`/visits/${slipVisit}`)).body).casts;

    const body = asked();
    const answer = await out(here.people.manager, chartId, body);
    expect(answer.status, answer.text).toBe(200);
    const marked = ChartReview.parse(answer.body);
    expect(marked.leftOut).toEqual([
      expect.objectContaining({ id: body.id, what: body.what, label: 'Cast 1, peg FO7', putBack: null }),
    ]);
    expect(marked.leftOut[0]).toMatchObject({ reason: body.reason, at: '2027-04-03T12:00:00.000Z' });
    expect(marked.checks.find(({ key }) => key === 'built')).toMatchObject({ state: 'failed', blocks: true });
    expect(marked.may.submit).toBe(false);

    await rebuilt(chartId);
    const after = await reviewOf(chartId);
    expect(after.quality?.soundings).toBe((before.quality?.soundings ?? 0) - 1);
    expect(after.misses.map(({ id }) => id)).not.toContain(slipId);
    expect(after.may.submit).toBe(true);
    expect(await digestOf(chartId)).not.toBe(digest);

    const listed = (await castsOf(chartId)).casts.find(({ id }) => id === slipId);
    expect(listed).toMatchObject({ stands: 'left_out', why: body.reason, leftOut: { id: body.id } });
    const csv = (await joan.get(`/charts/${chartId}/casts.csv`)).text;
    expect(csv.split('\r\n').filter((line) => line.includes('left_out'))).toEqual([
      expect.stringMatching(/Left out of this chart by .* on 3 Apr 2027: The float hung/),
    ]);
    // The observation is as it was, and other charts use it.
    expect(VisitWithCasts.parse((await joan.get(`/visits/${slipVisit}`)).body).casts).toEqual(observed);
    expect((await reviewOf(await draft())).quality?.flagged).toContain(slipId);
  });

  test('counts again when it is put back, and the chart comes out as it was', async () => {
    const chartId = await draft();
    const digest = await digestOf(chartId);
    const body = asked();
    await out(joan, chartId, body);
    await rebuilt(chartId);
    const answer = await back(here.people.manager, chartId, body.id);
    expect(answer.status, answer.text).toBe(200);
    expect(ChartReview.parse(answer.body).leftOut[0]?.putBack?.at).toBe('2027-04-03T12:00:00.000Z');
    expect((await back(here.people.manager, chartId, body.id)).status).toBe(200); // sent twice
    const late = await back(joan, chartId, body.id);
    expect(problem(late.body).title).toMatch(/^This was put back already, by /);
    await rebuilt(chartId);
    expect(await digestOf(chartId)).toBe(digest);
    expect((await reviewOf(chartId)).quality?.flagged).toContain(slipId);
    expect((await out(joan, chartId, asked())).status).toBe(200); // and may be left out anew
  });

  test('is left out once, however often it is sent and by whomever', async () => {
    const chartId = await draft();
    const body = asked();
    const twice = await Promise.all([out(joan, chartId, body), out(joan, chartId, body)]);
    expect(twice.map(({ status }) => status)).toEqual([200, 200]);
    expect((await out(joan, chartId, { ...body, reason: 'Another' })).status).toBe(409);
    const other = await draft();
    const [one, two] = await Promise.all([
      out(joan, other, asked()),
      out(here.people.manager, other, asked()),
    ]);
    expect([one.status, two.status].sort()).toEqual([200, 409]);
    expect((await reviewOf(other)).leftOut).toHaveLength(1);
    // An id that is kept on one chart tells nothing on another.
    expect((await out(joan, other, body)).status).toBe(404);
  });

  test('is for the manager and the head bailiff, and of a draft', async () => {
    const chartId = await draft();
    expect((await out(here.people.bailiff, chartId, asked())).status).toBe(403);
    expect((await out(here.people.owner, chartId, asked())).status).toBe(403);
    expect((await out(here.people.member, chartId, asked())).status).toBe(403);
    expect((await out(elsewhere.people.manager, chartId, asked())).status).toBe(404);
    expect((await here.people.member.get(`/charts/${chartId}/casts`)).status).toBe(403);
    const [out1, body] = [await reviewOf(chartId), asked()];
    expect(out1.leftOut).toEqual([]);
    await out(joan, chartId, body);
    expect((await back(here.people.bailiff, chartId, body.id)).status).toBe(403);
    expect((await back(joan, chartId, randomUUID())).status).toBe(404);
    await rebuilt(chartId);
    await joan.post(`/charts/${chartId}/submit`);
    const approved = await here.people.owner.post(`/charts/${chartId}/approve`);
    expect(approved.status, approved.text).toBe(200);
    expect(problem((await back(joan, chartId, body.id)).body).title).toBe('A published chart never changes');
    const refused = await out(joan, chartId, asked({ what: { kind: 'cast', castId: randomUUID() } }));
    expect(problem(refused.body).title).toBe('A published chart never changes');
    expect((await castsOf(chartId)).may.leaveOut).toBe(false);
    // Not the service alone keeps it so.
    await expect(
      server.server.source.query('UPDATE chart_left_out SET reason = $2 WHERE id = $1', [body.id, 'Other']),
    ).rejects.toThrow(/never changes/);
  });

  test('takes a submitted chart out of its approver’s hands until it is built again', async () => {
    const chartId = await draft();
    await joan.post(`/charts/${chartId}/submit`);
    await out(here.people.manager, chartId, asked());
    const answer = await here.people.owner.post(`/charts/${chartId}/approve`);
    expect(problem(answer.body)).toMatchObject({ title: 'This chart can’t be published yet' });
  });

  test('must be of the chart, and needs a reason', async () => {
    const chartId = await draft();
    const strange = await out(joan, chartId, asked({ what: { kind: 'cast', castId: randomUUID() } }));
    expect(strange.status).toBe(404);
    expect((await out(joan, chartId, asked({ reason: '  ' }))).status).toBe(400);
    expect((await out(joan, chartId, { ...asked(), what: { kind: 'cast' } })).status).toBe(400);
  });

  test('goes with the draft that is discarded', async () => {
    const chartId = await draft();
    await out(joan, chartId, asked());
    expect((await joan.delete(`/charts/${chartId}`)).status).toBe(204);
  });
});

describe('a part of a boat’s log left out of a chart', { timeout: 60_000 }, () => {
  const track = aBoatTrack({ linesM: 20 });
  const SHOAL = 6; // fixes two metres apart: each a cell of its own

  /** A log with echoes off a shoal of fish, long enough to be no spike. */
  async function loggedDraft(): Promise<{ chartId: string; logId: string; at: number }> {
    const at = track.findIndex((fix) => boatDepthM(fix) > 3.3);
    const lines = track.flatMap((fix, i) => {
      const { rmc, gga, dpt } = nmeaOf(fix);
      const fish = sentence(`SDDPT,${(boatDepthM(fix) - 2).toFixed(2)},0.00`);
      return [...(i % 60 === 0 ? [rmc] : []), gga, i >= at && i < at + SHOAL ? fish : dpt];
    });
    const visit = await openedVisit(joan, water, { title: 'By boat' });
    await closedVisit({ person: joan, visitId: visit });
    const brought = await joan
      .post(`/visits/${visit}/logs`)
      .field('id', randomUUID())
      .attach('files', Buffer.from(`${lines.join('\r\n')}\r\n`), 'boat.log');
    const { id: logId } = LogView.parse(brought.body);
    await server.settle();
    await joan.post(`/logs/${logId}/start`);
    await server.settle();
    const chartId = await draftedChart(server, {
      person: joan,
      lakeId: water.lake.id,
      visitIds: [visit],
    });
    return { chartId, logId, at };
  }

  test('is found out of line by place and miss, and left out by its cell or its run', async () => {
    const { chartId, logId, at } = await loggedDraft();
    const { logMisses, logs } = await reviewOf(chartId);
    const ofShoal = ({ merged }: LogMissView) =>
      merged !== null && merged.fromSeq > at && merged.toSeq <= at + SHOAL;
    const shoal = logMisses.filter(ofShoal);
    expect(shoal.length).toBeGreaterThan(0);
    const [worst] = shoal;
    expect(worst).toMatchObject({ flagged: true, logId, filenames: ['boat.log'], visitTitle: 'By boat' });
    expect(worst!.errorM).toBeGreaterThan(0.5); // read shallow
    const { cell, count } = worst!.merged!;
    for (const [valueM, fromM] of [
      [worst!.xM, cell.xM],
      [worst!.yM, cell.yM],
    ] as const) {
      expect(valueM).toBeGreaterThanOrEqual(fromM - 0.005); // places are kept to the centimetre
      expect(valueM).toBeLessThanOrEqual(fromM + cell.sideM + 0.005);
    }

    const byCell = asked({ what: cell, reason: 'A shoal under the boat' });
    expect((await out(joan, chartId, byCell)).status).toBe(200);
    await rebuilt(chartId);
    const after = await reviewOf(chartId);
    expect(after.logs[0]).toMatchObject({ leftOut: count, cells: logs[0]!.cells - 1 });
    expect(after.leftOut[0]?.label).toBe('boat.log: a cell of 1 m');
    expect(after.logMisses.some(({ xM, yM }) => xM === worst!.xM && yM === worst!.yM)).toBe(false);

    await back(joan, chartId, byCell.id);
    const run = { kind: 'run', logId, fromSeq: at + 1, toSeq: at + SHOAL } as const;
    expect((await out(joan, chartId, asked({ what: run }))).status).toBe(200);
    await rebuilt(chartId);
    const again = await reviewOf(chartId);
    expect(again.logs[0]).toMatchObject({ leftOut: SHOAL, cells: logs[0]!.cells - SHOAL });
    expect(again.leftOut[0]?.label).toBe(`boat.log: soundings ${at + 1} to ${at + SHOAL}`);
    expect(again.logMisses.filter(ofShoal)).toEqual([]);
  });

  test('must be of a log of the chart, and run forwards', async () => {
    const { chartId, logId } = await loggedDraft();
    const turned = await out(joan, chartId, asked({ what: { kind: 'run', logId, fromSeq: 9, toSeq: 3 } }));
    expect(turned.status).toBe(400);
    expect(problem(turned.body).errors?.[0]?.pointer).toBe('/what/toSeq');
    const strange = asked({ what: { kind: 'run', logId: randomUUID(), fromSeq: 1, toSeq: 3 } });
    expect((await out(joan, chartId, strange)).status).toBe(404);
  });
});
