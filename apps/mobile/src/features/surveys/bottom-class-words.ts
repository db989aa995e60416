import type { ConfirmedBy } from '@mereward/shared/surveys/confirmed-contract';
import type { Cover, Substrate } from '@mereward/shared/surveys/contract';

export const SUBSTRATES: readonly { key: Substrate; label: string }[] = [
  { key: 'silt', label: 'silt' },
  { key: 'clay', label: 'clay' },
  { key: 'sand', label: 'sand' },
  { key: 'gravel', label: 'gravel' },
  { key: 'stones', label: 'stones' },
];

export const COVERS: readonly { key: Cover; label: string }[] = [
  { key: 'clear', label: 'clear' },
  { key: 'low_weed', label: 'low weed' },
  { key: 'tall_weed', label: 'tall weed' },
  { key: 'leaf_litter', label: 'leaf litter' },
  { key: 'snag', label: 'snag' },
];

export const CONFIRMED_WAYS: readonly { key: ConfirmedBy; label: string; note: string }[] = [
  { key: 'grab', label: 'grab', note: 'a sample brought up' },
  { key: 'pronged_lead', label: 'pronged lead', note: 'what it hooked' },
  { key: 'drain_down', label: 'drain-down', note: 'seen dry' },
  { key: 'diver', label: 'diver', note: 'seen under water' },
];

const labelOf = (choices: readonly { key: string; label: string }[], key: string): string =>
  choices.find((choice) => choice.key === key)?.label ?? key;

export const classWords = (name: Substrate | Cover): string => labelOf([...SUBSTRATES, ...COVERS], name);
export const wayWords = (method: ConfirmedBy): string => labelOf(CONFIRMED_WAYS, method);
