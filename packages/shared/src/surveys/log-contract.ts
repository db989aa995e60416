import { z } from 'zod';
import { Position } from '../fisheries/contract';
import { Grade } from './contract';

/** The kinds of file a log of soundings comes in. */
export const LogFormat = z.enum(['nmea', 'gpx', 'geojson', 'csv']);
export type LogFormat = z.infer<typeof LogFormat>;

/** What the columns of a table of soundings can be. */
export const LOG_COLUMNS = ['lat', 'lon', 'depth', 'time'] as const;
export type LogColumn = (typeof LOG_COLUMNS)[number];
export const LogColumns = z.partialRecord(z.enum(LOG_COLUMNS), z.int().min(0).max(199));
export type LogColumns = z.infer<typeof LogColumns>;

export const DepthUnit = z.enum(['m', 'ft', 'fathom']);
export type DepthUnit = z.infer<typeof DepthUnit>;

/** All the files of one log together, bytes. */
export const LOG_MOST_BYTES = 64 * 1024 * 1024;
export const LOG_MOST_FILES = 12;
/** One log holds no more soundings than this. */
export const LOG_MOST_SOUNDINGS = 200_000;

/**
 * How a log is to be read, and how well it was made. What is null is guessed from the files; the preview says what
 * was guessed. Lengths in metres, σ is one standard deviation.
 */
export const LogOptions = z.strictObject({
  /** Where a GPX or GeoJSON file keeps its depth: a name among those the preview offers. */
  depthFrom: z.string().max(200).nullable(),
  /** Does that number grow downwards from the surface, or is it the bed's height? */
  depthMeans: z.enum(['depth', 'bed_height']),
  waterHeightM: z.number().min(-500).max(9000), // of the surface, where the bed's height is given
  depthUnit: DepthUnit.nullable(),
  columns: LogColumns.nullable(), // of a table
  decimal: z.enum(['point', 'comma']).nullable(), // of a table
  transducerM: z.number().min(0).max(5), // below the surface; added to depths read from the transducer
  gapS: z.number().min(1).max(60), // longest time between two fixes that a depth may lie between
  depthSigmaM: z.number().min(0.01).max(2),
  depthSigmaShare: z.number().min(0).max(0.2), // of the depth, beside depthSigmaM
  positionSigmaM: z.number().min(0.01).max(20).nullable(), // null: by the kind of fix the log states, else 3
  outsideM: z.number().min(0).max(100), // a place further outside the outline than this is left out
  /** Which water level brings a depth to datum: the board's at that hour, or at the visit's start for all. */
  level: z.enum(['by_hour', 'at_start']),
});
export type LogOptions = z.infer<typeof LogOptions>;

/** Sizes are common practice, no published source. */
export const USUAL_LOG_OPTIONS: LogOptions = {
  depthFrom: null,
  depthMeans: 'depth',
  waterHeightM: 0,
  depthUnit: null,
  columns: null,
  decimal: null,
  transducerM: 0,
  gapS: 5,
  depthSigmaM: 0.1,
  depthSigmaShare: 0.01,
  positionSigmaM: null,
  outsideM: 5,
  level: 'by_hour',
};

/** Something wrong in a file: where, what stands there, what is wrong and what to do. */
export const LogFault = z.object({
  file: z.string(),
  unit: z.enum(['file', 'line', 'row', 'feature']),
  at: z.int().nonnegative(), // counted from 1; 0 of a whole file
  value: z.string(),
  detail: z.string(),
});
export type LogFault = z.infer<typeof LogFault>;

/** Why a sounding that could be read is not taken. */
export const LeftOutReason = z.enum(['no_fix', 'outside', 'not_deep', 'too_deep', 'spike', 'other_day']);
export type LeftOutReason = z.infer<typeof LeftOutReason>;

/** A sounding as read, for the first ones shown. */
export const LogPointView = z.object({
  position: Position,
  depthM: z.number(), // below the water of that hour
  at: z.iso.datetime().nullable(),
  where: z.string(), // "track.log, line 14"
  taken: z.boolean(),
});
export type LogPointView = z.infer<typeof LogPointView>;

/** What was found in a log's files and what is kept of it: the same before and after it is taken in. */
export const LogReport = z.object({
  format: LogFormat,
  files: z.array(z.object({ name: z.string(), bytes: z.int(), words: z.string() })),
  joined: z.string(), // how places and depths were brought together
  found: z.int(), // soundings with a place and a depth, and depths without a place
  kept: z.int(),
  leftOut: z.array(z.object({ reason: LeftOutReason, count: z.int(), words: z.string() })),
  faultCount: z.int(),
  faults: z.array(LogFault), // the first of them
  cautions: z.array(z.string()),
  grade: Grade, // of the soundings, by the errors stated
  gradeWords: z.string(),
  from: z.iso.datetime().nullable(),
  to: z.iso.datetime().nullable(),
  shallowestM: z.number().nullable(),
  deepestM: z.number().nullable(),
});
export type LogReport = z.infer<typeof LogReport>;

/** How a log would be read with the options beside it. Nothing of it is taken in yet. */
export const LogPreview = LogReport.extend({
  asks: z.array(z.object({ option: z.string(), words: z.string() })), // to be answered first
  depthChoices: z.array(z.object({ key: z.string(), words: z.string(), count: z.int() })),
  heading: z.array(z.string()), // of a table
  guessed: LogOptions, // the options with every guess filled in
  first: z.array(LogPointView),
  box: z.tuple([z.number(), z.number(), z.number(), z.number()]).nullable(), // west, south, east, north of what is kept
  sample: z.array(z.tuple([z.number(), z.number(), z.boolean()])), // lon, lat, kept: thinned, to draw on the lake
});
export type LogPreview = z.infer<typeof LogPreview>;

/** looked: read and shown, not taken in. done: taken in. */
export const LogState = z.enum(['queued', 'running', 'looked', 'done', 'failed', 'cancelled']);
export type LogState = z.infer<typeof LogState>;

/** POST /api/visits/:visitId/logs (multipart: id, then the files). GET /api/logs/:logId. */
export const LogView = z.object({
  id: z.uuid(),
  visitId: z.uuid(),
  filenames: z.array(z.string()),
  state: LogState,
  goal: z.enum(['look', 'keep']), // what is being done, or was done last
  step: z.string(),
  share: z.number(),
  error: z.string().nullable(),
  options: LogOptions,
  preview: LogPreview.nullable(), // null while it is being read
  report: LogReport.nullable(), // once it is taken in
  importedBy: z.string(),
  importedAt: z.iso.datetime(),
  may: z.object({ change: z.boolean(), undo: z.boolean(), cancel: z.boolean() }),
});
export type LogView = z.infer<typeof LogView>;

/** GET /api/visits/:visitId/logs: newest first; previews and lists of faults are left to the log itself. */
export const LogListItem = LogView.omit({ preview: true, report: true }).extend({ kept: z.int().nullable() });
export type LogListItem = z.infer<typeof LogListItem>;
export const LogList = z.object({ logs: z.array(LogListItem), may: z.object({ bring: z.boolean() }) });
export type LogList = z.infer<typeof LogList>;

/** POST /api/logs/:logId/look: reads the files again in another way. …/start takes in what was last shown. */
export const LookAgain = z.strictObject({ options: LogOptions });
export type LookAgain = z.infer<typeof LookAgain>;

/** The form's fields beside the files. */
export const BringLog = z.strictObject({ id: z.uuid() });
export type BringLog = z.infer<typeof BringLog>;
