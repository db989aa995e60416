import { BookingList, BookingView } from '@mereward/shared/bookings/contract';
import { TICKET_TEMPLATES } from '@mereward/shared/tickets/ticket-templates';
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import { aLakeGround } from '../support/grounds';
import { aPerson, aStranger, type Asker, type Person } from '../support/people';
import type { TestServer } from '../support/server';
import { aHold, aTicketType, bookedFor, paidInCash } from '../support/tickets';
import { aLake, aPeg, type TestFishery, type TestLake, type TestPeg } from '../support/waters';

let server: TestServer;
let here: TestFishery;
let elsewhere: TestFishery;
let lake: TestLake;
let stay: { id: string };

const SATURDAY = '2027-07-17';

beforeAll(async () => {
  ({ server, here, elsewhere, lake } = await aLakeGround());
  server.setNow('2027-07-10T11:00:00Z');
  stay = await aTicketType(server, lake, { ...TICKET_TEMPLATES.stay24, mostNightsInARow: null });
});
beforeEach(() => server.setNow('2027-07-10T11:00:00Z'));
afterAll(() => server.close());

let pegs = 0;
const freshPeg = (): Promise<TestPeg> => aPeg(server, lake, { number: `R${(pegs += 1)}` });
const view = (body: unknown) => BookingView.parse(body);
const at = (bookingId: string, deed = '') => `/bookings/${bookingId}${deed}`;
type Wishes = { holder?: { name: string; email: string | null }; day?: string };
const written = (pegIds: string[], { holder, day = SATURDAY }: Wishes = {}): Promise<BookingView> =>
  bookedFor(here, aHold({ ticketTypeId: stay.id, lakeId: lake.id, day, start: '12:00' }, pegIds), holder);
const ofPerson = ({ name, email }: Person) => ({ name, email });
const paid = (bookingId: string, amountPence: number) => paidInCash(server, here, { bookingId, amountPence });

