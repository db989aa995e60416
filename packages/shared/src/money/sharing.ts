import { wholePence } from './money';

/**
 * Parts an amount by whole-number weights so that the parts add up to it to the penny: each gets its exact share
 * rounded towards nought, and the pence left go one by one to the largest remainders, the earlier first.
 * `weights`: whole, 0 or more, not all 0 unless there is nothing to part; answer of the same length. Throws RangeError.
 * Source: the method of largest remainders (Hamilton).
 */
export function sharePence(amountPence: number, weights: readonly number[]): number[] {
  const total = BigInt(Math.abs(wholePence(amountPence)));
  if (weights.some((each) => !Number.isSafeInteger(each) || each < 0))
    throw new RangeError('A weight is a whole number, 0 or more.');
  const whole = weights.reduce((sum, each) => sum + BigInt(each), 0n);
  if (whole === 0n) {
    if (total === 0n) return weights.map(() => 0);
    throw new RangeError('There is nobody to share this between.');
  }
  const exact = weights.map((weight, index) => {
    const product = total * BigInt(weight);
    return { index, part: product / whole, left: product % whole };
  });
  const short = Number(total - exact.reduce((sum, { part }) => sum + part, 0n));
  const lucky = new Set(
    [...exact]
      .sort((a, b) => (a.left === b.left ? a.index - b.index : a.left > b.left ? -1 : 1))
      .slice(0, short)
      .map(({ index }) => index),
  );
  const sign = amountPence < 0 ? -1 : 1;
  return exact.map(({ part, index }) => wholePence(sign * (Number(part) + (lucky.has(index) ? 1 : 0))));
}

/** A share of an amount in hundredths of a per cent (5000 is half), rounded half up to the penny, away from nought. */
export function shareOf(amountPence: number, shareBp: number): number {
  if (!Number.isInteger(shareBp) || shareBp < 0 || shareBp > 10_000)
    throw new RangeError('A share is 0 to 10,000 hundredths of a per cent.');
  const size = BigInt(Math.abs(wholePence(amountPence)));
  const rounded = Number((2n * size * BigInt(shareBp) + 10_000n) / 20_000n);
  return wholePence(amountPence < 0 ? -rounded : rounded);
}
