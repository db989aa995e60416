import { ProblemBody } from '@mereward/shared/problems/problem';
import { afterAll, beforeAll, expect, test } from 'vitest';
import type { Person } from '../support/people';
import { aServer, type TestServer } from '../support/server';
import { aCastBody, aLongWater, aVisitBody, openedVisit, type TestWater } from '../support/surveys';
import { aFishery } from '../support/waters';

let server: TestServer;
let water: TestWater;
let joan: Person;

beforeAll(async () => {
  server = await aServer();
  server.setNow('2027-04-03T12:00:00Z');
  const here = await aFishery(server, { name: 'Ostlemere Waters' });
  water = await aLongWater(server, here);
  joan = here.people.head_bailiff;
});
afterAll(() => server.close());

const pointer = (body: unknown) => ProblemBody.parse(body).errors?.[0]?.pointer;
const wrong = ['1970-01-01T00:00:00.000Z', '0001-01-01T00:00:00.000Z', '2031-04-03T09:00:00.000Z'];

test('a visit opened by a wrong clock is refused', async () => {
  for (const startedAt of wrong) {
    const answer = await joan.post(`/lakes/${water.lake.id}/visits`).send(aVisitBody(water, { startedAt }));
    expect(pointer(answer.body)).toBe('/startedAt');
  }
});

test('a cast made by a wrong clock is refused, as its day would become the chart’s', async () => {
  const visitId = await openedVisit(joan, water);
  for (const observedAt of wrong) {
    const answer = await joan.post(`/visits/${visitId}/casts`).send(aCastBody(water, {}, { observedAt }));
    expect(pointer(answer.body)).toBe('/observedAt');
  }
  expect((await joan.post(`/visits/${visitId}/casts`).send(aCastBody(water))).status).toBe(201);
});

test('a visit is not closed years ahead', async () => {
  const visitId = await openedVisit(joan, water);
  const end = { endedAt: '2031-04-03T09:00:00.000Z', gaugeEndM: 0.62 };
  expect(pointer((await joan.post(`/visits/${visitId}/close`).send(end)).body)).toBe('/endedAt');
});

test('a visit sent three times at once is opened once and answered thrice', async () => {
  const body = aVisitBody(water);
  const answers = await Promise.all(
    [1, 2, 3].map(() => joan.post(`/lakes/${water.lake.id}/visits`).send(body)),
  );
  expect(answers.map(({ status }) => status)).toEqual([201, 201, 201]);
  const other = await joan.post(`/lakes/${water.lake.id}/visits`).send({ ...body, title: 'Another' });
  expect(other.status).toBe(409);
});

test('a cast sent twice is kept once, also when a nought of it has a sign', async () => {
  const visitId = await openedVisit(joan, water);
  const body = JSON.stringify(aCastBody(water)).replace('"sidestepM":0', '"sidestepM":-0');
  expect(body).toContain('-0');
  for (let time = 1; time <= 2; time += 1) {
    const answer = await joan
      .post(`/visits/${visitId}/casts`)
      .set('content-type', 'application/json')
      .send(body);
    expect(answer.status).toBe(201);
  }
});
