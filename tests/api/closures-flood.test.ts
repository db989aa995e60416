import { settleRefund } from '@mereward/api/payments/settle-refund';
import { ctxOf } from '@mereward/api/http/ctx-of';
import { settleChoices } from '@mereward/api/bookings/settle-choices';
import { ClosureChoice } from '@mereward/db/entities/bookings/closure-choice';
import { Refund } from '@mereward/db/entities/payments/refund';
import { ChoiceView } from '@mereward/shared/bookings/choosing-contract';
import { ClosurePreview, ClosureView } from '@mereward/shared/closures/deeds-contract';
import { ProblemBody } from '@mereward/shared/problems/problem';
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { aPerson, aStranger, type Person } from '../support/people';
import { aServer, type TestServer } from '../support/server';
import { aPaidTicket, aTicketType } from '../support/taken-tickets';
import { aFishery, aLake, aPeg, type TestFishery, type TestLake, type TestPeg } from '../support/waters';

/** Story 8: the flood of February 2027, with its figures: 40 bookings worth £1,116.00. */
let server: TestServer;
let here: TestFishery;
let farOstle: TestLake;
let pool: TestLake;

type Booked = { id: string; holder: Person; kind: '24h' | '48h' | 'member' };
const booked: Booked[] = [];
const tokens = new Map<string, string>();
const closureId = randomUUID();
const hour = (day: number, clock: string) => `2027-02-${String(day).padStart(2, '0')}T${clock}:00.000Z`;
const instants = { from: hour(12, '12:00'), until: hour(15, '12:00') };

const closing = () => ({
  id: closureId,
  details: {
    scope: { kind: 'lakes', lakeIds: [farOstle.id] },
    reason: 'flood',
    effect: 'move',
    ...instants,
    publicWords: 'The board stands at 1.24 m. The banks of FO1 to FO5 are under water.',
    liftConditions: [],
  },
  moveToLakeId: pool.id,
  chooseUntil: hour(13, '10:00'),
});
const close = () => here.people.manager.post(`/fisheries/${here.id}/closures`).send(closing());
const look = async () => ClosureView.parse((await here.people.office.get(`/closures/${closureId}`)).body);

const choicePath = (booking: Booked): string => `/choices/${tokens.get(booking.id)}`;
const choose = (booking: Booked, body: object) => aStranger(server).post(choicePath(booking)).send(body);

async function bookings(count: number, kind: Booked['kind'], sold: object): Promise<void> {
  for (let i = 0; i < count; i += 1) {
    const holder = await aPerson(server, { name: `Angler ${booked.length + 1}` });
    const id = await aPaidTicket(server, {
      ...(sold as Parameters<typeof aPaidTicket>[1]),
      holder,
      ...pegAndTimes(),
      ...(kind === '48h' ? { until: hour(pegDay + 2, '12:00') } : {}),
    });
    booked.push({ id, holder, kind });
  }
}

const pegs: TestPeg[] = [];
let pegDay = 12;
let pegIndex = 0;
/** 24 pegs; a peg is let from noon to noon, 48 hours first so that they have room. */
function pegAndTimes() {
  const peg = pegs[pegIndex];
  if (!peg) throw new Error('There is no such peg.');
  const from = hour(pegDay, '12:00');
  const until = hour(pegDay + 1, '12:00');
  const day = from.slice(0, 10);
  pegIndex += 1;
  if (pegIndex === 24) {
    pegIndex = 10;
    pegDay += 1;
  }
  return { peg, from, until, day, start: '12:00' };
}

