import { z } from 'zod';
import { Currency } from '../money/money';
import { RefundView } from './contract';
import { PaymentMethod } from './payment-state';

const words = (max: number) => z.string().trim().max(max);
const AmountToGive = z.int().min(1).max(1_000_000_000);

/**
 * POST /api/bookings/:bookingId/refunds. Its holder, the head bailiff and whoever gives more than the office's limit
 * propose; the office up to the limit, a manager and the owner give at once. `id` is the asking's own, so that a
 * repeat changes nothing.
 */
export const AskRefund = z.strictObject({
  id: z.uuid(),
  amountPence: AmountToGive,
  reason: words(300).min(1),
});
export type AskRefund = z.infer<typeof AskRefund>;

/** The refunds an asking came to: one for each payment it is taken from. */
export const RefundList = z.object({ refunds: z.array(RefundView) });
export type RefundList = z.infer<typeof RefundList>;

/**
 * POST /api/refunds/:refundId/decision: a proposed refund is given or declined, never by whoever proposed it. Above
 * the office's limit by a manager or the owner.
 * POST /api/refunds/:refundId/again: a failed one is asked of the provider once more, or given by hand.
 * POST /api/refunds/:refundId/given: handed over in cash or sent from the bank. POST …/seen: a late payment was noted.
 * Each answers the RefundView.
 */
export const DecideRefund = z.strictObject({ approve: z.boolean(), words: words(300) });
export type DecideRefund = z.infer<typeof DecideRefund>;
export const AskRefundAgain = z.strictObject({ by: z.enum(['card', 'hand']) });
export type AskRefundAgain = z.infer<typeof AskRefundAgain>;
export const GiveByHand = z.strictObject({ method: z.enum(['cash', 'bank_transfer', 'card_reader']) });
export type GiveByHand = z.infer<typeof GiveByHand>;

/** What waits for somebody in the office, oldest first. */
export const OfficeQueueKind = z.enum([
  'refund_proposed', // somebody else approves or declines it
  'refund_failed', // the provider said no
  'give_back_by_hand', // cash, bank or card machine: a person does it and says so
  'refund_slow', // asked of the provider over an hour ago, no answer yet
  'paid_too_late', // came after the hold had run out; given back by itself
  'dispute_open', // an angler disputes a payment with their bank
]);
export type OfficeQueueKind = z.infer<typeof OfficeQueueKind>;

export const OfficeQueueItem = z.object({
  kind: OfficeQueueKind,
  id: z.string(), // of the refund, or of the dispute
  bookingId: z.uuid(),
  bookingCode: z.string(),
  holder: z.string(),
  amountPence: z.int(),
  currency: Currency,
  method: PaymentMethod,
  words: z.string(), // what is the matter and what to do
  reason: z.string(), // as it was given
  askedBy: z.string().nullable(), // a name; null: by itself
  since: z.iso.datetime(),
  may: z.object({
    decide: z.boolean(),
    again: z.boolean(),
    given: z.boolean(),
    seen: z.boolean(),
  }),
});
export type OfficeQueueItem = z.infer<typeof OfficeQueueItem>;

/** GET /api/fisheries/:fisheryId/office-queue (head bailiff sees proposals; office and up all). */
export const OfficeQueue = z.object({ items: z.array(OfficeQueueItem) });
export type OfficeQueue = z.infer<typeof OfficeQueue>;

/** GET /api/fisheries/:fisheryId/disputes (office and up), the newest first. Answered at the provider’s own pages. */
export const DisputeView = z.object({
  id: z.string(),
  bookingId: z.uuid(),
  bookingCode: z.string(),
  holder: z.string(),
  amountPence: z.int(),
  currency: Currency,
  reason: z.string(), // in words
  status: z.enum(['open', 'won', 'lost']),
  openedAt: z.iso.datetime(),
  closedAt: z.iso.datetime().nullable(),
});
export type DisputeView = z.infer<typeof DisputeView>;
export const DisputeList = z.object({ disputes: z.array(DisputeView) });
