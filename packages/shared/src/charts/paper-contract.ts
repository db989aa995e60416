import { z } from 'zod';

/** GET /api/charts/:chartId/sheet.pdf?size=a4: the chart true to a round scale, on ISO 216 paper. */
export const PaperAsked = z.object({ size: z.enum(['a3', 'a4']).default('a4') });
export type PaperAsked = z.infer<typeof PaperAsked>;
