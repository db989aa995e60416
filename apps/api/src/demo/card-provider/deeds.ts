import { randomBytes } from 'node:crypto';
import type { Intent, Kept, Message, Refund, Session } from './kept';

export type Ground = {
  kept: Kept;
  save: () => void;
  deliver: (message: Message) => void;
  nowS: () => number;
  address: () => string; // where the pages are
  refundsFail: () => boolean;
};

/** How the provider says no: Stripe's shape of an error. */
export class Refusal extends Error {
  constructor(
    readonly status: number,
    readonly code: string,
    message: string,
  ) {
    super(message);
  }
}

const idOf = (prefix: string): string => `${prefix}_demo_${randomBytes(12).toString('hex')}`;

function tell({ kept, save, deliver, nowS }: Ground, type: string, object: object): void {
  const message: Message = {
    id: idOf('evt'),
    object: 'event',
    type,
    created: nowS(),
    data: { object: structuredClone(object) },
  };
  kept.messages.push(message);
  save();
  deliver(message);
}

export type Asked = Record<string, unknown>;
const text = (value: unknown): string => (typeof value === 'string' ? value : '');
const record = (value: unknown): Record<string, unknown> =>
  typeof value === 'object' && value !== null ? { ...value } : {};
const first = (value: unknown): Record<string, unknown> =>
  record(Array.isArray(value) ? value[0] : record(value)['0']);
const metadataOf = (value: unknown): Record<string, string> =>
  Object.fromEntries(Object.entries(record(value)).map(([key, each]) => [key, text(each)]));

export function makeSession(ground: Ground, asked: Asked): Session {
  const item = first(asked.line_items);
  const price = record(item.price_data);
  const amount = Number(price.unit_amount) * Number(item.quantity ?? 1);
  if (!Number.isSafeInteger(amount) || amount < 30)
    throw new Refusal(400, 'amount_too_small', 'The amount must be at least 30 pence.');
  const id = idOf('cs');
  const session: Session = {
    id,
    object: 'checkout.session',
    status: 'open',
    payment_status: 'unpaid',
    payment_intent: null,
    amount_total: amount,
    currency: text(price.currency),
    metadata: metadataOf(asked.metadata),
    client_reference_id: text(asked.client_reference_id) || null,
    success_url: text(asked.success_url),
    cancel_url: text(asked.cancel_url),
    expires_at: Number(asked.expires_at),
    created: ground.nowS(),
    url: `${ground.address()}/pay/${id}`,
    description: text(record(price.product_data).name),
  };
  ground.kept.sessions[id] = session;
  ground.save();
  return session;
}

export function sessionOf({ kept }: Ground, id: string): Session {
  const session = kept.sessions[id];
  if (!session) throw new Refusal(404, 'resource_missing', `No such checkout.session: ${id}`);
  return session;
}

export function expireSession(ground: Ground, id: string): Session {
  const session = sessionOf(ground, id);
  if (session.status !== 'open')
    throw new Refusal(400, 'checkout_session_not_open', 'Only an open session can be expired.');
  session.status = 'expired';
  session.url = null;
  const intent = session.payment_intent === null ? undefined : ground.kept.intents[session.payment_intent];
  if (intent) intent.status = 'canceled';
  tell(ground, 'checkout.session.expired', session);
  return session;
}

/** Payments of the demo's invented past were never here: any of theirs counts as taken. */
const OF_THE_PAST = /^pi_past_/;

export function intentOf(ground: Ground, id: string): Intent {
  const intent = ground.kept.intents[id];
  if (intent) return intent;
  if (!OF_THE_PAST.test(id)) throw new Refusal(404, 'resource_missing', `No such payment_intent: ${id}`);
  const past: Intent = {
    id,
    object: 'payment_intent',
    status: 'succeeded',
    amount: 100_000_000,
    amount_received: 100_000_000,
    currency: 'gbp',
    metadata: {},
    created: ground.nowS(),
    last_payment_error: null,
  };
  ground.kept.intents[id] = past;
  return past;
}

export const CARDS = {
  good: 'A card that is paid',
  challenge: 'A card whose bank asks first',
  declined: 'A card that is declined',
  insufficient: 'A card with too little money',
} as const;
export type Card = keyof typeof CARDS;
export const isCard = (value: unknown): value is Card => typeof value === 'string' && value in CARDS;

/** One try with a card; answers what the page does next. */
export function tryCard(ground: Ground, sessionId: string, card: Card): 'paid' | 'ask' | 'refused' {
  const session = openSession(ground, sessionId);
  const intent = intentFor(ground, session);
  switch (card) {
    case 'good':
      return pay(ground, session, intent);
    case 'challenge':
      intent.status = 'requires_action';
      intent.last_payment_error = null;
      tell(ground, 'payment_intent.requires_action', intent);
      return 'ask';
    case 'declined':
      return refuse(ground, intent, { code: 'card_declined', decline_code: 'generic_decline' });
    case 'insufficient':
      return refuse(ground, intent, { code: 'card_declined', decline_code: 'insufficient_funds' });
  }
}

