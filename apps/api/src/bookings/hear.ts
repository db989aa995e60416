import { Dispute } from '@mereward/db/entities/payments/dispute';
import { Payment } from '@mereward/db/entities/payments/payment';
import { Refund } from '@mereward/db/entities/payments/refund';
import { paymentFrom, type PaymentEvent } from '@mereward/shared/payments/payment-state';
import { randomUUID } from 'node:crypto';
import type { EntityManager } from 'typeorm';
import { z } from 'zod';
import type { Ctx } from '../ctx';
import type { Heard, HeardDispute, HeardRefund } from '../payments/heard';
import { writeDeed } from '../payments/ledger';
import { aboutBooking, settleRefund } from '../payments/settle-refund';
import { insertOnce } from '../repeat';
import { extendHold } from './let-go';
import { paid } from './paid';
import { postPaymentFailed } from './post-ticket';
import { lockStay, tell } from './stay';

/**
 * Takes in one message of the card provider, kept once by its id, and does whatever follows from all that was heard of
 * its payment. Told again, late or out of order it changes nothing more.
 */
export async function hear(ctx: Ctx, heard: Heard): Promise<void> {
  const payment = await paymentOf(ctx.tx, heard);
  const { event, fault } = heard;
  if (payment) await lockStay(ctx.tx, payment.bookingId); // booking first, then its payments: so everybody locks
  const fresh: unknown[] = await ctx.tx.query(
    `INSERT INTO provider_event (id, payment_id, type, said_at, received_at, told)
     VALUES ($1, $2, $3, $4, $5, $6) ON CONFLICT DO NOTHING RETURNING id`,
    [heard.id, payment?.id ?? null, heard.type, heard.saidAt, ctx.now, { event, fault }],
  );
  if (fresh.length === 0 || !payment) return;
  await keepReferences(ctx.tx, payment, heard);
  if (heard.event) await settlePayment(ctx, payment.id);
  if (heard.refund) await hearRefund(ctx, payment, heard.refund);
  if (heard.dispute) await hearDispute(ctx, payment, heard.dispute);
}

const Id = z.uuid();

async function paymentOf(
  tx: EntityManager,
  { paymentId, sessionId, intentId }: Heard,
): Promise<Payment | null> {
  const byOurs = Id.safeParse(paymentId);
  const found = byOurs.success ? await tx.findOneBy(Payment, { id: byOurs.data }) : null;
  if (found) return found;
  const bySession = sessionId === null ? null : await tx.findOneBy(Payment, { providerSession: sessionId });
  if (bySession) return bySession;
  return intentId === null ? null : tx.findOneBy(Payment, { providerIntent: intentId });
}

async function keepReferences(
  tx: EntityManager,
  { id }: Payment,
  { sessionId, intentId }: Heard,
): Promise<void> {
  await tx.query(
    `UPDATE payment SET provider_session = coalesce(provider_session, $2), provider_intent = coalesce(provider_intent, $3)
      WHERE id = $1 AND ((provider_session IS NULL AND $2::text IS NOT NULL) OR (provider_intent IS NULL AND $3::text IS NOT NULL))`,
    [id, sessionId, intentId],
  );
}

type Kept = { event: PaymentEvent | null; fault: string };

/** Everything heard of how a payment stands, in the order of its tries. */
export async function keptEvents(tx: EntityManager, paymentId: string): Promise<Kept[]> {
  const rows: { told: Kept }[] = await tx.query(
    'SELECT told FROM provider_event WHERE payment_id = $1 ORDER BY said_at, id',
    [paymentId],
  );
  return rows.map(({ told }) => told);
}

/** Brings a payment to where all that was heard puts it, its booking with it. */
async function settlePayment(ctx: Ctx, paymentId: string): Promise<void> {
  const { tx, now } = ctx;
  const { bookingId } = await tx.findOneByOrFail(Payment, { id: paymentId });
  const stay = await lockStay(tx, bookingId);
  const payment = await tx.findOneOrFail(Payment, {
    where: { id: paymentId },
    lock: { mode: 'pessimistic_write' },
  });
  if (payment.status === 'captured') return;
  const kept = await keptEvents(tx, paymentId);
  const { state } = paymentFrom(kept.flatMap(({ event }) => (event ? [event] : [])));
  const change = {
    status: state,
    takenAt: state === 'captured' ? now : null,
    fault: state === 'failed' ? faultOf(kept) : '',
  };
  await tx.update(Payment, { id: paymentId }, change);
  if (state === 'captured') await paid(ctx, stay, { ...payment, ...change });
  else if (state === 'requires_action') await extendHold(ctx, bookingId);
  else if (state === 'failed' && payment.status !== 'failed') {
    await tell(ctx, bookingId, { kind: 'payment-failed', paymentId, fault: change.fault });
    await postPaymentFailed(ctx, bookingId, change.fault);
  }
}

const attemptOf = ({ event }: Kept): number => (event && 'attempt' in event ? event.attempt : 0);

const faultOf = (kept: readonly Kept[]): string =>
  kept
    .filter(({ event }) => event?.kind === 'failed')
    .reduce<Kept | null>((last, each) => (last && attemptOf(last) > attemptOf(each) ? last : each), null)
    ?.fault ?? '';

/** A refund of ours as it ended; or one made on the provider's own pages, which counts as given all the same. */
async function hearRefund(ctx: Ctx, payment: Payment, told: HeardRefund): Promise<void> {
  if (told.outcome === null) return;
  const refundId = told.ours ?? (await madeElsewhere(ctx, payment, told));
  if (refundId !== null) await settleRefund(ctx, refundId, told.outcome);
}

async function madeElsewhere(ctx: Ctx, payment: Payment, told: HeardRefund): Promise<string | null> {
  const { tx, now } = ctx;
  const cause = `provider:${told.providerId}`;
  const known = await tx.findOneBy(Refund, { paymentId: payment.id, cause });
  if (known) return known.id;
  if (told.outcome?.kind !== 'done') return null;
  const id = randomUUID();
  await tx.insert(Refund, {
    id,
    fisheryId: payment.fisheryId,
    bookingId: payment.bookingId,
    paymentId: payment.id,
    amountPence: told.amountPence,
    cause,
    reason: 'Given back on the card provider’s own pages.',
    status: 'queued',
    askedAt: now,
    fault: '',
  });
  return id;
}

/** Money the card's bank holds back while its owner disputes it, and how that ended. */
async function hearDispute(ctx: Ctx, payment: Payment, told: HeardDispute): Promise<void> {
  const { tx, now } = ctx;
  const { id, amountPence, reason, status } = told;
  const opened = { id, paymentId: payment.id, amountPence, reason, status: 'open', openedAt: now };
  await insertOnce(tx, Dispute, { ...opened, closedAt: null });
  const of = await aboutBooking(tx, payment.bookingId);
  const tags = { method: payment.method };
  const write = (kind: 'dispute_opened' | 'dispute_won' | 'dispute_lost') =>
    writeDeed(ctx, { kind, about: id, of, paymentId: payment.id }, [{ deed: { kind, amountPence }, tags }]);
  await write('dispute_opened');
  if (status === 'open') return;
  await tx.update(Dispute, { id, status: 'open' }, { status, closedAt: now });
  await write(status === 'won' ? 'dispute_won' : 'dispute_lost');
}
