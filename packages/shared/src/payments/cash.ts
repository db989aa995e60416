import { sumPence, wholePence } from '../money/money';

/** Coins and notes in pounds sterling, pence, largest first. */
export const DENOMINATIONS = [5000, 2000, 1000, 500, 200, 100, 50, 20, 10, 5, 2, 1] as const;
export type Denomination = (typeof DENOMINATIONS)[number];

/** What a tin holds by the count of each coin and note, pence. Throws RangeError for part of a coin. */
export function countedPence(counts: Readonly<Partial<Record<Denomination, number>>>): number {
  return sumPence(
    DENOMINATIONS.map((each) => {
      const count = counts[each] ?? 0;
      if (count < 0 || !Number.isInteger(count))
        throw new RangeError('Coins and notes are counted in whole numbers.');
      return each * count;
    }),
  );
}

/** Common practice, no published source: a difference above £5, or above 2 % of what is expected if that is more, is looked at. */
const FLAG_PENCE = 500;
const FLAG_PER_CENT = 2;

/** Counted less expected, pence; below nought is short. Any difference needs a reason; a large one is flagged. */
export function cashDifference(
  expectedPence: number,
  counted: number,
): { differencePence: number; needsReason: boolean; flagged: boolean } {
  const differencePence = wholePence(counted) - wholePence(expectedPence);
  const size = Math.abs(differencePence);
  return {
    differencePence,
    needsReason: size > 0,
    flagged: size > FLAG_PENCE && size * 100 > Math.abs(expectedPence) * FLAG_PER_CENT,
  };
}
