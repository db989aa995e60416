import { outOfDeadlock } from '@mereward/api/http/deadlock';
import { TicketList, TicketView } from '@mereward/shared/bookings/contract';
import { runningTicket, runningTicketAtLake } from '@mereward/api/lakes/running-ticket';
import { ProblemBody } from '@mereward/shared/problems/problem';
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { aLakeGround } from '../support/grounds';
import { aPerson, aStranger, type Person } from '../support/people';
import type { TestServer } from '../support/server';
import { pegDetails } from '../support/water-details';
import { aLake, aPeg, type TestFishery, type TestLake, type TestPeg } from '../support/waters';

let server: TestServer;
let here: TestFishery;
let elsewhere: TestFishery;
let lake: TestLake;
let peg: TestPeg;
let visitor: Person;

beforeAll(async () => {
  ({ server, here, elsewhere, lake } = await aLakeGround());
  visitor = await aPerson(server, { name: 'Sal Marsh', email: 'sal@anglers.example' });
  peg = await freshPeg();
});
afterAll(() => server.close());

let pegs = 0;
const freshPeg = (): Promise<TestPeg> => aPeg(server, lake, { number: `B${(pegs += 1)}` });

const ticket = (from = '2027-04-03T06:00:00Z', until = '2027-04-03T18:00:00Z') => ({
  id: randomUUID(),
  email: visitor.email,
  from,
  until,
});
const problem = (body: unknown) => ProblemBody.parse(body);

