import { expect, test } from 'vitest';
import { paidWords } from './paid-words';

const money = { grossPence: 2800, paidPence: 0, refundedPence: 0, currency: 'GBP' };

test('what is paid, what went back and what is left are each said once', () => {
  expect(paidWords(money)).toBe('£28.00 to pay');
  expect(paidWords({ ...money, paidPence: 2800 })).toBe('£28.00 paid');
  expect(paidWords({ ...money, paidPence: 2800, refundedPence: 1400 })).toBe('£28.00 paid, £14.00 back');
  expect(paidWords({ ...money, paidPence: 1000 })).toBe('£10.00 paid, £18.00 to pay');
  expect(paidWords({ ...money, grossPence: 0 })).toBe('nothing to pay');
});
