import { Payment } from '@mereward/db/entities/payments/payment';
import { paymentFrom, type PaymentEvent } from '@mereward/shared/payments/payment-state';
import type Stripe from 'stripe';
import type { EntityManager } from 'typeorm';
import type { Ctx } from '../ctx';
import { ctxOf } from '../http/ctx-of';
import { outOfDeadlock } from '../http/deadlock';
import type { Server } from '../http/server';
import { ofIntent, ofSession, type Heard } from '../payments/heard';
import { isOpen, openPayments } from '../payments/open-payments';
import { refusalOf, type Provider } from '../payments/provider';
import { hear, keptEvents } from './hear';
import { pageOf } from './payment-page';
import { findStay, ranOut } from './stay';

/** Does one deed by itself, in a transaction of its own. */
export const byItself = <T>(server: Server, deed: (ctx: Ctx) => Promise<T>): Promise<T> =>
  outOfDeadlock(() => server.source.transaction((tx) => deed(ctxOf(server, tx))));

/** Asks the provider how the open payments of a booking stand, and does what follows. */
export async function lookAt(server: Server, provider: Provider, bookingId: string): Promise<void> {
  const open = await openPayments(server.source.manager, { bookingId, most: 10 });
  for (const payment of open) await lookAtPayment(server, provider, payment);
}

/** As long as the provider knows an idempotency key again, a page half made can be asked for again. */
const KEY_KNOWN_MS = 20 * 3_600_000;

/**
 * One open payment: whatever a killed process left half done is done to its end, what the provider knows is heard, and
 * a page whose booking no longer waits for it is closed.
 */
export async function lookAtPayment(server: Server, provider: Provider, payment: Payment): Promise<void> {
  const { source, clock } = server;
  const stay = await findStay(source.manager, payment.bookingId);
  const waits = (stay.status === 'hold' || stay.status === 'pending_payment') && !ranOut(stay, clock());
  if (payment.providerSession === null) {
    if (clock().getTime() - payment.madeAt.getTime() > KEY_KNOWN_MS)
      return heardEnd(server, payment, 'never made');
    await pageOf(server, provider, payment);
  }
  const { providerSession } = await source.manager.findOneByOrFail(Payment, { id: payment.id });
  if (providerSession === null) return;
  const session = await askedSession(provider, providerSession, !waits);
  const told = { ...ofSession(session), ...(await newsOf(source.manager, payment.id, session)) };
  await byItself(server, async (ctx) => {
    if (told.event) await hear(ctx, lookedUp(payment, told, ctx.now)); // locks the booking before its payment
    await ctx.tx.update(Payment, { id: payment.id }, { lookedAt: ctx.now });
  });
}

async function askedSession(
  { stripe }: Provider,
  id: string,
  close: boolean,
): Promise<Stripe.Checkout.Session> {
  if (close) {
    try {
      await stripe.checkout.sessions.expire(id);
    } catch (error) {
      if (!refusalOf(error)) throw error; // refused: it was paid or has closed already, as is told below
    }
  }
  return stripe.checkout.sessions.retrieve(id, { expand: ['payment_intent'] });
}

/** What the provider's answer says that was not heard yet. */
async function newsOf(
  tx: EntityManager,
  paymentId: string,
  session: Stripe.Checkout.Session,
): Promise<{ event: PaymentEvent | null; fault?: string }> {
  const ended = ofSession(session).event ?? null;
  const intent = session.payment_intent;
  if (ended || intent === null || typeof intent === 'string') return { event: ended };
  const events = (await keptEvents(tx, paymentId)).flatMap(({ event }) => (event ? [event] : []));
  const latest = Math.max(0, ...events.map((event) => ('attempt' in event ? event.attempt : 0)));
  const { event = null, fault = '' } = ofIntent(intent, false, latest + 1);
  return event?.kind === paymentFrom(events).state ? { event: null } : { event, fault };
}

function lookedUp(payment: Payment, told: Partial<Heard>, now: Date): Heard {
  const event = told.event ?? null;
  const attempt = event && 'attempt' in event ? `:${event.attempt}` : '';
  return {
    id: `looked:${payment.id}:${event?.kind ?? ''}${attempt}`,
    type: 'looked',
    saidAt: now,
    paymentId: payment.id,
    sessionId: told.sessionId ?? null,
    intentId: told.intentId ?? null,
    event,
    fault: told.fault ?? '',
    refund: null,
    dispute: null,
  };
}

/** A payment that can't have come to anything any more. */
const heardEnd = (server: Server, payment: Payment, type: string): Promise<void> =>
  byItself(server, (ctx) =>
    hear(ctx, { ...lookedUp(payment, { event: { kind: 'cancelled' } }, ctx.now), type }),
  );

/** Closes the page of one payment whose booking no longer waits for it. */
export async function closePage(server: Server, provider: Provider, paymentId: string): Promise<void> {
  const payment = await server.source.manager.findOneBy(Payment, { id: paymentId });
  if (payment && isOpen(payment)) await lookAtPayment(server, provider, payment);
}