describe('a ticket', () => {
  test('is written by the office and read back by staff and by its holder', async () => {
    const body = ticket();
    const answer = await here.people.office.post(`/pegs/${peg.id}/bookings`).send(body);
    expect(answer.status).toBe(201);
    const view = TicketView.parse(answer.body);
    expect(view).toMatchObject({ pegNumber: peg.details.number, holder: 'Sal Marsh', zone: 'Europe/London' });
    expect(view.from).toBe('2027-04-03T06:00:00.000Z');
    const again = await here.people.office.post(`/pegs/${peg.id}/bookings`).send(body);
    expect(again.status).toBe(201);
    const list = TicketList.parse((await here.people.bailiff.get(`/pegs/${peg.id}/bookings`)).body);
    expect(list.tickets.map(({ id }) => id)).toEqual([body.id]);
    const mine = TicketList.parse((await visitor.get('/bookings/mine')).body);
    expect(mine.tickets.find(({ id }) => id === body.id)).toMatchObject({
      holder: null,
      may: { cancel: false },
    });
  });

  test('with its id used for something else is a conflict, and on another fishery’s peg nothing is found', async () => {
    const own = await freshPeg();
    const body = ticket();
    const path = `/pegs/${own.id}/bookings`;
    expect((await here.people.office.post(path).send(body)).status).toBe(201);
    const later = { ...body, until: '2027-04-03T19:00:00Z' };
    expect((await here.people.office.post(path).send(later)).status).toBe(409);
    expect((await elsewhere.people.office.post(path).send(ticket())).status).toBe(404);
    const theirLake = await aLake(server, elsewhere, { name: 'Their Water' });
    const theirs = await aPeg(server, theirLake);
    expect((await elsewhere.people.office.post(`/pegs/${theirs.id}/bookings`).send(body)).status).toBe(404);
  });

  test('is refused to bailiffs and strangers, for nobody, for no time, for the past', async () => {
    const path = `/pegs/${peg.id}/bookings`;
    expect((await here.people.bailiff.post(path).send(ticket())).status).toBe(403);
    expect((await aStranger(server).post(path).send(ticket())).status).toBe(401);
    const office = async (body: object) => problem((await here.people.office.post(path).send(body)).body);
    expect(await office({ ...ticket(), email: 'nobody@anglers.example' })).toMatchObject({
      kind: 'invalid',
      errors: [{ pointer: '/email' }],
    });
    const day = '2027-04-04T06:00:00Z';
    expect(await office(ticket(day, day))).toMatchObject({ errors: [{ pointer: '/until' }] });
    expect((await office(ticket('2027-04-01T06:00:00Z', '2027-04-02T06:00:00Z'))).title).toMatch(/is over/);
    expect((await office(ticket(day, '2027-05-06T06:00:00Z'))).title).toMatch(/31 days/);
    expect((await office({ ...ticket(), from: 'tomorrow' })).errors?.[0]?.pointer).toBe('/from');
  });

  test('may begin the moment another ends', async () => {
    const own = await freshPeg();
    const path = `/pegs/${own.id}/bookings`;
    const first = await here.people.office.post(path).send(ticket());
    const next = await here.people.office
      .post(path)
      .send(ticket('2027-04-03T18:00:00Z', '2027-04-04T18:00:00Z'));
    expect([first.status, next.status]).toEqual([201, 201]);
    const between = ticket('2027-04-03T17:59:59Z', '2027-04-03T18:30:00Z');
    const refused = problem((await here.people.office.post(path).send(between)).body);
    expect(refused).toMatchObject({ kind: 'conflict' });
    expect(refused.title).toMatch(/is let already/);
  });

  test('of sixteen for one peg at once exactly one is written, and nobody sees a deadlock', async () => {
    for (let round = 0; round < 5; round += 1) {
      const own = await freshPeg();
      const writers = [here.people.office, here.people.manager, here.people.owner];
      const answers = await Promise.all(
        Array.from({ length: 16 }, (_, i) => {
          const writer = writers[i % 3] ?? here.people.office;
          const hour = String(6 + (i % 5)).padStart(2, '0');
          return writer.post(`/pegs/${own.id}/bookings`).send(ticket(`2027-04-03T${hour}:00:00Z`));
        }),
      );
      const statuses = answers.map(({ status }) => status);
      expect(statuses.filter((status) => status === 201)).toHaveLength(1);
      expect(statuses.filter((status) => status === 409)).toHaveLength(15);
    }
  });

  test('sent twice at once with one id is written once', async () => {
    const own = await freshPeg();
    const body = ticket();
    const send = () => here.people.office.post(`/pegs/${own.id}/bookings`).send(body);
    const answers = await Promise.all([send(), send(), send()]);
    expect(answers.map(({ status }) => status)).toEqual([201, 201, 201]);
    const list = TicketList.parse((await here.people.office.get(`/pegs/${own.id}/bookings`)).body);
    expect(list.tickets).toHaveLength(1);
  });

  test('is refused on a closed peg, under a line without an assessment, and for a night where there are none', async () => {
    const line = {
      ...pegDetails().overheadLine,
      kind: 'present' as const,
      distanceM: 12,
      fishing: 'restricted' as const,
    };
    const under = await aPeg(server, lake, { number: 'UL', overheadLine: line });
    const assessed = await aPeg(server, lake, {
      number: 'UA',
      overheadLine: { ...line, document: 'Assessed 3 March 2027' },
    });
    const shut = await aPeg(server, lake, {
      number: 'SH',
      status: 'closed',
      statusReason: 'platform broken',
      statusUntil: '2027-04-05',
    });
    const dayOnly = await aLake(server, here, { name: 'Day Water', nights: false });
    const dayPeg = await aPeg(server, dayOnly);
    const send = (on: TestPeg, body = ticket()) =>
      here.people.manager.post(`/pegs/${on.id}/bookings`).send(body);
    expect(problem((await send(under)).body).title).toMatch(/no assessment is on file/);
    expect((await send(assessed)).status).toBe(201);
    expect(problem((await send(shut)).body).title).toBe('Peg SH is closed: platform broken');
    expect((await send(shut, ticket('2027-04-06T06:00:00Z', '2027-04-06T18:00:00Z'))).status).toBe(201);
    const night = ticket('2027-04-03T12:00:00Z', '2027-04-03T23:30:00Z'); // half past midnight in summer time
    expect(problem((await send(dayPeg, night)).body).title).toMatch(/no night fishing/);
    expect((await send(dayPeg, ticket('2027-04-03T04:00:00Z', '2027-04-03T23:00:00Z'))).status).toBe(201);
  });
});

describe('cancelling', () => {
  test('frees the peg; the holder may until it starts', async () => {
    const own = await freshPeg();
    const path = `/pegs/${own.id}/bookings`;
    const ahead = ticket('2027-04-05T06:00:00Z', '2027-04-05T18:00:00Z');
    const running = ticket();
    for (const body of [ahead, running]) await here.people.office.post(path).send(body);
    expect((await aStranger(server).delete(`/bookings/${ahead.id}`)).status).toBe(401);
    expect((await elsewhere.people.office.delete(`/bookings/${ahead.id}`)).status).toBe(404);
    expect((await here.people.bailiff.delete(`/bookings/${ahead.id}`)).status).toBe(404); // not his days
    expect((await here.people.bailiff.delete(`/bookings/${running.id}`)).status).toBe(403);
    expect((await visitor.delete(`/bookings/${running.id}`)).status).toBe(403);
    expect((await visitor.delete(`/bookings/${ahead.id}`)).status).toBe(204);
    for (let times = 0; times < 2; times += 1)
      expect((await here.people.office.delete(`/bookings/${running.id}`)).status).toBe(204);
    expect((await here.people.office.post(path).send(running)).status).toBe(409);
    expect((await here.people.office.post(path).send(ticket())).status).toBe(201);
  });
});

