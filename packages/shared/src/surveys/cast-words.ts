import type { CameBack, CastFlag, CastObservation, Drag, Drop } from './contract';

/** How each feel is called on a page. The codes are for files. */
export const DROP_WORDS: Readonly<Record<Drop, string>> = {
  soft_slow: 'soft and slow',
  dull: 'dull',
  firm_thud: 'firm thud',
  sharp_crack: 'sharp crack',
  stop_start: 'stop-start fall',
  no_touch: 'never felt to land',
  unsure: 'unsure how it landed',
};
export const DRAG_WORDS: Readonly<Record<Drag, string>> = {
  smooth_slow_heavy: 'stuck, then smooth and heavy',
  smooth_skim: 'smooth skim',
  fine_rattle: 'fine rattle',
  coarse_rattle: 'coarse rattle',
  stick_free_stick: 'sticks, frees, sticks',
  solid_stop: 'solid stop',
  spongy_pull: 'spongy pull',
  unsure: 'unsure how it dragged',
};
export const CAME_BACK_WORDS: Readonly<Record<CameBack, string>> = {
  none: 'nothing came back',
  black_silt: 'black silt',
  grey_clay: 'clay smear',
  sand: 'sand',
  weed: 'weed',
  leaves: 'leaves',
  twig: 'twig',
  shell: 'shell',
  bait_scrap: 'bait scrap',
  line_or_tackle: 'line or tackle',
};
export const CAST_FLAG_WORDS: Readonly<Record<CastFlag, string>> = {
  snag_lost_tackle: 'tackle lost on a snag',
  slack_line: 'slack line',
  crosswind: 'crosswind',
  hit_another_line: 'hit another line',
  boat: 'from a boat',
};

export type CastNames = { peg: string; mark: string | null };

/** A cast read back in words, so that a person sees how a row was understood. */
export function castWords(observation: CastObservation, names: CastNames): string {
  const { aim } = observation;
  const aimed =
    aim.by === 'mark'
      ? [`over ${names.mark ?? 'a mark'}`, aim.offsetDeg === 0 ? '' : sideWords(aim.offsetDeg)]
      : [`compass ${aim.bearingDeg}°`];
  const parts = [
    `peg ${names.peg}`,
    ...aimed,
    countWords(observation),
    observation.drop === null ? '' : DROP_WORDS[observation.drop],
    observation.drag === null ? '' : DRAG_WORDS[observation.drag],
    ...(observation.cameBack ?? []).map((each) => CAME_BACK_WORDS[each]),
    pullWords(observation),
    ...observation.flags.map((each) => CAST_FLAG_WORDS[each]),
  ];
  return parts.filter(Boolean).join(', ');
}

function sideWords(offsetDeg: number): string {
  return `${Math.abs(offsetDeg)}° ${offsetDeg > 0 ? 'right' : 'left'} of it`;
}

function countWords({ wrapsWhole, remainderM, remainderStated }: CastObservation): string {
  const rest = remainderM > 0 || remainderStated ? ` + ${Number(remainderM.toFixed(3))} m` : '';
  return `${wrapsWhole} wraps${rest}`;
}

function pullWords({ pulls, pullsAgain }: CastObservation): string {
  if (pulls === null) return 'no float reading';
  return pullsAgain === null ? `${pulls} pulls` : `${pulls} pulls, then ${pullsAgain}`;
}
