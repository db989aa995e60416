import { confirmBooking } from '@mereward/api/bookings/confirm';
import { expireHold, extendHold } from '@mereward/api/bookings/let-go';
import type { Ctx } from '@mereward/api/ctx';
import { ctxOf } from '@mereward/api/http/ctx-of';
import { PegTime } from '@mereward/db/entities/bookings/peg-time';
import { BookingView, type HoldPegs } from '@mereward/shared/bookings/contract';
import { USUAL_TERMS } from '@mereward/shared/bookings/letting-terms';
import { ProblemBody } from '@mereward/shared/problems/problem';
import { TICKET_TEMPLATES } from '@mereward/shared/tickets/ticket-templates';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { aLakeGround } from '../support/grounds';
import { aPerson, aStranger, type Person } from '../support/people';
import type { TestServer } from '../support/server';
import { aHold, aTicketType, filledIn } from '../support/tickets';
import { aLake, aPeg, type TestFishery, type TestLake, type TestPeg } from '../support/waters';

let server: TestServer;
let here: TestFishery;
let elsewhere: TestFishery;
let lake: TestLake;
let sofia: Person;
let colin: Person;
let stay: { id: string };

const SATURDAY = '2027-07-17';
const EVENING = '2027-07-10T18:00:00Z'; // 19:00 by the lake's clock, a week before

beforeAll(async () => {
  ({ server, here, elsewhere, lake } = await aLakeGround());
  server.setNow(EVENING);
  sofia = await aPerson(server, { name: 'Sofia Marsh' });
  colin = await aPerson(server, { name: 'Colin Frayne' });
  stay = await aTicketType(server, lake, TICKET_TEMPLATES.stay24);
});
afterAll(() => server.close());

let pegs = 0;
const freshPeg = (wishes: Parameters<typeof aPeg>[2] = {}, on = lake): Promise<TestPeg> =>
  aPeg(server, on, { number: `FO${(pegs += 1)}`, ...wishes });
const noon = (pegIds: (string | null)[], day = SATURDAY, start = '12:00'): HoldPegs =>
  aHold({ ticketTypeId: stay.id, lakeId: lake.id, day, start }, pegIds);
const hold = (who: ReturnType<typeof aStranger>, body: HoldPegs) => who.post('/bookings').send(body);
const view = (body: unknown) => BookingView.parse(body);
const problem = (body: unknown) => ProblemBody.parse(body);

/** A deed as the server itself does it: the provider's message, a job. */
const byServer = <T>(deed: (ctx: Ctx) => Promise<T>): Promise<T> =>
  server.server.source.transaction((tx) => deed(ctxOf(server.server, tx)));
const rowsOf = (bookingId: string) => server.server.source.manager.findBy(PegTime, { bookingId });

