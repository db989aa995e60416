import { PegTime } from '@mereward/db/entities/bookings/peg-time';
import { Booking } from '@mereward/db/entities/bookings/booking';
import { Refund } from '@mereward/db/entities/payments/refund';
import { BookingList, BookingView, CancellationQuote } from '@mereward/shared/bookings/contract';
import { ProblemBody } from '@mereward/shared/problems/problem';
import { TICKET_TEMPLATES } from '@mereward/shared/tickets/ticket-templates';
import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import { aLakeGround } from '../support/grounds';
import { aPerson, type Asker, type Person } from '../support/people';
import type { TestServer } from '../support/server';
import { aHold, aTicketType, bookedFor, paidInCash } from '../support/tickets';
import { aPeg, type TestFishery, type TestLake, type TestPeg } from '../support/waters';

let server: TestServer;
let here: TestFishery;
let lake: TestLake;
let stay: { id: string };
let rover: { id: string };

const SATURDAY = '2027-07-17';
const NOON = '2027-07-17T11:00:00Z'; // by the lake's clock

beforeAll(async () => {
  ({ server, here, lake } = await aLakeGround());
  server.setNow('2027-07-10T11:00:00Z');
  stay = await aTicketType(server, lake, { ...TICKET_TEMPLATES.stay24, mostNightsInARow: null });
  rover = await aTicketType(server, lake, {
    ...TICKET_TEMPLATES.day,
    pegChoice: 'book_the_lake_choose_on_arrival',
  });
});
beforeEach(() => server.setNow('2027-07-10T11:00:00Z'));
afterAll(() => server.close());

let pegs = 0;
const freshPeg = (wishes: Parameters<typeof aPeg>[2] = {}, on = lake): Promise<TestPeg> =>
  aPeg(server, on, { number: `P${(pegs += 1)}`, ...wishes });
const view = (body: unknown) => BookingView.parse(body);
const problem = (body: unknown) => ProblemBody.parse(body);
const rowsOf = (bookingId: string) => server.server.source.manager.findBy(PegTime, { bookingId });
const at = (bookingId: string, deed = '') => `/bookings/${bookingId}${deed}`;

type Wishes = { holder?: { name: string; email: string | null }; day?: string };

/** A ticket written by the office; a rover's where there is no peg. */
const written = (pegIds: (string | null)[], wishes: Wishes = {}): Promise<BookingView> => {
  const roving = pegIds.includes(null);
  const type = roving ? rover : stay;
  const asked = {
    ticketTypeId: type.id,
    lakeId: lake.id,
    day: wishes.day ?? SATURDAY,
    start: roving ? null : '12:00',
  };
  return bookedFor(here, aHold(asked, pegIds), wishes.holder);
};
const ofPerson = ({ name, email }: Person) => ({ name, email });

const paid = (bookingId: string, amountPence: number) => paidInCash(server, here, { bookingId, amountPence });

describe('cancelling', () => {
  test('gives back by the terms it was sold with, once, also when asked twice at once', async () => {
    const sam = await aPerson(server, { name: 'Sam Holt' });
    const peg = await freshPeg();
    const { id } = await written([peg.id], { holder: ofPerson(sam) });
    await paid(id, 2800);
    const quoteAt = async (now: string, who: Asker = sam, cause = '') => {
      server.setNow(now);
      return CancellationQuote.parse((await who.get(at(id, `/cancellation${cause}`))).body);
    };
    expect(await quoteAt('2027-07-10T11:00:00Z')).toMatchObject({ refundPence: 2800, percent: 100 });
    expect(await quoteAt('2027-07-10T11:00:01Z')).toMatchObject({ refundPence: 1400, percent: 50 });
    expect(await quoteAt('2027-07-15T11:00:01Z')).toMatchObject({ refundPence: 0, percent: 0 });
    expect(await quoteAt('2027-07-15T11:00:01Z', here.people.office)).toMatchObject({ refundPence: 2800 });
    expect(await quoteAt('2027-07-15T11:00:01Z', here.people.office, '?cause=angler')).toMatchObject({
      refundPence: 0,
    });
    server.setNow('2027-07-12T11:00:00Z');
    const answers = await Promise.all([1, 2, 3].map(() => sam.delete(at(id))));
    expect(answers.map(({ status }) => status)).toEqual([204, 204, 204]);
    const refunds = await server.server.source.manager.findBy(Refund, { bookingId: id });
    expect(refunds).toMatchObject([{ amountPence: 1400 }]);
    expect(await rowsOf(id)).toEqual([]);
    expect(view((await sam.get(at(id))).body)).toMatchObject({ status: 'cancelled_by_angler', notYet: [] });
  });

  test('by the office above its limit waits for the manager', async () => {
    const { id } = await written([
      (await freshPeg()).id,
      (await freshPeg()).id,
      (await freshPeg()).id,
      (await freshPeg()).id,
    ]);
    await paid(id, 11_200);
    expect((await here.people.office.delete(at(id))).status).toBe(204);
    const refunds = await server.server.source.manager.findBy(Refund, { bookingId: id });
    expect(refunds).toMatchObject([{ amountPence: 11_200, status: 'proposed' }]);
    const mine = await written([(await freshPeg()).id]);
    await paid(mine.id, 2800);
    await here.people.office.delete(at(mine.id));
    expect(await server.server.source.manager.findBy(Refund, { bookingId: mine.id })).toMatchObject([
      { amountPence: 2800, status: 'queued' },
    ]);
  });
});

