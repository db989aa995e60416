import { z } from 'zod';
import { Position } from '../fisheries/contract';

/** What stands at a lake beside its pegs, marks and boards. */
export const LakePlaceKind = z.enum(['parking', 'gate', 'throw_line', 'hazard', 'overhead_line']);
export type LakePlaceKind = z.infer<typeof LakePlaceKind>;

/** Who is shown it. What guards somebody from harm is shown to everybody. */
export const PlaceAudience = z.enum(['public', 'members', 'staff']);
export type PlaceAudience = z.infer<typeof PlaceAudience>;

/** A place drawn on the lake: one point, or for an overhead line its outer wire from post to post. WGS 84. */
export const LakePlace = z.strictObject({
  id: z.uuid(),
  kind: LakePlaceKind,
  name: z.string().trim().min(1, 'Say what it is.').max(120), // "Lodge car park", "Soft silt: do not wade"
  at: z.array(Position).min(1).max(100),
  note: z.string().trim().max(300),
  audience: PlaceAudience,
});
export type LakePlace = z.infer<typeof LakePlace>;

/** Those of a lake. */
export const LakePlaces = z.array(LakePlace).max(200);

/** A place as a chart shows it: x, y, x, y … metres on the lake's plane. */
export const ShownPlace = z.object({
  id: z.uuid(),
  kind: LakePlaceKind,
  name: z.string(),
  note: z.string(),
  audience: PlaceAudience,
  line: z.array(z.number()),
});
export type ShownPlace = z.infer<typeof ShownPlace>;

export const PLACE_WORDS: Readonly<Record<LakePlaceKind, string>> = {
  parking: 'Parking',
  gate: 'Gate',
  throw_line: 'Throw line',
  hazard: 'Hazard',
  overhead_line: 'Overhead line',
};
