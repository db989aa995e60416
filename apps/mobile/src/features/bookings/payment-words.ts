import type { PaymentView } from '@mereward/shared/payments/contract';

/** The newest try; null before the first. */
export const latestPayment = (payments: readonly PaymentView[]): PaymentView | null =>
  payments.reduce<PaymentView | null>(
    (latest, each) => (latest === null || each.madeAt > latest.madeAt ? each : latest),
    null,
  );

/** How far a payment has come for whoever waits for it. */
export type Stage = 'not paid' | 'challenge' | 'under way' | 'declined';

export function paymentStage(payment: Pick<PaymentView, 'status' | 'fault'> | null): Stage {
  switch (payment?.status) {
    case undefined:
      return 'not paid';
    case 'created':
      return payment?.fault === '' ? 'not paid' : 'declined'; // another card may be tried on the same page
    case 'requires_action':
      return 'challenge';
    case 'authorised':
    case 'captured':
      return 'under way';
    case 'failed':
    case 'cancelled':
      return 'declined';
  }
}
