import { Chart } from '@mereward/db/entities/charts/chart';
import { LIGHT } from '@mereward/api/charts/find-chart';
import { ChartReview, ChartView } from '@mereward/shared/charts/contract';
import { ProblemBody } from '@mereward/shared/problems/problem';
import fc from 'fast-check';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { draftedChart, publishedChart } from '../support/charts';
import { aSurveyGround } from '../support/grounds';
import { aPerson, aStranger, type Person } from '../support/people';
import type { TestServer } from '../support/server';
import { aSurvey, type TestWater } from '../support/surveys';
import type { TestFishery } from '../support/waters';

let server: TestServer;
let here: TestFishery;
let elsewhere: TestFishery;
let water: TestWater;
let surveyVisit: string;
let joan: Person;
let idris: Person;

beforeAll(async () => {
  ({ server, here, elsewhere, water, joan } = await aSurveyGround());
  idris = here.people.manager;
  surveyVisit = await aSurvey(joan, water);
});
afterAll(() => server.close());

const problem = (body: unknown) => ProblemBody.parse(body);
const review = async (id: string, person = joan) =>
  ChartReview.parse((await person.get(`/charts/${id}/review`)).body);
const rowOf = (id: string) =>
  server.server.source.manager.findOneOrFail(Chart, { where: { id }, select: LIGHT });
/** Every byte of a chart's row, or of some columns of it, as a digest. */
async function digestOf(id: string, columns = 'c'): Promise<string> {
  const rows = await server.server.source.query(
    `SELECT md5((${columns})::text) AS digest FROM chart c WHERE id = $1`,
    [id],
  );
  return rows[0].digest;
}
const drafting = (wishes: Partial<Parameters<typeof draftedChart>[1]> = {}) =>
  draftedChart(server, { person: joan, lakeId: water.lake.id, visitIds: [surveyVisit], ...wishes });

describe('publishing', () => {
  test('is asked for by mail of those who may approve, and refused to its surveyor and its submitter', async () => {
    const surveying = await aPerson(server, {
      name: 'Bea Lund',
      roles: [
        { fisheryId: here.id, role: 'bailiff' },
        { fisheryId: here.id, role: 'manager' },
      ],
    });
    const visitId = await aSurvey(surveying, water);
    const id = await drafting({ visitIds: [visitId], person: idris });
    expect((await idris.post(`/charts/${id}/submit`)).status).toBe(200);
    const mail = await server.mailTo(here.people.owner.email);
    expect(mail.subject).toContain('Far Ostle: a chart waits for approval');
    expect(server.mails.filter(({ to }) => to === surveying.email || to === idris.email)).toEqual([]);
    const own = await surveying.post(`/charts/${id}/approve`);
    expect(own.status).toBe(403);
    expect(problem(own.body).title).toMatch(/You surveyed this chart/);
    expect((await review(id, surveying)).may).toMatchObject({
      approve: false,
      approveWhyNot: expect.stringMatching(/surveyed/),
    });
    expect(problem((await idris.post(`/charts/${id}/approve`)).body).title).toMatch(
      /You submitted this chart/,
    );
    for (const person of [joan, here.people.office])
      expect((await person.post(`/charts/${id}/approve`)).status).toBe(403);
    expect((await elsewhere.people.owner.post(`/charts/${id}/approve`)).status).toBe(404);
    const answer = await here.people.owner.post(`/charts/${id}/approve`);
    expect(ChartReview.parse(answer.body).chart).toMatchObject({
      status: 'published',
      version: '2027.1',
      approvedBy: 'The owner',
    });
    expect((await server.mailTo(surveying.email)).subject).toContain('chart 2027.1 is published');
  });

  test('of one chart by two at once is done once; of two charts each gets its number', async () => {
    const [one, two] = [await drafting(), await drafting()];
    for (const id of [one, two]) expect((await joan.post(`/charts/${id}/submit`)).status).toBe(200);
    const both = await Promise.all(
      [idris, here.people.owner].map((person) => person.post(`/charts/${one}/approve`)),
    );
    expect(both.map(({ status }) => status).sort()).toEqual([200, 409]);
    const three = await drafting();
    await joan.post(`/charts/${three}/submit`);
    const pair = await Promise.all([two, three].map((id) => idris.post(`/charts/${id}/approve`)));
    expect(pair.map(({ status }) => status)).toEqual([200, 200]);
    const rows = [await rowOf(one), await rowOf(two), await rowOf(three)];
    expect(rows.map(({ version }) => version)).toEqual([
      '2027.2',
      expect.stringMatching(/^2027\.[34]$/),
      expect.stringMatching(/^2027\.[34]$/),
    ]);
    expect(new Set(rows.map(({ version }) => version)).size).toBe(3);
    expect(rows.filter(({ status }) => status === 'published')).toHaveLength(1);
    expect(rows[0]).toMatchObject({ status: 'superseded', supersededBy: expect.any(String) });
  });

  test('needs a submitted chart', async () => {
    const id = await drafting();
    expect((await idris.post(`/charts/${id}/approve`)).status).toBe(409);
    await joan.post(`/charts/${id}/submit`);
    expect((await joan.post(`/charts/${id}/submit`)).status).toBe(409);
    await joan.post(`/charts/${id}/rebuild`);
    expect((await rowOf(id)).status).toBe('draft');
  });

  test('counts each year anew', async () => {
    server.setNow('2028-01-01T00:30:00Z');
    const id = await publishedChart(server, {
      person: joan,
      approver: idris,
      lakeId: water.lake.id,
      visitIds: [surveyVisit],
    });
    server.setNow('2027-04-03T12:00:00Z');
    expect((await rowOf(id)).version).toBe('2028.1');
  });
});

