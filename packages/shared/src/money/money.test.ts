import fc from 'fast-check';
import { expect, test } from 'vitest';
import { decimalAmount, MOST_PENCE, moneyWords, sumMoney, sumPence } from './money';
import { shareOf, sharePence } from './sharing';
import { vatByRate, vatLine, vatOfGross } from './vat';

const pence = fc.integer({ min: -MOST_PENCE, max: MOST_PENCE });

test('money is added in one currency and in whole pence only', () => {
  expect(sumPence([1200, -200, 0])).toBe(1000);
  expect(sumPence([])).toBe(0);
  expect(() => sumPence([0.5])).toThrow(RangeError);
  expect(sumMoney([{ pence: 1200, currency: 'GBP' }], 'GBP')).toEqual({ pence: 1200, currency: 'GBP' });
  expect(() => sumMoney([{ pence: 1200, currency: 'EUR' }], 'GBP')).toThrow('another currency');
});

test('an amount is written with its sign, its thousands and two places', () => {
  expect(moneyWords(2800)).toBe('£28.00');
  expect(moneyWords(-467)).toBe('−£4.67');
  expect(moneyWords(123_456_789, 'EUR')).toBe('€1,234,567.89');
  expect(moneyWords(5, 'CHF')).toBe('CHF 0.05');
  expect([decimalAmount(123_456), decimalAmount(-7)]).toEqual(['1234.56', '-0.07']);
});

test('VAT and net make the gross at any rate, and a refund carries the VAT its sale did', () => {
  fc.assert(
    fc.property(pence, fc.integer({ min: 0, max: 10_000 }), (gross, rateBp) => {
      const line = vatLine(gross, rateBp);
      expect(line.netPence + line.vatPence).toBe(gross);
      expect(Math.abs(line.vatPence - (gross * rateBp) / (10_000 + rateBp))).toBeLessThanOrEqual(0.5 + 1e-6);
      expect(vatOfGross(-gross, rateBp) + line.vatPence).toBe(0);
    }),
  );
  expect(() => vatOfGross(100, -1)).toThrow(RangeError);
  expect(() => vatOfGross(100, 2000.5)).toThrow(RangeError);
});

test('lines are rounded each by itself, then added by rate', () => {
  const lines = [vatLine(1, 2000), vatLine(3, 2000), vatLine(3, 2000), vatLine(105, 500)];
  expect(lines.map((line) => line.vatPence)).toEqual([0, 1, 1, 5]); // 0.17, 0.5, 0.5, 5
  expect(vatByRate(lines)).toEqual([
    { grossPence: 7, netPence: 5, vatPence: 2, rateBp: 2000 },
    { grossPence: 105, netPence: 100, vatPence: 5, rateBp: 500 },
  ]);
});

test('parts add up to what was shared and none is a penny away from its exact share', () => {
  fc.assert(
    fc.property(pence, fc.array(fc.nat(1000), { minLength: 1, maxLength: 20 }), (amount, weights) => {
      const whole = weights.reduce((sum, each) => sum + each, 0);
      fc.pre(whole > 0);
      const parts = sharePence(amount, weights);
      expect(sumPence(parts)).toBe(amount);
      parts.forEach((part, index) => {
        expect(Math.abs(part - (amount * (weights[index] ?? 0)) / whole)).toBeLessThan(1);
      });
    }),
  );
});

test('an odd penny goes to the earlier of two equal shares, and nothing can be shared with nobody', () => {
  expect(sharePence(100, [1, 1, 1])).toEqual([34, 33, 33]);
  expect(sharePence(-100, [1, 1, 1])).toEqual([-34, -33, -33]);
  expect(sharePence(0, [0, 0])).toEqual([0, 0]);
  expect(() => sharePence(1, [0, 0])).toThrow(RangeError);
  expect(() => sharePence(1, [0.5])).toThrow(RangeError);
});

test('half of an odd amount is rounded up', () => {
  expect(shareOf(2801, 5000)).toBe(1401);
  expect(shareOf(2801, 10_000)).toBe(2801);
  expect(shareOf(-2801, 5000)).toBe(-1401);
  expect(() => shareOf(1, 10_001)).toThrow(RangeError);
});
