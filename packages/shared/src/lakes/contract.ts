import { z } from 'zod';
import { PhotoView } from '../files/contract';
import { Position, Version } from '../fisheries/contract';
import { LakePlaces } from './place-contract';
import { OutlineSource } from './outline-source';

export { AddPhoto, PhotoView } from '../files/contract';

const words = (max: number) => z.string().trim().max(max);

/** GeoJSON Polygon (RFC 7946): one shore, then islands. Closed rings of [lon, lat]. */
export const LakePolygon = z.strictObject({
  type: z.literal('Polygon'),
  coordinates: z.array(z.array(Position).max(20_001)).min(1).max(60), // more positions are told of in words
});
export type LakePolygon = z.infer<typeof LakePolygon>;

/** Who may see a layer: everybody; anglers with a ticket for that peg while it runs; members and up; staff only. */
export const Audience = z.enum(['public', 'ticket', 'members', 'staff']);
export type Audience = z.infer<typeof Audience>;
export const LayerAudiences = z.strictObject({
  depth: Audience, // tints, isobaths, section, depth today
  bottom: Audience,
  spots: Audience,
  soundings: Audience, // reduced casts as points; raw casts are for staff always
});
export type LayerAudiences = z.infer<typeof LayerAudiences>;

export const LakeDetails = z.strictObject({
  name: words(120).min(1),
  kind: z.enum([
    'gravel_pit',
    'estate_lake',
    'farm_pond',
    'reservoir',
    'canal_section',
    'river_section',
    'purpose_dug',
  ]),
  outline: LakePolygon,
  outlineFrom: OutlineSource.optional(), // absent: nobody said
  nights: z.boolean(),
  maxPeople: z.int().min(0).max(2000).nullable(),
  maxRods: z.int().min(0).max(5000).nullable(),
  stockClass: z.enum(['natural', 'improved', 'intensive']),
  ownership: z.enum(['owned', 'leased', 'shared']),
  designations: words(200), // SSSI, SAC, LNR: consents may be needed
  publicPathBeside: z.boolean(),
  inflowOutflow: words(300),
  emergencyAccess: words(400), // ambulance route and boat slip
  phoneSignal: words(200),
  datumM: z.number().min(-100).max(9000), // chart datum: a reading of the datum board
  maxGapM: z.number().min(2).max(15), // farther from a cast than this is "not surveyed"
  longestCastM: z.number().min(10).max(250),
  audiences: LayerAudiences,
  places: LakePlaces.optional(), // parking, gates, throw lines, hazards, overhead lines; left out of a change they stay
});
export type LakeDetails = z.infer<typeof LakeDetails>;

/** POST /api/fisheries/:fisheryId/lakes, PUT /api/lakes/:lakeId */
export const MakeLake = z.strictObject({ id: z.uuid(), details: LakeDetails });
export type MakeLake = z.infer<typeof MakeLake>;
export const ChangeLake = z.strictObject({ details: LakeDetails, version: Version });
export type ChangeLake = z.infer<typeof ChangeLake>;

/** POST /api/outlines/read: a file's text to an outline, with what was found wrong and whether it was mended. */
export const ReadOutline = z.strictObject({ filename: words(200), text: z.string().max(5_000_000) });
export type ReadOutline = z.infer<typeof ReadOutline>;
export const OutlineFinding = z.object({
  kind: z.enum(['mended', 'refused', 'noted']),
  words: z.string(),
  at: Position.nullable(),
});
export type OutlineFinding = z.infer<typeof OutlineFinding>;
export const OutlineRead = z.object({
  outline: LakePolygon.nullable(), // null when anything was refused
  areaM2: z.number().nullable(),
  findings: z.array(OutlineFinding),
});
export type OutlineRead = z.infer<typeof OutlineRead>;

export const GaugeBoardDetails = z.strictObject({
  code: words(30).min(1),
  kind: z.enum(['board', 'painted_mark']),
  position: Position,
  unit: z.enum(['m', 'ft']), // what is painted on it; stored readings are metres
  higherNumberHigherWater: z.boolean(),
  normalLowM: z.number().nullable(),
  normalHighM: z.number().nullable(),
  alarmLowM: z.number().nullable(),
  alarmHighM: z.number().nullable(),
  lastCleanedOn: z.iso.date().nullable(),
  isDatumBoard: z.boolean(), // the one board the chart datum is read on
});
export type GaugeBoardDetails = z.infer<typeof GaugeBoardDetails>;
/** PUT /api/lakes/:lakeId/boards/:boardId makes or changes. */
export const PutBoard = z.strictObject({ details: GaugeBoardDetails, version: Version.nullable() });
export type PutBoard = z.infer<typeof PutBoard>;

