import type { Bottom } from '../surveys/contract';

/**
 * How a bait is commonly presented on each bottom: advice and never a rule. Common practice, no published source. A
 * fishery's own tackle limits come first and are shown beside it.
 */
export const PRESENTATION: Readonly<Record<Bottom, string | null>> = {
  gravel: 'Firm and clear: a bottom bait or a low pop-up, with a stiffer hook link.',
  clay: 'Firm and clear: a bottom bait or a low pop-up, with a stiffer hook link.',
  sand: 'Firm and clear: a bottom bait or a low pop-up, with a stiffer hook link.',
  silt_firm: 'Soft: a pop-up or a longer link, on a lead set-up that lets the link ride up the line.',
  silt_deep:
    'Deep and soft: a pop-up and a light lead, on a set-up that lets the link ride up the line. Where it smells bad, try elsewhere.',
  leaf: 'Littered: a pop-up, on a lead set-up that lets the link ride up the line. It changes each autumn.',
  weed_low: 'Low weed: a solid bag that dissolves, so that the hook stays clear.',
  weed_thick: 'Thick weed: a short stiff link that slides up the leader, or ask the fishery about clearing.',
  snag: 'A snag: do not fish tight to it, and tell the fishery.',
  shell: 'Shell: as on gravel, and look at the hook link for cuts after every cast.',
  unknown: null,
};

/** Stands beside every piece of advice on rigs. */
export const RIG_CAUTION =
  'The lead must be able to come off if the line breaks. Follow the fishery’s rig rules.';
