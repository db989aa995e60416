import { ProblemBody } from '@mereward/shared/problems/problem';
import { ImportDone, ImportPreview, VisitWithCasts } from '@mereward/shared/surveys/contract';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { aSurveyGround } from '../support/grounds';
import { aStranger, type Person } from '../support/people';
import type { TestServer } from '../support/server';
import { keptCast, openedVisit, type TestWater } from '../support/surveys';
import { aPeg, type TestFishery } from '../support/waters';

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

describe('a casts file', () => {
  const rows =
    'Peg;Mark;Wraps;Remainder mm;Drop;Drag;Returned;Pulls\nFO7;M3;14;0;sharp crack;fine rattle;none;8\nFO7;pump-house chimney;17;120,6;soft_slow;smooth slow heavy;black silt|leaves;9\n';
  const file = (text: string, mapping: Record<string, number> | null = null) => ({
    filename: 'casts.csv',
    text,
    mapping,
  });

  test('is shown as it would be read before anything is kept', async () => {
    const visitId = await openedVisit(joan, water);
    const answer = await joan.post(`/visits/${visitId}/imports/preview`).send(file(rows));
    const preview = ImportPreview.parse(answer.body);
    expect(preview).toMatchObject({ delimiter: ';', rows: 2, errors: [], alreadyImported: false });
    expect(preview.sample[1]?.words).toBe(
      'peg FO7, over pump-house chimney, 17 wraps + 0.121 m, soft and slow, stuck, then smooth and heavy, black silt, leaves, 9 pulls',
    );
    expect((await visitOf(visitId)).casts).toEqual([]);
  });

  test('is taken in whole, once, and reduced', async () => {
    const visitId = await openedVisit(joan, water);
    const both = await Promise.all(
      [1, 2].map(() => joan.post(`/visits/${visitId}/imports`).send(file(rows))),
    );
    expect(both.map(({ body }) => ImportDone.parse(body).added).sort()).toEqual([0, 2]);
    const again = await joan.post(`/visits/${visitId}/imports`).send(file('\uFEFF' + rows));
    expect(ImportDone.parse(again.body)).toEqual({ added: 0, alreadyImported: true });
    const { casts } = await visitOf(visitId);
    expect(casts.map(({ reduced }) => reduced.ok && reduced.sounding.bottom)).toEqual([
      'gravel',
      'silt_deep',
    ]);
    expect(casts[1]?.observation).toMatchObject({
      wrapsWhole: 17,
      remainderM: 0.1206,
      remainderStated: true,
    });
  });

  test('with one wrong row is not taken at all, and every fault is told', async () => {
    const visitId = await openedVisit(joan, water);
    const bad = rows + 'FO9;M3;x;0;clonk;fine rattle;none;8\n';
    const preview = ImportPreview.parse(
      (await joan.post(`/visits/${visitId}/imports/preview`).send(file(bad))).body,
    );
    expect(preview.errors.map(({ row, column }) => [row, column])).toEqual([
      [4, 'peg'],
      [4, 'wraps_whole'],
      [4, 'drop'],
    ]);
    const answer = await joan.post(`/visits/${visitId}/imports`).send(file(bad));
    expect(answer.status).toBe(400);
    expect(problem(answer.body).errors?.map(({ pointer }) => pointer)).toContain('/rows/4/peg');
    expect((await visitOf(visitId)).casts).toEqual([]);
    const mended = await joan.post(`/visits/${visitId}/imports`).send(file(rows));
    expect(ImportDone.parse(mended.body).added).toBe(2);
  });

  test('is read by the columns that a person chose', async () => {
    const visitId = await openedVisit(joan, water);
    const text = 'a,b,c\nFO7,14,M3\n';
    const guessed = await joan.post(`/visits/${visitId}/imports`).send(file(text));
    expect(guessed.status).toBe(400);
    const chosen = await joan
      .post(`/visits/${visitId}/imports`)
      .send(file(text, { peg: 0, wraps_whole: 1, mark: 2 }));
    expect(ImportDone.parse(chosen.body).added).toBe(1);
    const outside = await joan
      .post(`/visits/${visitId}/imports`)
      .send(file(text + '\n', { peg: 0, wraps_whole: 9, mark: 2 }));
    expect(outside.status).toBe(400);
  });

  test('that is no table, or lost its letters, is refused in words', async () => {
    const visitId = await openedVisit(joan, water);
    for (const text of ['', 'peg,wraps\n"FO7,14', 'peg,wraps\nFO\uFFFD,14']) {
      const answer = await joan.post(`/visits/${visitId}/imports`).send(file(text));
      expect(answer.status).toBe(400);
      expect(problem(answer.body).errors?.[0]?.pointer).toBe('/text');
    }
  });

  test('with days that are none, or long before or after the visit, is refused row by row', async () => {
    const visitId = await openedVisit(joan, water);
    const at = [
      '2027-02-30T09:00:00Z',
      '1970-01-01T00:00:00Z',
      '2031-04-03T09:00:00Z',
      '2027-04-03T09:30:00Z',
    ];
    const text = `peg,mark,wraps,at_utc\n${at.map((each) => `FO7,M3,14,${each}`).join('\n')}\n`;
    const answer = await joan.post(`/visits/${visitId}/imports`).send(file(text));
    const rows = problem(answer.body).errors?.map(({ pointer }) => pointer);
    expect(rows?.sort()).toEqual(['/rows/2/at_utc', '/rows/3/at_utc', '/rows/4/at_utc']);
  });

  test('whose note holds letters that can’t be kept is refused in its row', async () => {
    const visitId = await openedVisit(joan, water);
    const text = 'peg,mark,wraps,note\nFO7,M3,14,gravel \u202Ebar\n';
    const answer = await joan.post(`/visits/${visitId}/imports`).send(file(text));
    expect(problem(answer.body).errors?.[0]?.pointer).toBe('/rows/2/note');
  });

  test('is for those who keep casts', async () => {
    const visitId = await openedVisit(joan, water);
    for (const at of [`/visits/${visitId}/imports`, `/visits/${visitId}/imports/preview`]) {
      expect((await here.people.owner.post(at).send(file(rows))).status).toBe(403);
      expect((await elsewhere.people.manager.post(at).send(file(rows))).status).toBe(404);
      expect((await aStranger(server).post(at).send(file(rows))).status).toBe(401);
    }
  });
});

