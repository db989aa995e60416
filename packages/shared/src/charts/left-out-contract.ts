import { z } from 'zod';
import { Grade } from '../surveys/contract';
import { SoundingMiss } from './sounding-miss';

/** A square of the lake's plane, by its south-west corner, metres. */
export const LogCell = z.strictObject({
  kind: z.literal('cell'),
  logId: z.uuid(),
  xM: z.number().min(-100_000).max(100_000),
  yM: z.number().min(-100_000).max(100_000),
  sideM: z.number().min(0.5).max(50),
});
export type LogCell = z.infer<typeof LogCell>;

/** Soundings of a log from one to another, both of them, counted from 1 as they were read. */
export const LogRun = z.strictObject({
  kind: z.literal('run'),
  logId: z.uuid(),
  fromSeq: z.int().min(1).max(1_000_000),
  toSeq: z.int().min(1).max(1_000_000),
});
export type LogRun = z.infer<typeof LogRun>;

/** What can be left out of one chart; it stays in its survey as it was observed. */
export const LeftOutWhat = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('cast'), castId: z.uuid() }),
  LogCell,
  LogRun,
]);
export type LeftOutWhat = z.infer<typeof LeftOutWhat>;

/** POST /api/charts/:chartId/left-out, answered with ChartReview. The id is made where it is decided. */
export const LeaveOut = z.strictObject({
  id: z.uuid(),
  what: LeftOutWhat,
  reason: z.string().trim().min(1, 'Say why: whoever approves the chart reads it.').max(300),
});
export type LeaveOut = z.infer<typeof LeaveOut>;

/** Something left out of a chart, with who, why and when. POST …/left-out/:leftOutId/put-back takes it in again. */
export const LeftOutView = z.object({
  id: z.uuid(),
  what: LeftOutWhat,
  label: z.string(), // "Cast 12, peg FO7"
  reason: z.string(),
  by: z.string(),
  at: z.iso.datetime(),
  putBack: z.object({ by: z.string(), at: z.iso.datetime() }).nullable(), // null: it is left out
});
export type LeftOutView = z.infer<typeof LeftOutView>;

/** A merged sounding of a boat's log that lies far from what the others foretell of its place. */
export const LogMissView = SoundingMiss.extend({
  flagged: z.boolean(),
  logId: z.uuid(),
  filenames: z.array(z.string()),
  visitTitle: z.string(),
  depthM: z.number(), // below datum, merged
  foretoldM: z.number(),
  position: z.tuple([z.number(), z.number()]), // lon, lat
  xM: z.number(), // on the lake's plane
  yM: z.number(),
  /** What was merged into it, to be left out by cell or by run; null on charts built before that was kept. */
  merged: z.object({ cell: LogCell, fromSeq: z.int(), toSeq: z.int(), count: z.int() }).nullable(),
});
export type LogMissView = z.infer<typeof LogMissView>;

/** GET /api/charts/:chartId/casts (staff): every cast of a chart's visits, and how it stands in this chart. */
export const ChartCastView = z.object({
  id: z.uuid(),
  visitId: z.uuid(),
  visitTitle: z.string(),
  castNumber: z.int(),
  pegNumber: z.string().nullable(), // null: the peg is gone
  lineOutM: z.number().nullable(), // null: it could not be reduced
  bearingDeg: z.number().nullable(),
  depthM: z.number().nullable(), // below datum
  grade: Grade.nullable(),
  stands: z.enum(['charted', 'left_out', 'not_charted', 'not_built']),
  why: z.string(), // it does not count, in words; else empty
  leftOut: LeftOutView.nullable(),
});
export type ChartCastView = z.infer<typeof ChartCastView>;
export const ChartCastList = z.object({
  chartId: z.uuid(),
  lakeName: z.string(),
  zone: z.string(), // IANA, of the fishery
  title: z.string(),
  casts: z.array(ChartCastView),
  may: z.object({ leaveOut: z.boolean() }),
});
export type ChartCastList = z.infer<typeof ChartCastList>;