export const LevelReadingView = z.object({
  id: z.uuid(),
  at: z.iso.datetime(),
  levelM: z.number(),
  by: z.string(),
  note: z.string(),
});
export type LevelReadingView = z.infer<typeof LevelReadingView>;
/** POST /api/boards/:boardId/readings (bailiff and up). `levelM` as the board reads, in metres. */
export const RecordLevel = z.strictObject({
  id: z.uuid(),
  at: z.iso.datetime(),
  levelM: z.number().min(-100).max(9000),
  levelText: words(20), // as typed, unit and all
  note: words(300),
});
export type RecordLevel = z.infer<typeof RecordLevel>;

/** What the reader of a fresh reading is told: an alarm of the board, a jump that may be a misread figure. */
export const LevelWarning = z.object({
  kind: z.enum(['alarm_high', 'alarm_low', 'outside_normal', 'jump', 'older_than_newest']),
  words: z.string(),
});
export type LevelWarning = z.infer<typeof LevelWarning>;
/** Answer of POST /api/boards/:boardId/readings. The reading is kept either way; DELETE /api/readings/:readingId takes a misread one back. */
export const LevelRecorded = z.object({
  reading: LevelReadingView,
  warnings: z.array(LevelWarning),
});
export type LevelRecorded = z.infer<typeof LevelRecorded>;

/**
 * The newest reading of the datum board. `levelM` rises with the water whichever way the board is painted, so
 * depth today = depth at datum + levelM − datumM; `boardReadsM` is what stands on the board.
 */
export const LevelNow = z.object({
  levelM: z.number(),
  at: z.iso.datetime(),
  boardCode: z.string(),
  boardReadsM: z.number(),
});
export type LevelNow = z.infer<typeof LevelNow>;

export const GaugeBoardView = z.object({
  id: z.uuid(),
  details: GaugeBoardDetails,
  readings: z.array(LevelReadingView), // newest first, at most 60; `by` and `note` are empty unless the reader is staff
  version: z.int(),
});
export type GaugeBoardView = z.infer<typeof GaugeBoardView>;

export const MarkDetails = z.strictObject({
  code: words(30).min(1), // "M3"
  name: words(120).min(1), // "pump-house chimney"
  position: Position,
  fixedBy: z.enum(['plan', 'gnss', 'phone_gnss', 'estimated']),
  sigmaM: z.number().min(0.05).max(50),
  permanence: z.enum(['permanent', 'tree', 'pole', 'temporary']),
  nightNote: words(200),
});
export type MarkDetails = z.infer<typeof MarkDetails>;
/** PUT /api/lakes/:lakeId/marks/:markId */
export const PutMark = z.strictObject({ details: MarkDetails, version: Version.nullable() });
export type PutMark = z.infer<typeof PutMark>;

export const MarkView = z.object({
  id: z.uuid(),
  details: MarkDetails,
  photos: z.array(PhotoView),
  version: z.int(),
});
export type MarkView = z.infer<typeof MarkView>;

