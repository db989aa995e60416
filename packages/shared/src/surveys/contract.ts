import { z } from 'zod';
import { Version } from '../fisheries/contract';

/**
 * A survey visit and its casts, exactly as they were observed. Nothing here is reduced: the reduction reads these
 * and can be run again at any time. Words of feel are the trade's; the lists are ours.
 */
export const Drop = z.enum([
  'soft_slow',
  'dull',
  'firm_thud',
  'sharp_crack',
  'stop_start',
  'no_touch',
  'unsure',
]);
export type Drop = z.infer<typeof Drop>;

export const Drag = z.enum([
  'smooth_slow_heavy',
  'smooth_skim',
  'fine_rattle',
  'coarse_rattle',
  'stick_free_stick',
  'solid_stop',
  'spongy_pull',
  'unsure',
]);
export type Drag = z.infer<typeof Drag>;

export const CameBack = z.enum([
  'none',
  'black_silt',
  'grey_clay',
  'sand',
  'weed',
  'leaves',
  'twig',
  'shell',
  'bait_scrap',
  'line_or_tackle',
]);
export type CameBack = z.infer<typeof CameBack>;

export const CastFlag = z.enum(['snag_lost_tackle', 'slack_line', 'crosswind', 'hit_another_line', 'boat']);
export type CastFlag = z.infer<typeof CastFlag>;

export const WrapReference = z.enum(['lead_to_rod_tip', 'lead_to_clip']);
export type WrapReference = z.infer<typeof WrapReference>;

const metres = (max: number) => z.number().min(0).max(max);

/** What the casts of one visit were made with. Lengths in metres; angles in degrees. */
export const Kit = z.strictObject({
  stickSpacingM: z.number().min(0.3).max(10),
  /** How the sticks' spacing was taped; between centres, half a turn round each stick is added when the diameter is known. */
  stickMeasured: z.enum(['along_line', 'centres']),
  stickDiameterM: metres(0.1).nullable(),
  stickCheckedOn: z.iso.date().nullable(), // civil day of the last tape check
  wrapReference: WrapReference,
  rodLengthM: z.number().min(1).max(6),
  lineAlongRodM: metres(6), // r: line lying along the rod from clip to tip
  reelHeightM: metres(6), // h: reel above the water
  rodElevationDeg: z.number().min(0).max(90), // e: rod above level while the count is true; a cast may differ
  lineType: z.enum(['braid', 'mono', 'other']),
  stretchShare: z.number().min(0).max(0.3), // of the line out, at casting load
  stretchSigmaShare: z.number().min(0).max(0.3),
  wrapSigmaShare: z.number().min(0.005).max(1), // σ of a count, as a share of one wrap
  pullM: z.number().min(0.05).max(2), // one pull of line in a float reading
  floatOffsetM: metres(2), // c: float and link above the ring when wound down
  leadG: z.number().min(5).max(500),
  leadShape: z.enum(['smooth_ball', 'ribbed', 'pronged', 'other']),
  leadId: z.uuid().nullable().optional(), // the calibrated lead thrown (surveys/lead-contract); none: its falls stay counts
  declinationDeg: z.number().min(-90).max(90), // magnetic to true, east positive
});
export type Kit = z.infer<typeof Kit>;

export const Aim = z.discriminatedUnion('by', [
  z.strictObject({
    by: z.literal('mark'),
    markId: z.uuid(),
    offsetDeg: z.number().min(-90).max(90), // right of the mark positive
  }),
  z.strictObject({
    by: z.literal('compass'),
    bearingDeg: z.number().min(0).lt(360), // magnetic, as read
    method: z.enum(['compass_phone', 'compass_sighting', 'estimated']),
  }),
]);
export type Aim = z.infer<typeof Aim>;

/** One reading of one throw, as observed. A reading closer in on the same throw carries the same `lineId`. */
export const CastObservation = z.strictObject({
  aim: Aim,
  sidestepM: z.number().min(-10).max(10), // right of the origin mark positive, facing the aim
  wrapsWhole: z.int().min(0).max(120),
  remainderM: metres(10),
  remainderStated: z.boolean(), // false: "14 and a bit" or not looked at; the wider σ applies
  lineText: z.string().max(40), // the count as it was typed, unit and all
  rodElevationDeg: z.number().min(0).max(90),
  drop: Drop.nullable(),
  dropCountS: z.number().min(0).max(60).nullable(),
  drag: Drag.nullable(),
  dragLengthM: metres(20).nullable(),
  cameBack: z.array(CameBack).max(10).nullable(), // null: nobody looked
  smell: z.enum(['none', 'bad_eggs']).nullable(),
  pulls: z.number().min(0.5).max(200).nullable(), // as counted; null: no float reading
  pullsAgain: z.number().min(0.5).max(200).nullable(), // a second reading of the same float
  floatSight: z.enum(['good', 'poor']).nullable(),
  flags: z.array(CastFlag).max(5),
  note: z.string().max(500),
});
export type CastObservation = z.infer<typeof CastObservation>;