describe('lists', () => {
  test('are for staff; bailiffs see a day each way', async () => {
    const own = await freshPeg();
    const path = `/pegs/${own.id}/bookings`;
    await here.people.office.post(path).send(ticket());
    await here.people.office.post(path).send(ticket('2027-04-09T06:00:00Z', '2027-04-09T18:00:00Z'));
    const count = async (who: Person) => TicketList.parse((await who.get(path)).body).tickets.length;
    expect(await count(here.people.owner)).toBe(2);
    expect(await count(here.people.head_bailiff)).toBe(1);
    expect((await here.people.member.get(path)).status).toBe(403);
    expect((await visitor.get(path)).status).toBe(404);
    expect((await aStranger(server).get(path)).status).toBe(401);
    expect((await aStranger(server).get('/bookings/mine')).status).toBe(401);
  });
});

describe('a running ticket', () => {
  test('counts for its holder, its peg and its lake, from its first moment to before its last', async () => {
    const own = await freshPeg();
    const other = await aLake(server, here, { name: 'Other Water' });
    const sam = await aPerson(server, { email: 'sam@anglers.example' });
    const body = { ...ticket('2027-04-03T06:00:00Z', '2027-04-03T18:00:00Z'), email: sam.email };
    await here.people.office.post(`/pegs/${own.id}/bookings`).send(body);
    const tx = server.server.source.manager;
    const at = (instant: string, id = sam.id) => ({
      tx,
      actor: { kind: 'account' as const, id, roles: new Map() },
      now: new Date(instant),
    });
    expect(await runningTicket(at('2027-04-03T06:00:00Z'), own.id)).toEqual({
      from: new Date(body.from),
      until: new Date(body.until),
    });
    expect(await runningTicket(at('2027-04-03T05:59:59Z'), own.id)).toBeNull();
    expect(await runningTicket(at('2027-04-03T18:00:00Z'), own.id)).toBeNull();
    expect(await runningTicket(at('2027-04-03T07:00:00Z', visitor.id), own.id)).toBeNull();
    expect(await runningTicket(at('2027-04-03T07:00:00Z'), peg.id)).toBeNull();
    expect(await runningTicketAtLake(at('2027-04-03T07:00:00Z'), lake.id)).not.toBeNull();
    expect(await runningTicketAtLake(at('2027-04-03T07:00:00Z'), other.id)).toBeNull();
    const stranger = { tx, actor: { kind: 'stranger' as const }, now: new Date('2027-04-03T07:00:00Z') };
    expect(await runningTicket(stranger, own.id)).toBeNull();
    await here.people.office.delete(`/bookings/${body.id}`);
    expect(await runningTicket(at('2027-04-03T07:00:00Z'), own.id)).toBeNull();
  });
});

describe('a deadlock', () => {
  test('between two transactions is run again, and both are kept', async () => {
    const { source } = server.server;
    const [one, two] = [await freshPeg(), await freshPeg()];
    let release = () => {};
    const held = new Promise<void>((resolve) => (release = resolve));
    const waiting = { count: 0 };
    const attempts: number[] = [0, 0];
    const cross = (order: [string, string], who: number) =>
      outOfDeadlock(() =>
        source.transaction(async (tx) => {
          attempts[who] = (attempts[who] ?? 0) + 1;
          await tx.query('UPDATE peg SET version = version + 1 WHERE id = $1', [order[0]]);
          if ((waiting.count += 1) >= 2) release(); // both hold one row before either asks for the other's
          await held;
          await tx.query('UPDATE peg SET version = version + 1 WHERE id = $1', [order[1]]);
        }),
      );
    await Promise.all([cross([one.id, two.id], 0), cross([two.id, one.id], 1)]);
    const rows = await source.query('SELECT version FROM peg WHERE id = ANY($1)', [[one.id, two.id]]);
    expect(rows).toEqual([{ version: 3 }, { version: 3 }]);
    expect(attempts.toSorted()).toEqual([1, 2]);
  });

  test('is the only failure that is tried again', async () => {
    let tries = 0;
    const failing = outOfDeadlock(async () => {
      tries += 1;
      throw new Error('something else');
    });
    await expect(failing).rejects.toThrow('something else');
    expect(tries).toBe(1);
  });
});