describe('moving', () => {
  test('keeps id, code and price, frees the old peg, and is the angler’s once', async () => {
    const sam = await aPerson(server, { name: 'Sam Holt' });
    const [a, b, c] = [await freshPeg(), await freshPeg(), await freshPeg()];
    const before = await written([a.id], { holder: ofPerson(sam) });
    const move = (pegId: string, version: number, day = SATURDAY) =>
      sam
        .post(at(before.id, '/move'))
        .send({ version, day, start: '12:00', lakeId: lake.id, pegIds: [pegId], reason: '' });
    const moved = view((await move(b.id, 1, '2027-07-24')).body);
    expect(moved).toMatchObject({
      id: before.id,
      code: before.code,
      grossPence: 2800,
      from: '2027-07-24T11:00:00.000Z',
      pegs: [{ pegId: b.id }],
      version: 2,
    });
    expect((await move(b.id, 1, '2027-07-24')).status).toBe(200); // a lost answer
    expect(problem((await move(c.id, 1)).body).title).toMatch(/changed this meanwhile/);
    expect(problem((await move(c.id, 2)).body).title).toBe('A ticket can be moved once.');
    expect(await written([a.id])).toMatchObject({ status: 'confirmed' });
    const staff = {
      version: 2,
      day: SATURDAY,
      start: '12:00',
      lakeId: lake.id,
      pegIds: [c.id],
      reason: 'flood',
    };
    expect((await here.people.bailiff.post(at(before.id, '/move')).send(staff)).status).toBe(404);
    expect((await here.people.head_bailiff.post(at(before.id, '/move')).send(staff)).status).toBe(200);
  });

  test('to a peg that somebody else holds, at the same instant, leaves one of them with it and the other where they were', async () => {
    for (let round = 0; round < 6; round += 1) {
      const [from, to] = [await freshPeg(), await freshPeg()];
      const { id } = await written([from.id]);
      const body = {
        version: 1,
        day: SATURDAY,
        start: '12:00',
        lakeId: lake.id,
        pegIds: [to.id],
        reason: '',
      };
      const other = await aPerson(server);
      const held = aHold({ ticketTypeId: stay.id, lakeId: lake.id, day: SATURDAY, start: '12:00' }, [to.id]);
      const [moved, hold] = await Promise.all([
        here.people.office.post(at(id, '/move')).send(body),
        other.post('/bookings').send(held),
      ]);
      expect([moved.status, hold.status].sort()).toEqual(moved.status === 200 ? [200, 409] : [201, 409]);
      expect(await rowsOf(id)).toMatchObject([{ pegId: moved.status === 200 ? to.id : from.id }]);
    }
  });
});

