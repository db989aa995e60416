import { PegTime } from '@mereward/db/entities/bookings/peg-time';
import { FreePegs, type FreePeg } from '@mereward/shared/bookings/availability-contract';
import { TICKET_TEMPLATES } from '@mereward/shared/tickets/ticket-templates';
import { sunTimes } from '@mereward/shared/time/sun';
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { aClosure, aHold } from '../support/peg-times';
import { aStranger } from '../support/people';
import { aServer, type TestServer } from '../support/server';
import { aTicket, aTicketType } from '../support/tickets';
import { aFishery, aLake, aPeg, type TestFishery, type TestLake, type TestPeg } from '../support/waters';

let server: TestServer;
let here: TestFishery;
let lake: TestLake;

beforeAll(async () => {
  server = await aServer();
  here = await aFishery(server);
  lake = await aLake(server, here, { name: 'Long Wend' });
});
afterAll(() => server.close());

let pegs = 0;
const freshPeg = (wishes: Parameters<typeof aPeg>[2] = {}, on = lake): Promise<TestPeg> =>
  aPeg(server, on, { number: `F${(pegs += 1)}`, ...wishes });
const noon = (day: number) => new Date(Date.UTC(2027, 6, day, 11)); // 12:00 at the lake, in July
const holder = () => here.people.angler;

async function free(wishes: Record<string, string | number>): Promise<FreePegs> {
  const query = new URLSearchParams(
    Object.entries({ day: '2027-07-17', ...wishes }).map(([k, v]) => [k, String(v)]),
  );
  const answer = await aStranger(server).get(`/fisheries/${here.id}/free?${query.toString()}`);
  expect(answer.status).toBe(200);
  return FreePegs.parse(answer.body);
}
const find = (answer: FreePegs, peg: TestPeg): FreePeg | undefined =>
  answer.pegs.find(({ pegId }) => pegId === peg.id);

describe('a peg', () => {
  test('is free, taken, held, blocked or closed for the hours asked, and nobody learns by whom', async () => {
    const [open, taken, held, blocked, closed] = [
      await freshPeg(),
      await freshPeg(),
      await freshPeg(),
      await freshPeg(),
      await freshPeg(),
    ];
    const hours = { from: noon(17), until: noon(18) };
    await aTicket(server, { pegId: taken.id, holder: { ...holder(), name: 'Sofia Marsh' }, ...hours });
    const holdUntil = new Date(server.server.clock().getTime() + 60_000);
    await aHold(server, { pegId: held.id, holder: holder(), ...hours, holdUntil });
    const block = await here.people.office.post(`/fisheries/${here.id}/blocks`).send({
      ...{ id: randomUUID(), title: 'Gwen’s match', pegIds: [blocked.id] },
      ...{ from: noon(17).toISOString(), until: noon(18).toISOString() },
    });
    expect(block.status).toBe(201);
    await aClosure(server, here, { lakeIds: [lake.id], pegIds: [closed.id], from: noon(16).toISOString() });
    const answer = await free({ nights: 1 });
    expect(answer).toMatchObject({
      from: noon(17).toISOString(),
      until: noon(18).toISOString(),
      whyNot: null,
    });
    const states = [open, taken, held, blocked, closed].map((peg) => find(answer, peg)?.state);
    expect(states).toEqual(['free', 'taken', 'held', 'blocked', 'closed']);
    expect(find(answer, closed)).toMatchObject({ whyNot: 'Closed for works', nextFree: null });
    expect(find(answer, taken)?.nextFree).toEqual({ day: '2027-07-18', from: noon(18).toISOString() });
    expect(find(answer, open)).toMatchObject({ nextFree: null, whyNot: null });
    expect(JSON.stringify(answer)).not.toMatch(/Sofia|Gwen|angler/);
  });

  test('whose hold has run out is free again though nobody has cleared it away', async () => {
    const peg = await freshPeg();
    const now = server.server.clock();
    await aHold(server, { pegId: peg.id, holder: holder(), from: noon(17), until: noon(18), holdUntil: now });
    expect(find(await free({ nights: 1 }), peg)?.state).toBe('free');
  });

  test('keeps the ticket’s turnaround free before the next one', async () => {
    const peg = await freshPeg();
    const kind = await aTicketType(server, lake, TICKET_TEMPLATES.stay24);
    await aTicket(server, { pegId: peg.id, holder: holder(), from: noon(18), until: noon(19) });
    const without = await free({ nights: 1, day: '2027-07-17' });
    expect(find(without, peg)?.state).toBe('free');
    const asked = { ticketTypeId: kind.id, start: '12:00' };
    expect(find(await free(asked), peg)?.state).toBe('taken');
  });

  test('that is closed by its keeper or lies under a line is told so in words', async () => {
    const shut = await freshPeg({
      status: 'closed',
      statusReason: 'Board rotten',
      statusUntil: '2027-07-20',
    });
    const line = {
      ...{ kind: 'present' as const, distanceM: 20, heightM: null, operator: '', signFitted: true },
      fishing: 'no_fishing' as const,
    };
    const under = await freshPeg({ overheadLine: line });
    const answer = await free({});
    expect(find(answer, shut)).toMatchObject({ state: 'closed', whyNot: 'Board rotten' });
    expect(find(answer, shut)?.nextFree?.day).toBe('2027-07-21');
    expect(find(answer, under)).toMatchObject({ state: 'closed', nextFree: null });
  });

  test('let place by place tells how many places are left', async () => {
    const peg = await freshPeg({ people: 3, rods: 6, letting: 'by_place' });
    const id = await aTicket(server, { pegId: peg.id, holder: holder(), from: noon(17), until: noon(18) });
    await server.server.source.manager.update(PegTime, { bookingId: id }, { lane: '1' });
    expect(find(await free({ nights: 1 }), peg)).toMatchObject({ state: 'free', placesLeft: 2 });
    expect(find(await free({ nights: 1, people: 3, rods: 3 }), peg)?.state).toBe('taken');
    expect(find(await free({ nights: 1, people: 4 }), peg)).toBeUndefined();
  });
});

