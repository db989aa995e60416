import { ctxOf } from '@mereward/api/http/ctx-of';
import { expireHold } from '@mereward/api/bookings/let-go';
import { freePegs } from '@mereward/api/bookings/peg-calendar';
import { WaitingList, type WaitingView } from '@mereward/shared/bookings/waiting-contract';
import { TICKET_TEMPLATES } from '@mereward/shared/tickets/ticket-templates';
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import { aPerson, aStranger, type Person } from '../support/people';
import { aServer, type TestServer } from '../support/server';
import { aTicket, aTicketType } from '../support/tickets';
import { aFishery, aLake, aPeg, type TestFishery, type TestLake, type TestPeg } from '../support/waters';

let server: TestServer;
let here: TestFishery;
let lake: TestLake;
let peg: TestPeg;
let other: TestPeg;
let kind: string;
let taken: string;
let lakes = 0;

const FROM = '2027-07-17T11:00:00Z';
const UNTIL = '2027-07-18T11:00:00Z';

beforeAll(async () => {
  server = await aServer();
  here = await aFishery(server);
});
afterAll(() => server.close());

/** Each test has a lake of its own with two pegs, both let over the 17th. */
beforeEach(async () => {
  server.setNow('2027-07-10T09:00:00Z');
  lake = await aLake(server, here, { name: `Full Water ${(lakes += 1)}` });
  [peg, other] = [await aPeg(server, lake, { number: 'W1' }), await aPeg(server, lake, { number: 'W2' })];
  kind = (await aTicketType(server, lake, { ...TICKET_TEMPLATES.stay24, prices: freeOfCharge() })).id;
  const holder = here.people.member;
  taken = await aTicket(server, { pegId: peg.id, holder, from: FROM, until: UNTIL });
  await aTicket(server, { pegId: other.id, holder, from: FROM, until: UNTIL });
});

const freeOfCharge = () =>
  TICKET_TEMPLATES.stay24.prices.map((price) => ({ ...price, pricePence: 0, extraRodPence: 0 }));
const wish = (more: object = {}) => ({ ticketTypeId: kind, start: '12:00', rods: 2, pegIds: [], ...more });
const entry = (more: object = {}) => ({ id: randomUUID(), day: '2027-07-17', wish: wish(more) });
const join = (who: Pick<Person, 'post'>, body: object = entry()) =>
  who.post(`/lakes/${lake.id}/waiting`).send(body);

async function waiter(name: string, more: object = {}): Promise<Person & { entryId: string }> {
  const person = await aPerson(server, { name });
  const body = entry(more);
  expect((await join(person, body)).status).toBe(201);
  return { ...person, entryId: body.id };
}
async function mine(who: Person & { entryId: string }): Promise<WaitingView> {
  const { waiting } = WaitingList.parse((await who.get('/waiting/mine')).body);
  const found = waiting.find(({ id }) => id === who.entryId);
  if (!found) throw new Error('Not in the list any more');
  return found;
}
const cancel = () => server.server.source.transaction((tx) => freePegs(tx, taken));
const expire = (bookingId: string) =>
  server.server.source.transaction((tx) => expireHold(ctxOf(server.server, tx), bookingId));

describe('a line', () => {
  test('is joined once for a lake’s day, repeated without harm, and shows nobody but one’s own place', async () => {
    const ann = await waiter('Ann Reed');
    const bob = await waiter('Bob Hale');
    expect(await mine(ann)).toMatchObject({ status: 'waiting', place: 1, lakeName: lake.details.name });
    expect(await mine(bob)).toMatchObject({ status: 'waiting', place: 2 });
    expect((await join(ann)).status).toBe(409);
    const body = { ...entry(), id: bob.entryId };
    expect((await join(bob, body)).status).toBe(201);
    expect((await join(bob, { ...body, day: '2027-07-16' })).status).toBe(409);
    expect((await join(ann, body)).status).toBe(409);
    const seen = WaitingList.parse((await bob.get('/waiting/mine')).body);
    expect(JSON.stringify(seen)).not.toContain(ann.entryId);
    expect((await bob.delete(`/waiting/${ann.entryId}`)).status).toBe(404);
    expect((await bob.post(`/waiting/${ann.entryId}/pass`)).status).toBe(404);
    expect((await join(aStranger(server))).status).toBe(401);
    expect((await aStranger(server).get('/waiting/mine')).status).toBe(401);
  });

  test('has one place for somebody who joins twice at once', async () => {
    const eve = await aPerson(server);
    const answers = await Promise.all([join(eve), join(eve), join(eve)]);
    expect(answers.map(({ status }) => status).sort()).toEqual([201, 409, 409]);
  });

  test('is not for what is free, over, or not sold', async () => {
    const person = await aPerson(server);
    await cancel();
    const free = await join(person);
    expect(free.status).toBe(409);
    expect(free.body).toMatchObject({ title: 'Free just now: W1' });
    expect((await join(person, entry({ pegIds: [other.id] }))).status).toBe(201);
    for (const more of [{ ticketTypeId: randomUUID() }, { start: '03:00' }, { pegIds: [randomUUID()] }])
      expect((await join(await aPerson(server), entry(more))).status).toBe(400);
    expect((await join(await aPerson(server), { ...entry(), day: '2027-07-01' })).status).toBe(400);
  });
});

