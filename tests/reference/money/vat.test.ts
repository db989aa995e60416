/**
 * Sources, from memory: HM Revenue & Customs, VAT Notice 700 (VAT guide), section 17.5 on rounding a line to the
 * nearest penny, with its examples of 0.86p and 0.34p; VAT fractions as the same guide tables them: 1/6 at 20 %,
 * 7/47 at 17.5 %, 3/23 at 15 %, 1/21 at 5 %. The trade's own examples (£12.00, £28.00 and £18.00 gross at 20 %) are
 * arithmetic. Exact: pence are whole numbers.
 */
import { vatLine, vatOfGross } from '@mereward/shared/money/vat';
import { expect, test } from 'vitest';

test.each([
  [2000, 1, 6],
  [1750, 7, 47],
  [1500, 3, 23],
  [500, 1, 21],
])('VAT at %i hundredths of a per cent is %i parts in %i of the gross', (rateBp, part, whole) => {
  for (let gross = 0; gross < 3000; gross += 1)
    expect(vatOfGross(gross, rateBp)).toBe(Math.floor((2 * gross * part + whole) / (2 * whole)));
});

test('a line’s 0.86p is rounded up to 1p and 0.34p down to none', () => {
  expect(vatOfGross(5, 2000)).toBe(1); // 5p holds 0.83p
  expect(vatOfGross(18, 500)).toBe(1); // 18p holds 0.857p
  expect(vatOfGross(2, 2000)).toBe(0); // 2p holds 0.33p
});

test.each([
  [1200, 200, 1000],
  [2800, 467, 2333],
  [1800, 300, 1500],
])('%i pence at 20 %% hold %i of VAT and %i net', (grossPence, vatPence, netPence) => {
  expect(vatLine(grossPence, 2000)).toEqual({ grossPence, vatPence, netPence, rateBp: 2000 });
});