export const PegDetails = z.strictObject({
  number: words(12).min(1), // "FO7"
  name: words(80),
  position: Position, // at the water's edge
  origin: Position, // the marked place to stand
  originMark: words(200), // "painted dot on the peg board"
  originFixedBy: z.enum(['gnss', 'phone_gnss', 'tape_or_plan', 'estimated']),
  originMarked: z.boolean(), // physically marked
  arcFromDeg: z.number().min(0).lt(360), // left limit of this peg's water, true
  arcToDeg: z.number().min(0).lt(360), // right limit, clockwise from the left
  waterWords: words(300), // "to the line between the dead oak and the pump house"
  longestCastM: z.number().min(5).max(250).nullable(),
  platform: z.strictObject({
    kind: z.enum(['none', 'bank', 'timber', 'stone']),
    widthM: z.number().min(0).max(50).nullable(),
    lengthM: z.number().min(0).max(50).nullable(),
    heightM: z.number().min(-2).max(10).nullable(), // above water at datum
    inspectedOn: z.iso.date().nullable(),
    state: words(120),
  }),
  access: z.strictObject({
    fromParkingM: z.int().min(0).max(10_000).nullable(),
    surface: words(120),
    steepest: words(60),
    steps: z.int().min(0).max(500).nullable(),
    gates: words(120),
    barrow: z.enum(['yes', 'no', 'unknown']),
    winter: words(120),
  }),
  stepFree: z.strictObject({
    kind: z.enum(['measured_suitable', 'assisted', 'not_suitable', 'unknown']),
    facts: words(400), // path width, gradient, turning circle, edge height, bay, toilet
  }),
  parking: z.strictObject({
    bay: words(60),
    spaces: z.int().min(0).max(500).nullable(),
    walkMinutes: z.int().min(0).max(240).nullable(),
    vehicleLimit: words(80),
    winterClosure: words(120),
  }),
  people: z.int().min(1).max(20),
  rods: z.int().min(1).max(40),
  letting: z.enum(['whole', 'by_place']).optional(), // by place: strangers may share it; absent: whole
  shelters: z.int().min(0).max(20),
  overheadLine: z.strictObject({
    kind: z.enum(['none', 'present', 'unknown']),
    distanceM: z.number().min(0).max(500).nullable(), // horizontally from the outer wire, at ground level
    heightM: z.number().min(0).max(100).nullable(),
    operator: words(120),
    signFitted: z.boolean(),
    fishing: z.enum(['ok', 'restricted', 'no_fishing']), // within 30 m never 'ok'
    document: words(200).optional(), // the risk assessment on file and its date; without one no ticket within 30 m
  }),
  hazards: z.array(words(120).min(1)).max(30),
  tackleLimits: words(400),
  notesPublic: words(2000),
  notesMembers: words(2000),
  notesStaff: words(2000),
  status: z.enum(['open', 'limited', 'closed']),
  statusReason: words(300),
  statusUntil: z.iso.date().nullable(),
  emergency: z.strictObject({
    gridReference: words(20),
    throwLine: words(120),
    ambulanceGate: words(120),
    sayThis: words(300), // to the 999 operator
  }),
});
export type PegDetails = z.infer<typeof PegDetails>;
/** POST /api/lakes/:lakeId/pegs (the new peg is last in walking order), PUT /api/pegs/:pegId */
export const MakePeg = z.strictObject({ id: z.uuid(), details: PegDetails });
export type MakePeg = z.infer<typeof MakePeg>;
export const ChangePeg = z.strictObject({ details: PegDetails, version: Version });
export type ChangePeg = z.infer<typeof ChangePeg>;

/** PUT /api/lakes/:lakeId/peg-order: every peg of the lake once, in the order they are walked. */
export const OrderPegs = z.strictObject({ pegIds: z.array(z.uuid()).min(1).max(1000) });
export type OrderPegs = z.infer<typeof OrderPegs>;

/** GET /api/pegs/:pegId/details (open; what the reader may not see is empty) */
export const PegView = z.object({
  id: z.uuid(),
  lakeId: z.uuid(),
  details: PegDetails, // notes beyond the reader's audience are empty
  photos: z.array(PhotoView),
  version: z.int(),
  may: z.object({ change: z.boolean(), addPhotos: z.boolean() }),
});
export type PegView = z.infer<typeof PegView>;

/** GET /api/lakes/:lakeId/pegs: every peg of a lake in full, in walking order, for a phone that will lose its signal. */
export const PegList = z.object({ pegs: z.array(PegView) });
export type PegList = z.infer<typeof PegList>;

export const PegListItem = z.object({
  id: z.uuid(),
  number: z.string(),
  name: z.string(),
  position: Position,
  facingDeg: z.number(), // middle of its arc
  status: z.enum(['open', 'limited', 'closed']),
  statusReason: z.string(),
  overheadFishing: z.enum(['ok', 'restricted', 'no_fishing']),
  fromParkingM: z.int().nullable(),
  overheadDispute: z.string().nullable().optional(), // staff: its sheet and the lake's drawing differ
});
export type PegListItem = z.infer<typeof PegListItem>;

/** GET /api/lakes/:lakeId (public): the lake, its pegs in walking order, marks and boards. */
export const LakeView = z.object({
  id: z.uuid(),
  fisheryId: z.uuid(),
  fisheryName: z.string(),
  zone: z.string(),
  details: LakeDetails,
  origin: Position, // of the lake's local plane
  areaM2: z.number(),
  levelNow: LevelNow.nullable(),
  pegs: z.array(PegListItem),
  marks: z.array(MarkView),
  boards: z.array(GaugeBoardView),
  publishedChart: z.object({ id: z.uuid(), version: z.string() }).nullable(),
  version: z.int(),
  may: z.object({
    change: z.boolean(), // the lake itself
    changePegs: z.boolean(), // pegs, marks, boards, photos
    recordLevel: z.boolean(),
    survey: z.boolean(),
    buildCharts: z.boolean(),
    approveCharts: z.boolean(),
  }),
});
export type LakeView = z.infer<typeof LakeView>;
