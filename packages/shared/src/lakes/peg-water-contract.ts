import { z } from 'zod';
import { Position, Version } from '../fisheries/contract';

/**
 * Who a peg's water belongs to: a first partition (the nearest stance that can cast there: inside its arc, within its
 * longest cast, in straight sight over the water), then the owner's drawn areas, the last one winning. No place is two
 * pegs' water. Rings are x, y, x, y … metres on the lake's plane, closed, islands of other water as rings of their own.
 */
export const PegWater = z.object({
  pegId: z.uuid(),
  number: z.string(),
  name: z.string(),
  areaM2: z.number(), // 0: nothing is this peg's (its arc looks over land, or the owner gave all of it away)
  rings: z.array(z.array(z.number())),
});
export type PegWater = z.infer<typeof PegWater>;

/** An area the owner drew and gave to a peg, or to nobody (`pegId` null: kept free of lines, a reserve). */
export const WaterAreaDetails = z.strictObject({
  pegId: z.uuid().nullable(),
  ring: z.array(Position).min(3).max(500), // lon, lat; open or closed
  note: z.string().trim().max(200), // "to the line between the dead oak and the pump house"
});
export type WaterAreaDetails = z.infer<typeof WaterAreaDetails>;

/**
 * PUT /api/lakes/:lakeId/water-areas/:areaId makes (version null) or changes one and puts it on top of the others;
 * DELETE takes it away. Owner or manager. Both answer LakeWaters.
 */
export const PutWaterArea = z.strictObject({ details: WaterAreaDetails, version: Version.nullable() });
export type PutWaterArea = z.infer<typeof PutWaterArea>;

export const WaterAreaView = z.object({
  id: z.uuid(),
  details: WaterAreaDetails,
  takesM2: z.number(), // of the water it lies on, what is still its own under later areas
  version: z.int(),
});
export type WaterAreaView = z.infer<typeof WaterAreaView>;

/** GET /api/lakes/:lakeId/waters (open to all). */
export const LakeWaters = z.object({
  lakeId: z.uuid(),
  cellM: z.number(), // borders are true to about half of this
  pegs: z.array(PegWater), // in walking order
  nobodysM2: z.number(), // water that is no peg's
  areas: z.array(WaterAreaView), // oldest first: the last one lies on top
  words: z.string(), // how the waters were made, in a sentence
  may: z.object({ change: z.boolean() }),
});
export type LakeWaters = z.infer<typeof LakeWaters>;

/** Whose water a place is, seen from one peg. Null `pegId`: nobody's. */
export const PlaceWater = z.object({
  pegId: z.uuid().nullable(),
  number: z.string().nullable(),
  own: z.boolean(),
  words: z.string(), // "In this peg’s own water." / "In peg 8’s water." / "In no peg’s water."
});
export type PlaceWater = z.infer<typeof PlaceWater>;
