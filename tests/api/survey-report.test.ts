import { VisitWithCasts } from '@mereward/shared/surveys/contract';
import { spawnSync } from 'node:child_process';
import { createHash, randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, test, vi } from 'vitest';
import { draftedChart, publishedChart } from '../support/charts';
import { aStranger, type Asker } from '../support/people';
import { aServer, type TestServer } from '../support/server';
import { aLongWater, aSurvey, type TestWater } from '../support/surveys';
import { aFishery, type TestFishery } from '../support/waters';

vi.setConfig({ testTimeout: 60_000 }); // the thread that draws reads its source when it starts

let server: TestServer;
let here: TestFishery;
let water: TestWater;
let visitId: string;
let chartId: string;

beforeAll(async () => {
  server = await aServer();
  here = await aFishery(server, { name: 'Ostlemere Waters' });
  water = await aLongWater(server, here);
  const joan = here.people.head_bailiff;
  visitId = await aSurvey(joan, water);
  const lakeId = water.lake.id;
  const approver = here.people.manager;
  chartId = await publishedChart(server, { person: joan, approver, lakeId, visitIds: [visitId] });
});
afterAll(() => server.close());

const bytes = async (reader: Asker, path: string): Promise<Buffer> => {
  const answer = await reader
    .get(path)
    .buffer(true)
    .parse((res, done) => {
      const parts: Buffer[] = [];
      res.on('data', (part: Buffer) => parts.push(part));
      res.on('end', () => done(null, Buffer.concat(parts)));
    });
  expect(answer.status).toBe(200);
  return Buffer.from(answer.body);
};

const table = async (): Promise<{ heading: string[]; rows: string[][] }> => {
  const file = await bytes(here.people.bailiff, `/charts/${chartId}/casts.csv`);
  const [heading = [], ...rows] = file
    .toString('utf8')
    .replace(/^\uFEFF/, '')
    .trimEnd()
    .split('\r\n')
    .map((line) => line.split(','));
  return { heading, rows };
};

describe('the table of a chart’s casts', () => {
  test('has every cast of every visit, with instants, days and lengths of both kinds', async () => {
    const { casts } = VisitWithCasts.parse((await here.people.bailiff.get(`/visits/${visitId}`)).body);
    const { heading, rows } = await table();
    expect(rows).toHaveLength(casts.length);
    const at = (row: string[], column: string) => row[heading.indexOf(column)] ?? '';
    for (const row of rows) {
      expect(at(row, 'visit_id')).toBe(visitId);
      expect(at(row, 'at_utc')).toMatch(/^\d{4}-\d\d-\d\dT\d\d:\d\d:\d\d\.\d{3}Z$/);
      expect(at(row, 'day')).toBe('2027-04-03');
      if (at(row, 'depth_at_datum_mm') === '') continue;
      const depthM = Number(at(row, 'depth_at_datum_m'));
      expect(Number(at(row, 'depth_at_datum_mm'))).toBe(Math.round(depthM * 1000));
      expect(Number(at(row, 'depth_at_datum_ft'))).toBeCloseTo(depthM / 0.3048, 1); // 1959: exact foot
    }
  });

  test('is told apart by a digest that anybody can work out again', async () => {
    const file = await bytes(here.people.bailiff, `/charts/${chartId}/casts.csv`);
    const told = (await bytes(here.people.bailiff, `/charts/${chartId}/casts.csv.sha256`)).toString('utf8');
    const digest = createHash('sha256').update(file).digest('hex');
    expect(told).toBe(`${digest}  far-ostle-casts-2027.1.csv\n`);
  });

  test('stays the same when the kit is put right after the chart was published', async () => {
    const before = await table();
    const { visit } = VisitWithCasts.parse((await here.people.bailiff.get(`/visits/${visitId}`)).body);
    const kit = { ...visit.kit, floatOffsetM: visit.kit.floatOffsetM + 0.1 };
    const put = await here.people.head_bailiff
      .patch(`/visits/${visitId}/kit`)
      .send({ kit, version: visit.version });
    expect(put.status).toBe(200);
    const after = await table();
    const depths = ({ heading, rows }: typeof before) =>
      rows.map((row) => row[heading.indexOf('depth_at_datum_mm')]);
    expect(depths(after)).toEqual(depths(before));
  });

  test('is read back by the import, which leaves alone what was worked out', async () => {
    const text = (await bytes(here.people.bailiff, `/charts/${chartId}/casts.csv`)).toString('utf8');
    const preview = await here.people.head_bailiff
      .post(`/visits/${visitId}/imports/preview`)
      .send({ filename: 'casts.csv', text, mapping: null });
    expect(preview.body).toMatchObject({ errors: [] });
    expect(Object.keys(preview.body.mapping)).toEqual(
      expect.arrayContaining(['peg', 'mark', 'wraps_whole', 'depth_pulls', 'drag', 'returned', 'at_utc']),
    );
  });
});

describe('the survey report', () => {
  test('is a PDF for staff alone, as is the table', async () => {
    for (const path of ['report.pdf', 'casts.csv', 'casts.csv.sha256']) {
      const at = `/charts/${chartId}/${path}`;
      expect((await aStranger(server).get(at)).status).toBe(401);
      expect([403, 404]).toContain((await here.people.member.get(at)).status);
      expect((await here.people.bailiff.get(`/charts/${randomUUID()}/${path}`)).status).toBe(404);
    }
    const pdf = await bytes(here.people.bailiff, `/charts/${chartId}/report.pdf`);
    expect(pdf.subarray(0, 5).toString()).toBe('%PDF-');
  });

  test('there is one of a draft too, for those who look it over', async () => {
    const lakeId = water.lake.id;
    const draft = await draftedChart(server, {
      person: here.people.head_bailiff,
      lakeId,
      visitIds: [visitId],
    });
    const pdf = await bytes(here.people.manager, `/charts/${draft}/report.pdf`);
    expect(pdf.toString('latin1')).toContain('/Type /Page');
  });

  test.runIf(spawnSync('pdftotext', ['-v']).error === undefined)(
    'prints every cast, the approver, and the same digest, as another program reads it',
    async () => {
      const pdf = await bytes(here.people.bailiff, `/charts/${chartId}/report.pdf`);
      const file = await bytes(here.people.bailiff, `/charts/${chartId}/casts.csv`);
      const read = spawnSync('pdftotext', ['-layout', '-', '-'], { input: pdf, maxBuffer: 2 ** 26 });
      const words = String(read.stdout);
      expect(words).toContain(createHash('sha256').update(file).digest('hex'));
      expect(words).toContain('The manager');
      const { rows } = await table();
      expect(words.match(/^ *FO7 +\d+ +\d\d:\d\d /gm)).toHaveLength(rows.length);
      const pages = Number(/of (\d+)\s*$/m.exec(words.split('\f')[0] ?? '')?.[1]);
      expect(words.split('\f').length - 1).toBe(pages);
      const heads = words.match(/Peg +Seq +Time +Aim/g) ?? [];
      expect(heads.length).toBeGreaterThan(1);
    },
  );
});
