import { ChartFeature, StandOutPatch } from '@mereward/shared/charts/chart-answers';
import { WrapReference } from '@mereward/shared/surveys/contract';
import { z } from 'zod';

/** One peg's casts to make next, on the sticks and in the peg's water of the day the chart was built. */
export const BuiltNextCasts = z.object({
  stickSpacingM: z.number(),
  wrapReference: WrapReference,
  meanSigmaM: z.number(), // root of the mean variance over the places
  places: z.int(), // of the water the variance is held over
  isMerged: z.boolean().default(false), // from samples merged by cells: gains are good to a tenth of the best
  meanErrorShare: z.number(), // standard error of that mean, as a share of it
  pegs: z.array(
    z.object({
      pegId: z.uuid(),
      casts: z.array(
        z.object({
          xM: z.number(),
          yM: z.number(),
          bearingDeg: z.number(),
          rangeM: z.number(),
          wrapsWhole: z.int(),
          lineOutM: z.number(),
          gainShare: z.number(),
        }),
      ),
    }),
  ),
});
export type BuiltNextCasts = z.infer<typeof BuiltNextCasts>;

/** What a chart was found to tell when it was built. `nextCasts` is null where no visit told its kit. */
export const BuiltTellings = z.object({
  features: z.array(ChartFeature),
  patches: z.array(StandOutPatch.omit({ reach: true })),
  nextCasts: BuiltNextCasts.nullable(),
});
export type BuiltTellings = z.infer<typeof BuiltTellings>;
