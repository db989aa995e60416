import type Stripe from 'stripe';
import { z } from 'zod';
import type { Config } from '../config';

/** The card provider’s client. Loaded when first wanted: its library takes a second. */
export type Provider = { stripe: Stripe; webhookSecret: string };

const clients = new WeakMap<Config, Promise<Provider>>();

export const takesCards = ({ cards }: Config): boolean => cards !== null;

/** Null where no cards are taken on the web. */
export async function providerOf(config: Config): Promise<Provider | null> {
  if (!config.cards) return null;
  const known = clients.get(config);
  if (known) return known;
  const opened = open(config.cards);
  clients.set(config, opened);
  opened.catch(() => clients.delete(config));
  return opened;
}

async function open({ secretKey, webhookSecret, url }: NonNullable<Config['cards']>): Promise<Provider> {
  const { default: Stripe } = await import('stripe');
  const stripe = new Stripe(secretKey, {
    ...addressOf(url),
    telemetry: false,
    maxNetworkRetries: 2,
    timeout: 15_000,
  });
  return { stripe, webhookSecret };
}

function addressOf(url: string | null): Pick<Stripe.StripeConfig, 'host' | 'port' | 'protocol'> {
  if (url === null) return {};
  const { hostname, port, protocol } = new URL(url);
  const plain = protocol === 'http:';
  return { host: hostname, port: port || (plain ? 80 : 443), protocol: plain ? 'http' : 'https' };
}

const Refused = z.object({
  type: z.enum(['StripeInvalidRequestError', 'StripeCardError', 'StripeIdempotencyError']),
  code: z.string().optional(),
  message: z.string(),
});

/** Why the provider said no for good; null when it may yet say yes: it was away, slow or busy. */
export function refusalOf(error: unknown): { code: string; words: string } | null {
  const parsed = Refused.safeParse(error);
  return parsed.success ? { code: parsed.data.code ?? '', words: parsed.data.message } : null;
}

type Sent = { body: Buffer; signature: string; receivedAtMs?: number };

/** A message of the provider, once its signature is found good and not older than five minutes; null otherwise. */
export function readMessage(
  { stripe, webhookSecret }: Provider,
  { body, signature, receivedAtMs }: Sent,
): Stripe.Event | null {
  try {
    return stripe.webhooks.constructEvent(body, signature, webhookSecret, undefined, undefined, receivedAtMs);
  } catch {
    return null;
  }
}
