import { z } from 'zod';
import { PaymentMethod, PaymentState } from './payment-state';

/** How the office may have been paid; cards on the web go through the provider's page. */
export const OfficeMethod = PaymentMethod.exclude(['card_online']);
export type OfficeMethod = z.infer<typeof OfficeMethod>;

export const RefundStatus = z.enum(['proposed', 'queued', 'done', 'failed', 'declined']);
export type RefundStatus = z.infer<typeof RefundStatus>;

/** VAT by rate, as a receipt must show it. `rateBp` is hundredths of a per cent: 2000 is 20 %. */
export const VatLineView = z.object({
  rateBp: z.int(),
  grossPence: z.int(),
  vatPence: z.int(),
  netPence: z.int(),
});

/** What a receipt or a credit note says, kept as it was printed. It names no customer: up to £250 none is asked for. */
export const ReceiptTold = z.object({
  seller: z.object({ name: z.string(), address: z.string(), vatNumber: z.string() }),
  description: z.string(),
  currency: z.string(),
  lines: z.array(z.object({ words: z.string(), grossPence: z.int(), rateBp: z.int(), vatPence: z.int() })),
  vat: z.array(VatLineView),
  grossPence: z.int(),
  method: PaymentMethod,
});
export type ReceiptTold = z.infer<typeof ReceiptTold>;

export const ReceiptView = z.object({
  id: z.uuid(),
  number: z.string(), // 2027-000418
  kind: z.enum(['receipt', 'credit_note']),
  taxPoint: z.iso.date(),
  issuedAt: z.iso.datetime(),
  told: ReceiptTold,
});
export type ReceiptView = z.infer<typeof ReceiptView>;

export const PaymentView = z.object({
  id: z.uuid(),
  method: PaymentMethod,
  amountPence: z.int(),
  currency: z.string(),
  status: PaymentState,
  pageUrl: z.string().nullable(), // the provider's page, while it can still be paid there
  fault: z.string(), // why the provider said no, in words
  madeAt: z.iso.datetime(),
  takenAt: z.iso.datetime().nullable(),
});
export type PaymentView = z.infer<typeof PaymentView>;

export const RefundView = z.object({
  id: z.uuid(),
  bookingId: z.uuid(),
  amountPence: z.int(),
  currency: z.string(),
  reason: z.string(),
  status: RefundStatus,
  askedAt: z.iso.datetime(),
  doneAt: z.iso.datetime().nullable(),
  fault: z.string(),
});
export type RefundView = z.infer<typeof RefundView>;
