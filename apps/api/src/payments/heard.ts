import type { PaymentEvent } from '@mereward/shared/payments/payment-state';
import type Stripe from 'stripe';
import { declinedWords } from './declined-words';
import type { RefundOutcome } from './settle-refund';

/** What a message of the provider, or its answer when asked, says of one payment. */
export type Heard = {
  id: string; // the message's own: it counts once
  type: string;
  saidAt: Date;
  paymentId: string | null; // ours, where the message bears it
  sessionId: string | null;
  intentId: string | null;
  event: PaymentEvent | null;
  fault: string; // why the card was refused, in words
  refund: HeardRefund | null;
  dispute: HeardDispute | null;
};

export type HeardRefund = {
  providerId: string;
  ours: string | null;
  amountPence: number;
  outcome: RefundOutcome | null;
};
export type HeardDispute = {
  id: string;
  amountPence: number;
  reason: string;
  status: 'open' | 'won' | 'lost';
};

type Object = { id: string } | string | null | undefined;
const idOf = (object: Object): string | null => (typeof object === 'string' ? object : (object?.id ?? null));

const nothing = {
  paymentId: null,
  sessionId: null,
  intentId: null,
  event: null,
  fault: '',
  refund: null,
  dispute: null,
};

/** Null for messages that are about nothing of ours. */
export function heardFrom(message: Stripe.Event): Heard | null {
  const base = { ...nothing, id: message.id, type: message.type, saidAt: new Date(message.created * 1000) };
  switch (message.type) {
    case 'checkout.session.completed':
    case 'checkout.session.async_payment_succeeded':
    case 'checkout.session.expired':
      return { ...base, ...ofSession(message.data.object) };
    case 'payment_intent.succeeded':
    case 'payment_intent.requires_action':
    case 'payment_intent.payment_failed':
      return {
        ...base,
        ...ofIntent(message.data.object, message.type === 'payment_intent.payment_failed', message.created),
      };
    case 'refund.created':
    case 'refund.updated':
    case 'refund.failed':
      return { ...base, ...ofRefund(message.data.object) };
    case 'charge.dispute.created':
    case 'charge.dispute.closed':
      return { ...base, ...ofDispute(message.data.object) };
    default:
      return null;
  }
}

type Told = Partial<Omit<Heard, 'id' | 'type' | 'saidAt'>>;

export function ofSession(session: Stripe.Checkout.Session): Told {
  return {
    paymentId: session.metadata?.payment_id ?? null,
    sessionId: session.id,
    intentId: idOf(session.payment_intent),
    event:
      session.payment_status === 'paid'
        ? { kind: 'captured', amountPence: session.amount_total ?? 0 }
        : session.status === 'expired'
          ? { kind: 'cancelled' }
          : null,
  };
}

/** Tries are told apart by the second in which they were told: the provider does not count them. */
export function ofIntent(intent: Stripe.PaymentIntent, failed: boolean, attempt: number): Told {
  const { status, last_payment_error: error } = intent;
  const refused = failed || (status === 'requires_payment_method' && error !== null);
  return {
    paymentId: intent.metadata.payment_id ?? null,
    intentId: intent.id,
    fault: refused ? declinedWords(error?.decline_code ?? error?.code ?? '') : '',
    event: refused
      ? { kind: 'failed', attempt }
      : status === 'succeeded'
        ? { kind: 'captured', amountPence: intent.amount_received }
        : status === 'requires_action'
          ? { kind: 'requires_action', attempt }
          : null,
  };
}

export function ofRefund(refund: Stripe.Refund): Told & { refund: HeardRefund } {
  return {
    paymentId: refund.metadata?.payment_id ?? null,
    intentId: idOf(refund.payment_intent),
    refund: {
      providerId: refund.id,
      ours: refund.metadata?.refund_id ?? null,
      amountPence: refund.amount,
      outcome: outcomeOf(refund),
    },
  };
}

/** Null while the provider is still at it. */
export function outcomeOf({ id, status, failure_reason: reason }: Stripe.Refund): RefundOutcome | null {
  if (status === 'succeeded') return { kind: 'done', method: 'card_online', providerRef: id };
  if (status === 'failed' || status === 'canceled')
    return { kind: 'failed', fault: refundFaultWords(reason ?? status), providerRef: id };
  return null;
}

/** Why a refund failed, for the office. */
export function refundFaultWords(code: string): string {
  switch (code) {
    case 'expired_or_canceled_card':
    case 'lost_or_stolen_card':
      return 'The card is no longer there. Send it to the angler’s bank account, or hand it over, and mark it given.';
    case 'insufficient_funds':
      return 'There is not enough with the card provider to give it back. Ask again once more card money has come in.';
    case 'charge_already_refunded':
      return 'The provider says that it was given back already. Look at its pages before you give it again.';
    default:
      return 'The card provider could not give it back. Ask again, or give it by hand and mark it given.';
  }
}

function ofDispute(dispute: Stripe.Dispute): Told {
  const { status } = dispute;
  return {
    intentId: idOf(dispute.payment_intent),
    dispute: {
      id: dispute.id,
      amountPence: dispute.amount,
      reason: disputeWords(dispute.reason),
      status: DISPUTE_ENDS[status] ?? 'open',
    },
  };
}

const DISPUTE_ENDS: Readonly<Record<string, 'won' | 'lost'>> = {
  won: 'won',
  warning_closed: 'won',
  lost: 'lost',
};

const DISPUTE_WORDS: Readonly<Record<string, string>> = {
  fraudulent: 'The card’s owner says that they did not pay this.',
  duplicate: 'The card’s owner says that they paid twice.',
  product_not_received: 'The card’s owner says that they could not fish.',
  product_unacceptable: 'The card’s owner says that it was not what they bought.',
  credit_not_processed: 'The card’s owner says that a refund has not come.',
  subscription_canceled: 'The card’s owner says that they had cancelled.',
  unrecognized: 'The card’s owner does not recognise the payment.',
};
const disputeWords = (reason: string): string =>
  DISPUTE_WORDS[reason] ?? 'The card’s owner disputes the payment with their bank.';