beforeAll(async () => {
  server = await aServer();
  server.setNow('2027-02-12T07:10:00Z');
  here = await aFishery(server, { name: 'Ostlemere Waters' });
  farOstle = await aLake(server, here, { name: 'Far Ostle', nights: true });
  pool = await aLake(server, here, { name: 'Ostle Pool', nights: false });
  for (let n = 1; n <= 24; n += 1) pegs.push(await aPeg(server, farOstle, { number: `FO${n}` }));
  const pools: TestPeg[] = [];
  for (let n = 1; n <= 14; n += 1) pools.push(await aPeg(server, pool, { number: `OP${n}` }));
  const elapsed = (hours: 24 | 48) =>
    ({
      kind: 'elapsed',
      hours,
      startsFrom: '12:00',
      startsUntil: '12:00',
      startStepMinutes: 60,
      clockChange: 'same_clock_time',
    }) as const;
  const onOstle = { lakeIds: [farOstle.id] };
  const day24 = await aTicketType(server, here, {
    name: '24 hours',
    pricePence: 2800,
    duration: elapsed(24),
    ...onOstle,
  });
  const day48 = await aTicketType(server, here, {
    name: '48 hours',
    pricePence: 5000,
    duration: elapsed(48),
    ...onOstle,
  });
  const member = await aTicketType(server, here, {
    name: 'Season member',
    pricePence: 0,
    audience: 'member',
    duration: elapsed(24),
    ...onOstle,
  });
  const onPool = await aTicketType(server, here, { name: 'Day', pricePence: 1200, lakeIds: [pool.id] });
  const at = { fishery: here, lake: farOstle };
  await bookings(10, '48h', { ...at, type: day48, paidPence: 5000 });
  await bookings(22, '24h', { ...at, type: day24, paidPence: 2800 });
  await bookings(8, 'member', { ...at, type: member, paidPence: 0 });
  for (const peg of pools.slice(0, 9))
    await aPaidTicket(server, {
      fishery: here,
      lake: pool,
      peg,
      holder: here.people.angler,
      type: onPool,
      from: hour(13, '07:00'),
      until: hour(13, '19:00'),
      day: '2027-02-13',
      start: null,
      paidPence: 1200,
    });
});
afterAll(() => server.close());

const of = (kind: Booked['kind']) => booked.filter((each) => each.kind === kind);
const state = async (): Promise<Record<string, number>> => {
  const rows: { status: string; count: number }[] = await server.server.source.manager.query(
    `SELECT status, count(*)::int FROM booking WHERE id = ANY ($1) GROUP BY status`,
    [booked.map(({ id }) => id)],
  );
  return Object.fromEntries(rows.map(({ status, count }) => [status, count]));
};

