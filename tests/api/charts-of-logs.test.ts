import { ChartReview, ChartView } from '@mereward/shared/charts/contract';
import { ProblemBody } from '@mereward/shared/problems/problem';
import { LogView } from '@mereward/shared/surveys/log-contract';
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { draftedChart, publishedChart } from '../support/charts';
import type { Person } from '../support/people';
import { aServer, type TestServer } from '../support/server';
import { aBoatTrack, boatDepthM, nmeaLog } from '../support/sounding-log';
import { aLongWater, openedVisit, type TestWater } from '../support/surveys';
import { aFishery, type TestFishery } from '../support/waters';

let server: TestServer;
let here: TestFishery;
let water: TestWater;
let joan: Person;

beforeAll(async () => {
  server = await aServer();
  server.setNow('2027-04-03T12:00:00Z');
  here = await aFishery(server);
  water = await aLongWater(server, here, { audiences: AUDIENCES });
  joan = here.people.head_bailiff;
});
afterAll(() => server.close());

const AUDIENCES = { depth: 'public', bottom: 'public', spots: 'public', soundings: 'staff' } as const;
const track = aBoatTrack({ linesM: 20 });

/** A visit whose board fell from 0.62 (datum) to 0.52, and a log of it taken in. */
async function loggedVisit(gaugeStartM = 0.62): Promise<{ visitId: string; logId: string }> {
  const visitId = await openedVisit(joan, water, { gaugeStartM });
  await joan
    .post(`/visits/${visitId}/close`)
    .send({ endedAt: '2027-04-03T10:40:00.000Z', gaugeEndM: gaugeStartM });
  const brought = await joan
    .post(`/visits/${visitId}/logs`)
    .field('id', randomUUID())
    .attach('files', Buffer.from(nmeaLog(track)), 'boat.log');
  const { id: logId } = LogView.parse(brought.body);
  await server.settle();
  await joan.post(`/logs/${logId}/start`);
  await server.settle();
  return { visitId, logId };
}

const drafting = (visitIds: string[]) => ({ person: joan, lakeId: water.lake.id, visitIds });

describe('a chart of a log', { timeout: 60_000 }, () => {
  test('is made of its soundings at datum, merged by cells, and says how many', async () => {
    const { visitId, logId } = await loggedVisit(0.82); // 0.2 m over datum all the while
    const id = await draftedChart(server, drafting([visitId]));
    const review = ChartReview.parse((await joan.get(`/charts/${id}/review`)).body);
    expect(review.chart.build).toMatchObject({ state: 'done', error: null });
    expect(review.logs).toHaveLength(1);
    const [log] = review.logs;
    expect(log).toMatchObject({ id: logId, found: track.length, kept: track.length, outside: 0, cellM: 1 });
    expect(log?.cells).toBeGreaterThan(0.9 * track.length);
    expect(log?.contoured).toBe(log?.cells);
    expect(review.chart).toMatchObject({ surveyedFrom: '2027-04-03', surveyedTo: '2027-04-03' });

    const view = ChartView.parse((await joan.get(`/charts/${id}`)).body);
    const shown = view.soundings ?? [];
    expect(shown.length).toBeGreaterThan(300);
    expect(shown.length).toBeLessThanOrEqual(1500);
    expect(shown.every(({ ofLog, bottom }) => ofLog === true && bottom === 'unknown')).toBe(true);
    for (const { xM, yM, depthM } of shown) {
      expect(Math.abs(depthM - (boatDepthM({ xM, yM }) - 0.2))).toBeLessThan(0.12); // a metre's cell of a steep bank
    }
  });

  test('names what is a sounding of a log in its exported features', async () => {
    const { visitId } = await loggedVisit();
    const id = await draftedChart(server, drafting([visitId]));
    const { features } = (await joan.get(`/charts/${id}/geojson`)).body;
    const kinds = new Set(
      features.map(({ properties }: { properties: { kind: string } }) => properties.kind),
    );
    expect(kinds).toContain('sounding');
    expect(kinds).not.toContain('cast');
  });

  test('keeps its soundings from those who may not see them, and its log from being taken back', async () => {
    const { visitId, logId } = await loggedVisit();
    const id = await publishedChart(server, { ...drafting([visitId]), approver: here.people.owner });
    const view = ChartView.parse((await here.people.member.get(`/charts/${id}`)).body);
    expect(view.depth).not.toBeNull();
    expect(view.soundings).toBeNull();
    const refused = ProblemBody.parse((await joan.delete(`/logs/${logId}`)).body);
    expect(refused).toMatchObject({ kind: 'conflict', title: 'A published chart was made from this log' });

    const reason = { reason: 'The boat’s echo sounder was set to feet.' };
    await here.people.owner.post(`/charts/${id}/withdraw`).send(reason);
    expect((await joan.delete(`/logs/${logId}`)).status).toBe(204);
  });

  test('that is still a draft has to be built again once its log is taken back', async () => {
    const { visitId, logId } = await loggedVisit();
    const id = await draftedChart(server, drafting([visitId]));
    expect((await joan.delete(`/logs/${logId}`)).status).toBe(204);
    const review = ChartReview.parse((await joan.get(`/charts/${id}/review`)).body);
    expect(review.checks.find(({ key }) => key === 'built')).toMatchObject({ state: 'failed', blocks: true });
  });
});
