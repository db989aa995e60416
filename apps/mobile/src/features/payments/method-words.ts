import type { OfficeMethod } from '@mereward/shared/payments/contract';
import type { PaymentMethod } from '@mereward/shared/payments/payment-state';
import type { Choice } from '@/components/choice-props';

export const METHOD_WORDS: Readonly<Record<PaymentMethod, string>> = {
  card_online: 'Card on the web',
  card_reader: 'Card reader',
  cash: 'Cash',
  bank_transfer: 'Bank transfer',
  credit_note: 'Credit note',
  complimentary: 'Complimentary',
};

/** How the office may have been paid. A complimentary ticket is one that costs nothing. */
export const PAID_BY: readonly Choice<OfficeMethod>[] = (
  ['cash', 'card_reader', 'bank_transfer', 'credit_note'] as const
).map((key) => ({ key, label: METHOD_WORDS[key] }));
