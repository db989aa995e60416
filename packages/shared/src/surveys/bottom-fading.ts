import type { FadeMonths } from './bottom-table-contract';
import type { CoverShares } from './contract';

const DAYS_A_MONTH = 365.25 / 12;
const DAY_MS = 86_400_000;

/** Months from one civil day to a later one, with the fraction; none when it lies before. */
export function monthsSince(seenOn: string, day: string): number {
  return Math.max(0, (Date.parse(day) - Date.parse(seenOn)) / DAY_MS / DAYS_A_MONTH);
}

/**
 * What a cover seen `months` ago is still worth: the shares of weed and leaf litter halve every `fadeMonths`, the others
 * stand. What is lost goes to no other class: nobody saw it clear, so the place only becomes less certain.
 */
export function fadedCover(cover: CoverShares, fadeMonths: FadeMonths, months: number): CoverShares {
  const worth = (halfLife: number): number => 0.5 ** (months / halfLife);
  return {
    ...cover,
    low_weed: cover.low_weed * worth(fadeMonths.low_weed),
    tall_weed: cover.tall_weed * worth(fadeMonths.tall_weed),
    leaf_litter: cover.leaf_litter * worth(fadeMonths.leaf_litter),
  };
}
