import { z } from 'zod';
import { Bottom, Grade } from '../surveys/contract';

/** How one bottom map was made, and how well it foretells a cast that it was not shown. */
export const BottomQuality = z.object({
  casts: z.int(), // evidence it rests on, confirmed bottoms among it
  bandwidthM: z.number(), // how far a cast's word carries
  logScore: z.number().nullable(), // mean of Σ p ln P over casts left out one by one; null: too few to score
  evenLogScore: z.number(), // the same of somebody who knows nothing
});
export type BottomQuality = z.infer<typeof BottomQuality>;

export const BottomQualityView = z.object({ substrate: BottomQuality, cover: BottomQuality });
export type BottomQualityView = z.infer<typeof BottomQualityView>;

/** What an event after the casts took out of a chart: how many casts lost their word on each. */
export const EndedEvidence = z.object({
  eventId: z.uuid(),
  words: z.string(),
  cover: z.int(),
  substrate: z.int(),
  depth: z.int(),
});
export type EndedEvidence = z.infer<typeof EndedEvidence>;

/** A cast that read no depth: it tells of the bottom only, and is shown as a point without a figure. */
export const BottomPoint = z.object({
  id: z.string(),
  xM: z.number(),
  yM: z.number(),
  bottom: Bottom,
  grade: Grade,
});
export type BottomPoint = z.infer<typeof BottomPoint>;
