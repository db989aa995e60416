import { CalendarList, CalendarMade } from '@mereward/shared/bookings/calendar-contract';
import { Booking } from '@mereward/db/entities/bookings/booking';
import { FisheryRole } from '@mereward/db/entities/fisheries/fishery-role';
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { aClosure } from '../support/peg-times';
import { aPerson, aStranger, type Asker, type Person } from '../support/people';
import { aServer, type TestServer } from '../support/server';
import { aTicket } from '../support/tickets';
import { aFishery, aLake, aPeg, type TestFishery, type TestLake, type TestPeg } from '../support/waters';

let server: TestServer;
let here: TestFishery;
let lake: TestLake;
let peg: TestPeg;

beforeAll(async () => {
  server = await aServer();
  here = await aFishery(server, { name: 'Ostlemere Waters' });
  lake = await aLake(server, here, { name: 'Far Ostle' });
  peg = await aPeg(server, lake, { number: 'FO7' });
});
afterAll(() => server.close());

async function make(who: Asker, lakeId: string | null = null): Promise<CalendarMade> {
  const answer = await who.post('/calendars').send({ id: randomUUID(), lakeId });
  expect(answer.status).toBe(201);
  return CalendarMade.parse(answer.body);
}
const pathOf = ({ url }: CalendarMade) => new URL(url).pathname.replace(/^\/api/, '');
const open = (made: CalendarMade) => aStranger(server).get(pathOf(made));

async function read(made: CalendarMade): Promise<string[]> {
  const answer = await open(made);
  expect(answer.status).toBe(200);
  expect(answer.headers['content-type']).toBe('text/calendar; charset=utf-8');
  expect(answer.headers['cache-control']).toMatch(/^private/);
  return answer.text.replace(/\r\n /g, '').split('\r\n');
}
const sofia = () => aPerson(server, { name: 'Sofia Marsh' });
const ticketFor = (holder: Person, day: number) =>
  aTicket(server, {
    ...{ pegId: peg.id, holder, from: `2027-07-${day}T11:00:00Z` },
    until: `2027-07-${day + 1}T11:00:00Z`,
  });

describe('one’s own calendar', () => {
  test('shows one’s bookings by the fishery’s clock to whoever has its address, and nobody else’s', async () => {
    const [me, other] = [await sofia(), await sofia()];
    const id = await ticketFor(me, 17);
    const theirs = await ticketFor(other, 19);
    const lines = await read(await make(me));
    expect(lines).toContain('SUMMARY:Fishing: peg FO7\\, Far Ostle');
    expect(lines).toContain('DTSTART;TZID=Europe/London:20270717T120000');
    expect(lines).toContain('DTEND;TZID=Europe/London:20270718T120000');
    expect(lines.filter((line) => line.startsWith('UID:'))).toEqual([`UID:booking-${id}@127.0.0.1`]);
    expect(lines.join()).not.toContain(theirs);
  });

  test('keeps what was cancelled after it was confirmed, so that calendars take it away, and no mere hold', async () => {
    const me = await sofia();
    const [cancelled, held] = [await ticketFor(me, 21), await ticketFor(me, 23)];
    const { manager } = server.server.source;
    await manager.query(
      `INSERT INTO booking_event (booking_id, at, kind, told) VALUES ($1, $2, 'confirmed', '{}')`,
      [cancelled, server.server.clock()],
    );
    await manager.update(Booking, { id: cancelled }, { status: 'cancelled_by_angler', version: 2 });
    await manager.update(Booking, { id: held }, { status: 'hold', holdUntil: server.server.clock() });
    const lines = await read(await make(me));
    expect(lines.filter((line) => line.startsWith('UID:'))).toEqual([`UID:booking-${cancelled}@127.0.0.1`]);
    expect(lines).toEqual(expect.arrayContaining(['STATUS:CANCELLED', 'SEQUENCE:2']));
  });

  test('tells its address once, and revoked it finds nothing', async () => {
    const me = await sofia();
    const made = await make(me);
    const again = await me.post('/calendars').send({ id: made.id, lakeId: null });
    expect(again.status).toBe(409);
    const list = await me.get('/calendars');
    expect(CalendarList.parse(list.body).calendars).toEqual([
      { id: made.id, lakeId: null, lakeName: null, madeAt: made.madeAt },
    ]);
    const token = /calendars\/(.+)\.ics$/.exec(made.url)?.[1] ?? 'none';
    expect(JSON.stringify(list.body)).not.toContain(token);
    const kept: unknown = await server.server.source.query('SELECT * FROM calendar_feed');
    expect(JSON.stringify(kept)).not.toContain(token); // only its digest
    expect((await (await sofia()).delete(`/calendars/${made.id}`)).status).toBe(404);
    for (let times = 0; times < 2; times += 1)
      expect((await me.delete(`/calendars/${made.id}`)).status).toBe(204);
    expect((await open(made)).status).toBe(404);
    expect(CalendarList.parse((await me.get('/calendars')).body).calendars).toEqual([]);
  });

  test('is made by whoever is signed in, and a guessed address finds nothing', async () => {
    const stranger = aStranger(server);
    expect((await stranger.post('/calendars').send({ id: randomUUID(), lakeId: null })).status).toBe(401);
    expect((await stranger.get('/calendars')).status).toBe(401);
    expect((await stranger.get(`/calendars/${'A'.repeat(43)}.ics`)).status).toBe(404);
    expect((await stranger.get('/calendars/short.ics')).status).toBe(404);
    expect((await (await sofia()).post('/calendars').send({ id: 'one' })).status).toBe(400);
  });
});

describe('a lake’s calendar', () => {
  test('shows pegs, blocks and closures to its staff without a name, and ends with the role', async () => {
    await ticketFor(await sofia(), 25);
    await here.people.office.post(`/fisheries/${here.id}/blocks`).send({
      ...{ id: randomUUID(), title: 'Gwen’s match', pegIds: [peg.id] },
      ...{ from: '2027-07-27T05:00:00Z', until: '2027-07-27T15:00:00Z' },
    });
    await aClosure(server, here, { lakeIds: [lake.id], pegIds: [peg.id], from: '2027-08-01T05:00:00Z' });
    const tom = await aPerson(server, { roles: [{ fisheryId: here.id, role: 'bailiff' }] });
    const made = await make(tom, lake.id);
    const text = (await read(made)).join('\n');
    for (const words of ['Peg FO7: taken', 'Peg FO7: kept back', 'Closed: Closed for works'])
      expect(text).toContain(`SUMMARY:${words}`);
    expect(text).not.toMatch(/Sofia|Gwen|, code/);
    await server.server.source.manager.delete(FisheryRole, { accountId: tom.id });
    expect((await open(made)).status).toBe(404);
  });

  test('is made by staff of its fishery only', async () => {
    const ask = (who: Asker) => who.post('/calendars').send({ id: randomUUID(), lakeId: lake.id });
    expect((await ask(here.people.angler)).status).toBe(403);
    expect((await ask(await sofia())).status).toBe(404);
    expect(
      (await here.people.bailiff.post('/calendars').send({ id: randomUUID(), lakeId: randomUUID() })).status,
    ).toBe(404);
  });
});
