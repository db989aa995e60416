import type { Bottom, Cover, Substrate } from '../surveys/contract';

/** What each bottom is called on a page; small letters, for the middle of a sentence. */
export const BOTTOM_WORDS: Readonly<Record<Bottom, string>> = {
  gravel: 'gravel',
  clay: 'clay',
  sand: 'sand',
  silt_firm: 'firm silt',
  silt_deep: 'deep soft silt',
  leaf: 'leaf litter',
  weed_low: 'low weed',
  weed_thick: 'thick weed',
  snag: 'snag',
  shell: 'shell',
  unknown: 'bottom not known',
};

/** The nearest bottom of the angler's list to what the chart's two maps say of a place. */
export const BOTTOM_OF_SUBSTRATE: Readonly<Record<Substrate, Bottom>> = {
  silt: 'silt_firm',
  clay: 'clay',
  sand: 'sand',
  gravel: 'gravel',
  stones: 'gravel',
};
export const BOTTOM_OF_COVER: Readonly<Record<Exclude<Cover, 'clear'>, Bottom>> = {
  low_weed: 'weed_low',
  tall_weed: 'weed_thick',
  leaf_litter: 'leaf',
  snag: 'snag',
};