describe('a hold', () => {
  test('keeps the peg for ten minutes at a price and on terms, and is one however often it is sent', async () => {
    const peg = await freshPeg();
    const body = noon([peg.id]);
    const answers = await Promise.all([hold(sofia, body), hold(sofia, body), hold(sofia, body)]);
    expect(answers.map(({ status }) => status)).toEqual([201, 201, 201]);
    const held = view(answers[0]?.body);
    expect(held).toMatchObject({
      status: 'hold',
      holdUntil: '2027-07-10T18:10:00.000Z',
      from: '2027-07-17T11:00:00.000Z',
      until: '2027-07-18T11:00:00.000Z',
      grossPence: 2800,
      pegs: [{ pegId: peg.id }],
      holder: 'Sofia Marsh',
      may: { fillIn: true, pay: false, confirm: false, cancel: false },
    });
    expect(held.details.lines).toMatchObject([{ grossPence: 2800, vatPence: 467, netPence: 2333 }]);
    expect(await rowsOf(held.id)).toHaveLength(1);
    const other = { ...body, day: '2027-07-18' };
    expect((await hold(sofia, other)).status).toBe(409);
    expect((await hold(colin, body)).status).toBe(409);
    expect((await hold(aStranger(server), noon([peg.id]))).status).toBe(401);
    expect((await colin.get(`/bookings/${held.id}`)).status).toBe(404);
  });

  test('of fifty at once is one, and the others are told that it was just taken and what is near', async () => {
    const water = await aLake(server, here, { name: 'Far Ostle' });
    const type = await aTicketType(server, water, TICKET_TEMPLATES.stay24);
    const [fo7, fo6, far] = [
      await freshPeg({ thetaDeg: 200 }, water),
      await freshPeg({ thetaDeg: 206 }, water),
      await freshPeg({ thetaDeg: 20 }, water),
    ];
    const closed = await freshPeg({ thetaDeg: 203, status: 'closed', statusReason: 'flooded' }, water);
    const anglers = await Promise.all(Array.from({ length: 50 }, () => aPerson(server)));
    const ask = { ticketTypeId: type.id, lakeId: water.id, day: SATURDAY, start: '12:00' };
    const answers = await Promise.all(anglers.map((who) => hold(who, aHold(ask, [fo7.id]))));
    expect(answers.filter(({ status }) => status === 201)).toHaveLength(1);
    const refused = answers.filter(({ status }) => status === 409).map(({ body }) => problem(body));
    expect(refused).toHaveLength(49);
    for (const { title, detail, errors } of refused) {
      expect(title).toBe(`Peg ${fo7.details.number} was just taken`);
      expect(detail).toContain(`${fo6.details.number} and ${far.details.number}`);
      expect(errors?.map(({ pointer }) => pointer)).toEqual([
        '/tickets/0/pegId',
        `/offers/${fo6.id}`,
        `/offers/${far.id}`,
      ]);
    }
    expect(JSON.stringify(refused)).not.toContain(closed.id);
  });

  test('of two hundred over twenty pegs, two and three at a time, takes no peg twice and none in part', async () => {
    const water = await aLake(server, here, { name: 'Wide Water' });
    const type = await aTicketType(server, water, TICKET_TEMPLATES.stay24);
    const wide: TestPeg[] = [];
    for (let i = 0; i < 20; i += 1) wide.push(await freshPeg({}, water));
    const anglers = await Promise.all(Array.from({ length: 20 }, () => aPerson(server)));
    const asked = Array.from({ length: 200 }, (_, i) => {
      const at = (step: number) => wide[(i * 7 + step * (i % 2 === 0 ? 1 : 19)) % 20]?.id ?? null;
      const pegIds = Array.from({ length: 1 + (i % 3) }, (_each, step) => at(step));
      const ask = { ticketTypeId: type.id, lakeId: water.id, day: `2027-07-${17 + (i % 2)}`, start: '12:00' };
      return { who: anglers[i % 20] ?? sofia, body: aHold(ask, pegIds, { kind: 'guest' }) };
    });
    const answers = await Promise.all(asked.map(({ who, body }) => hold(who, body)));
    expect([...new Set(answers.map(({ status }) => status))].sort()).toEqual([201, 409]);
    const won = asked.filter((_, i) => answers[i]?.status === 201);
    for (const { body } of won) expect(await rowsOf(body.id)).toHaveLength(body.tickets.length);
    const rows = await server.server.source.manager.findBy(PegTime, { lakeId: water.id });
    expect(rows).toHaveLength(won.reduce((sum, { body }) => sum + body.tickets.length, 0));
    const overlaps: unknown = await server.server.source.query(
      `SELECT 1 FROM peg_time a JOIN peg_time b ON a.peg_id = b.peg_id AND a.id < b.id AND a.during && b.during
        WHERE a.lake_id = $1`,
      [water.id],
    );
    expect(overlaps).toEqual([]);
  });

  test('keeps the peg an hour after its end, and no shorter', async () => {
    const peg = await freshPeg();
    const half = await aTicketType(server, lake, {
      ...TICKET_TEMPLATES.stay24,
      duration: {
        kind: 'elapsed',
        hours: 12,
        startsFrom: '08:00',
        startsUntil: '20:00',
        startStepMinutes: 30,
        clockChange: 'same_clock_time',
      },
    });
    expect((await hold(sofia, noon([peg.id]))).status).toBe(201);
    const sunday = (start: string) =>
      hold(colin, aHold({ ticketTypeId: half.id, lakeId: lake.id, day: '2027-07-18', start }, [peg.id]));
    expect((await sunday('12:30')).status).toBe(409);
    expect((await sunday('13:00')).status).toBe(201);
  });

  test('is refused to more people and rods than the peg has room for', async () => {
    const single = await freshPeg({ people: 1, rods: 3 });
    const double = await freshPeg({ people: 2, rods: 6 });
    const two = (pegId: string) => noon([pegId, pegId]);
    const refused = problem((await hold(sofia, two(single.id))).body);
    expect(refused).toMatchObject({
      kind: 'conflict',
      title: `Peg ${single.details.number} has room for one person.`,
    });
    const answer = view((await hold(sofia, two(double.id))).body);
    expect(answer).toMatchObject({ people: 2, rods: 4, grossPence: 5600 });
    expect(await rowsOf(answer.id)).toMatchObject([{ people: 2, rods: 4 }]);
  });

  test('that has run out is let go of by whoever wants the peg next, by a job, or by its holder', async () => {
    const [a, b, c] = [await freshPeg(), await freshPeg(), await freshPeg()];
    const bodies = [noon([a.id]), noon([b.id]), noon([c.id])];
    for (const body of bodies) expect((await hold(sofia, body)).status).toBe(201);
    const [first, second, third] = bodies.map(({ id }) => id);
    expect((await sofia.delete(`/bookings/${third}/hold`)).status).toBe(204);
    expect((await sofia.delete(`/bookings/${third}/hold`)).status).toBe(204);
    expect((await hold(colin, noon([c.id]))).status).toBe(201);
    expect((await hold(colin, noon([a.id]))).status).toBe(409);
    server.pass(599);
    expect((await hold(colin, noon([a.id]))).status).toBe(409);
    server.pass(1);
    expect(view((await sofia.get(`/bookings/${first}`)).body)).toMatchObject({
      status: 'expired',
      may: { pay: false },
    });
    const late = await sofia.put(`/bookings/${first}/details`).send(filledIn(1));
    expect(problem(late.body).title).toMatch(/has run out/);
    expect((await hold(colin, noon([a.id]))).status).toBe(201);
    await server.settle();
    expect(view((await sofia.get(`/bookings/${second}`)).body).status).toBe('expired');
    expect(await rowsOf(second ?? '')).toEqual([]);
    server.setNow(EVENING);
  });

  test('runs on once to fifteen minutes while a card is being checked, and is then a ticket', async () => {
    const peg = await freshPeg();
    const body = noon([peg.id]);
    await hold(sofia, body);
    server.pass(590);
    for (let told = 0; told < 3; told += 1)
      expect(await byServer((ctx) => extendHold(ctx, body.id))).toEqual(new Date('2027-07-10T18:15:00Z'));
    server.pass(160); // 19:12:30
    expect(await byServer((ctx) => expireHold(ctx, body.id))).toBe(false);
    expect(await byServer((ctx) => confirmBooking(ctx, body.id))).toBe('confirmed');
    expect(await byServer((ctx) => confirmBooking(ctx, body.id))).toBe('was');
    expect(await rowsOf(body.id)).toMatchObject([{ state: 'taken' }]);
    expect(view((await sofia.get(`/bookings/${body.id}`)).body)).toMatchObject({
      status: 'confirmed',
      holdUntil: null,
    });
    server.setNow(EVENING);
  });

  test('is either confirmed or expired when both are asked at once', async () => {
    for (let round = 0; round < 8; round += 1) {
      const body = noon([(await freshPeg()).id]);
      await hold(sofia, body);
      server.pass(600);
      const [confirmed, expired] = await Promise.all([
        byServer((ctx) => confirmBooking(ctx, body.id)),
        byServer((ctx) => expireHold(ctx, body.id)),
      ]);
      expect(expired).toBe(confirmed === 'too_late');
      const rows = await rowsOf(body.id);
      expect(rows.map(({ state }) => state)).toEqual(expired ? [] : ['taken']);
      server.setNow(EVENING);
    }
  });

  test('extended and expired at once is one of the two', async () => {
    const body = noon([(await freshPeg()).id]);
    await hold(sofia, body);
    server.pass(600);
    const [until, expired] = await Promise.all([
      byServer((ctx) => extendHold(ctx, body.id)),
      byServer((ctx) => expireHold(ctx, body.id)),
    ]);
    expect([until, expired]).toEqual([null, true]);
    server.setNow(EVENING);
  });
});

