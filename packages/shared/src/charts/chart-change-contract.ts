import { z } from 'zod';
import { BottomEventKind } from '../surveys/bottom-event-contract';

/** Something known to have changed a lake's bottom after the last cast of a chart. Who recorded it stays with the staff. */
export const ChartChange = z.object({
  kind: BottomEventKind,
  happenedOn: z.iso.date(),
  words: z.string(), // "Weed was cut in part of the lake on 4 May 2028"
  rings: z.array(z.array(z.number())).nullable(), // x, y, x, y … metres on the lake's plane; null: the whole lake
});
export type ChartChange = z.infer<typeof ChartChange>;
