import type { Asker, Person } from '../support/people';
import { BookingView } from '@mereward/shared/bookings/contract';
import { OfficeQueue, RefundList } from '@mereward/shared/payments/refund-contract';
import { LedgerView, ReceiptList, TakingsView } from '@mereward/shared/payments/takings-contract';
import { RefundView } from '@mereward/shared/payments/contract';
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { aCardGround, tryCard, type CardGround } from '../support/cards';
import { aPerson, aStranger } from '../support/people';

let ground: CardGround;
let sofia: Person;
let elsewhere: Person;

beforeAll(async () => {
  ground = await aCardGround();
  sofia = await aPerson(ground.server, { name: 'Sofia Marsh' });
  elsewhere = await aPerson(ground.server);
});
afterAll(() => ground.close());

const seen = async (id: string): Promise<BookingView> =>
  BookingView.parse((await sofia.get(`/bookings/${id}`)).body);
const taken = (
  who: Asker,
  bookingId: string,
  amountPence: number,
  method = 'cash',
  id: string = randomUUID(),
) => who.post(`/bookings/${bookingId}/taken`).send({ id, method, amountPence });
const ask = (who: Asker, bookingId: string, amountPence: number, id: string = randomUUID()) =>
  who.post(`/bookings/${bookingId}/refunds`).send({ id, amountPence, reason: 'A kind word' });
const queueOf = async (who: Asker): Promise<OfficeQueue['items']> => {
  const answer = await who.get(`/fisheries/${ground.here.id}/office-queue`);
  return OfficeQueue.parse(answer.body).items;
};
const ledger = async (): Promise<LedgerView> =>
  LedgerView.parse((await ground.here.people.office.get(`/fisheries/${ground.here.id}/ledger`)).body);
const standing = async (account: string): Promise<number> =>
  (await ledger()).accounts.find((each) => each.account === account)?.amountPence ?? NaN;

async function aPaidByCard(): Promise<BookingView> {
  const held = await ground.aFilledHold(sofia, await ground.freshPeg());
  await tryCard(await ground.pageOf(sofia, held.id), 'good');
  await ground.quiet();
  return seen(held.id);
}
async function aPaidInCash(): Promise<BookingView> {
  const held = await ground.aFilledHold(sofia, await ground.freshPeg());
  const answer = await taken(ground.here.people.office, held.id, 2800);
  expect(answer.status, JSON.stringify(answer.body)).toBe(201);
  return seen(held.id);
}

describe('money at the lodge', () => {
  test('confirms a held ticket with a receipt and the ledger at once, and is one however often it is sent', async () => {
    const { office } = ground.here.people;
    const held = await ground.aFilledHold(sofia, await ground.freshPeg());
    const tin = await standing('cash_tin');
    const id = randomUUID();
    expect((await taken(office, held.id, 1000)).status).toBe(409);
    const answers = await Promise.all([1, 2, 3].map(() => taken(office, held.id, 2800, 'cash', id)));
    expect(answers.map(({ status }) => status)).toEqual([201, 201, 201]);
    expect(await seen(held.id)).toMatchObject({
      status: 'confirmed',
      paidPence: 2800,
      receipts: [{ kind: 'receipt', told: { method: 'cash', grossPence: 2800 } }],
    });
    expect((await taken(office, held.id, 2800)).status).toBe(409);
    expect((await taken(office, held.id, 2700, 'cash', id)).status).toBe(409);
    expect((await standing('cash_tin')) - tin).toBe(2800);
    expect((await ledger()).sumPence).toBe(0);
  });

  test('is taken by the office and up, and by nobody else', async () => {
    const held = await ground.aFilledHold(sofia, await ground.freshPeg());
    const { bailiff, head_bailiff, member } = ground.here.people;
    expect((await taken(aStranger(ground.server), held.id, 2800)).status).toBe(401);
    expect((await taken(sofia, held.id, 2800)).status).toBe(403);
    expect((await taken(head_bailiff, held.id, 2800)).status).toBe(403);
    for (const who of [member, elsewhere, bailiff])
      expect((await taken(who, held.id, 2800)).status).toBe(404);
  });

  test('closes the card page that was open beside it', async () => {
    const held = await ground.aFilledHold(sofia, await ground.freshPeg());
    const page = await ground.pageOf(sofia, held.id);
    await taken(ground.here.people.office, held.id, 2800);
    await ground.server.settle();
    await ground.quiet();
    expect(await (await fetch(page)).text()).toContain('Nothing was taken');
    expect((await seen(held.id)).payments.map(({ status }) => status).sort()).toEqual([
      'cancelled',
      'captured',
    ]);
  });
});

