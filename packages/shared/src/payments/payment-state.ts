import { z } from 'zod';
import { sumPence } from '../money/money';

export const PaymentMethod = z.enum([
  'card_online',
  'card_reader',
  'cash',
  'bank_transfer',
  'credit_note',
  'complimentary',
]);
export type PaymentMethod = z.infer<typeof PaymentMethod>;

export const PaymentState = z.enum([
  'created',
  'requires_action',
  'authorised',
  'captured',
  'failed',
  'cancelled',
]);
export type PaymentState = z.infer<typeof PaymentState>;

/**
 * What was heard of one payment, from its provider or from the till. `attempt` counts the tries with one card or
 * another, from 1. A refund and a dispute are told apart by their own ids. Amounts in pence, above nought.
 */
export type PaymentEvent =
  | { kind: 'requires_action' | 'authorised' | 'failed'; attempt: number }
  | { kind: 'captured'; amountPence: number }
  | { kind: 'cancelled' }
  | { kind: 'refunded'; refundId: string; amountPence: number }
  | { kind: 'refund_failed'; refundId: string }
  | { kind: 'dispute_opened'; disputeId: string; amountPence: number }
  | { kind: 'dispute_won' | 'dispute_lost'; disputeId: string };

export type Payment = {
  state: PaymentState;
  capturedPence: number;
  refundedPence: number;
  refund: 'none' | 'part' | 'full';
  failedRefunds: string[]; // ids, for the office to look at
  disputedPence: number; // withheld while it is open
  lostPence: number; // by disputes
};

/**
 * Where a payment stands by all that was heard of it. It looks at the set of events and never at their order, so one
 * told three times, or after what followed it, changes nothing: money taken outweighs all else, an end outweighs what
 * led to it, the latest attempt outweighs the earlier. A refund that failed after it was told as made counts as failed.
 */
export function paymentFrom(events: readonly PaymentEvent[]): Payment {
  const capturedPence = Math.max(
    0,
    ...events.map((each) => (each.kind === 'captured' ? each.amountPence : 0)),
  );
  const failed = new Set(events.flatMap((each) => (each.kind === 'refund_failed' ? [each.refundId] : [])));
  const refundedPence = sumPence(
    [...amountsById(events, 'refunded')].flatMap(([id, pence]) => (failed.has(id) ? [] : [pence])),
  );
  const disputes = [...amountsById(events, 'dispute_opened')];
  const ended = (kind: 'dispute_won' | 'dispute_lost', id: string): boolean =>
    events.some((each) => each.kind === kind && each.disputeId === id);
  const lost = disputes.filter(([id]) => ended('dispute_lost', id));
  const open = disputes.filter(([id]) => !ended('dispute_lost', id) && !ended('dispute_won', id));
  return {
    state: stateFrom(events, capturedPence),
    capturedPence,
    refundedPence,
    refund: refundedPence === 0 ? 'none' : refundedPence < capturedPence ? 'part' : 'full',
    failedRefunds: [...failed].sort(),
    disputedPence: sumPence(open.map(([, pence]) => pence)),
    lostPence: sumPence(lost.map(([, pence]) => pence)),
  };
}

function amountsById(
  events: readonly PaymentEvent[],
  kind: 'refunded' | 'dispute_opened',
): Map<string, number> {
  const amounts = new Map<string, number>();
  for (const each of events) {
    if (each.kind !== kind) continue;
    const id = each.kind === 'refunded' ? each.refundId : each.disputeId;
    amounts.set(id, Math.max(amounts.get(id) ?? 0, each.amountPence));
  }
  return amounts;
}

/** Within one attempt the later of these outweighs the earlier. */
const ATTEMPT_ORDER = ['requires_action', 'authorised', 'failed'] as const;

function stateFrom(events: readonly PaymentEvent[], capturedPence: number): PaymentState {
  if (capturedPence > 0) return 'captured';
  if (events.some(({ kind }) => kind === 'cancelled')) return 'cancelled';
  const tries = events.flatMap((each) =>
    each.kind === 'requires_action' || each.kind === 'authorised' || each.kind === 'failed' ? [each] : [],
  );
  const latest = Math.max(0, ...tries.map(({ attempt }) => attempt));
  const kinds = new Set(tries.filter(({ attempt }) => attempt === latest).map(({ kind }) => kind));
  return [...ATTEMPT_ORDER].reverse().find((kind) => kinds.has(kind)) ?? 'created';
}

/** What is left that could still be given back, pence: never more than was taken. */
export const refundablePence = ({
  capturedPence,
  refundedPence,
  disputedPence,
  lostPence,
}: Payment): number => Math.max(0, capturedPence - refundedPence - disputedPence - lostPence);

/** What to do about money that comes for a booking that may have run out. */
export function onCaptured(
  booking: 'waiting' | 'ran_out_peg_free' | 'ran_out_peg_gone',
): 'confirm' | 'refund_all' {
  return booking === 'ran_out_peg_gone' ? 'refund_all' : 'confirm';
}
