import { DisagreementView } from '@mereward/shared/charts/disagreement';
import { LogView } from '@mereward/shared/surveys/log-contract';
import { spawnSync } from 'node:child_process';
import { createHash, randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, test, vi } from 'vitest';
import { draftedChart } from '../support/charts';
import { aPhoto } from '../support/pictures';
import { aStranger, type Asker, type Person } from '../support/people';
import { aServer, type TestServer } from '../support/server';
import { aBoatTrack, nmeaLog } from '../support/sounding-log';
import { aLongWater, aSurvey, closedVisit, openedVisit, type TestWater } from '../support/surveys';
import { aFishery, aReading, type TestFishery } from '../support/waters';

vi.setConfig({ testTimeout: 60_000, hookTimeout: 60_000 }); // the thread that draws reads its source when it starts

let server: TestServer;
let here: TestFishery;
let water: TestWater;
let joan: Person;
let logId: string;
let chartId: string;

const track = aBoatTrack({ linesM: 20 });
const MANY = 120; // merged soundings of a log that are printed at most

beforeAll(async () => {
  server = await aServer();
  server.setNow('2027-04-03T12:00:00Z');
  here = await aFishery(server, { name: 'Ostlemere Waters' });
  water = await aLongWater(server, here);
  joan = here.people.head_bailiff;
  const casts = await aSurvey(joan, water);
  await aReading(server, water.board, { levelM: 0.62, at: '2027-04-03T06:00:00Z' });
  const logged = await aLogOf(joan);
  const photo = here.people.manager
    .post(`/pegs/${water.peg.id}/photos`)
    .field({ id: randomUUID(), caption: 'Towards the chimney', takenOn: '2027-04-01' })
    .attach('photo', await aPhoto(3), 'view.jpg');
  expect((await photo).ok).toBe(true);
  await anAcceptedReport();
  chartId = await draftedChart(server, {
    person: joan,
    lakeId: water.lake.id,
    visitIds: [casts, logged],
  });
  server.setNow('2027-05-20T12:00:00Z');
  await joan.post(`/lakes/${water.lake.id}/bottom-events`).send({
    id: randomUUID(),
    kind: 'weed_cut',
    area: null,
    happenedOn: '2027-05-12',
    ends: ['cover'],
    note: 'From the punt',
  });
});
afterAll(() => server.close());

async function aLogOf(person: Person): Promise<string> {
  const visitId = await openedVisit(person, water, { title: 'By boat' });
  await closedVisit({ person, visitId });
  const brought = await person
    .post(`/visits/${visitId}/logs`)
    .field('id', randomUUID())
    .attach('files', Buffer.from(nmeaLog(track)), 'boat.log');
  logId = LogView.parse(brought.body).id;
  await server.settle();
  await person.post(`/logs/${logId}/start`);
  await server.settle();
  return visitId;
}

async function anAcceptedReport(): Promise<void> {
  const told = await here.people.bailiff.post(`/pegs/${water.peg.id}/disagreements`).send({
    id: randomUUID(),
    day: '2027-04-03',
    at: {
      by: 'count',
      markId: water.mark.id,
      offsetDeg: 0,
      wrapsWhole: 12,
      remainderM: 0,
      stickSpacingM: 3.6576,
      wrapReference: 'lead_to_clip',
    },
    found: { depthM: 2.1, depthBy: 'float', bottom: 'gravel', snag: false, weed: null, note: 'Ella saw it' },
  });
  const { id } = DisagreementView.parse(told.body);
  const decided = await joan
    .post(`/disagreements/${id}/decide`)
    .send({ decision: 'accept', remeasured: null, reason: '' });
  expect(decided.status).toBe(200);
}

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

describe('the table of a chart’s merged soundings', () => {
  test('has every one of them with a place, a depth and a grade, for staff alone', async () => {
    const path = `/charts/${chartId}/soundings.csv`;
    expect((await aStranger(server).get(path)).status).toBe(401);
    expect([403, 404]).toContain((await here.people.member.get(path)).status);
    expect((await joan.get(`/charts/${randomUUID()}/soundings.csv`)).status).toBe(404);
    const text = (await bytes(here.people.bailiff, path)).toString('utf8');
    const [heading = '', ...rows] = text
      .replace(/^\uFEFF/, '')
      .trimEnd()
      .split('\r\n');
    expect(heading).toBe('visit_id,log_id,number,lat,lon,east_m,north_m,depth_at_datum_m,sigma_m,grade');
    expect(rows.length).toBeGreaterThan(0.9 * track.length);
    for (const [at, row] of rows.entries()) {
      const cells = row.split(',');
      expect(cells.slice(1, 3)).toEqual([logId, String(at + 1)]);
      expect(cells[9]).toMatch(/^[A-D]$/);
      expect(Number(cells[7])).toBeGreaterThan(0);
      expect(Number(cells[7])).toBeLessThan(3.6); // the made-up bed is 3.5 m deep at most
    }
  });
});

describe.runIf(spawnSync('pdftotext', ['-v']).error === undefined)('the whole report, read back', () => {
  let words: string;
  let pdf: Buffer;

  beforeAll(async () => {
    pdf = await bytes(here.people.bailiff, `/charts/${chartId}/report.pdf`);
    const read = spawnSync('pdftotext', ['-layout', '-', '-'], { input: pdf, maxBuffer: 2 ** 26 });
    words = String(read.stdout);
  });
  const said = (): string => words.replace(/\s+/g, ' ');

  test('tells of each log: file, instrument, counts, speed of sound, offset, extent and spread', () => {
    expect(said()).toContain('Log 1: boat.log');
    expect(said()).toMatch(/Instrument NMEA 0183 sentences: boat\.log/);
    expect(said()).toContain(`${track.length} found, ${track.length} taken in`);
    expect(said()).toMatch(/Speed of sound not recorded in such a log/);
    for (const term of ['Offset', 'Left out', 'Extent', 'Spread \\(one σ\\)', 'Depths at datum'])
      expect(said()).toMatch(new RegExp(`${term} `));
  });

  test('prints soundings up to the stated number, and says where the rest are', async () => {
    const [, printed, all] = /Merged soundings of log 1: (\d+) of (\d+), spread/.exec(said()) ?? [];
    expect(Number(printed)).toBeLessThanOrEqual(MANY);
    const file = await bytes(joan, `/charts/${chartId}/soundings.csv`);
    expect(file.toString('utf8').trimEnd().split('\r\n')).toHaveLength(Number(all) + 1);
    expect(words.match(/^ *\d+ +-?\d+\.\d{7} +-?\d+\.\d{7} /gm)).toHaveLength(Number(printed));
    expect(said()).toContain(createHash('sha256').update(file).digest('hex'));
  });

  test('tells what an angler found and the fishery accepted, and nobody’s name or note', () => {
    expect(said()).toContain('12 wraps');
    expect(said()).toContain('Reports of anglers 1 in the chart');
    expect(said()).not.toContain('Ella saw it');
  });

  test('tells what has happened since, by its day', () => {
    expect(said()).toContain('Weed was cut on 12 May 2027');
    expect(said()).toContain('From the punt');
  });

  test.runIf(spawnSync('pdfimages', ['-v']).error === undefined)(
    'prints the photo of the peg with its caption',
    () => {
      expect(said()).toMatch(/Peg FO7\. Towards the chimney\. 1 Apr 2027/);
      const listed = spawnSync('pdfimages', ['-list', '-'], { input: pdf });
      expect(String(listed.stdout).match(/\bimage\b.* jpeg /g)).toHaveLength(1);
    },
  );
});