describe('Story 8: a flood with 40 bookings to move', () => {
  test('the preview tells 40 bookings worth £1,116.00 and does nothing', async () => {
    const { id: _id, ...preview } = closing();
    const answer = await here.people.manager.post(`/fisheries/${here.id}/closures/preview`).send(preview);
    expect(ClosurePreview.parse(answer.body)).toMatchObject({
      bookings: 40,
      valuePence: 111_600,
      words: 'Hits 40 bookings worth £1,116.00',
      pegs: 24,
      kinds: [
        { ticketName: '24 hours', count: 22, valuePence: 61_600 },
        { ticketName: '48 hours', count: 10, valuePence: 50_000 },
        { ticketName: 'Season member', count: 8, valuePence: 0 },
      ],
    });
    expect(await state()).toEqual({ confirmed: 40 });
  });

  test('closing twice, and by two at once, puts each to one choice with one letter', async () => {
    const answers = await Promise.all([close(), close()]);
    expect(answers.map(({ status }) => status)).toEqual([201, 201]);
    expect((await close()).status).toBe(201);
    await server.settle();
    expect(await state()).toEqual({ choosing: 40 });
    const choices = await server.server.source.manager.countBy(ClosureChoice, { closureId });
    expect(choices).toBe(40);
    for (const { id, holder } of booked) {
      const mails = server.mails.filter(({ to }) => to === holder.email);
      expect(mails).toHaveLength(1);
      const token = /\/choose\/([\w-]+)/.exec(mails[0]?.text ?? '')?.[1];
      expect(token).toBeDefined();
      tokens.set(id, token ?? '');
    }
    const inside: unknown[] = await server.server.source.manager.query(
      `SELECT 1 FROM peg_time t JOIN peg p ON p.id = t.peg_id
        WHERE p.lake_id = $1 AND t.state IN ('held', 'taken') AND t.during && tstzrange($2, $3)`,
      [farOstle.id, instants.from, instants.until],
    );
    expect(inside).toEqual([]);
    expect((await look()).tally).toMatchObject({ bookings: 40, valuePence: 111_600, waiting: 40 });
  });

  test('six ask for Saturday on Ostle Pool at once: five are placed, the sixth takes Sunday', async () => {
    const six = of('24h').slice(0, 6);
    const first = six[0];
    if (!first) throw new Error('There are six.');
    const offered = ChoiceView.parse((await aStranger(server).get(choicePath(first))).body);
    expect(offered).toMatchObject({
      paidPence: 2800,
      moveLake: { lakeName: 'Ostle Pool', ticketName: 'Day', grossPence: 1200, backPence: 1600 },
    });
    expect(offered.moveLake?.days.find(({ day }) => day === '2027-02-13')?.free).toBe(5);
    const saturday = { choice: 'move_lake', day: '2027-02-13' };
    const answers = await Promise.all(six.map((booking) => choose(booking, saturday)));
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 200, 200, 200, 200, 409]);
    const late = answers.findIndex(({ status }) => status === 409);
    const problem = ProblemBody.parse(answers[late]?.body);
    expect(problem.title).toBe('Ostle Pool is full that day');
    expect(problem.errors?.[0]?.detail).toContain('Sun 14 February 2027');
    const sixth = six[late];
    if (!sixth) throw new Error('One was late.');
    expect((await choose(sixth, { choice: 'move_lake', day: '2027-02-14' })).status).toBe(200);
    expect((await choose(sixth, { choice: 'move_lake', day: '2027-02-14' })).status).toBe(200);
    expect((await choose(sixth, { choice: 'refund' })).status).toBe(409);
  });

  test('22 move to another date, 8 take their money, 3 members cancel', async () => {
    const movers = [...of('24h').slice(6, 18), ...of('48h').slice(0, 5), ...of('member').slice(0, 5)];
    expect(movers).toHaveLength(22);
    for (const [index, booking] of movers.entries()) {
      const day = `2027-03-${String(1 + (index % 3) * 3).padStart(2, '0')}`;
      expect((await choose(booking, { choice: 'move_date', day })).status).toBe(200);
    }
    const leavers = [...of('24h').slice(18), ...of('48h').slice(5, 9), ...of('member').slice(5)];
    for (const booking of leavers) expect((await choose(booking, { choice: 'refund' })).status).toBe(200);
    expect((await look()).tally).toMatchObject({ waiting: 1, movedDate: 22, movedLake: 6 });
  });

  test('after the deadline the one who said nothing gets all back: £458.00 given back, £658.00 kept', async () => {
    server.setNow('2027-02-13T10:00:00Z');
    await Promise.all([settleChoices(server.server, closureId), settleChoices(server.server, closureId)]);
    await settleChoices(server.server, closureId);
    const { tally } = await look();
    expect(tally).toMatchObject({
      bookings: 40,
      waiting: 0,
      movedDate: 22,
      movedLake: 6,
      refunded: 9,
      cancelled: 3,
      refundedPence: 45_800,
      keptPence: 65_800,
    });
    expect(await state()).toEqual({ confirmed: 28, cancelled_by_fishery: 12 });
    const refunds = await server.server.source.manager.findBy(Refund, { cause: `closure:${closureId}` });
    expect(refunds).toHaveLength(15);
    const silent = of('48h')[9];
    if (!silent) throw new Error('One said nothing.');
    const view = ChoiceView.parse((await aStranger(server).get(choicePath(silent))).body);
    expect(view.chosen).toMatchObject({
      choice: 'refund',
      by: 'deadline',
      words: '£50.00 is given back to you.',
    });
    expect((await choose(silent, { choice: 'refund' })).status).toBe(409);
  });

  test('run once more nothing doubles, and nothing stays confirmed inside the closed time', async () => {
    expect((await close()).status).toBe(201);
    await settleChoices(server.server, closureId);
    const refunds = await server.server.source.manager.findBy(Refund, { cause: `closure:${closureId}` });
    expect(refunds.reduce((sum, { amountPence }) => sum + amountPence, 0)).toBe(45_800);
    const inside: unknown[] = await server.server.source.manager.query(
      `SELECT 1 FROM booking WHERE lake_id = $1 AND status IN ('confirmed', 'checked_in', 'hold', 'pending_payment')
         AND during && tstzrange($2, $3)`,
      [farOstle.id, instants.from, instants.until],
    );
    expect(inside).toEqual([]);
  });

  test('a refund the provider refuses is counted for the office, and its holder is told the truth', async () => {
    const { manager } = server.server.source;
    const refund = await manager.findOneByOrFail(Refund, { cause: `closure:${closureId}` });
    await server.server.source.transaction((tx) =>
      settleRefund(ctxOf(server.server, tx), refund.id, {
        kind: 'failed',
        fault: 'The card was closed',
        providerRef: null,
      }),
    );
    expect((await look()).tally).toMatchObject({ refundFailed: 1, refundedPence: 45_800 });
    const holder = booked.find(({ id }) => id === refund.bookingId)?.holder;
    // No provider is set here: what would be asked of it is left aside, and the letters are sent.
    await manager.query(`DELETE FROM pgboss.job WHERE name = 'refund.ask'`);
    const mail = await server.mailTo(holder?.email ?? '');
    expect(mail.subject).toContain('has not gone through yet');
  });
});