test('a day without a kind of ticket is told from before sunrise to after sunset at the lake', async () => {
  const { sunrise } = sunTimes('2027-07-17', lake.origin, 'Europe/London');
  const hourBefore = (sunrise?.getTime() ?? 0) - 3_600_000;
  const answer = await free({ lakeId: lake.id });
  expect(Math.abs(Date.parse(answer.from ?? '') - hourBefore)).toBeLessThanOrEqual(60_000); // told to the minute
});

describe('a lake', () => {
  test('without nights, full or closed is free nowhere and says why', async () => {
    const day = await aLake(server, here, { name: 'Day Water', nights: false });
    const full = await aLake(server, here, { name: 'Full Water', maxPeople: 1 });
    const shut = await aLake(server, here, { name: 'Shut Water' });
    const [a, b, c, other] = [
      await freshPeg({}, day),
      await freshPeg({}, full),
      await freshPeg({}, shut),
      await freshPeg({}, full),
    ];
    await aTicket(server, { pegId: other.id, holder: holder(), from: noon(17), until: noon(18) });
    await aClosure(server, here, {
      ...{ lakeIds: [shut.id], pegIds: [], scope: { kind: 'lakes', lakeIds: [shut.id] } },
      ...{ from: noon(17).toISOString(), publicWords: 'Low oxygen' },
    });
    const answer = await free({ nights: 1 });
    expect(find(answer, a)).toMatchObject({
      state: 'closed',
      whyNot: 'There is no night fishing on Day Water.',
    });
    expect(find(answer, b)?.state).toBe('taken');
    expect(find(answer, b)?.nextFree?.day).toBe('2027-07-18');
    expect(find(answer, c)).toMatchObject({ state: 'closed', whyNot: 'Low oxygen' });
    const lakes = new Map(answer.lakes.map((each) => [each.name, each]));
    expect(lakes.get('Shut Water')).toMatchObject({ closed: 'Low oxygen', free: 0 });
    expect(lakes.get('Full Water')).toMatchObject({ closed: null, free: 0 });
    expect(find(await free({}), a)?.state).toBe('free');
  });
});

describe('what is asked', () => {
  test('filters by lake, walk, barrow, steps and room', async () => {
    const water = await aLake(server, here, { name: 'Filter Water' });
    const access = { surface: '', steepest: '', steps: 0, gates: '', winter: '' };
    const near = await freshPeg(
      {
        access: { ...access, fromParkingM: 40, barrow: 'yes' },
        stepFree: { kind: 'assisted', facts: 'A ramp' },
      },
      water,
    );
    const far = await freshPeg({ access: { ...access, fromParkingM: 400, barrow: 'no' } }, water);
    const unknown = await freshPeg({ access: { ...access, fromParkingM: null, barrow: 'unknown' } }, water);
    const numbers = async (asked: Record<string, string | number>) =>
      (await free({ lakeId: water.id, ...asked })).pegs.map(({ number }) => number).sort();
    const all = [near, far, unknown].map(({ details }) => details.number).sort();
    expect(await numbers({})).toEqual(all);
    for (const asked of [{ fromParkingM: 100 }, { barrow: 'yes' }, { stepFree: 'assisted' }])
      expect(await numbers(asked)).toEqual([near.details.number]);
    expect(await numbers({ stepFree: 'measured_suitable' })).toEqual([]);
    expect(await numbers({ rods: 9 })).toEqual([]);
  });

  test('by a kind of ticket finds its pegs only, with its price, and a start it can’t have is told', async () => {
    const water = await aLake(server, here, { name: 'Priced Water' });
    const [one, two] = [await freshPeg({}, water), await freshPeg({}, water)];
    const kind = await aTicketType(server, water, { ...TICKET_TEMPLATES.stay24, pegIds: [one.id] });
    const answer = await free({ ticketTypeId: kind.id, start: '12:00', rods: 3 });
    expect(answer.pegs.map(({ pegId }) => pegId)).toEqual([one.id]);
    const { prices, rodsIncluded } = kind.details;
    const extra = (3 - rodsIncluded) * (prices[0]?.extraRodPence ?? 0);
    expect(answer.pegs[0]?.priceFromPence).toBe((prices[0]?.pricePence ?? 0) + extra);
    const plain = await free({ lakeId: water.id });
    expect(find(plain, two)?.priceFromPence).toBeNull();
    const refused = await free({ ticketTypeId: kind.id, start: '03:00' });
    expect(refused.pegs).toEqual([]);
    expect(refused.whyNot).toContain('can’t start at 03:00');
    expect((await free({ day: '2027-04-01' })).whyNot).toBe('That time is over. Choose a later day.');
  });

  test('must be a day and things of this fishery', async () => {
    const stranger = aStranger(server);
    expect((await stranger.get(`/fisheries/${here.id}/free?day=soon`)).status).toBe(400);
    const nothing = `/fisheries/${here.id}/free?day=2027-07-17&lakeId=${randomUUID()}`;
    expect((await stranger.get(nothing)).status).toBe(404);
    expect((await stranger.get(`/fisheries/${randomUUID()}/free?day=2027-07-17`)).status).toBe(404);
  });
});
