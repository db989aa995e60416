import fc from 'fast-check';
import { expect, test } from 'vitest';
import { sumPence } from '../money/money';
import { vatLine } from '../money/vat';
import { partOfLines, saleLines, type SaleLine } from './line-parts';

const line = (words: string, grossPence: number, rateBp: number): SaleLine => ({
  words,
  grossPence,
  rateBp,
  vatPence: vatLine(grossPence, rateBp).vatPence,
});

test('lines of the same words and rate are told as one', () => {
  const day = { ...line('Day ticket', 1200, 2000), count: 1 };
  expect(saleLines([day, day, { ...line('Extra rod', 400, 2000), count: 1 }])).toEqual([
    { words: '2 × Day ticket', grossPence: 2400, rateBp: 2000, vatPence: 400 },
    { words: 'Extra rod', grossPence: 400, rateBp: 2000, vatPence: 67 },
  ]);
});

test('a whole is given back line for line', () => {
  const whole = [line('24 hours', 2800, 2000)];
  expect(partOfLines(whole, [], 2800)).toEqual(whole);
  expect(whole[0]?.vatPence).toBe(467);
});

test('parts of a sale add up to it, VAT and all, and none has VAT beyond its gross', () => {
  const lines = fc.array(fc.record({ pence: fc.nat(5000), rate: fc.constantFrom(0, 500, 2000, 10_000) }), {
    minLength: 1,
    maxLength: 5,
  });
  fc.assert(
    fc.property(lines, fc.array(fc.nat(10_000), { maxLength: 6 }), (made, cuts) => {
      const whole = made.map(({ pence, rate }, index) => line(`Line ${index}`, pence, rate));
      const total = sumPence(whole.map(({ grossPence }) => grossPence));
      const had: SaleLine[] = [];
      const given = () => sumPence(had.map(({ grossPence }) => grossPence));
      for (const cut of cuts) had.push(...partOfLines(whole, had, Math.min(cut, total - given())));
      had.push(...partOfLines(whole, had, total - given()));
      expect(given()).toBe(total);
      expect(sumPence(had.map(({ vatPence }) => vatPence))).toBe(
        sumPence(whole.map(({ vatPence }) => vatPence)),
      );
      expect(had.every(({ vatPence, grossPence }) => vatPence >= 0 && vatPence <= grossPence)).toBe(true);
    }),
  );
  expect(() => partOfLines([line('Day ticket', 1200, 2000)], [], 1201)).toThrow(RangeError);
});
