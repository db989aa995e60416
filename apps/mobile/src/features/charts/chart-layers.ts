import { createPreference } from '@/lib/preference';
import { z } from 'zod';

/** What a reader wants to see of a chart; kept on this device. */
export const ShownLayers = z.object({
  depth: z.boolean(),
  bottom: z.boolean(),
  soundings: z.boolean(),
  today: z.boolean(), // at today's level where it is known, else at datum
  otherUnit: z.boolean(), // feet for whoever usually reads metres, and the other way round
});
export type ShownLayers = z.infer<typeof ShownLayers>;

export const shownLayers = createPreference<ShownLayers>({
  key: 'mereward.chart-layers',
  schema: ShownLayers,
  fallback: { depth: true, bottom: false, soundings: false, today: false, otherUnit: false },
});