export const Substrate = z.enum(['silt', 'clay', 'sand', 'gravel', 'stones']);
export type Substrate = z.infer<typeof Substrate>;
export const Cover = z.enum(['clear', 'low_weed', 'tall_weed', 'leaf_litter', 'snag']);
export type Cover = z.infer<typeof Cover>;
export const Bottom = z.enum([
  'gravel',
  'clay',
  'sand',
  'silt_firm',
  'silt_deep',
  'leaf',
  'weed_low',
  'weed_thick',
  'snag',
  'shell',
  'unknown',
]);
export type Bottom = z.infer<typeof Bottom>;
export const Grade = z.enum(['A', 'B', 'C', 'D']);
export type Grade = z.infer<typeof Grade>;

export const SubstrateShares = z.record(Substrate, z.number());
export type SubstrateShares = z.infer<typeof SubstrateShares>;
export const CoverShares = z.record(Cover, z.number());
export type CoverShares = z.infer<typeof CoverShares>;

/** One line of "how did you get this?": what was worked out, by which formula, from what. */
export const ReductionStep = z.object({
  key: z.string(),
  name: z.string(),
  formula: z.string(),
  inputs: z.array(z.object({ name: z.string(), value: z.string() })),
  value: z.string(), // with its unit
  sigma: z.string().nullable(),
});
export type ReductionStep = z.infer<typeof ReductionStep>;

/** A cast reduced: lake-plane metres east and north of the lake's origin; depths in metres below chart datum. */
export const SoundingView = z.object({
  position: z.tuple([z.number(), z.number()]), // lon, lat
  xM: z.number(),
  yM: z.number(),
  rangeM: z.number(),
  lineOutM: z.number(),
  bearingDeg: z.number(),
  covariance: z.object({ xx: z.number(), xy: z.number(), yy: z.number() }), // m²
  ellipse: z.object({ semiMajorM: z.number(), semiMinorM: z.number(), bearingDeg: z.number() }), // 95 %
  depthAsReadM: z.number().nullable(), // below the water of that hour
  depthM: z.number().nullable(), // below datum
  depthSigmaM: z.number().nullable(),
  grade: Grade,
  gradeReasons: z.array(z.string()),
  substrate: SubstrateShares.nullable(),
  cover: CoverShares.nullable(),
  bottom: Bottom,
  bottomWords: z.string(),
  askAgain: z.boolean(),
  warnings: z.array(z.string()),
});
export type SoundingView = z.infer<typeof SoundingView>;

export const Reduced = z.discriminatedUnion('ok', [
  z.object({ ok: z.literal(true), sounding: SoundingView, steps: z.array(ReductionStep) }),
  z.object({ ok: z.literal(false), reason: z.string(), remedy: z.string(), steps: z.array(ReductionStep) }),
]);
export type Reduced = z.infer<typeof Reduced>;

export const Weather = z.strictObject({
  windForce: z.int().min(0).max(12).nullable(), // Beaufort
  windFrom: z.enum(['N', 'NE', 'E', 'SE', 'S', 'SW', 'W', 'NW']).nullable(),
  note: z.string().max(300),
});
export type Weather = z.infer<typeof Weather>;

/** POST /api/lakes/:lakeId/visits. The id is made where the visit is typed, so that sending twice is harmless. */
export const OpenVisit = z.strictObject({
  id: z.uuid(),
  title: z.string().trim().min(1).max(120),
  competence: z.enum(['trainee', 'competent', 'lead']),
  boardId: z.uuid(),
  startedAt: z.iso.datetime(),
  gaugeStartM: z.number().min(-100).max(100),
  weather: Weather,
  clarity: z.string().max(120),
  weedState: z.string().max(120),
  kit: Kit,
  consentToPublish: z.boolean(),
});
export type OpenVisit = z.infer<typeof OpenVisit>;

/** PATCH /api/visits/:visitId/kit: a corrected constant; every cast of the visit is reduced again. */
export const CorrectKit = z.strictObject({ kit: Kit, version: Version });
export type CorrectKit = z.infer<typeof CorrectKit>;

/** POST /api/visits/:visitId/close */
export const CloseVisit = z.strictObject({
  endedAt: z.iso.datetime(),
  gaugeEndM: z.number().min(-100).max(100),
});
export type CloseVisit = z.infer<typeof CloseVisit>;

