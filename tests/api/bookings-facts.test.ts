import { BoardView, FreePegs } from '@mereward/shared/bookings/availability-contract';
import { BookingView } from '@mereward/shared/bookings/contract';
import { ProblemBody } from '@mereward/shared/problems/problem';
import { TICKET_TEMPLATES } from '@mereward/shared/tickets/ticket-templates';
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { aLakeGround } from '../support/grounds';
import { aPerson, type Person } from '../support/people';
import { aRule, publishRules } from '../support/rules';
import type { TestServer } from '../support/server';
import { aHold, aTicketType, bookedFor } from '../support/tickets';
import { aLake, aPeg, type TestFishery, type TestLake, type TestPeg } from '../support/waters';

let server: TestServer;
let here: TestFishery;
let lake: TestLake;
let colin: Person;

const SATURDAY = '2027-07-17';

beforeAll(async () => {
  ({ server, here, lake } = await aLakeGround());
  server.setNow('2027-07-10T09:00:00Z');
  colin = await aPerson(server, { name: 'Colin Frayne', roles: [{ fisheryId: here.id, role: 'member' }] });
});
afterAll(() => server.close());

let pegs = 0;
const freshPeg = (on = lake): Promise<TestPeg> => aPeg(server, on, { number: `F${(pegs += 1)}` });
const view = (body: unknown) => BookingView.parse(body);
const problem = (body: unknown) => ProblemBody.parse(body);

test('a guest comes with a member who is there at the time, and with nobody else', async () => {
  const guest = await aTicketType(server, lake, TICKET_TEMPLATES.guest);
  const member = await aTicketType(server, lake, { ...TICKET_TEMPLATES.day, audience: 'member' });
  const sofia = await aPerson(server, { name: 'Sofia Marsh' });
  const ask = async (type: { id: string }, day = SATURDAY) =>
    aHold({ ticketTypeId: type.id, lakeId: lake.id, day }, [(await freshPeg()).id], {
      kind: type.id === guest.id ? 'guest' : 'holder',
    });
  const title = async (who: Person, body: object) =>
    problem((await who.post('/bookings').send(body)).body).title;
  expect(await title(sofia, await ask(member))).toBe('This ticket is for members.');
  expect(await title(sofia, await ask(guest))).toBe('A guest ticket needs the member who brings you.');
  expect(await title(colin, await ask(guest))).toMatch(/has no ticket for that time/);
  expect((await colin.post('/bookings').send(await ask(member))).status).toBe(201);
  expect((await colin.post('/bookings').send(await ask(guest))).status).toBe(201);
  expect(await title(colin, await ask(guest, '2027-07-18'))).toMatch(/has no ticket for that time/);
});

test('a closed lake is not let for hours it is closed, and is for others', async () => {
  const shut = await aLake(server, here, { name: 'Shut Water' });
  const day = await aTicketType(server, shut, TICKET_TEMPLATES.day);
  await server.server.source.query(
    `INSERT INTO closure (id, fishery_id, lake_ids, reason, effect, during, details, decided_by, decided_at, version)
     VALUES ($1, $2, $3, 'flood', 'block', tstzrange($4, $5), $6, $7, $8, 1)`,
    [
      randomUUID(),
      here.id,
      [shut.id],
      '2027-07-17T00:00:00Z',
      '2027-07-18T00:00:00Z',
      {
        scope: { kind: 'lakes', lakeIds: [shut.id] },
        reason: 'flood',
        effect: 'block',
        from: '2027-07-17T00:00:00Z',
        until: '2027-07-18T00:00:00Z',
        publicWords: 'The path is under water.',
        liftConditions: [],
      },
      here.people.manager.id,
      server.server.clock(),
    ],
  );
  const ask = async (onDay: string) =>
    colin
      .post('/bookings')
      .send(aHold({ ticketTypeId: day.id, lakeId: shut.id, day: onDay }, [(await freshPeg(shut)).id]));
  expect(problem((await ask(SATURDAY)).body)).toMatchObject({
    kind: 'conflict',
    title: 'Closed then (flood): The path is under water.',
    errors: [{ pointer: '/tickets/0/pegId' }],
  });
  expect((await ask('2027-07-19')).status).toBe(201);
});

