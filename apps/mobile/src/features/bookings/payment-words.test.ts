import type { PaymentView } from '@mereward/shared/payments/contract';
import { expect, test } from 'vitest';
import { latestPayment, paymentStage } from './payment-words';

test('the newest try tells how it stands', () => {
  const at = (madeAt: string) => ({ madeAt }) as PaymentView;
  expect(latestPayment([])).toBeNull();
  expect(
    latestPayment([at('2027-07-16T18:01:00Z'), at('2027-07-16T18:05:00Z'), at('2027-07-16T18:03:00Z')])
      ?.madeAt,
  ).toBe('2027-07-16T18:05:00Z');
});

test('a try is called paid by nobody before it is captured, and declined when its bank said no', () => {
  expect(paymentStage(null)).toBe('not paid');
  expect(paymentStage({ status: 'created', fault: '' })).toBe('not paid');
  expect(paymentStage({ status: 'created', fault: 'The card has run out.' })).toBe('declined');
  expect(paymentStage({ status: 'requires_action', fault: '' })).toBe('challenge');
  expect(paymentStage({ status: 'authorised', fault: '' })).toBe('under way');
  expect(paymentStage({ status: 'failed', fault: '' })).toBe('declined');
});