/** POST /api/visits/:visitId/casts. Kept exactly; answered with its reduction. */
export const KeepCast = z.strictObject({
  id: z.uuid(),
  pegId: z.uuid(),
  lineId: z.uuid(), // one throw; further readings closer in share it
  observedAt: z.iso.datetime(),
  observation: CastObservation,
});
export type KeepCast = z.infer<typeof KeepCast>;

export const CastView = z.object({
  id: z.uuid(),
  visitId: z.uuid(),
  pegId: z.uuid(),
  seq: z.int(),
  lineId: z.uuid(),
  observedAt: z.iso.datetime(),
  observation: CastObservation,
  reduced: Reduced,
});
export type CastView = z.infer<typeof CastView>;

export const ArcCoverage = z.object({
  pegId: z.uuid(),
  share: z.number(), // of the peg's arc, by sectors and rings
  repeatsShare: z.number(),
  casts: z.int(),
});
export type ArcCoverage = z.infer<typeof ArcCoverage>;

export const VisitView = z.object({
  id: z.uuid(),
  lakeId: z.uuid(),
  lakeName: z.string(),
  title: z.string(),
  surveyor: z.object({ id: z.uuid(), name: z.string() }),
  competence: z.string(),
  status: z.enum(['open', 'closed']),
  startedAt: z.iso.datetime(),
  endedAt: z.iso.datetime().nullable(),
  boardId: z.uuid(),
  gaugeStartM: z.number(),
  gaugeEndM: z.number().nullable(),
  datumM: z.number(),
  weather: Weather,
  clarity: z.string(),
  weedState: z.string(),
  kit: Kit,
  consentToPublish: z.boolean(),
  castCount: z.int(),
  soundingCount: z.int().default(0), // of logs taken in
  version: z.int(),
  may: z.object({ addCasts: z.boolean(), correct: z.boolean() }),
});
export type VisitView = z.infer<typeof VisitView>;

/** GET /api/lakes/:lakeId/visits: newest first. */
export const VisitList = z.object({ visits: z.array(VisitView), may: z.object({ open: z.boolean() }) });
export type VisitList = z.infer<typeof VisitList>;

/**
 * GET /api/visits/:visitId: the visit, its casts in order (their steps left out: whoever opens a cast works them out
 * with the same reduction), and coverage by peg. GET …/casts.csv is the same as a
 * table. DELETE …/casts/:castId takes the last one back.
 */
export const VisitWithCasts = z.object({
  visit: VisitView,
  casts: z.array(CastView),
  coverage: z.array(ArcCoverage),
  reducing: z.unknown().optional(), // Reducing (surveys/reducing-contract), parsed by the client
});
export type VisitWithCasts = z.infer<typeof VisitWithCasts>;

/** Our names for the columns a casts file can bring, in the order they are offered. */
export const CAST_COLUMNS = [
  'peg',
  'mark',
  'offset_deg',
  'bearing_deg_magnetic',
  'wraps_whole',
  'wraps_remainder_mm',
  'rod_angle',
  'drop',
  'drag',
  'drag_length_mm',
  'returned',
  'depth_pulls',
  'depth_pulls_again',
  'float_sight',
  'flags',
  'note',
  'at_utc',
] as const;
export type CastColumn = (typeof CAST_COLUMNS)[number];

/** Which column of the file feeds which of ours; null: not in the file. */
export const ColumnMapping = z.partialRecord(z.enum(CAST_COLUMNS), z.int().min(0).max(199));
export type ColumnMapping = z.infer<typeof ColumnMapping>;

/** POST /api/visits/:visitId/imports/preview and /imports: the file's text travels with how to read it. */
export const ImportCasts = z.strictObject({
  filename: z.string().max(200),
  text: z.string().max(4_000_000),
  mapping: ColumnMapping.nullable(), // null: guess from the heading
});
export type ImportCasts = z.infer<typeof ImportCasts>;

export const ImportRowError = z.object({
  row: z.int(),
  column: z.string(),
  value: z.string(),
  detail: z.string(),
});
export type ImportRowError = z.infer<typeof ImportRowError>;

export const ImportPreview = z.object({
  heading: z.array(z.string()),
  mapping: ColumnMapping,
  delimiter: z.string(),
  rows: z.int(),
  sample: z.array(z.object({ row: z.int(), cells: z.array(z.string()), words: z.string() })), // words: as we read it
  errors: z.array(ImportRowError),
  alreadyImported: z.boolean(),
});
export type ImportPreview = z.infer<typeof ImportPreview>;

export const ImportDone = z.object({ added: z.int(), alreadyImported: z.boolean() });
export type ImportDone = z.infer<typeof ImportDone>;