describe('a refund', () => {
  test('up to the limit is given by the office at once, with a credit note in the row of receipts', async () => {
    const booking = await aPaidByCard();
    const id = randomUUID();
    const answers = await Promise.all(
      [1, 2, 3].map(() => ask(ground.here.people.office, booking.id, 1000, id)),
    );
    expect(answers.map(({ status }) => status)).toEqual([201, 201, 201]);
    await ground.server.settle();
    await ground.quiet();
    const after = await seen(booking.id);
    expect(after.refunds).toMatchObject([{ amountPence: 1000, status: 'done' }]);
    expect(after.receipts).toMatchObject([
      { kind: 'receipt' },
      { kind: 'credit_note', told: { grossPence: 1000, vat: [{ vatPence: 167 }] } },
    ]);
    expect((await ask(ground.here.people.office, booking.id, 1801)).status).toBe(409);
    await ask(ground.here.people.office, booking.id, 1800);
    await ground.server.settle();
    const whole = (await seen(booking.id)).receipts.filter(({ kind }) => kind === 'credit_note');
    expect(whole.flatMap(({ told }) => told.vat).reduce((sum, { vatPence }) => sum + vatPence, 0)).toBe(467);
    expect((await ledger()).sumPence).toBe(0);
  });

  test('of two asked at once for all of it is given once', async () => {
    const booking = await aPaidByCard();
    const answers = await Promise.all(
      [1, 2, 3, 4].map(() => ask(ground.here.people.manager, booking.id, 2800)),
    );
    expect(answers.map(({ status }) => status).sort()).toEqual([201, 409, 409, 409]);
  });

  test('above the limit waits for another who may, and never for who asked', async () => {
    const { office, manager, owner, head_bailiff } = ground.here.people;
    await manager.put(`/fisheries/${ground.here.id}/letting-terms`).send({
      details: {
        ...(await manager.get(`/fisheries/${ground.here.id}/letting-terms`)).body.details,
        officeRefundPence: 1000,
      },
      version: null,
    });
    const booking = await aPaidByCard();
    const [asked] = RefundList.parse((await ask(manager, booking.id, 2000)).body).refunds;
    expect(asked?.status).toBe('proposed');
    const decide = (who: Asker, approve = true) =>
      who.post(`/refunds/${asked?.id}/decision`).send({ approve, words: '' });
    expect((await decide(manager)).status).toBe(403);
    expect((await decide(office)).status).toBe(403);
    expect((await decide(head_bailiff)).status).toBe(403);
    expect((await decide(elsewhere)).status).toBe(404);
    const item = (await queueOf(owner)).find(({ id }) => id === asked?.id);
    expect(item).toMatchObject({ kind: 'refund_proposed', may: { decide: true }, askedBy: 'The manager' });
    expect((await queueOf(manager)).find(({ id }) => id === asked?.id)?.may.decide).toBe(false);
    expect(RefundView.parse((await decide(owner)).body).status).toBe('queued');
    expect((await decide(owner)).status).toBe(200);
    await ground.server.settle();
    expect((await seen(booking.id)).refunds).toMatchObject([{ status: 'done', amountPence: 2000 }]);
  });

  test('is proposed by the head bailiff and the holder, and by no bailiff, member or stranger', async () => {
    const booking = await aPaidByCard();
    const { head_bailiff, bailiff, member, office } = ground.here.people;
    const [proposed] = RefundList.parse((await ask(head_bailiff, booking.id, 500)).body).refunds;
    expect(proposed?.status).toBe('proposed');
    expect(RefundList.parse((await ask(sofia, booking.id, 300)).body).refunds).toMatchObject([
      { status: 'proposed' },
    ]);
    for (const who of [bailiff, member, elsewhere])
      expect((await ask(who, booking.id, 100)).status).toBe(404);
    expect((await ask(aStranger(ground.server), booking.id, 100)).status).toBe(401);
    expect((await ask(office, booking.id, 0)).status).toBe(400);
    const declined = await office
      .post(`/refunds/${proposed?.id}/decision`)
      .send({ approve: false, words: 'Not this time' });
    expect(RefundView.parse(declined.body).status).toBe('declined');
  });

  test('the provider refuses stands in the office’s queue, is told truthfully, and is given by hand', async () => {
    const booking = await aPaidByCard();
    ground.provider.faults.refundsFail = true;
    await ask(ground.here.people.office, booking.id, 900);
    await ground.server.settle();
    ground.provider.faults.refundsFail = false;
    const [failed] = (await seen(booking.id)).refunds;
    expect(failed?.status).toBe('failed');
    expect((await ground.server.mailTo(sofia.email)).text).toContain('still owed to you');
    const { office } = ground.here.people;
    expect((await queueOf(office)).find(({ id }) => id === failed?.id)).toMatchObject({
      kind: 'refund_failed',
      may: { again: true },
    });
    const next = RefundView.parse(
      (await office.post(`/refunds/${failed?.id}/again`).send({ by: 'hand' })).body,
    );
    expect((await queueOf(office)).find(({ id }) => id === next.id)?.kind).toBe('give_back_by_hand');
    const given = () => office.post(`/refunds/${next.id}/given`).send({ method: 'cash' });
    expect(RefundView.parse((await given()).body).status).toBe('done');
    expect((await given()).status).toBe(200);
    expect((await seen(booking.id)).receipts.filter(({ kind }) => kind === 'credit_note')).toHaveLength(1);
    expect((await ledger()).sumPence).toBe(0);
  });

  test('that comes back days later is owed again and given again without a second credit note', async () => {
    const booking = await aPaidByCard();
    await ask(ground.here.people.office, booking.id, 700);
    await ground.server.settle();
    const made = Object.values(ground.provider.kept.refunds).find(({ amount }) => amount === 700);
    const { returnRefund } = await import('@mereward/api/demo/card-provider/deeds');
    returnRefund(ground.provider.ground, made?.id ?? '');
    await ground.quiet();
    const [returned] = (await seen(booking.id)).refunds;
    expect(returned?.status).toBe('failed');
    expect(await standing('credit_owed')).toBe(-700);
    await ground.here.people.office.post(`/refunds/${returned?.id}/again`).send({ by: 'card' });
    await ground.server.settle();
    const after = await seen(booking.id);
    expect(after.refunds).toMatchObject([{ status: 'done', amountPence: 700 }]);
    expect(after.receipts.filter(({ kind }) => kind === 'credit_note')).toHaveLength(1);
    expect(await standing('credit_owed')).toBe(0);
    expect((await ledger()).sumPence).toBe(0);
  });

  test('of cash waits for a hand', async () => {
    const booking = await aPaidInCash();
    const tin = await standing('cash_tin');
    const [refund] = RefundList.parse((await ask(ground.here.people.office, booking.id, 400)).body).refunds;
    await ground.server.settle();
    expect((await seen(booking.id)).refunds).toMatchObject([{ status: 'queued' }]);
    await ground.here.people.office.post(`/refunds/${refund?.id}/given`).send({ method: 'cash' });
    expect((await standing('cash_tin')) - tin).toBe(-400);
  });
});

