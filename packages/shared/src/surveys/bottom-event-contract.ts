import { z } from 'zod';
import { LakePolygon } from '../lakes/contract';

/** What can happen to a bottom after it was surveyed. */
export const BottomEventKind = z.enum([
  'weed_cut',
  'snag_removed',
  'dredged',
  'leaf_fall',
  'flood',
  'drawdown',
  'other',
]);
export type BottomEventKind = z.infer<typeof BottomEventKind>;

/** Which evidence of the days before an event no longer counts. */
export const EventEnds = z.enum(['cover', 'substrate', 'depth']);
export type EventEnds = z.infer<typeof EventEnds>;

/** POST /api/lakes/:lakeId/bottom-events. `area` null: the whole lake. */
export const RecordBottomEvent = z.strictObject({
  id: z.uuid(),
  kind: BottomEventKind,
  area: LakePolygon.nullable(),
  happenedOn: z.iso.date(),
  ends: z
    .array(EventEnds)
    .min(1, 'Say what of the old survey it ends')
    .max(3)
    .refine((ends) => new Set(ends).size === ends.length, 'Each once'),
  note: z.string().trim().max(500),
});
export type RecordBottomEvent = z.infer<typeof RecordBottomEvent>;

export const BottomEventView = z.object({
  id: z.uuid(),
  kind: BottomEventKind,
  area: LakePolygon.nullable(),
  happenedOn: z.iso.date(),
  ends: z.array(EventEnds),
  note: z.string(),
  by: z.string(),
  words: z.string(), // "Weed was cut on 4 May 2028"
});
export type BottomEventView = z.infer<typeof BottomEventView>;

/** GET /api/lakes/:lakeId/bottom-events (staff): newest first. DELETE /api/bottom-events/:eventId takes one back. */
export const BottomEvents = z.object({
  events: z.array(BottomEventView),
  may: z.object({ record: z.boolean() }),
});
export type BottomEvents = z.infer<typeof BottomEvents>;
