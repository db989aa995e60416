import { z } from 'zod';
import { sigmaOfRadiusM } from './shore-walk';

/** How a lake's outline was found, and within how many metres its line lies in 19 of 20 places. */
export const OutlineSource = z.strictObject({
  way: z.enum(['walked', 'traced', 'plan', 'drawn']),
  withinM: z.number().min(0.1).max(50),
});
export type OutlineSource = z.infer<typeof OutlineSource>;

export const OUTLINE_WAYS: Readonly<Record<OutlineSource['way'], string>> = {
  walked: 'Walked with a phone',
  traced: 'Traced over a picture',
  plan: 'Read from a plan or a file',
  drawn: 'Drawn by hand',
};

/** “Walked with a phone, within 6 m in 19 of 20 places”; null where nobody said. */
export const outlineSourceWords = (source: OutlineSource | undefined): string | null =>
  source
    ? `${OUTLINE_WAYS[source.way]}, within ${Number(source.withinM.toFixed(1))} m in 19 of 20 places`
    : null;

/** σ of the shore's place across its own line, metres; nought where nobody said, as a drawn line is then believed. */
export const shoreSigmaM = (source: OutlineSource | undefined): number =>
  source ? sigmaOfRadiusM(source.withinM) : 0;
