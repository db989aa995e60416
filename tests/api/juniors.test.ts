import { BookingView, type BookedTicket, type FillInBooking } from '@mereward/shared/bookings/contract';
import { USUAL_TERMS } from '@mereward/shared/bookings/letting-terms';
import { ProblemBody } from '@mereward/shared/problems/problem';
import { TICKET_TEMPLATES } from '@mereward/shared/tickets/ticket-templates';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { aLakeGround } from '../support/grounds';
import { aPerson, type Person } from '../support/people';
import type { TestServer } from '../support/server';
import { aHold, aTicketType, filledIn } from '../support/tickets';
import { aLake, aPeg, type TestFishery, type TestLake, type TestPeg } from '../support/waters';

let server: TestServer;
let here: TestFishery;
let cut: TestLake; // the juniors' water
let far: TestLake; // with nights
let junior: { id: string };
let day: { id: string };
let night: { id: string };
let sofia: Person;
let colin: Person;

const SUNDAY = '2027-07-18';
const KIT = { name: 'Kit', bornOn: '2014-09-20' };
const ELLA = { name: 'Ella', bornOn: '2012-11-02' };
const guardian = { name: 'Sofia Marsh', phone: '01632 960 003', consent: true };

beforeAll(async () => {
  ({ server, here } = await aLakeGround());
  server.setNow('2027-07-10T09:00:00Z');
  cut = await aLake(server, here, { name: 'Sedge Cut', nights: false });
  far = await aLake(server, here, { name: 'Far Ostle' });
  junior = await aTicketType(server, cut, TICKET_TEMPLATES.junior);
  day = await aTicketType(server, cut, TICKET_TEMPLATES.day);
  night = await aTicketType(server, far, TICKET_TEMPLATES.night);
  sofia = await aPerson(server, { name: 'Sofia Marsh' });
  colin = await aPerson(server, { name: 'Colin Frayne' });
});
afterAll(() => server.close());

let pegs = 0;
const freshPeg = (on: TestLake, people = 1): Promise<TestPeg> =>
  aPeg(server, on, { number: `SC${(pegs += 1)}`, people, rods: 4 });
const view = (body: unknown) => BookingView.parse(body);
const problem = (body: unknown) => ProblemBody.parse(body);

/** Holds a junior's ticket and fills it in. */
async function forKit(onDay: string, said: Partial<FillInBooking> = {}) {
  const peg = await freshPeg(cut);
  const body = aHold({ ticketTypeId: junior.id, lakeId: cut.id, day: onDay }, [peg.id], { kind: 'junior' });
  const held = await sofia.post('/bookings').send(body);
  expect(held.status).toBe(201);
  const details = filledIn(1, { tickets: [KIT], guardian, licence: null, ...said });
  return { held: view(held.body), answer: await sofia.put(`/bookings/${body.id}/details`).send(details) };
}

describe('a junior’s day ticket', () => {
  test('at twelve costs £6.00 and needs no rod licence, but a guardian who agrees and an emergency contact', async () => {
    const { held, answer } = await forKit(SUNDAY);
    expect(held.grossPence).toBe(600);
    expect(held.details.lines).toMatchObject([{ grossPence: 600, vatPence: 100, netPence: 500 }]);
    expect(answer.status).toBe(200);
    expect(view(answer.body)).toMatchObject({ notYet: [], details: { guardian: { name: 'Sofia Marsh' } } });
    const wrong = async (said: Partial<FillInBooking>) =>
      problem((await forKit(SUNDAY, said)).answer.body).errors?.map(({ pointer }) => pointer);
    expect(await wrong({ guardian: null })).toEqual(['/guardian']);
    expect(await wrong({ guardian: { ...guardian, consent: false } })).toEqual(['/guardian']);
    expect(await wrong({ emergencyContact: '' })).toEqual(['/emergencyContact']);
    expect(await wrong({ tickets: [{ name: 'Kit', bornOn: null }] })).toEqual(['/tickets/0/bornOn']);
  });

  test('for the day on which he is thirteen asks for the licence, and warns where there is none', async () => {
    expect(view((await forKit('2027-09-19')).answer.body).notYet).toEqual([]); // the day before his birthday
    const { answer } = await forKit('2027-09-25');
    expect(problem(answer.body).errors?.map(({ pointer }) => pointer)).toEqual(['/licence']);
    const none = { held: false, lastSix: '', expiresOn: null };
    const warned = view((await forKit('2027-09-25', { licence: none })).answer.body);
    expect(warned.notYet).toEqual(['Have a rod licence before you fish. It can be bought the same day.']);
    const declared = { held: true, lastSix: 'K4T2M9', expiresOn: '2027-09-24' };
    const over = view((await forKit('2027-09-25', { licence: declared })).answer.body);
    expect(over.notYet).toEqual([
      'The rod licence runs out before the ticket does. Renew it before you fish.',
    ]);
  });

  test('is for juniors by their age on the day', async () => {
    const old = { tickets: [{ name: 'Ned', bornOn: '2011-07-18' }] };
    expect(problem((await forKit(SUNDAY, old)).answer.body).title).toMatch(
      /is 16. This ticket is for 15 and under/,
    );
    const still = {
      tickets: [{ name: 'Ned', bornOn: '2011-07-19' }],
      licence: { held: true, lastSix: '', expiresOn: null },
    };
    expect((await forKit(SUNDAY, still)).answer.status).toBe(200);
  });
});