describe('what can’t be held', () => {
  test('is refused with every reason, each pointing at its ticket', async () => {
    const peg = await freshPeg();
    const other = await aTicketType(server, lake, { ...TICKET_TEMPLATES.day });
    const send = async (body: HoldPegs) => problem((await hold(sofia, body)).body);
    const body = noon([peg.id]);
    expect(await send(noon([null]))).toMatchObject({
      kind: 'invalid',
      errors: [{ pointer: '/tickets/0/pegId' }],
    });
    expect((await send(noon([peg.id], SATURDAY, '03:00'))).title).toMatch(/can’t start at 03:00/);
    expect((await send(noon([peg.id], '2027-07-01'))).title).toMatch(/is over/);
    const mixed = {
      ...body,
      tickets: [...body.tickets, { ...(body.tickets[0] ?? never()), ticketTypeId: other.id }],
    };
    expect(await send(mixed)).toMatchObject({ errors: [{ pointer: '/tickets/1/ticketTypeId' }] });
    const theirs = await aPeg(server, await aLake(server, elsewhere));
    expect(await send(noon([theirs.id]))).toMatchObject({
      errors: [{ detail: 'There is no such peg on this lake.' }],
    });
    const many = aHold(
      { ticketTypeId: stay.id, lakeId: lake.id, day: '2028-07-17', start: '12:00' },
      [peg.id],
      {
        rods: 5,
        people: 2,
      },
    );
    const all = await send(many);
    expect(all.errors?.map(({ pointer }) => pointer)).toEqual([
      '/tickets/0/ticketTypeId',
      '/tickets/0/rods',
      '/tickets/0/people',
    ]);
  });

  test('is a third night in a row, a peg under a line, a night where there are none', async () => {
    const nights = await aPerson(server);
    const days = [SATURDAY, '2027-07-18'];
    for (const day of days) {
      const [peg] = [await freshPeg()];
      expect((await hold(nights, noon([peg.id], day))).status).toBe(201);
    }
    const third = problem((await hold(nights, noon([(await freshPeg()).id], '2027-07-19'))).body);
    expect(third.title).toMatch(/3 nights in a row; at most 2 are allowed/);
    const overheadLine = {
      kind: 'present' as const,
      distanceM: 24,
      heightM: null,
      operator: '',
      signFitted: false,
      fishing: 'no_fishing' as const,
    };
    const under = await freshPeg({ overheadLine });
    expect(problem((await hold(sofia, noon([under.id]))).body)).toMatchObject({
      kind: 'conflict',
      title: 'No fishing from this peg: an overhead line is too near.',
    });
    const dayOnly = await aLake(server, here, { name: 'Day Water', nights: false });
    const type = await aTicketType(server, dayOnly, TICKET_TEMPLATES.stay24);
    const dayPeg = await freshPeg({}, dayOnly);
    const ask = { ticketTypeId: type.id, lakeId: dayOnly.id, day: SATURDAY, start: '12:00' };
    expect(problem((await hold(sofia, aHold(ask, [dayPeg.id]))).body).title).toMatch(/no night fishing/);
  });

  test('is a full lake, said so', async () => {
    const small = await aLake(server, here, { name: 'Small Water', maxPeople: 1 });
    const rover = await aTicketType(server, small, {
      ...TICKET_TEMPLATES.day,
      pegChoice: 'book_the_lake_choose_on_arrival',
    });
    const ask = { ticketTypeId: rover.id, lakeId: small.id, day: SATURDAY };
    expect((await hold(sofia, aHold(ask, [null]))).status).toBe(201);
    expect(problem((await hold(colin, aHold(ask, [null]))).body)).toMatchObject({
      kind: 'conflict',
      title: 'Small Water is full at that time',
    });
  });
});