describe('who may what', () => {
  test('holds in every cell of the matrix of roles', async () => {
    const sam = await aPerson(server, { name: 'Sam Holt' });
    const { owner, manager, office, head_bailiff, bailiff, member, angler } = here.people;
    const everybody = {
      sam,
      owner,
      manager,
      office,
      head_bailiff,
      bailiff,
      member,
      angler,
      theirs: elsewhere.people.owner,
    };
    const today = await written([(await freshPeg()).id], { holder: ofPerson(sam) });
    const later = await written([(await freshPeg()).id], { holder: ofPerson(sam), day: '2027-07-24' });
    server.setNow('2027-07-17T12:00:00Z');
    const each = async (deed: (who: Asker) => Promise<{ status: number }>) => {
      const told: Record<string, number> = {};
      for (const [name, who] of Object.entries(everybody)) told[name] = (await deed(who)).status;
      return { ...told, stranger: (await deed(aStranger(server))).status };
    };
    const outside = { member: 404, angler: 404, theirs: 404, stranger: 401 };
    expect(await each((who) => who.get(at(today.id)))).toEqual({
      sam: 200,
      owner: 200,
      manager: 200,
      office: 200,
      head_bailiff: 200,
      bailiff: 200,
      ...outside,
    });
    expect(await each((who) => who.get(at(later.id)))).toEqual({
      sam: 200,
      owner: 200,
      manager: 200,
      office: 200,
      head_bailiff: 200,
      bailiff: 404,
      ...outside,
    });
    expect(await each((who) => who.get(`/fisheries/${here.id}/bookings?day=${SATURDAY}`))).toEqual({
      sam: 404,
      owner: 200,
      manager: 200,
      office: 200,
      head_bailiff: 200,
      bailiff: 200,
      member: 403,
      angler: 403,
      theirs: 404,
      stranger: 401,
    });
    expect(await each((who) => who.get(at(later.id, '/cancellation')))).toEqual({
      sam: 200,
      owner: 200,
      manager: 200,
      office: 200,
      head_bailiff: 403,
      bailiff: 404,
      ...outside,
    });
    expect(await each((who) => who.post(at(later.id, '/confirm')))).toEqual({
      sam: 200,
      owner: 403,
      manager: 403,
      office: 403,
      head_bailiff: 403,
      bailiff: 404,
      ...outside,
    });
    const move = {
      version: 99,
      day: SATURDAY,
      start: '12:00',
      lakeId: lake.id,
      pegIds: [randomUUID()],
      reason: '',
    };
    expect(await each((who) => who.post(at(later.id, '/move')).send(move))).toEqual({
      sam: 409,
      owner: 409,
      manager: 409,
      office: 409,
      head_bailiff: 409,
      bailiff: 404,
      ...outside,
    });
    expect(await each((who) => who.post(at(today.id, '/check-in')))).toEqual({
      sam: 200,
      owner: 200,
      manager: 200,
      office: 200,
      head_bailiff: 200,
      bailiff: 200,
      ...outside,
    });
    expect(await each((who) => who.post(at(today.id, '/no-show')))).toEqual({
      sam: 403,
      owner: 409,
      manager: 409,
      office: 409,
      head_bailiff: 409,
      bailiff: 409,
      ...outside,
    });
    const body = {
      ...aHold({ ticketTypeId: randomUUID(), lakeId: lake.id, day: SATURDAY }, [null]),
      holder: { name: 'A', email: null },
      vehicle: '',
      note: '',
    };
    expect(await each((who) => who.post(`/fisheries/${here.id}/bookings`).send(body))).toEqual({
      sam: 404,
      owner: 400,
      manager: 400,
      office: 400,
      head_bailiff: 403,
      bailiff: 403,
      member: 403,
      angler: 403,
      theirs: 404,
      stranger: 401,
    });
  });

  test('a bailiff reads who, which ticket and which car of three days, and no contact, birth or money', async () => {
    const sam = await aPerson(server, { name: 'Sam Holt' });
    const peg = await freshPeg();
    const { id, code } = await written([peg.id], { holder: ofPerson(sam) });
    await server.server.source.query(
      `UPDATE booking SET details = details || '{"emergencyContact": "Jo 01632 960 002", "guardian": {"name": "Jo", "phone": "01632 960 002", "consent": true}}' WHERE id = $1`,
      [id],
    );
    await paid(id, 2800);
    server.setNow('2027-07-16T00:00:00Z');
    const seen = view((await here.people.bailiff.get(at(id))).body);
    expect(seen).toMatchObject({ holder: 'Sam Holt', paidPence: 2800, payments: [], receipts: [] });
    expect(seen.details).toMatchObject({
      vehicle: 'WE27 OST',
      emergencyContact: '',
      guardian: { name: 'Jo', phone: '' },
    });
    expect(view((await here.people.office.get(at(id))).body)).toMatchObject({
      details: { emergencyContact: 'Jo 01632 960 002' },
      payments: [{ amountPence: 2800, method: 'cash' }],
    });
    expect(view((await here.people.owner.get(at(id))).body).details.emergencyContact).toBe('');
    const spoken = `${code.slice(0, 3).toLowerCase()} ${code.slice(3)}`;
    const byCode = (who: Asker, path = `/fisheries/${here.id}/bookings/by-code/`) =>
      who.get(`${path}${encodeURIComponent(spoken)}`);
    expect(view((await byCode(here.people.bailiff)).body).id).toBe(id);
    expect((await byCode(sam)).status).toBe(404);
    expect(view((await byCode(sam, '/bookings/by-code/')).body).id).toBe(id);
    expect((await byCode(here.people.angler, '/bookings/by-code/')).status).toBe(404);
    expect((await byCode(elsewhere.people.owner, '/bookings/by-code/')).status).toBe(404);
    const list = BookingList.parse(
      (await here.people.bailiff.get(`/fisheries/${here.id}/bookings?day=${SATURDAY}`)).body,
    );
    expect(list.bookings.map((each) => each.id)).toContain(id);
    server.setNow('2027-07-12T11:00:00Z');
    const early = await here.people.bailiff.get(`/fisheries/${here.id}/bookings?day=${SATURDAY}`);
    expect(BookingList.parse(early.body).bookings).toEqual([]);
  });

  test('another lake’s or fishery’s tickets stay out of a day’s list', async () => {
    const other = await aLake(server, here, { name: 'Other Water' });
    await written([(await freshPeg()).id]);
    const path = `/fisheries/${here.id}/bookings?day=${SATURDAY}&lakeId=${other.id}`;
    expect(BookingList.parse((await here.people.office.get(path)).body).bookings).toEqual([]);
    const theirs = await elsewhere.people.office.get(`/fisheries/${elsewhere.id}/bookings?day=${SATURDAY}`);
    expect(BookingList.parse(theirs.body).bookings).toEqual([]);
  });
});
