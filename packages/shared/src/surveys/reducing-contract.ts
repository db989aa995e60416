import { z } from 'zod';
import { BottomFeel } from './bottom-table-contract';
import { LeadCalibration } from './lead-contract';

/** What the casts of a visit are reduced with beside its kit: travels with the visit, so that a phone reduces alike. */
export const Reducing = z.object({
  tableVersion: z.int(), // 0: the built-in
  feel: BottomFeel.nullable(), // null: the built-in
  lead: LeadCalibration.nullable(), // of the lead the kit names
});
export type Reducing = z.infer<typeof Reducing>;
