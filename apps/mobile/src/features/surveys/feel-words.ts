import type { CameBack, Drag, Drop } from '@mereward/shared/surveys/contract';

/** Words for the cells of the cast form: what is felt, in two words, in the order it is met from soft to hard. */
export const DROP_CELLS: readonly { key: Drop; label: string }[] = [
  { key: 'no_touch', label: 'never felt' },
  { key: 'soft_slow', label: 'soft, slow' },
  { key: 'dull', label: 'dull' },
  { key: 'firm_thud', label: 'firm thud' },
  { key: 'sharp_crack', label: 'sharp crack' },
  { key: 'stop_start', label: 'stop, start' },
  { key: 'unsure', label: 'not sure' },
];

export const DRAG_CELLS: readonly { key: Drag; label: string }[] = [
  { key: 'smooth_slow_heavy', label: 'stuck, then smooth' },
  { key: 'smooth_skim', label: 'smooth skim' },
  { key: 'fine_rattle', label: 'fine rattle' },
  { key: 'coarse_rattle', label: 'coarse rattle' },
  { key: 'stick_free_stick', label: 'sticks, frees' },
  { key: 'solid_stop', label: 'solid stop' },
  { key: 'spongy_pull', label: 'spongy pull' },
  { key: 'unsure', label: 'not sure' },
];

export const BACK_CELLS: readonly { key: CameBack; label: string }[] = [
  { key: 'none', label: 'nothing' },
  { key: 'black_silt', label: 'black silt' },
  { key: 'grey_clay', label: 'clay smear' },
  { key: 'sand', label: 'sand' },
  { key: 'weed', label: 'weed' },
  { key: 'leaves', label: 'leaves' },
  { key: 'twig', label: 'twig' },
  { key: 'shell', label: 'shell' },
  { key: 'bait_scrap', label: 'bait scrap' },
  { key: 'line_or_tackle', label: 'line, tackle' },
];

export const backWords = (came: readonly CameBack[]): string =>
  came.length === 0
    ? 'nobody looked'
    : BACK_CELLS.filter(({ key }) => came.includes(key))
        .map(({ label }) => label)
        .join(', ');

/** What a feel is called, whichever list it stands in. */
export function feelWords(part: 'drop' | 'drag' | 'cameBack' | 'smell', feel: string): string {
  const cells: readonly { key: string; label: string }[] = {
    drop: DROP_CELLS,
    drag: DRAG_CELLS,
    cameBack: BACK_CELLS,
    smell: [
      { key: 'none', label: 'no smell' },
      { key: 'bad_eggs', label: 'bad eggs' },
    ],
  }[part];
  return cells.find(({ key }) => key === feel)?.label ?? feel;
}