test('at most so many bookings of a kind are held at once', async () => {
  const few = await aTicketType(server, lake, { ...TICKET_TEMPLATES.day, mostBookings: 1 });
  const ned = await aPerson(server, { name: 'Ned Bray' });
  const ask = async (day: string) =>
    ned
      .post('/bookings')
      .send(aHold({ ticketTypeId: few.id, lakeId: lake.id, day }, [(await freshPeg()).id]));
  const first = view((await ask('2027-07-20')).body);
  expect(problem((await ask('2027-07-21')).body).title).toMatch(/at most 1 can be held at once/);
  await ned.delete(`/bookings/${first.id}/hold`);
  expect((await ask('2027-07-21')).status).toBe(201);
});

test('a season ticket takes no peg and may be booked by any number', async () => {
  const season = await aTicketType(server, lake, {
    ...TICKET_TEMPLATES.day,
    duration: { kind: 'season', firstDay: '2027-06-16', lastDay: '2028-03-14' },
  });
  const body = aHold({ ticketTypeId: season.id, lakeId: lake.id, day: SATURDAY }, [null]);
  const held = view((await colin.post('/bookings').send(body)).body);
  expect(held).toMatchObject({ pegs: [], until: '2028-03-15T00:00:00.000Z' });
  const rows: unknown = await server.server.source.query('SELECT 1 FROM peg_time WHERE booking_id = $1', [
    held.id,
  ]);
  expect(rows).toEqual([]);
});

test('a ticket is not good, and nobody is checked in on it, until the rules in force are read', async () => {
  const { sheet } = await publishRules(
    here,
    [aRule(12, 'FO3 closed: overhead line 24 m away.', { category: 'safety' })],
    'safety',
  );
  const version = { major: sheet?.major, minor: sheet?.minor };
  const day = await aTicketType(server, lake, TICKET_TEMPLATES.day);
  const holder = { name: colin.name, email: colin.email };
  const hold = aHold({ ticketTypeId: day.id, lakeId: lake.id, day: SATURDAY }, [(await freshPeg()).id]);
  const { id } = await bookedFor(here, hold, holder);
  server.setNow('2027-07-17T09:00:00Z');
  const seen = async () => view((await colin.get(`/bookings/${id}`)).body);
  expect(await seen()).toMatchObject({ rulesToRead: true, status: 'confirmed' });
  expect((await seen()).notYet[0]).toBe('Not valid until the rules are read');
  for (const who of [colin, here.people.bailiff])
    expect((await who.post(`/bookings/${id}/check-in`)).status).toBe(409);
  const read = { id: randomUUID(), version, at: '2027-07-17T09:00:00Z', language: 'en-GB' };
  const told = await colin.post(`/fisheries/${here.id}/rules/acknowledge`).send(read);
  expect(told.status).toBeLessThan(300);
  expect(await seen()).toMatchObject({ rulesToRead: false });
  expect((await colin.post(`/bookings/${id}/check-in`)).status).toBe(200);
});

test('a peg by a line drawn on the lake is not let, whatever its own sheet says', async () => {
  const peg = await freshPeg();
  const [lon, lat] = peg.details.position;
  const wire = {
    id: randomUUID(),
    kind: 'overhead_line',
    name: 'Power line',
    at: [
      [lon - 0.01, lat + 0.0001],
      [lon + 0.01, lat + 0.0001], // some 11 m to the north
    ],
    audience: 'public',
    note: '',
  };
  await server.server.source.query(
    `UPDATE lake SET details = jsonb_set(details, '{places}', $2::jsonb) WHERE id = $1`,
    [lake.id, JSON.stringify([wire])],
  );
  const day = await aTicketType(server, lake, TICKET_TEMPLATES.day);
  const body = aHold({ ticketTypeId: day.id, lakeId: lake.id, day: '2027-07-18' }, [peg.id]);
  expect(problem((await colin.post('/bookings').send(body)).body)).toMatchObject({
    kind: 'conflict',
    title: expect.stringContaining('no assessment is on file'),
  });
  const noAssessment = expect.stringContaining('no assessment is on file');
  const free = FreePegs.parse((await colin.get(`/fisheries/${lake.fisheryId}/free?day=2027-07-18`)).body);
  expect(free.pegs.find(({ pegId }) => pegId === peg.id)).toMatchObject({
    state: 'closed',
    whyNot: noAssessment,
  });
  const board = BoardView.parse((await colin.get(`/lakes/${lake.id}/board?from=2027-07-18&days=1`)).body);
  expect(board.pegs.find(({ pegId }) => pegId === peg.id)?.shut).toEqual(noAssessment);
});
