import { NoticeList, type NoticeView } from '@mereward/shared/notices/contract';
import { ProblemBody } from '@mereward/shared/problems/problem';
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, beforeEach, expect, test } from 'vitest';
import { aPerson, aStranger, type Asker } from '../support/people';
import { aServer, type TestServer } from '../support/server';
import { aTicket } from '../support/tickets';
import { aFishery, aLake, aPeg, type TestFishery, type TestLake } from '../support/waters';

let server: TestServer;
let here: TestFishery;
let lake: TestLake;

beforeAll(async () => {
  server = await aServer();
});
afterAll(() => server.close());
beforeEach(async () => {
  server.setNow('2027-07-01T09:00:00Z');
  here = await aFishery(server);
  lake = await aLake(server, here);
});

const path = () => `/fisheries/${here.id}/notices`;
const notice = (audience = 'public', more: object = {}) => ({
  id: randomUUID(),
  lakeIds: [lake.id],
  severity: 'caution',
  from: '2027-07-01T00:00:00Z',
  until: null,
  details: { title: `For ${audience}`, text: 'Algae: keep dogs out of the water.', audience },
  ...more,
});
const shown = async (who: Asker): Promise<NoticeView[]> =>
  NoticeList.parse((await who.get(path())).body).notices;
const titles = async (who: Asker) => (await shown(who)).map(({ details }) => details.title).sort();

test('each reader is told what is meant for them, and nobody more', async () => {
  for (const audience of ['public', 'ticket', 'members', 'staff'])
    expect((await here.people.office.post(path()).send(notice(audience))).status).toBe(201);
  expect(await titles(aStranger(server))).toEqual(['For public']);
  expect(await titles(here.people.member)).toEqual(['For members', 'For public']);
  expect(await titles(here.people.bailiff)).toEqual(['For members', 'For public', 'For staff', 'For ticket']);
  const sal = await aPerson(server);
  expect(await titles(sal)).toEqual(['For public']);
  const peg = await aPeg(server, lake);
  const times = { from: '2027-07-02T06:00:00Z', until: '2027-07-02T18:00:00Z' };
  await aTicket(server, { pegId: peg.id, holder: sal, ...times });
  expect(await titles(sal)).toEqual(['For public', 'For ticket']);
});

test('what is to come is seen by its writers only, and what is over by nobody', async () => {
  const { head_bailiff: joan } = here.people;
  await joan.post(path()).send(notice('public', { from: '2027-07-05T00:00:00Z' }));
  const over = { from: '2027-06-01T00:00:00Z', until: '2027-06-02T00:00:00Z' };
  await joan.post(path()).send(notice('public', over));
  expect(await shown(joan)).toHaveLength(1);
  expect(await shown(aStranger(server))).toEqual([]);
});

test('the gravest stand first', async () => {
  for (const severity of ['info', 'danger', 'caution'])
    await here.people.office.post(path()).send(notice('public', { severity }));
  expect((await shown(aStranger(server))).map(({ severity }) => severity)).toEqual([
    'danger',
    'caution',
    'info',
  ]);
});

test('it is written twice once, changed by its version, taken down, and refused to bailiffs', async () => {
  const body = notice();
  const { office, bailiff } = here.people;
  expect((await bailiff.post(path()).send(body)).status).toBe(403);
  expect((await aStranger(server).post(path()).send(body)).status).toBe(401);
  await Promise.all([office.post(path()).send(body), office.post(path()).send(body)]);
  expect(await shown(office)).toHaveLength(1);
  const change = { ...body, severity: 'danger', version: 1 };
  expect((await office.put(`/notices/${body.id}`).send(change)).status).toBe(204);
  expect((await office.put(`/notices/${body.id}`).send(change)).status).toBe(409);
  expect((await bailiff.delete(`/notices/${body.id}`)).status).toBe(403);
  expect((await office.delete(`/notices/${body.id}`)).status).toBe(204);
  expect(await shown(office)).toEqual([]);
});

test('one that ends before it begins, is too long, or names another’s lake is refused', async () => {
  const { office } = here.people;
  const back = notice('public', { until: '2027-06-30T00:00:00Z' });
  const refused = await office.post(path()).send(back);
  expect(ProblemBody.parse(refused.body)).toMatchObject({ kind: 'invalid', errors: [{ pointer: '/until' }] });
  const long = notice();
  long.details.text = 'x'.repeat(501);
  expect((await office.post(path()).send(long)).status).toBe(400);
  const elsewhere = await aFishery(server, { name: 'Upper Sallow' });
  const theirs = await aLake(server, elsewhere);
  expect((await office.post(path()).send(notice('public', { lakeIds: [theirs.id] }))).status).toBe(404);
});
