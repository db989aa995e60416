import type pino from 'pino';
import type Stripe from 'stripe';
import { z } from 'zod';
import type { Server } from '../http/server';
import type { Handler } from '../jobs/worker';
import { heardFrom } from '../payments/heard';
import { providerOf, type Provider } from '../payments/provider';
import { hear } from './hear';
import { byItself, closePage, lookAtPayment } from './look';
import { openPayments } from '../payments/open-payments';

const CloseJob = z.strictObject({ paymentId: z.uuid() });

/** Closes a page to pay on whose booking no longer waits for it. */
export const closePageJob: Handler = async ({ payload }, server) => {
  const { paymentId } = CloseJob.parse(payload);
  const provider = await providerOf(server.config);
  if (provider) await closePage(server, provider, paymentId);
};

const AT_ONCE = 100;
const OVERLAP_MS = 3_600_000;
const NEVER_HEARD_MS = 3 * 86_400_000;
const MOST_MESSAGES = 5000;

/**
 * What may have been missed: messages of the provider that never came, and payments that have not ended. Nobody is
 * then charged without a ticket or a refund, whatever was down and for how long.
 */
export async function reconcile(server: Server, logger: pino.Logger): Promise<void> {
  const provider = await providerOf(server.config);
  if (!provider) return;
  await hearMissed(server, provider);
  for (const payment of await openPayments(server.source.manager, { bookingId: null, most: AT_ONCE }))
    await lookAtPayment(server, provider, payment).catch((err: unknown) =>
      logger.error({ err, payment: payment.id }, 'a payment could not be looked at'),
    );
}

async function hearMissed(server: Server, { stripe }: Provider): Promise<void> {
  const { manager } = server.source;
  const [row]: { at: Date | null }[] = await manager.query(
    `SELECT max(said_at) AS at FROM provider_event WHERE type <> 'looked'`,
  );
  const since = row?.at ? row.at.getTime() - OVERLAP_MS : Date.parse(await nowOf(server)) - NEVER_HEARD_MS;
  const messages: Stripe.Event[] = [];
  const created = { gte: Math.floor(since / 1000) };
  for await (const message of stripe.events.list({ created, limit: 100 })) {
    messages.push(message);
    if (messages.length >= MOST_MESSAGES) break;
  }
  const known: { id: string }[] = await manager.query('SELECT id FROM provider_event WHERE id = ANY ($1)', [
    messages.map(({ id }) => id),
  ]);
  const before = new Set(known.map(({ id }) => id));
  for (const message of messages.reverse()) {
    const heard = before.has(message.id) ? null : heardFrom(message);
    if (heard) await byItself(server, (ctx) => hear(ctx, heard));
  }
}

/** The database's own clock: what the provider says bears the world's time, whatever this server takes for now. */
async function nowOf({ source }: Server): Promise<string> {
  const [row]: { now: string }[] = await source.query('SELECT now()::text AS now');
  return row?.now ?? '';
}

const EVERY_S = 120;

/** Reconciles now and every two minutes, never twice at once; answers how to stop. */
export function watchPayments(server: Server, logger: pino.Logger): () => void {
  let busy = false;
  const look = () => {
    if (busy) return;
    busy = true;
    reconcile(server, logger)
      .catch((err: unknown) => logger.error({ err }, 'payments could not be looked at'))
      .finally(() => {
        busy = false;
      });
  };
  look();
  const timer = setInterval(look, EVERY_S * 1000);
  timer.unref();
  return () => clearInterval(timer);
}
