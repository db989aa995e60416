import type { Bottom, Substrate } from './contract';

/**
 * Abbreviations of the nature of the bottom as nautical charts print them. Source: IHO INT 1, section J (J1–J13.1),
 * with the qualifiers so (soft) and sf (stiff). Null where section J has none.
 */
export const SUBSTRATE_ABBREVIATION: Readonly<Record<Substrate, string>> = {
  silt: 'Si',
  clay: 'Cy',
  sand: 'S',
  gravel: 'G',
  stones: 'St',
};

export const BOTTOM_ABBREVIATION: Readonly<Record<Bottom, string | null>> = {
  gravel: 'G',
  clay: 'Cy',
  sand: 'S',
  silt_firm: 'sfSi',
  silt_deep: 'soSi',
  leaf: null,
  weed_low: 'Wd',
  weed_thick: 'Wd',
  snag: null,
  shell: 'Sh',
  unknown: null,
};
