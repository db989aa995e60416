import { Payment } from '@mereward/db/entities/payments/payment';
import { sumPence } from '@mereward/shared/money/money';
import { Problem } from '@mereward/shared/problems/problem';
import { randomUUID } from 'node:crypto';
import type Stripe from 'stripe';
import { accountOf, type Ctx } from '../ctx';
import { outOfDeadlock } from '../http/deadlock';
import type { Server } from '../http/server';
import { isOpen } from '../payments/open-payments';
import { refusalOf, type Provider } from '../payments/provider';
import { allow, lockBooking } from './access';
import { refuseIncomplete, refuseOver } from './fill-in';
import { saleWords } from './sale-words';
import { findStay, step } from './stay';

/**
 * The first of three steps to a page to pay on: a payment in our own books, before anybody outside is asked. The same
 * unpaid amount keeps its payment, so that two windows come to one page.
 */
export async function openPayment(ctx: Ctx, bookingId: string): Promise<Payment> {
  const { tx, now } = ctx;
  const { stay, standing } = await lockBooking(ctx, bookingId);
  allow(standing.holder, 'whoever holds the ticket');
  if (!ctx.takesCards)
    throw new Problem('conflict', 'No cards are taken here on the web', {
      detail: 'Ask the fishery’s office how to pay.',
    });
  refuseOver(stay, now);
  await refuseIncomplete(ctx, stay, false);
  const payments = await tx.findBy(Payment, { bookingId });
  const taken = payments.flatMap(({ status, amountPence }) => (status === 'captured' ? [amountPence] : []));
  const amountPence = stay.grossPence - sumPence(taken);
  if (amountPence <= 0)
    throw new Problem('conflict', 'There is nothing to pay', {
      detail: 'Go back to the booking: it can be confirmed without paying.',
    });
  const open = payments.find((each) => isOpen(each) && each.amountPence === amountPence);
  if (open) return open;
  const payment = tx.create(Payment, {
    id: randomUUID(),
    fisheryId: stay.fisheryId,
    bookingId,
    method: 'card_online',
    amountPence,
    currency: stay.currency,
    status: 'created',
    providerSession: null,
    providerIntent: null,
    pageUrl: null,
    madeBy: accountOf(ctx.actor),
    madeAt: now,
    takenAt: null,
    lookedAt: null,
    fault: '',
  });
  await tx.insert(Payment, payment);
  if (stay.status === 'hold') await step(ctx, stay, { to: 'pending_payment', kind: 'paying' });
  return payment;
}

/** The provider closes a page by itself after an hour; we close it when the hold runs out. */
const PAGE_OPEN_S = 60 * 60;

/** The second and the third: the provider makes the page, once for each payment, and its address is kept. */
export async function pageOf(server: Server, { stripe }: Provider, payment: Payment): Promise<string> {
  if (payment.pageUrl !== null) return payment.pageUrl;
  const asked = await whatIsPaid(server, payment);
  const session = await orInWords(stripe.checkout.sessions.create(asked, { idempotencyKey: payment.id }));
  const url = session.url ?? '';
  await outOfDeadlock(() =>
    server.source.transaction((tx) =>
      tx.query(
        `UPDATE payment SET provider_session = $2, page_url = nullif($3, '') WHERE id = $1 AND page_url IS NULL`,
        [payment.id, session.id, url],
      ),
    ),
  );
  return url;
}

async function whatIsPaid(
  { source, config }: Server,
  payment: Payment,
): Promise<Stripe.Checkout.SessionCreateParams> {
  const stay = await findStay(source.manager, payment.bookingId);
  const back = `${config.publicUrl}/tickets/bookings/${payment.bookingId}`;
  const metadata = { payment_id: payment.id };
  return {
    mode: 'payment',
    client_reference_id: payment.bookingId,
    success_url: back,
    cancel_url: back,
    expires_at: Math.floor(payment.madeAt.getTime() / 1000) + PAGE_OPEN_S,
    metadata,
    payment_intent_data: { metadata },
    line_items: [
      {
        quantity: 1,
        price_data: {
          currency: payment.currency.toLowerCase(),
          unit_amount: payment.amountPence,
          product_data: { name: await saleWords(source.manager, stay) },
        },
      },
    ],
  };
}

async function orInWords<T>(asked: Promise<T>): Promise<T> {
  try {
    return await asked;
  } catch (error) {
    const refusal = refusalOf(error);
    if (refusal)
      throw new Problem('conflict', 'The card provider did not open a page to pay on', {
        detail: `Nothing was taken. It said: ${refusal.words} Ask the fishery’s office how to pay.`,
      });
    throw new Problem('internal', 'The card provider can’t be reached just now', {
      detail: 'Nothing was taken, and your peg is still held. Try again in a minute.',
    });
  }
}
