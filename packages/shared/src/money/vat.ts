import { z } from 'zod';
import { wholePence } from './money';

/** A rate of VAT in basis points, hundredths of a per cent: 2000 is 20 %. */
export const VatRateBp = z.int().min(0).max(10_000);

/**
 * What VAT is charged at, set by the owner for each kind of ticket and never guessed: exempt and outside the scope
 * carry none, zero-rated carries nought of it.
 */
export const VatCode = z.enum(['standard', 'reduced', 'zero', 'exempt', 'outside_scope']);
export type VatCode = z.infer<typeof VatCode>;

/**
 * VAT contained in a gross price, whole pence, rounded half up once for the line. A refund's is the sale's with its
 * sign turned. `grossPence` × rate / (1 + rate), in whole numbers. Throws RangeError for part pence or a rate below 0.
 * Source: HM Revenue & Customs, VAT Notice 700, section 17.5 (lines may be rounded to the nearest penny); the VAT
 * fraction of 20 % is 1/6. From memory.
 */
export function vatOfGross(grossPence: number, rateBp: number): number {
  if (!Number.isInteger(rateBp) || rateBp < 0 || rateBp > 10_000)
    throw new RangeError('A rate of VAT is 0 to 10,000 hundredths of a per cent.');
  const size = Math.abs(wholePence(grossPence));
  const whole = BigInt(10_000 + rateBp);
  const rounded = Number((2n * BigInt(size) * BigInt(rateBp) + whole) / (2n * whole));
  return wholePence(grossPence < 0 ? -rounded : rounded);
}

/** A line's gross, and what of it is VAT and what is left: `netPence + vatPence` is `grossPence` always. */
export type VatLine = { grossPence: number; netPence: number; vatPence: number; rateBp: number };

export function vatLine(grossPence: number, rateBp: number): VatLine {
  const vatPence = vatOfGross(grossPence, rateBp);
  return { grossPence, netPence: wholePence(grossPence - vatPence), vatPence, rateBp };
}

/** Gross, net and VAT for each rate that occurs, highest rate first: sums of lines already rounded. */
export function vatByRate(lines: readonly VatLine[]): VatLine[] {
  const sums = new Map<number, VatLine>();
  for (const line of lines) {
    const sum = sums.get(line.rateBp) ?? { grossPence: 0, netPence: 0, vatPence: 0, rateBp: line.rateBp };
    sums.set(line.rateBp, {
      grossPence: wholePence(sum.grossPence + line.grossPence),
      netPence: wholePence(sum.netPence + line.netPence),
      vatPence: wholePence(sum.vatPence + line.vatPence),
      rateBp: line.rateBp,
    });
  }
  return [...sums.values()].sort((a, b) => b.rateBp - a.rateBp);
}
