import type { Units } from '@mereward/shared/accounts/contract';
import type { LakeView } from '@mereward/shared/lakes/contract';
import { RMS_LIMIT_M, type PictureCaution } from '@mereward/shared/lakes/picture-placing';
import type { Choice } from '@/components/choice-props';
import { length, percent } from '@/lib/format';
import { positionText } from '@/lib/position-text';

/** What speaks against tracing by a fit, and what to do about it. */
export function cautionWords(caution: PictureCaution, units: Units): { title: string; words: string } {
  switch (caution.kind) {
    case 'unchecked':
      return {
        title: 'Nothing checks these points',
        words:
          'Two points always fit, also where one of them is wrong. Add a third, far from both, and see how far it is missed.',
      };
    case 'misses':
      return {
        title: `The points are missed by ${length(caution.rmsM, units)} (RMS), more than ${length(RMS_LIMIT_M, units, 0)}`,
        words: `The worst is “${caution.worst}”, missed by ${length(caution.worstM, units)}. Look whether it is the right pixel and the right place. A shore traced now is no better than that.`,
      };
    case 'narrow':
      return {
        title: 'The points lie in a small part of the picture',
        words: 'Beyond them it may be off by more than is told here. Choose points all round the water.',
      };
    case 'stretched':
      return {
        title: `The picture is stretched by ${percent(caution.share)}`,
        words:
          'It was not taken straight down, or one of the points is wrong. High banks and trees lean outwards in such a picture: trace where the water meets the ground.',
      };
  }
}

/** A place that is known already, to give a point of a picture. */
export type KnownPlace = { key: string; label: string; position: string };

/** Places of a lake that stand already: pegs, marks, boards. */
export function knownPlaces({
  pegs,
  marks,
  boards,
}: Pick<LakeView, 'pegs' | 'marks' | 'boards'>): KnownPlace[] {
  return [
    ...pegs.map(({ id, number, position }) => ({
      key: `peg:${id}`,
      label: `Peg ${number}, at the water’s edge`,
      position: positionText(position),
    })),
    ...marks.map(({ id, details }) => ({
      key: `mark:${id}`,
      label: `Mark ${details.code}, ${details.name}`,
      position: positionText(details.position),
    })),
    ...boards.map(({ id, details }) => ({
      key: `board:${id}`,
      label: `Gauge board ${details.code}`,
      position: positionText(details.position),
    })),
  ];
}

export const OTHER_PLACE = 'other';

export const placeChoices = (known: readonly KnownPlace[]): Choice<string>[] => [
  ...known.map(({ key, label }) => ({ key, label })),
  { key: OTHER_PLACE, label: 'Another place: type it, or tap it on the outline' },
];
