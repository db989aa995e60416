import { createPreference } from '@/lib/preference';
import { z } from 'zod';

/** What the chart tells beyond its layers, shown or not; kept on this device. */
export const ShownTales = z.object({
  features: z.boolean(),
  patches: z.boolean(),
  waters: z.boolean(),
  changes: z.boolean(),
});
export type ShownTales = z.infer<typeof ShownTales>;

export const shownTales = createPreference<ShownTales>({
  key: 'mereward.chart-tales',
  schema: ShownTales,
  fallback: { features: false, patches: false, waters: false, changes: false },
});
