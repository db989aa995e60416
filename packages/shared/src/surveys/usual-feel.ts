import { COVER_LIKELIHOODS, SUBSTRATE_LIKELIHOODS } from './bottom-likelihoods';
import type { BottomFeel, FadeMonths } from './bottom-table-contract';

/**
 * Months after which weed and leaf litter once felt are worth half of what they were: weed dies back and is grazed, litter
 * rots and drifts. Common practice, no published source; a fishery may put its own in its table.
 */
export const USUAL_FADE_MONTHS: FadeMonths = { low_weed: 4, tall_weed: 3, leaf_litter: 6 };

/** The built-in table: what is in force at a fishery that has made none of its own. */
export const USUAL_FEEL: BottomFeel = {
  substrate: SUBSTRATE_LIKELIHOODS,
  cover: COVER_LIKELIHOODS,
  fadeMonths: USUAL_FADE_MONTHS,
};
