import { LakePlaceKind, PlaceAudience, type LakePlace } from '@mereward/shared/lakes/place-contract';
import { z } from 'zod';
import type { Choice } from '@/components/choice-props';
import { cornersOf } from '@/features/charts/event-draft';
import { positionText } from '@/lib/position-text';

/** A place as it is drawn or typed: one point, or one post a line. */
export const PlaceDraft = z
  .object({
    id: z.string(),
    kind: LakePlaceKind,
    name: z
      .string()
      .trim()
      .min(1, 'Say what it is, so that anybody finds it.')
      .max(120, 'At most 120 letters.'),
    points: z.string(),
    note: z.string().trim().max(300, 'At most 300 letters.'),
    audience: PlaceAudience,
  })
  .refine(({ points }) => cornersOf(points).length > 0, {
    path: ['points'],
    message: 'Tap it on the lake, or type its latitude and longitude.',
  })
  .refine(({ kind, points }) => kind !== 'overhead_line' || cornersOf(points).length !== 1, {
    path: ['points'],
    message: 'A line takes two posts or more.',
  });
export type PlaceTyped = z.input<typeof PlaceDraft>;
export type PlaceRead = z.output<typeof PlaceDraft>;

/** Hazards, throw lines and overhead lines are shown to everybody. */
export const maySayWho = (kind: LakePlaceKind): boolean => kind === 'parking' || kind === 'gate';

/** As it is kept; a place that was a line before keeps its first point. */
export function placeOfDraft({ points, kind, audience, ...rest }: PlaceRead): LakePlace {
  const at = cornersOf(points);
  return {
    ...rest,
    kind,
    at: kind === 'overhead_line' ? at : at.slice(0, 1),
    audience: maySayWho(kind) ? audience : 'public',
  };
}

export const draftOfPlace = ({ at, ...place }: LakePlace): PlaceTyped => ({
  ...place,
  points: at.map(positionText).join('\n'),
});

export const newPlace = (id: string): PlaceTyped => ({
  ...{ id, kind: 'parking', name: '', points: '', note: '', audience: 'public' },
});

export const PLACE_KINDS: readonly Choice<LakePlaceKind>[] = [
  { key: 'parking', label: 'Parking' },
  { key: 'gate', label: 'Gate', note: 'where help is met' },
  { key: 'throw_line', label: 'Throw line' },
  { key: 'hazard', label: 'Hazard', note: 'soft silt, stakes' },
  { key: 'overhead_line', label: 'Overhead line', note: 'the outer wire' },
];

export const PLACE_AUDIENCES: readonly Choice<PlaceAudience>[] = [
  { key: 'public', label: 'Everybody' },
  { key: 'members', label: 'Members', note: 'and staff' },
  { key: 'staff', label: 'Staff' },
];
