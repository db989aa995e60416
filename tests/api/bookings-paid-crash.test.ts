import { BookingView } from '@mereward/shared/bookings/contract';
import type { ChildProcess } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { setTimeout as pause } from 'node:timers/promises';
import { freePort } from '../../scripts/lib/port.mjs';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { aCardGround, CARD_KEY, CARD_SECRET, tryCard, type CardGround } from '../support/cards';
import { aProcessOn, killed, until } from '../support/killed-server';
import { aPerson, type Person } from '../support/people';

let ground: CardGround;
let sofia: Person;
let folder: string;
let port: number;
const started: ChildProcess[] = [];

beforeAll(async () => {
  ground = await aCardGround();
  sofia = await aPerson(ground.server, { name: 'Sofia Marsh' });
  folder = mkdtempSync(join(tmpdir(), 'mereward-clock-'));
  writeFileSync(join(folder, 'clock'), ground.server.server.clock().toISOString());
  port = await freePort();
  ground.provider.sendTo(`http://127.0.0.1:${port}/api/payments/webhook`);
});
afterAll(async () => {
  for (const child of started) await killed(child);
  rmSync(folder, { recursive: true, force: true });
  await ground.close();
});

/** The real server in a process of its own, which hears the provider and can be killed. */
async function aServerToKill(): Promise<ChildProcess> {
  const child = aProcessOn(ground.server, {
    PORT: String(port),
    CLOCK_FILE: join(folder, 'clock'),
    STRIPE_SECRET_KEY: CARD_KEY,
    STRIPE_WEBHOOK_SECRET: CARD_SECRET,
    STRIPE_URL: ground.provider.url,
  });
  started.push(child);
  await until(async () =>
    fetch(`http://127.0.0.1:${port}/api/ready`).then(
      ({ ok }) => ok,
      () => false,
    ),
  );
  return child;
}

const seen = async (id: string): Promise<BookingView> =>
  BookingView.parse((await sofia.get(`/bookings/${id}`)).body);

test('a server killed while money is told leaves nobody charged without a ticket, and no refund given twice', async () => {
  const paid: string[] = [];
  const payAndKill = async (afterMs: number): Promise<void> => {
    const held = await ground.aFilledHold(sofia, await ground.freshPeg());
    const page = await ground.pageOf(sofia, held.id);
    const child = await aServerToKill();
    await tryCard(page, 'good');
    await pause(afterMs);
    await killed(child);
    paid.push(held.id);
  };
  await payAndKill(0);
  await payAndKill(40);
  const dead = await ground.aFilledHold(sofia, await ground.freshPeg());
  await tryCard(await ground.pageOf(sofia, dead.id), 'good'); // nobody hears it
  paid.push(dead.id);

  const child = await aServerToKill();
  await until(async () => {
    const states = await Promise.all(paid.map(seen));
    return states.every(({ status }) => status === 'confirmed');
  });
  for (const id of paid)
    expect(await seen(id)).toMatchObject({ paidPence: 2800, refunds: [], receipts: [{ kind: 'receipt' }] });

  ground.provider.faults.slowMs = 1500;
  const [first = ''] = paid;
  await ground.here.people.office
    .post(`/bookings/${first}/refunds`)
    .send({ id: crypto.randomUUID(), amountPence: 1000, reason: 'A kind word' });
  await pause(1200);
  await killed(child);
  ground.provider.faults.slowMs = 0;
  await aServerToKill();
  await until(async () => (await seen(first)).refunds.every(({ status }) => status === 'done'));
  const given = Object.values(ground.provider.kept.refunds).filter(({ amount }) => amount === 1000);
  expect(given).toHaveLength(1);
  expect((await seen(first)).receipts.filter(({ kind }) => kind === 'credit_note')).toHaveLength(1);
}, 240_000);
