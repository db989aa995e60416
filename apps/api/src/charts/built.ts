import { EndedEvidence } from '@mereward/shared/charts/bottom-quality-contract';
import { CheckView, QualityView } from '@mereward/shared/charts/contract';
import { Position } from '@mereward/shared/fisheries/contract';
import { LakePolygon } from '@mereward/shared/lakes/contract';
import { Bottom, Grade, Kit } from '@mereward/shared/surveys/contract';
import { z } from 'zod';
import { BuiltTellings } from './built-tellings';
import { OutlineSource } from '@mereward/shared/lakes/outline-source';

/** A reduced cast as a chart keeps it: with what an angler needs to throw it again, in the survey's own sticks. */
export const BuiltSounding = z.object({
  id: z.uuid(), // of the cast
  visitId: z.uuid(),
  pegId: z.uuid(),
  seq: z.int(),
  observedOn: z.iso.date(), // civil day at the lake
  xM: z.number(),
  yM: z.number(),
  ellipse: z.object({ semiMajorM: z.number(), semiMinorM: z.number(), bearingDeg: z.number() }),
  depthM: z.number(), // below datum
  depthAsReadM: z.number(), // below the water of that hour
  sigmaM: z.number(),
  grade: Grade,
  bottom: Bottom,
  bottomShare: z.number().nullable(), // how sure of it: the greatest probability of its kind
  wrapsWhole: z.int(),
  remainderM: z.number(),
  lineOutM: z.number(),
  bearingDeg: z.number(),
  markId: z.uuid().nullable(),
  markOffsetDeg: z.number(),
  coverEnded: z.boolean().default(false), // what lay there was seen before an event that ended it
});
export type BuiltSounding = z.infer<typeof BuiltSounding>;

/** A cast that read no depth, most snags among them: it tells of the bottom only. */
export const BuiltPoint = z.object({
  id: z.uuid(), // of the cast
  pegId: z.uuid(),
  observedOn: z.iso.date(),
  xM: z.number(),
  yM: z.number(),
  grade: Grade,
  bottom: Bottom,
  coverEnded: z.boolean(),
});
export type BuiltPoint = z.infer<typeof BuiltPoint>;

/** What each visit was made with, frozen with the chart. */
export const BuiltVisit = z.object({
  id: z.uuid(),
  title: z.string(),
  surveyorId: z.uuid(),
  surveyorName: z.string(),
  day: z.iso.date(),
  kit: Kit,
  gaugeStartM: z.number(), // as the board reads
  gaugeEndM: z.number().nullable(),
});
export type BuiltVisit = z.infer<typeof BuiltVisit>;

/** An accepted report as a chart keeps it: evidence with a grade of its own, and nobody's name. */
export const BuiltReport = z.object({
  id: z.uuid(), // of the report
  pegId: z.uuid(),
  observedOn: z.iso.date(),
  xM: z.number(),
  yM: z.number(),
  ellipse: z.object({ semiMajorM: z.number(), semiMinorM: z.number(), bearingDeg: z.number() }),
  depthM: z.number().nullable(), // below datum
  sigmaM: z.number().nullable(),
  grade: Grade,
  bottom: Bottom,
});
export type BuiltReport = z.infer<typeof BuiltReport>;

/** A log of soundings as a chart keeps it: merged by cells, in the lake's plane. */
export const BuiltLog = z.object({
  id: z.uuid(),
  visitId: z.uuid(),
  filenames: z.array(z.string()),
  found: z.int(), // in its files
  kept: z.int(), // when it was taken in
  outside: z.int(), // of those, off the water of this outline
  leftOut: z.int().default(0), // of those, left out of this chart by a person
  cellM: z.number(), // side of the cells the others were merged in
  points: z.array(z.number()), // x, y, depth, σ, x, y, depth, σ … metres
  grades: z.string(), // a letter for each
});
export type BuiltLog = z.infer<typeof BuiltLog>;

/** What was merged into a sounding of a log that is out of line, or among the ten worst. */
export const MergedPlace = z.object({
  id: z.string(), // of the merged sounding
  xM: z.number(), // of the cell's south-west corner
  yM: z.number(),
  fromSeq: z.int(), // of the log's soundings, from 1
  toSeq: z.int(),
  count: z.int(),
});
export type MergedPlace = z.infer<typeof MergedPlace>;

const Lines = z.array(z.object({ levelM: z.number(), lines: z.array(z.array(z.number())) }));

/** The `built` column of a chart: everything of it that is not a grid. */
export const Built = z.object({
  origin: Position,
  outline: LakePolygon,
  outlineFrom: OutlineSource.optional(),
  maxGapM: z.number(),
  visits: z.array(BuiltVisit),
  soundings: z.array(BuiltSounding), // every grade; D is left out of every view but the staff's
  points: z.array(BuiltPoint).default([]), // every grade, as above
  logs: z.array(BuiltLog).default([]),
  merged: z.array(MergedPlace).default([]),
  leftOut: z.array(z.object({ id: z.string(), why: z.string(), byHand: z.boolean().default(false) })), // by hand: by a person
  ended: z.array(EndedEvidence).default([]), // what events since the casts took out of it
  bottomTable: z.int().default(0), // version of the fishery's table of feels; 0 is the built-in
  isobaths: Lines, // x, y, x, y … metres on the lake's plane, to 0.01
  hypsography: z.array(z.object({ depthM: z.number(), areaM2: z.number(), volumeM3: z.number() })),
  figures: z.object({
    areaM2: z.number(),
    volumeM3: z.number(),
    meanDepthM: z.number(),
    greatestDepthM: z.number(),
    shorelineDevelopment: z.number(),
    surveyedShare: z.number(),
  }),
  quality: QualityView,
  reports: z.array(BuiltReport).default([]), // what anglers found otherwise and the fishery accepted
  checks: z.array(CheckView).default([]), // of what it was made from
  tellings: BuiltTellings.nullable().default(null), // null: built before there were any
});
export type Built = z.infer<typeof Built>;
