import { z } from 'zod';
import { USUAL_SPACING_M } from '../units/wraps';

/** GET /api/charts/:chartId/sheet.pdf?size=a4: the chart true to a round scale, on ISO 216 paper. */
export const PaperAsked = z.object({ size: z.enum(['a3', 'a4']).default('a4') });
export type PaperAsked = z.infer<typeof PaperAsked>;

const yes = z.enum(['yes', 'no']).default('no');

/** GET /api/charts/:chartId/chart.svg: the screen's own drawing, in the look, unit and layers asked for. */
export const SvgAsked = z.object({
  look: z.enum(['light', 'dusk', 'print']).default('light'),
  in: z.enum(['m', 'ft']).default('m'),
  sticks: z.coerce.number().min(0.3).max(10).default(USUAL_SPACING_M), // metres, for the scale bar
  today: yes, // as the water stands now, when that is known
  soundings: yes,
});
export type SvgAsked = z.infer<typeof SvgAsked>;
