import { z } from 'zod';

/** What a chart's depths were measured with: casts from the bank, an echo sounder's logs, or both. */
export const SurveyedBy = z.enum(['casts', 'logs', 'both']);
export type SurveyedBy = z.infer<typeof SurveyedBy>;

/** What a chart took from one log of soundings, in numbers. */
export const ChartLogView = z.object({
  id: z.uuid(),
  visitId: z.uuid(),
  visitTitle: z.string(),
  filenames: z.array(z.string()),
  found: z.int(), // in its files
  kept: z.int(), // when it was taken in
  outside: z.int(), // of those, off the water of the chart's outline
  leftOut: z.int().default(0), // of those, left out of this chart by a person
  cells: z.int(), // into which the others were merged
  cellM: z.number(),
  contoured: z.int(), // cells of grades A and B
  flagged: z.int(), // cells out of line with their neighbours
});
export type ChartLogView = z.infer<typeof ChartLogView>;
