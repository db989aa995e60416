import { heardFrom } from '@mereward/api/payments/heard';
import { signatureOf } from '@mereward/api/demo/card-provider/deliveries';
import { Payment } from '@mereward/db/entities/payments/payment';
import { BookingView } from '@mereward/shared/bookings/contract';
import { ProblemBody } from '@mereward/shared/problems/problem';
import { setTimeout as pause } from 'node:timers/promises';
import { afterAll, afterEach, beforeAll, describe, expect, test } from 'vitest';
import { aCardGround, answerBank, CARD_SECRET, tryCard, type CardGround } from '../support/cards';
import { aPerson, aStranger, type Person } from '../support/people';

let ground: CardGround;
let sofia: Person;

const EVENING = '2027-07-10T18:00:00Z';

beforeAll(async () => {
  ground = await aCardGround();
  sofia = await aPerson(ground.server, { name: 'Sofia Marsh' });
});
afterAll(() => ground.close());
afterEach(() => {
  ground.server.setNow(EVENING);
  Object.assign(ground.provider.faults, {
    slowMs: 0,
    failing: 0,
    failingAfter: 0,
    loseMessages: false,
    duplicate: 0,
    reorder: false,
    refundsFail: false,
  });
});

const seen = async (who: Person, id: string): Promise<BookingView> =>
  BookingView.parse((await who.get(`/bookings/${id}`)).body);
const looked = async (who: Person, id: string): Promise<BookingView> =>
  BookingView.parse((await who.post(`/bookings/${id}/look`)).body);
const problem = (body: unknown) => ProblemBody.parse(body);
const manager = () => ground.server.server.source.manager;

/** The ledger comes to nought, and what was taken less what went back is what stands on the accounts of money. */
async function expectBooksToAgree(): Promise<void> {
  const [sums]: { all: string; sold: string; receipts: string; taken: string }[] = await manager().query(`
    SELECT (SELECT coalesce(sum(amount_pence), 0) FROM ledger_posting) AS all,
           (SELECT -coalesce(sum(p.amount_pence), 0) FROM ledger_posting p
             WHERE p.account IN ('ticket_sales', 'vat_owed')) AS sold,
           (SELECT coalesce(sum((told->>'grossPence')::int * CASE kind WHEN 'receipt' THEN 1 ELSE -1 END), 0) FROM receipt) AS receipts,
           (SELECT coalesce((SELECT sum(amount_pence) FROM payment WHERE status = 'captured'), 0)
                 - coalesce((SELECT sum(amount_pence) FROM refund WHERE done_at IS NOT NULL AND status = 'done'), 0)) AS taken`);
  expect(sums?.all).toBe('0');
  expect(sums?.receipts).toBe(sums?.sold);
  expect(sums?.taken).toBe(sums?.sold);
}