/** The bank's question answered. */
export function answerBank(ground: Ground, sessionId: string, yes: boolean): 'paid' | 'refused' {
  const session = openSession(ground, sessionId);
  const intent = intentFor(ground, session);
  if (yes) return pay(ground, session, intent);
  return refuse(ground, intent, { code: 'payment_intent_authentication_failure', decline_code: null });
}

function openSession(ground: Ground, id: string): Session {
  const session = sessionOf(ground, id);
  if (session.status !== 'open') throw new Refusal(400, 'checkout_session_not_open', 'This page is closed.');
  return session;
}

function intentFor({ kept, nowS, save }: Ground, session: Session): Intent {
  const known = session.payment_intent === null ? undefined : kept.intents[session.payment_intent];
  if (known) return known;
  const intent: Intent = {
    id: idOf('pi'),
    object: 'payment_intent',
    status: 'requires_payment_method',
    amount: session.amount_total,
    amount_received: 0,
    currency: session.currency,
    metadata: session.metadata,
    created: nowS(),
    last_payment_error: null,
  };
  kept.intents[intent.id] = intent;
  session.payment_intent = intent.id;
  save();
  return intent;
}

function pay(ground: Ground, session: Session, intent: Intent): 'paid' {
  intent.status = 'succeeded';
  intent.amount_received = intent.amount;
  intent.last_payment_error = null;
  session.status = 'complete';
  session.payment_status = 'paid';
  session.url = null;
  tell(ground, 'payment_intent.succeeded', intent);
  tell(ground, 'checkout.session.completed', session);
  return 'paid';
}

function refuse(ground: Ground, intent: Intent, error: NonNullable<Intent['last_payment_error']>): 'refused' {
  intent.status = 'requires_payment_method';
  intent.last_payment_error = error;
  tell(ground, 'payment_intent.payment_failed', intent);
  return 'refused';
}

export function makeRefund(ground: Ground, asked: Asked): Refund {
  const intent = intentOf(ground, text(asked.payment_intent));
  const amount = Number(asked.amount);
  const back = Object.values(ground.kept.refunds)
    .filter((each) => each.payment_intent === intent.id && each.status === 'succeeded')
    .reduce((sum, each) => sum + each.amount, 0);
  if (intent.status !== 'succeeded' || !Number.isSafeInteger(amount) || amount < 1)
    throw new Refusal(400, 'charge_not_refundable', 'Nothing was taken that could be given back.');
  if (back + amount > intent.amount_received)
    throw new Refusal(400, 'charge_already_refunded', 'That is more than is left of the charge.');
  const refund: Refund = {
    id: idOf('re'),
    object: 'refund',
    status: ground.refundsFail() ? 'failed' : 'succeeded',
    failure_reason: ground.refundsFail() ? 'expired_or_canceled_card' : null,
    amount,
    currency: intent.currency,
    payment_intent: intent.id,
    metadata: metadataOf(asked.metadata),
    created: ground.nowS(),
  };
  ground.kept.refunds[refund.id] = refund;
  tell(ground, refund.status === 'failed' ? 'refund.failed' : 'refund.created', refund);
  return refund;
}

/** A refund that was told as made comes back from the card's bank, as they do days later. */
export function returnRefund(ground: Ground, id: string): Refund {
  const refund = refundOf(ground, id);
  refund.status = 'failed';
  refund.failure_reason = 'lost_or_stolen_card';
  tell(ground, 'refund.failed', refund);
  return refund;
}

export function refundOf({ kept }: Ground, id: string): Refund {
  const refund = kept.refunds[id];
  if (!refund) throw new Refusal(404, 'resource_missing', `No such refund: ${id}`);
  return refund;
}

/** A dispute as a card's owner opens it with their bank, and as it ends. */
export function tellDispute(ground: Ground, asked: Asked): object {
  const intent = intentOf(ground, text(asked.payment_intent));
  const dispute = {
    id: text(asked.id) || idOf('dp'),
    object: 'dispute',
    amount: Number(asked.amount ?? intent.amount_received),
    currency: intent.currency,
    payment_intent: intent.id,
    reason: text(asked.reason) || 'fraudulent',
    status: text(asked.status) || 'needs_response',
    metadata: {},
  };
  const ended = dispute.status === 'won' || dispute.status === 'lost';
  tell(ground, ended ? 'charge.dispute.closed' : 'charge.dispute.created', dispute);
  return dispute;
}
