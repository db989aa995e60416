import { existsSync, readFileSync, renameSync, writeFileSync } from 'node:fs';

type Metadata = Record<string, string>;

/** The provider's things, as far as this program speaks of them, in the shapes of Stripe's documented API. */
export type Session = {
  id: string;
  object: 'checkout.session';
  status: 'open' | 'complete' | 'expired';
  payment_status: 'unpaid' | 'paid';
  payment_intent: string | null;
  amount_total: number;
  currency: string;
  metadata: Metadata;
  client_reference_id: string | null;
  success_url: string;
  cancel_url: string;
  expires_at: number;
  created: number;
  url: string | null;
  description: string;
};

export type Intent = {
  id: string;
  object: 'payment_intent';
  status: 'requires_payment_method' | 'requires_action' | 'succeeded' | 'canceled';
  amount: number;
  amount_received: number;
  currency: string;
  metadata: Metadata;
  created: number;
  last_payment_error: { code: string; decline_code: string | null } | null;
};

export type Refund = {
  id: string;
  object: 'refund';
  status: 'succeeded' | 'failed';
  failure_reason: string | null;
  amount: number;
  currency: string;
  payment_intent: string;
  metadata: Metadata;
  created: number;
};

export type Message = {
  id: string;
  object: 'event';
  type: string;
  created: number;
  data: { object: unknown };
};

export type Kept = {
  sessions: Record<string, Session>;
  intents: Record<string, Intent>;
  refunds: Record<string, Refund>;
  messages: Message[]; // oldest first
  answers: Record<string, { asked: string; status: number; body: unknown }>; // by idempotency key
  waiting: { messageId: string; attempt: number }[]; // still to be delivered
};

const nothing = (): Kept => ({
  sessions: {},
  intents: {},
  refunds: {},
  messages: [],
  answers: {},
  waiting: [],
});

const KEPT_MESSAGES = 2000;

/** What is kept outlives the process when there is a file; it is written whole, beside itself, then put in place. */
export function openKept(file: string | null): { kept: Kept; save: () => void } {
  const kept: Kept = file !== null && existsSync(file) ? JSON.parse(readFileSync(file, 'utf8')) : nothing();
  return {
    kept,
    save() {
      kept.messages.splice(0, Math.max(0, kept.messages.length - KEPT_MESSAGES));
      if (file === null) return;
      writeFileSync(`${file}.next`, JSON.stringify(kept));
      renameSync(`${file}.next`, file);
    },
  };
}