describe('a card', () => {
  test('that is declined takes nothing; the next one pays, and messages told thrice and out of order count once', async () => {
    const { provider, server, here } = ground;
    await manager().query('INSERT INTO receipt_counter (fishery_id, year, last) VALUES ($1, 2027, 417)', [
      here.id,
    ]);
    const held = await ground.aFilledHold(sofia, await ground.freshPeg('FO11'));
    expect(held).toMatchObject({ status: 'hold', grossPence: 2800, may: { pay: true, confirm: false } });
    const page = await ground.pageOf(sofia, held.id);
    expect(page).toContain('/pay/cs_');
    await tryCard(page, 'declined');
    await ground.quiet();
    const declined = await seen(sofia, held.id);
    expect(declined).toMatchObject({
      status: 'pending_payment',
      holdUntil: held.holdUntil,
      receipts: [],
      payments: [
        { status: 'failed', pageUrl: page, fault: expect.stringContaining('declined. Nothing was taken') },
      ],
    });
    expect(await ground.pageOf(sofia, held.id)).toBe(page);
    expect(await (await fetch(page)).text()).toContain('declined. Nothing was taken');

    Object.assign(provider.faults, { duplicate: 2, reorder: true });
    expect(await tryCard(page, 'challenge')).toMatch(/\/bank$/);
    expect(await answerBank(page, true)).toBe(`http://127.0.0.1:4310/tickets/bookings/${held.id}`);
    await ground.quiet();
    const paid = await seen(sofia, held.id);
    expect(paid).toMatchObject({
      status: 'confirmed',
      holdUntil: null,
      paidPence: 2800,
      payments: [{ status: 'captured', amountPence: 2800, fault: '', pageUrl: null }],
      refunds: [],
    });
    expect(paid.receipts).toMatchObject([
      {
        number: '2027-000418',
        kind: 'receipt',
        taxPoint: '2027-07-10',
        told: {
          grossPence: 2800,
          seller: { name: 'Ostlemere Waters Ltd', vatNumber: 'GB000000000' },
          vat: [{ rateBp: 2000, grossPence: 2800, vatPence: 467, netPence: 2333 }],
        },
      },
    ]);
    await server.settle();
    const letters = server.mails.filter(({ to }) => to === sofia.email);
    expect(letters.map(({ subject }) => subject)).toEqual([
      'Ostlemere Waters: the payment did not go through',
      expect.stringMatching(/^Ostlemere Waters: ticket \w{3} \w{3} is confirmed$/),
    ]);
    expect(letters[0]?.text).toContain('declined. Nothing was taken');
    expect(letters[1]?.text).toContain('2027-000418');
    expect(letters[1]?.text).toContain('£4.67');
    await expectBooksToAgree();
  });

  test('whose money comes after the hold ran out and the peg was let again is given back in full, with a word of sorrow', async () => {
    const { server, provider } = ground;
    const [late, quick] = await Promise.all([aPerson(server), aPerson(server)]);
    const peg = await ground.freshPeg('FO12');
    const held = await ground.aFilledHold(late, peg);
    const page = await ground.pageOf(late, held.id);
    provider.faults.loseMessages = true;
    await tryCard(page, 'good');
    provider.faults.loseMessages = false;
    server.pass(20 * 60);
    expect(await ground.aFilledHold(quick, peg)).toMatchObject({ status: 'hold' });
    await ground.reconcile();
    expect(await seen(late, held.id)).toMatchObject({
      status: 'expired',
      paidPence: 2800,
      refundedPence: 2800,
      refunds: [{ amountPence: 2800, status: 'queued' }],
    });
    const letter = await server.mailTo(late.email);
    expect(letter.text).toMatch(/given back £28.00|goes back to the card/);
    expect(await seen(late, held.id)).toMatchObject({
      status: 'expired',
      refunds: [{ status: 'done' }],
      receipts: [{ kind: 'receipt' }, { kind: 'credit_note', told: { grossPence: 2800 } }],
    });
    expect(Object.values(provider.kept.refunds).filter(({ amount }) => amount === 2800)).toHaveLength(1);
    await expectBooksToAgree();
  });

  test('asked by its bank holds the peg on to fifteen minutes from the start', async () => {
    const { server } = ground;
    const held = await ground.aFilledHold(sofia, await ground.freshPeg());
    const page = await ground.pageOf(sofia, held.id);
    server.pass(9 * 60 + 50);
    await tryCard(page, 'challenge');
    await ground.quiet();
    expect(await seen(sofia, held.id)).toMatchObject({
      status: 'pending_payment',
      holdUntil: '2027-07-10T18:15:00.000Z',
      payments: [{ status: 'requires_action' }],
    });
    server.pass(160);
    await answerBank(page, true);
    await ground.quiet();
    expect((await seen(sofia, held.id)).status).toBe('confirmed');
  });

  test('answered with no, or without enough money, says so and can be tried again', async () => {
    const held = await ground.aFilledHold(sofia, await ground.freshPeg());
    const page = await ground.pageOf(sofia, held.id);
    await tryCard(page, 'insufficient');
    await ground.quiet();
    expect((await seen(sofia, held.id)).payments[0]?.fault).toContain('not enough money');
    await pause(1100); // tries are told apart by the second of their message, as a person makes them
    await tryCard(page, 'challenge');
    await answerBank(page, false);
    await ground.quiet();
    const refused = await seen(sofia, held.id);
    expect(refused.payments).toMatchObject([
      { status: 'failed', fault: expect.stringContaining('Your bank’s question') },
    ]);
    await tryCard(page, 'good');
    await ground.quiet();
    expect((await seen(sofia, held.id)).status).toBe('confirmed');
  });

  test('that paid while no message came is found by asking, by the reader and by the server itself', async () => {
    ground.provider.faults.loseMessages = true;
    const ids: string[] = [];
    for (const _ of [1, 2]) {
      const held = await ground.aFilledHold(sofia, await ground.freshPeg());
      await tryCard(await ground.pageOf(sofia, held.id), 'good');
      expect((await seen(sofia, held.id)).status).toBe('pending_payment');
      ids.push(held.id);
    }
    const [first = '', second = ''] = ids;
    expect((await looked(sofia, first)).status).toBe('confirmed');
    await ground.reconcile();
    expect(await seen(sofia, second)).toMatchObject({ status: 'confirmed', receipts: [{ kind: 'receipt' }] });
    await expectBooksToAgree();
  });

  test('paid, told by the provider, looked for and run out at one moment comes to one end', async () => {
    const { server } = ground;
    for (let round = 0; round < 2; round += 1) {
      const held = await ground.aFilledHold(sofia, await ground.freshPeg());
      const page = await ground.pageOf(sofia, held.id);
      ground.provider.faults.duplicate = 2;
      server.pass(10 * 60 - 1);
      await Promise.all([
        tryCard(page, 'good'),
        looked(sofia, held.id),
        looked(sofia, held.id),
        ground.reconcile(),
        sofia.delete(`/bookings/${held.id}/hold`),
      ]);
      await ground.quiet();
      await looked(sofia, held.id);
      await server.settle();
      const end = await seen(sofia, held.id);
      const kept = end.paidPence - end.refundedPence;
      expect([end.status, kept]).toEqual(end.status === 'confirmed' ? ['confirmed', 2800] : [end.status, 0]);
      expect(end.receipts.filter(({ kind }) => kind === 'receipt').length).toBeLessThanOrEqual(1);
      server.setNow(EVENING);
    }
    await expectBooksToAgree();
  });

  test('has one page however many windows ask for it, and none once the hold is over', async () => {
    const { server, provider } = ground;
    const held = await ground.aFilledHold(sofia, await ground.freshPeg());
    const pages = await Promise.all([1, 2, 3, 4].map(() => ground.pageOf(sofia, held.id)));
    expect(new Set(pages).size).toBe(1);
    expect(await manager().countBy(Payment, { bookingId: held.id })).toBe(1);
    server.pass(11 * 60);
    const refused = await sofia.post(`/bookings/${held.id}/page`);
    expect([refused.status, problem(refused.body).title]).toEqual([
      409,
      'The time to hold this peg has run out',
    ]);
    await ground.reconcile();
    const session = Object.values(provider.kept.sessions).find(
      ({ client_reference_id: id }) => id === held.id,
    );
    expect(session?.status).toBe('expired');
    expect(await (await fetch(pages[0] ?? '')).text()).toContain('Nothing was taken');
  });

  test('is refused before details are given, to strangers and to others', async () => {
    const held = await ground.aFilledHold(sofia, await ground.freshPeg());
    const other = await aPerson(ground.server);
    expect((await aStranger(ground.server).post(`/bookings/${held.id}/page`)).status).toBe(401);
    expect((await other.post(`/bookings/${held.id}/page`)).status).toBe(404);
    expect((await other.post(`/bookings/${held.id}/look`)).status).toBe(404);
    expect((await ground.here.people.office.post(`/bookings/${held.id}/page`)).status).toBe(403);
  });

  test('waits in words while the provider is away, and pays once it is back', async () => {
    const { provider } = ground;
    const held = await ground.aFilledHold(sofia, await ground.freshPeg());
    provider.faults.failing = 50;
    const away = await sofia.post(`/bookings/${held.id}/page`);
    expect([away.status, problem(away.body).title]).toEqual([
      500,
      'The card provider can’t be reached just now',
    ]);
    provider.faults.failing = 0;
    provider.faults.failingAfter = 1; // done, but the answer gets lost
    const page = await ground.pageOf(sofia, held.id);
    const sessions = Object.values(provider.kept.sessions).filter(
      (each) => each.client_reference_id === held.id,
    );
    expect(sessions).toHaveLength(1);
    await tryCard(page, 'good');
    await ground.quiet();
    expect((await seen(sofia, held.id)).status).toBe('confirmed');
  });
});

describe('a message', () => {
  const post = (body: string, signature: string) =>
    aStranger(ground.server)
      .post('/payments/webhook')
      .set('content-type', 'application/json')
      .set('stripe-signature', signature)
      .send(body);

  test('counts only when it is signed, and not when it is stale', async () => {
    const body = JSON.stringify({
      id: 'evt_x',
      object: 'event',
      type: 'ping',
      created: 1,
      data: { object: {} },
    });
    const nowS = Math.floor(Date.now() / 1000);
    expect((await post(body, signatureOf(body, CARD_SECRET, nowS))).status).toBe(204);
    expect((await post(body, signatureOf(body, 'whsec_of_another', nowS))).status).toBe(400);
    expect((await post(body, signatureOf(body, CARD_SECRET, nowS - 301))).status).toBe(400);
    expect((await post(body, '')).status).toBe(400);
  });

  test('of something that is not ours is heard and changes nothing', () => {
    const message = {
      id: 'evt_y',
      object: 'event',
      type: 'customer.created',
      created: 1,
      data: { object: {} },
    };
    expect(heardFrom(message as unknown as Parameters<typeof heardFrom>[0])).toBeNull();
  });
});
