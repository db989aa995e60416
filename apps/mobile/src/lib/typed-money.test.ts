import { assert, integer, property } from 'fast-check';
import { expect, test } from 'vitest';
import { penceTyped, typedPence, typedPounds } from './typed-money';

test('an amount is read with and without pence, sign and comma', () => {
  expect(['28', '28.5', '28.50', '£28.50', ' 0,05 '].map(penceTyped)).toEqual([2800, 2850, 2850, 2850, 5]);
});

test('what is no amount is refused, never rounded', () => {
  expect(['', '-1', '28.505', '1,000.00', 'free', '1e3'].map(penceTyped)).toEqual(
    Array.from({ length: 6 }, () => null),
  );
});

test('what is written is read back', () => {
  assert(
    property(integer({ min: 0, max: 1_000_000_000 }), (pence) => {
      expect(penceTyped(typedPounds(pence))).toBe(pence);
    }),
  );
});

test('a fault says what is wanted', () => {
  const read = typedPence('The price').safeParse('cheap');
  expect(read.error?.issues[0]?.message).toBe('The price is an amount like 28.00');
});