test('a disputed payment is withheld, stands in the queue, and its end moves it on', async () => {
  const booking = await aPaidByCard();
  const { tellDispute } = await import('@mereward/api/demo/card-provider/deeds');
  const session = Object.values(ground.provider.kept.sessions).find(
    (each) => each.client_reference_id === booking.id,
  );
  const dispute = { payment_intent: session?.payment_intent, id: 'dp_one', amount: 2800 };
  tellDispute(ground.provider.ground, { ...dispute, status: 'needs_response' });
  await ground.quiet();
  const { office } = ground.here.people;
  expect((await queueOf(office)).find(({ id }) => id === 'dp_one')).toMatchObject({ kind: 'dispute_open' });
  expect((await ask(office, booking.id, 100)).status).toBe(409);
  expect(await standing('disputes_open')).toBe(2800);
  tellDispute(ground.provider.ground, { ...dispute, status: 'won' });
  await ground.quiet();
  expect(await standing('disputes_open')).toBe(0);
  expect((await queueOf(office)).some(({ id }) => id === 'dp_one')).toBe(false);
});

describe('what the office reads', () => {
  const days = 'from=2027-07-01&until=2027-07-31';
  const paths = (): string[] => [
    `/fisheries/${ground.here.id}/takings?${days}&by=day`,
    `/fisheries/${ground.here.id}/receipts?${days}`,
    `/fisheries/${ground.here.id}/ledger`,
    `/fisheries/${ground.here.id}/disputes`,
    `/fisheries/${ground.here.id}/bookings.csv?${days}`,
  ];

  test('is for the office, managers and owners alone', async () => {
    const { owner, manager, office, head_bailiff, bailiff, member, angler } = ground.here.people;
    for (const path of paths()) {
      for (const who of [owner, manager, office]) expect((await who.get(path)).status, path).toBe(200);
      for (const who of [head_bailiff, bailiff, member, angler])
        expect((await who.get(path)).status, path).toBe(403);
      expect((await elsewhere.get(path)).status, path).toBe(404);
      expect((await aStranger(ground.server).get(path)).status, path).toBe(401);
    }
  });

  test('agrees: takings however grouped, receipts, and the ledger', async () => {
    const { office } = ground.here.people;
    const totals = [];
    for (const by of ['day', 'month', 'lake', 'ticketType', 'method', 'vatRate']) {
      const answer = await office.get(`/fisheries/${ground.here.id}/takings?${days}&by=${by}`);
      const { total, sums } = TakingsView.parse(answer.body);
      expect(sums.reduce((sum, { keptPence }) => sum + keptPence, 0)).toBe(total.keptPence);
      totals.push([total.keptPence, total.vatPence, total.netPence]);
    }
    expect(new Set(totals.map(String)).size).toBe(1);
    const { receipts } = ReceiptList.parse(
      (await office.get(`/fisheries/${ground.here.id}/receipts?${days}`)).body,
    );
    const told = receipts.reduce(
      (sum, { kind, told: { grossPence } }) => sum + (kind === 'receipt' ? 1 : -1) * grossPence,
      0,
    );
    expect(told).toBe(totals[0]?.[0]);
    expect(-(await standing('ticket_sales')) - (await standing('vat_owed'))).toBe(told);
    const numbers = receipts.map(({ number }) => Number(number.slice(5))).sort((a, b) => a - b);
    expect(numbers).toEqual(numbers.map((_, index) => index + 1));
    const [paper] = receipts;
    const page = await office.get(`/receipts/${paper?.id}/paper`);
    expect(page.text).toContain('GB000000000');
    expect((await elsewhere.get(`/receipts/${paper?.id}/paper`)).status).toBe(404);
    const file = await office.get(`/fisheries/${ground.here.id}/bookings.csv?${days}`);
    expect(file.text.split('\r\n')[0]).toContain('receipt_no,refunded,source');
    expect(file.text).not.toContain('Sofia');
  });
});