describe('a published chart', () => {
  let id: string;
  beforeAll(async () => {
    id = await publishedChart(server, {
      person: joan,
      approver: idris,
      lakeId: water.lake.id,
      visitIds: [surveyVisit],
    });
  });

  const MAY_CHANGE = ['status', 'superseded_by', 'withdrawn_reason', 'withdrawn_at'];
  const columnsOf = async (): Promise<string[]> => {
    const rows: { name: string }[] = await server.server.source.query(
      `SELECT column_name AS name FROM information_schema.columns WHERE table_name = 'chart' ORDER BY ordinal_position`,
    );
    return rows.map(({ name }) => name).filter((name) => !MAY_CHANGE.includes(name));
  };

  test('does not let even the database change any column of it, or delete it', async () => {
    const columns = await columnsOf();
    expect(columns).toEqual(
      expect.arrayContaining(['depth', 'built', 'version', 'datum_m', 'approved_by', 'title']),
    );
    const draft = await drafting();
    const before = await digestOf(id);
    const other = `(SELECT %s FROM chart WHERE id = $2)`;
    for (const column of columns) {
      const same = await server.server.source.query(
        `SELECT (c.${column} IS NOT DISTINCT FROM d.${column}) AS same FROM chart c, chart d WHERE c.id = $1 AND d.id = $2`,
        [id, draft],
      );
      const value = same[0].same ? 'NULL' : other.replace('%s', column);
      const values = same[0].same ? [id] : [id, draft];
      const change = server.server.source.query(
        `UPDATE chart SET ${column} = ${value} WHERE id = $1`,
        values,
      );
      await expect(change, column).rejects.toThrow(/published chart never changes/);
    }
    await expect(server.server.source.query('DELETE FROM chart WHERE id = $1', [id])).rejects.toThrow(
      /is kept/,
    );
    expect(await digestOf(id)).toBe(before);
    await joan.delete(`/charts/${draft}`);
  });

  test('never goes back, whatever is tried in whatever order', async () => {
    const rank = { published: 0, superseded: 1, withdrawn: 2 };
    const states = fc.array(fc.constantFrom('draft', 'submitted', 'published', 'superseded', 'withdrawn'), {
      maxLength: 4,
    });
    const runner = server.server.source.createQueryRunner();
    await fc.assert(
      fc.asyncProperty(states, async (tried) => {
        await runner.startTransaction();
        let reached = 0;
        for (const status of tried) {
          await runner.query('SAVEPOINT before_it');
          const done = await runner
            .query(`UPDATE chart SET status = $2 WHERE id = $1`, [id, status])
            .then(() => true)
            .catch(() => false);
          if (!done) await runner.query('ROLLBACK TO SAVEPOINT before_it');
          const at =
            status === 'published' || status === 'superseded' || status === 'withdrawn' ? rank[status] : -1;
          expect(done && at < reached).toBe(false);
          if (done) reached = at;
        }
        await runner.rollbackTransaction();
      }),
      { numRuns: 30 },
    );
    await runner.release();
  });

  test('is not touched by a constant corrected later, a rebuild or a discard', async () => {
    const before = await digestOf(id);
    const { version, kit } = (await joan.get(`/visits/${surveyVisit}`)).body.visit;
    expect(
      (await joan.patch(`/visits/${surveyVisit}/kit`).send({ kit: { ...kit, floatOffsetM: 0.4 }, version }))
        .status,
    ).toBe(200);
    await joan.patch(`/visits/${surveyVisit}/kit`).send({ kit, version: version + 1 });
    expect((await joan.post(`/charts/${id}/rebuild`)).status).toBe(409);
    expect((await joan.delete(`/charts/${id}`)).status).toBe(409);
    await server.settle();
    expect(await digestOf(id)).toBe(before);
  });

  test('is withdrawn with a reason by those who approve, and then only says so', async () => {
    const withdraw = (person: Pick<Person, 'post'>, reason: string) =>
      person.post(`/charts/${id}/withdraw`).send({ reason });
    expect((await withdraw(idris, '')).status).toBe(400);
    expect((await withdraw(joan, 'Board moved')).status).toBe(403);
    expect((await withdraw(elsewhere.people.owner, 'Board moved')).status).toBe(404);
    expect((await withdraw(aStranger(server), 'Board moved')).status).toBe(401);
    expect((await withdraw(idris, 'The gauge board had moved')).status).toBe(200);
    expect((await withdraw(idris, 'Again')).status).toBe(409);
    const seen = ChartView.parse((await aStranger(server).get(`/charts/${id}`)).body);
    expect(seen).toMatchObject({
      status: 'withdrawn',
      withdrawnReason: 'The gauge board had moved',
      depth: null,
      isobaths: null,
    });
    expect(seen.layerNotes.depth).toBe('This chart was withdrawn.');
    expect(ChartView.parse((await joan.get(`/charts/${id}`)).body).depth).not.toBeNull();
    const draft = await drafting({ settle: false });
    expect((await idris.post(`/charts/${draft}/withdraw`).send({ reason: 'x' })).status).toBe(409);
  });
});
