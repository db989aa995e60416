import { z } from 'zod';

/** How far a sounding lies from what the others foretell of its place. `errorM` is foretold less measured: positive, read shallow. */
export const SoundingMiss = z.object({
  id: z.string(),
  errorM: z.number(),
  standardised: z.number(), // |errorM| over its σ
});
export type SoundingMiss = z.infer<typeof SoundingMiss>;

/** The same with what a person needs to look the cast up and weigh it. */
export const SoundingMissView = SoundingMiss.extend({
  flagged: z.boolean(), // out of line by more than 3.5 robust σ
  visitId: z.uuid(),
  visitTitle: z.string(),
  castNumber: z.int(),
  pegNumber: z.string().nullable(), // null: the peg is gone
  depthM: z.number(), // below datum, as it was measured
  foretoldM: z.number(), // by its neighbours
  rangeM: z.number(), // of line out from the peg
  bearingDeg: z.number(),
  xM: z.number(), // on the lake's plane
  yM: z.number(),
});
export type SoundingMissView = z.infer<typeof SoundingMissView>;