describe('on the bank', () => {
  test('a peg is claimed by the first of two rovers, from now to the end of their day', async () => {
    const peg = await freshPeg();
    const one = await written([null]);
    const two = await written([null]);
    server.setNow(NOON);
    const claim = (id: string) => here.people.bailiff.post(at(id, '/claim')).send({ pegId: peg.id });
    const answers = await Promise.all([claim(one.id), claim(two.id)]);
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409]);
    const winner = answers.find(({ status }) => status === 200);
    expect(view(winner?.body)).toMatchObject({ pegs: [{ pegId: peg.id }], may: { claimPeg: false } });
    expect((await claim(view(winner?.body).id)).status).toBe(200);
    const rows = await server.server.source.manager.findBy(PegTime, { pegId: peg.id });
    expect(rows).toHaveLength(1);
    const loser = answers[0]?.status === 409 ? one : two;
    expect(await rowsOf(loser.id)).toMatchObject([{ pegId: null }]);
  });

  test('checking in, finishing early and the hour after free the rest of the peg’s time', async () => {
    const sam = await aPerson(server, { name: 'Sam Holt' });
    const peg = await freshPeg();
    const { id } = await written([peg.id], { holder: ofPerson(sam) });
    expect(problem((await sam.post(at(id, '/check-in'))).body).title).toBe('This ticket has not begun');
    server.setNow('2027-07-17T12:00:00Z');
    for (const who of [sam, here.people.bailiff])
      expect(view((await who.post(at(id, '/check-in'))).body).status).toBe('checked_in');
    const finished = await Promise.all([1, 2].map(() => sam.post(at(id, '/finish'))));
    expect(finished.map(({ status }) => status)).toEqual([200, 200]);
    expect(view(finished[0]?.body)).toMatchObject({ status: 'completed', until: '2027-07-17T12:00:00.000Z' });
    const ask = (start: string) =>
      aHold({ ticketTypeId: later.id, lakeId: lake.id, day: SATURDAY, start }, [peg.id]);
    const later = await aTicketType(server, lake, {
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
    const other = await aPerson(server);
    expect((await other.post('/bookings').send(ask('13:30'))).status).toBe(409);
    expect((await other.post('/bookings').send(ask('14:00'))).status).toBe(201);
  });

  test('nobody is a no-show before two hours, nor on their own word; the peg goes only when it is let go', async () => {
    const bailiffs = here.people.bailiff;
    const peg = await freshPeg();
    const { id } = await written([peg.id]);
    const own = await written([(await freshPeg()).id], { holder: ofPerson(bailiffs) });
    server.setNow('2027-07-17T12:59:59Z');
    expect((await bailiffs.post(at(id, '/no-show'))).status).toBe(409);
    server.setNow('2027-07-17T13:00:00Z');
    expect((await bailiffs.post(at(own.id, '/no-show'))).status).toBe(403);
    expect((await bailiffs.post(at(id, '/let-go'))).status).toBe(409);
    expect(view((await bailiffs.post(at(id, '/no-show'))).body)).toMatchObject({
      status: 'no_show',
      may: { letGo: true },
    });
    expect(await rowsOf(id)).toHaveLength(1);
    expect((await bailiffs.post(at(id, '/let-go'))).status).toBe(200);
    expect(await rowsOf(id)).toEqual([]);
    // They come after all: the peg is theirs again while nobody has taken it.
    expect(view((await bailiffs.post(at(id, '/check-in'))).body)).toMatchObject({ status: 'checked_in' });
    expect(await rowsOf(id)).toMatchObject([{ pegId: peg.id, state: 'taken' }]);
  });
});

describe('booking for somebody', () => {
  test('is one however often it is sent, with an account or without', async () => {
    const sam = await aPerson(server, { name: 'Sam Holt' });
    const hold = aHold({ ticketTypeId: stay.id, lakeId: lake.id, day: SATURDAY, start: '12:00' }, [
      (await freshPeg()).id,
    ]);
    const body = { ...hold, holder: ofPerson(sam), vehicle: '', note: 'by phone' };
    const path = `/fisheries/${here.id}/bookings`;
    const send = () => here.people.office.post(path).send(body);
    const answers = await Promise.all([send(), send()]);
    expect(answers.map(({ status }) => status)).toEqual([201, 201]);
    expect((await here.people.office.post(path).send({ ...body, note: 'by letter' })).status).toBe(409);
    const mine = BookingList.parse((await sam.get('/bookings/mine')).body);
    expect(mine.bookings.map(({ id }) => id)).toEqual([body.id]);
    expect(await server.server.source.manager.findOneByOrFail(Booking, { id: body.id })).toMatchObject({
      accountId: sam.id,
      source: 'office',
    });
  });

  test('may pass over notice, and never over a peg that is taken', async () => {
    const peg = await freshPeg();
    const far = await written([peg.id], { day: '2028-02-10' });
    expect(far.status).toBe('confirmed');
    const hold = aHold({ ticketTypeId: stay.id, lakeId: lake.id, day: '2028-02-10', start: '12:00' }, [
      peg.id,
    ]);
    const body = { ...hold, holder: { name: 'Ann Oak', email: null }, vehicle: '', note: '' };
    const answer = await here.people.office.post(`/fisheries/${here.id}/bookings`).send(body);
    expect(problem(answer.body)).toMatchObject({
      kind: 'conflict',
      title: `Peg ${peg.details.number} was just taken`,
    });
  });
});