const never = (): never => {
  throw new Error('a hold has a ticket');
};

describe('filling in and confirming', () => {
  test('names what is missing, keeps what is given, and a free ticket is then confirmed once', async () => {
    const free = await aTicketType(server, lake, {
      ...TICKET_TEMPLATES.stay24,
      prices: [{ ...(TICKET_TEMPLATES.stay24.prices[0] ?? never()), pricePence: 0, extraRodPence: 0 }],
    });
    const ask = { ticketTypeId: free.id, lakeId: lake.id, day: SATURDAY, start: '12:00' };
    const body = aHold(ask, [(await freshPeg()).id]);
    await hold(sofia, body);
    const put = (input: object) => sofia.put(`/bookings/${body.id}/details`).send(input);
    const empty = { vehicle: '', emergencyContact: '', tickets: [{ name: 'Sofia Marsh', bornOn: null }] };
    expect(problem((await put(filledIn(1, empty))).body).errors?.map(({ pointer }) => pointer)).toEqual([
      '/tickets/0/bornOn',
      '/vehicle',
      '/emergencyContact',
    ]);
    expect(problem((await put(filledIn(1, { licence: null }))).body).errors?.[0]?.pointer).toBe('/licence');
    const young = filledIn(1, { tickets: [{ name: 'Ella Frayne', bornOn: '2012-11-02' }] });
    expect(problem((await put(young)).body).title).toMatch(/is 14. This ticket is for 16 and over/);
    expect((await sofia.post(`/bookings/${body.id}/confirm`)).status).toBe(409);
    expect((await put(filledIn(1))).status).toBe(200);
    expect((await put(filledIn(1))).status).toBe(200); // a lost answer
    expect((await put(filledIn(1, { note: 'late' }))).status).toBe(409);
    const none = { held: false, lastSix: '', expiresOn: null };
    const warned = view((await put(filledIn(2, { licence: none }))).body);
    expect(warned.notYet).toEqual(['Have a rod licence before you fish. It can be bought the same day.']);
    expect((await colin.post(`/bookings/${body.id}/confirm`)).status).toBe(404);
    const confirms = await Promise.all([1, 2].map(() => sofia.post(`/bookings/${body.id}/confirm`)));
    expect(confirms.map((each) => [each.status, view(each.body).status])).toEqual([
      [200, 'confirmed'],
      [200, 'confirmed'],
    ]);
  });

  test('the gate code is told inside the hours of a confirmed ticket and at no other time', async () => {
    const free = await aTicketType(server, lake, {
      ...TICKET_TEMPLATES.stay24,
      prices: [{ ...(TICKET_TEMPLATES.stay24.prices[0] ?? never()), pricePence: 0, extraRodPence: 0 }],
    });
    const ask = { ticketTypeId: free.id, lakeId: lake.id, day: SATURDAY, start: '12:00' };
    const body = aHold(ask, [(await freshPeg()).id]);
    await hold(sofia, body);
    await sofia.put(`/bookings/${body.id}/details`).send(filledIn(1));
    await sofia.post(`/bookings/${body.id}/confirm`);
    const codeAt = async (now: string): Promise<string> => {
      server.setNow(now);
      return view((await sofia.get(`/bookings/${body.id}`)).body).gateCode;
    };
    expect(await codeAt('2027-07-17T10:59:59Z')).toBe('');
    expect(await codeAt('2027-07-17T11:00:00Z')).toBe('4711');
    expect(await codeAt('2027-07-18T11:00:00Z')).toBe('');
    server.setNow(EVENING);
  });

  test('what costs money is not confirmed unless it may be paid at the lodge', async () => {
    const body = noon([(await freshPeg()).id]);
    await hold(sofia, body);
    await sofia.put(`/bookings/${body.id}/details`).send(filledIn(1));
    expect(problem((await sofia.post(`/bookings/${body.id}/confirm`)).body).title).toMatch(
      /to be paid first/,
    );
    const details = { ...USUAL_TERMS, payAtLodge: true };
    const at = `/fisheries/${here.id}/letting-terms`;
    await here.people.owner.put(at).send({ details, version: null });
    const answer = await sofia.post(`/bookings/${body.id}/confirm`);
    expect(view(answer.body)).toMatchObject({ status: 'confirmed', paidPence: 0 });
    await here.people.owner.put(at).send({ details: USUAL_TERMS, version: 1 });
  });
});