describe('what comes free', () => {
  test('is held for the first in line, told by letter, and theirs once they finish', async () => {
    const [ann, bob] = [await waiter('Ann Reed'), await waiter('Bob Hale')];
    await cancel();
    const mail = await server.mailTo(ann.email);
    expect(mail.subject).toContain(`Peg W1 on ${lake.details.name} is free for you until 10:30`);
    const offered = await mine(ann);
    expect(offered).toMatchObject({ status: 'offered', claimUntil: '2027-07-10T09:30:00.000Z' });
    expect(await mine(bob)).toMatchObject({ status: 'waiting', place: 2 });
    const booking = await ann.get(`/bookings/${offered.bookingId ?? ''}`);
    expect(booking.body).toMatchObject({
      status: 'hold',
      pegs: [{ pegId: peg.id }],
      from: '2027-07-17T11:00:00.000Z',
    });
    await server.server.source.query(`UPDATE booking SET status = 'confirmed' WHERE id = $1`, [
      offered.bookingId,
    ]);
    expect(await mine(ann)).toMatchObject({ status: 'claimed', place: null, claimUntil: null });
    expect(await mine(bob)).toMatchObject({ status: 'waiting', place: 1 });
  });

  test('goes on to the next when the time is over or it is let go by, and each keeps their place', async () => {
    const [ann, bob, col] = [await waiter('Ann'), await waiter('Bob'), await waiter('Col')];
    await cancel();
    await server.settle();
    const first = await mine(ann);
    server.pass(31 * 60);
    expect(await expire(first.bookingId ?? '')).toBe(true);
    await server.settle();
    expect(await mine(ann)).toMatchObject({ status: 'waiting', place: 1, bookingId: null });
    expect(await mine(bob)).toMatchObject({ status: 'offered', place: 2 });
    expect((await bob.post(`/waiting/${bob.entryId}/pass`)).status).toBe(204);
    expect((await bob.post(`/waiting/${bob.entryId}/pass`)).status).toBe(204);
    await server.settle();
    expect(await mine(bob)).toMatchObject({ status: 'waiting', place: 2 });
    expect(await mine(col)).toMatchObject({ status: 'offered', place: 3 });
    expect((await col.delete(`/waiting/${col.entryId}`)).status).toBe(204);
    await server.settle();
    for (const who of [ann, bob]) expect((await mine(who)).status).toBe('waiting'); // nobody is asked twice
    const free = await aStranger(server).get(
      `/fisheries/${here.id}/free?day=2027-07-17&nights=1&lakeId=${lake.id}`,
    );
    expect(free.body).toMatchObject({ pegs: [{ state: 'free' }, { state: 'taken' }] });
    taken = await aTicket(server, { pegId: peg.id, holder: here.people.member, from: FROM, until: UNTIL });
    await cancel(); // another place than before, though the same peg
    await server.settle();
    expect(await mine(ann)).toMatchObject({ status: 'offered', place: 1 });
  });

  test('is offered to those only who wish for it and may have it', async () => {
    const ann = await waiter('Ann', { pegIds: [other.id] });
    const bob = await waiter('Bob', { pegIds: [peg.id, other.id] });
    await cancel();
    await server.settle();
    expect((await mine(ann)).status).toBe('waiting');
    expect((await mine(bob)).status).toBe('offered');
  });

  test('in the quiet hours is kept until morning, and the letter waits too', async () => {
    const ann = await waiter('Ann');
    server.setNow('2027-07-10T22:30:00Z'); // 23:30 at the lake
    await cancel();
    await server.settle();
    expect((await mine(ann)).claimUntil).toBe('2027-07-11T06:30:00.000Z'); // 07:00 at the lake, and half an hour
  });

  test('too late to be claimed before it starts is offered to nobody', async () => {
    const ann = await waiter('Ann');
    server.setNow('2027-07-17T10:45:00Z');
    await cancel();
    await server.settle();
    expect((await mine(ann)).status).toBe('waiting');
  });

  test('goes to one each when two pegs come free at once', async () => {
    const [ann, bob] = [await waiter('Ann'), await waiter('Bob')];
    await server.server.source.query('DELETE FROM peg_time WHERE lake_id = $1', [lake.id]);
    await server.settle();
    const pegs = await Promise.all(
      [ann, bob].map(async (who) => {
        const view = await mine(who);
        const booking = await who.get(`/bookings/${view.bookingId ?? ''}`);
        return String((booking.body as { pegs?: { number?: string }[] }).pegs?.[0]?.number);
      }),
    );
    expect(pegs.sort()).toEqual(['W1', 'W2']);
  });
});

test('a running server offers what comes free by itself', async () => {
  const { watchFreed } = await import('@mereward/api/bookings/watch-freed');
  const ann = await waiter('Ann');
  const faults: unknown[] = [];
  const watch = watchFreed(server.server, (error) => faults.push(error));
  await cancel();
  await expect.poll(async () => (await mine(ann)).status, { timeout: 15_000 }).toBe('offered');
  await watch.stop();
  expect(faults).toEqual([]);
});
