import type { Units } from '@mereward/shared/accounts/contract';
import type { Bottom, SoundingView } from '@mereward/shared/surveys/contract';
import { length, percent } from '@/lib/format';

export const BOTTOM_WORDS: Readonly<Record<Bottom, string>> = {
  gravel: 'Gravel',
  clay: 'Clay',
  sand: 'Sand',
  silt_firm: 'Firm silt',
  silt_deep: 'Deep soft silt',
  leaf: 'Leaf litter',
  weed_low: 'Low weed',
  weed_thick: 'Thick weed',
  snag: 'Snag',
  shell: 'Shell bed',
  unknown: 'Not known',
};

const likeliest = (shares: Readonly<Record<string, number>> | null): number | null =>
  shares === null ? null : Math.max(...Object.values(shares));

const COVERS: ReadonlySet<Bottom> = new Set(['leaf', 'weed_low', 'weed_thick', 'snag']);

/** "Gravel 91 %": the bottom's name and the chance of its class; the name alone when nothing was felt. */
export function callWords({ bottom, substrate, cover }: SoundingView): string {
  const share = likeliest(COVERS.has(bottom) ? cover : substrate);
  return bottom === 'unknown' || share === null
    ? BOTTOM_WORDS[bottom]
    : `${BOTTOM_WORDS[bottom]} ${percent(share)}`;
}

/** "depth at datum 2.54 ± 0.10 m", to the survey's own hundredth; said when no depth was read. */
export function depthWords({ depthM, depthSigmaM }: SoundingView, units: Units): string {
  if (depthM === null) return 'no depth read';
  return depthSigmaM === null
    ? `depth at datum ${length(depthM, units, 2)}`
    : `depth at datum ${length(depthM, units, 2)} ± ${length(depthSigmaM, units, 2)}`;
}