describe('the guardian', () => {
  test('is on the same peg or the next one, and nowhere else', async () => {
    const row = [await freshPeg(cut), await freshPeg(cut), await freshPeg(cut), await freshPeg(cut, 2)];
    const [one, two, three, double] = row.map(({ id }) => id);
    const pair = (adultPeg: string | undefined, juniorPeg: string | undefined) => {
      const hold = aHold({ ticketTypeId: day.id, lakeId: cut.id, day: SUNDAY }, [
        adultPeg ?? '',
        juniorPeg ?? '',
      ]);
      const tickets = hold.tickets.map((ticket, index): BookedTicket =>
        index === 0 ? ticket : { ...ticket, ...KIT, ticketTypeId: junior.id, kind: 'junior' },
      );
      return sofia.post('/bookings').send({ ...hold, tickets });
    };
    const far = await pair(one, three);
    expect(problem(far.body)).toMatchObject({ kind: 'invalid', errors: [{ pointer: '/guardian' }] });
    expect(problem(far.body).title).toMatch(/the guardian must be on the same or the next peg/);
    expect((await pair(one, two)).status).toBe(201);
    expect((await pair(double, double)).status).toBe(201);
  });
});

describe('a night', () => {
  const ask = (pegId: string, tickets: Partial<BookedTicket>[]) => {
    const hold = aHold(
      { ticketTypeId: night.id, lakeId: far.id, day: SUNDAY },
      tickets.map(() => pegId),
    );
    return { ...hold, tickets: hold.tickets.map((ticket, index) => ({ ...ticket, ...tickets[index] })) };
  };

  test('is refused to a junior who wants to fish it', async () => {
    const peg = await freshPeg(far);
    const refused = await colin.post('/bookings').send(ask(peg.id, [{ ...ELLA, kind: 'junior' }]));
    expect(problem(refused.body).title).toMatch(/is 14. This ticket is for 16 and over/);
  });

  test('beside a fishing adult is for a junior only where the fishery allows it', async () => {
    const peg = await freshPeg(far, 2);
    const both = () => ask(peg.id, [{}, { ...ELLA, kind: 'junior', rods: 0 }]);
    const refused = await colin.post('/bookings').send(both());
    expect(problem(refused.body).title).toBe('No junior may be on the bank at night here, fishing or not.');
    const details = { ...USUAL_TERMS, juniorNights: true };
    const at = `/fisheries/${here.id}/letting-terms`;
    await here.people.manager.put(at).send({ details, version: null });
    const allowed = await colin.post('/bookings').send(both());
    expect(view(allowed.body)).toMatchObject({ people: 2, rods: 2, grossPence: 1800 });
    const alone = await colin
      .post('/bookings')
      .send(ask((await freshPeg(far)).id, [{ ...ELLA, kind: 'junior', rods: 0 }]));
    expect(problem(alone.body)).toMatchObject({ kind: 'invalid', errors: [{ pointer: '/tickets/0/rods' }] });
  });
});
