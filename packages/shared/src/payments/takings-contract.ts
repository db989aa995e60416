import { z } from 'zod';
import { Currency } from '../money/money';
import { ReceiptView } from './contract';
import { LedgerAccount } from './ledger';

export const TakingsKey = z.enum(['day', 'month', 'lake', 'ticketType', 'method', 'vatRate']);
export type TakingsKey = z.infer<typeof TakingsKey>;

/** Days at the fishery, both counted; at most 400 at once. */
export const DaysAsked = z
  .object({ from: z.iso.date(), until: z.iso.date() })
  .refine(({ from, until }) => from <= until, {
    error: 'The last day comes before the first',
    path: ['until'],
  })
  .refine(({ from, until }) => (Date.parse(until) - Date.parse(from)) / 86_400_000 < 400, {
    error: 'Ask for at most 400 days at once',
    path: ['until'],
  });
export type DaysAsked = z.infer<typeof DaysAsked>;

/** GET /api/fisheries/:fisheryId/takings?from=…&until=…&by=… (office, manager, owner). */
export const TakingsAsked = z.intersection(DaysAsked, z.object({ by: TakingsKey }));
export type TakingsAsked = z.infer<typeof TakingsAsked>;

/** Pence. What was sold and given back on these days, whatever day it was for. */
export const TakingsSumView = z.object({
  key: z.string(),
  words: z.string(), // the key as a person reads it
  sales: z.int(),
  soldPence: z.int(),
  refundedPence: z.int(), // above nought
  keptPence: z.int(),
  vatPence: z.int(),
  netPence: z.int(),
});
export type TakingsSumView = z.infer<typeof TakingsSumView>;
export const TakingsView = z.object({
  currency: Currency,
  sums: z.array(TakingsSumView),
  total: TakingsSumView,
});
export type TakingsView = z.infer<typeof TakingsView>;

/** GET /api/fisheries/:fisheryId/receipts?from=…&until=… (office and up), the newest first. */
export const ReceiptListItem = ReceiptView.extend({
  bookingId: z.uuid(),
  bookingCode: z.string(),
  holder: z.string(),
});
export type ReceiptListItem = z.infer<typeof ReceiptListItem>;
export const ReceiptList = z.object({ receipts: z.array(ReceiptListItem) });
export type ReceiptList = z.infer<typeof ReceiptList>;

/**
 * GET /api/receipts/:receiptId/paper: the receipt as a page to print (HTML), for the booking's holder and the office.
 * GET /api/fisheries/:fisheryId/bookings.csv?from=…&until=…: bookings that begin then, for a spreadsheet (office and up).
 * GET /api/fisheries/:fisheryId/ledger (office and up): what stands on each account now. It comes to nought.
 */
export const LedgerView = z.object({
  currency: Currency,
  accounts: z.array(
    z.object({ account: LedgerAccount, words: z.string(), amountPence: z.int() }), // debit above nought
  ),
  sumPence: z.int(), // always nought
});
export type LedgerView = z.infer<typeof LedgerView>;