describe('the casts of a visit as a table', () => {
  test('give the trade’s columns, turn formulas into text, and can be taken in again', async () => {
    const visitId = await openedVisit(joan, water);
    await keptCast({ person: joan, water, visitId }, { note: '=1+1' });
    await keptCast({ person: joan, water, visitId }, { wrapsWhole: 36, lineText: '36' });
    const answer = await joan.get(`/visits/${visitId}/casts.csv`);
    expect(answer.headers['content-type']).toContain('text/csv');
    const [heading = '', first = '', second = ''] = answer.text.replace('\uFEFF', '').split('\r\n');
    const columns = heading.split(',');
    const cell = (row: string, column: string) => row.split(',')[columns.indexOf(column)];
    expect(columns).toEqual(
      expect.arrayContaining([
        'visit_id',
        'bearing_deg_true',
        'horizontal_mm',
        'depth_at_datum_mm',
        'lat',
        'lon',
      ]),
    );
    expect(cell(first, 'marker')).toBe('M3');
    expect(cell(first, 'line_length_mm')).toBe('51206');
    expect(Math.abs(Number(cell(first, 'horizontal_mm')) - 51_060)).toBeLessThanOrEqual(20);
    expect(cell(first, 'depth_mm')).toBe('2536');
    expect(cell(first, 'note')).toBe("'=1+1");
    expect(second).toMatch(/beyond the far bank/);
    const copy = await openedVisit(joan, water);
    const taken = await joan
      .post(`/visits/${copy}/imports`)
      .send({ filename: 'casts.csv', text: answer.text, mapping: null });
    expect(ImportDone.parse(taken.body).added).toBe(2);
    const [cast] = (await visitOf(copy)).casts;
    expect(cast?.observation).toMatchObject({
      wrapsWhole: 14,
      drop: 'sharp_crack',
      drag: 'fine_rattle',
      dragLengthM: 0.8,
      pulls: 8,
    });
  });
});

test('a peg of the same lake with another number is found by it', async () => {
  await aPeg(server, water.lake, {
    number: 'FO8',
    position: water.peg.details.position,
    origin: water.peg.details.origin,
  });
  const visitId = await openedVisit(joan, water);
  const text = 'peg,mark,wraps\nfo8,m3,10\n';
  const answer = await joan
    .post(`/visits/${visitId}/imports`)
    .send({ filename: 'a.csv', text, mapping: null });
  expect(ImportDone.parse(answer.body).added).toBe(1);
});
