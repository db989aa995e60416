import { z } from 'zod';
import { ChartLogView, SurveyedBy } from './chart-log-view';
import { Position, Version } from '../fisheries/contract';
import { LakePolygon, LevelNow, PhotoView } from '../lakes/contract';
import { PlaceWater } from '../lakes/peg-water-contract';
import { ShownPlace } from '../lakes/place-contract';
import { Bottom, Cover, Grade, Substrate } from '../surveys/contract';
import { BottomPoint, BottomQualityView, EndedEvidence } from './bottom-quality-contract';
import { ChartChange } from './chart-change-contract';
import { LeftOutView, LogMissView } from './left-out-contract';
import { SoundingMiss, SoundingMissView } from './sounding-miss';

/** draft → submitted → approved by another → published; then superseded by the next, or withdrawn. */
export const ChartStatus = z.enum(['draft', 'submitted', 'published', 'superseded', 'withdrawn']);
export type ChartStatus = z.infer<typeof ChartStatus>;

/** Isobath steps offered, in metres: 0.25, 0.5, 1 m and 1, 2, 5 ft. */
export const CONTOUR_STEPS_M = [0.25, 0.5, 1, 0.3048, 0.6096, 1.524] as const;

/** POST /api/lakes/:lakeId/charts: makes a draft and queues its building; answers 202 ChartReview. */
export const DraftChart = z.strictObject({
  id: z.uuid(),
  title: z.string().trim().min(1).max(120),
  visitIds: z.array(z.uuid()).min(1).max(500),
  contourStepM: z.number().min(0.2).max(2),
});
export type DraftChart = z.infer<typeof DraftChart>;

export const BuildView = z.object({
  state: z.enum(['queued', 'running', 'done', 'failed', 'cancelled']),
  step: z.string(), // in words: "choosing the variogram"
  share: z.number(), // 0…1 of the whole, true
  error: z.string().nullable(),
});
export type BuildView = z.infer<typeof BuildView>;

export const CheckView = z.object({
  key: z.string(),
  state: z.enum(['passed', 'failed', 'warning']),
  blocks: z.boolean(),
  words: z.string(),
  ids: z.array(z.string()), // casts or visits it speaks of
});
export type CheckView = z.infer<typeof CheckView>;

/** Leave-one-out quality of the surface. */
export const QualityView = z.object({
  soundings: z.int(),
  meanErrorM: z.number(),
  rmseM: z.number(),
  standardisedVariance: z.number(), // near 1 when the stated σ is honest
  coverage95: z.number(), // share of soundings inside their own 95 % band
  surveyedShare: z.number(), // of the lake's water
  worst: z.array(SoundingMiss),
  flagged: z.array(z.string()), // ids of the soundings out of line by more than 3.5 robust σ; they are used all the same
  flaggedBy: z.array(SoundingMiss).default([]), // by how much
  variogram: z.object({ model: z.string(), nugget: z.number(), sill: z.number(), rangeM: z.number() }),
  models: z.array(z.object({ model: z.string(), rmseM: z.number(), standardisedVariance: z.number() })),
  words: z.string(), // which model and why
  bottom: BottomQualityView.optional(), // charts built before it was kept have none
});
export type QualityView = z.infer<typeof QualityView>;

/** GET /api/lakes/:lakeId/charts (staff: all; others: published, superseded and withdrawn ones by number only). */
export const ChartListItem = z.object({
  id: z.uuid(),
  version: z.string().nullable(), // "2027.1", given when published
  title: z.string(),
  status: ChartStatus,
  surveyedFrom: z.iso.date().nullable(),
  surveyedTo: z.iso.date().nullable(),
  submittedBy: z.string().nullable(),
  approvedBy: z.string().nullable(),
  publishedAt: z.iso.datetime().nullable(),
  build: BuildView.nullable(),
});
export type ChartListItem = z.infer<typeof ChartListItem>;
export const ChartList = z.object({ charts: z.array(ChartListItem), may: z.object({ build: z.boolean() }) });
export type ChartList = z.infer<typeof ChartList>;

/** GET /api/charts/:chartId/review (staff). */
export const ChartReview = z.object({
  chart: ChartListItem,
  lakeId: z.uuid(),
  lakeName: z.string(),
  zone: z.string(), // IANA, of the fishery
  checks: z.array(CheckView),
  quality: QualityView.nullable(),
  ended: z.array(EndedEvidence).default([]), // what events since the casts took out of it
  bottomTable: z.int().default(0), // version of the table of feels it was made with; 0 is the built-in
  misses: z.array(SoundingMissView).default([]), // the flagged and the worst ten, worst first
  logMisses: z.array(LogMissView).default([]), // the same of boats' logs
  leftOut: z.array(LeftOutView).default([]), // by a person; newest first, those put back behind
  logs: z.array(ChartLogView).default([]),
  may: z.object({
    leaveOut: z.boolean().default(false),
    submit: z.boolean(),
    approve: z.boolean(),
    approveWhyNot: z.string().nullable(), // "You surveyed this chart: someone else approves it."
    rebuild: z.boolean(),
    cancelBuild: z.boolean(),
    withdraw: z.boolean(),
    discard: z.boolean(),
  }),
});
export type ChartReview = z.infer<typeof ChartReview>;

/**
 * POST /api/charts/:chartId/submit, /approve (publishes), /cancel-build, /rebuild, /withdraw, each answered with
 * ChartReview; DELETE discards a draft.
 */
export const WithdrawChart = z.strictObject({ reason: z.string().trim().min(1).max(300) });
export type WithdrawChart = z.infer<typeof WithdrawChart>;

/** Why a layer is missing for this reader; null: it is there. */
export const LayerNotes = z.object({
  depth: z.string().nullable(),
  bottom: z.string().nullable(),
  spots: z.string().nullable(),
  soundings: z.string().nullable(),
});
export type LayerNotes = z.infer<typeof LayerNotes>;

/** Where the grid lies on the lake's plane; cells row-major from the south-west, x and y of the first cell's centre. */
export const GridFrame = z.object({
  columns: z.int(),
  rows: z.int(),
  cellM: z.number(),
  originM: z.object({ xM: z.number(), yM: z.number() }),
});
export type GridFrame = z.infer<typeof GridFrame>;

/** GET /api/charts/:chartId: everything this reader may see of one chart. Bytes are base64 (charts/chart-encoding). */
export const ChartView = z.object({
  id: z.uuid(),
  lakeId: z.uuid(),
  lakeName: z.string(),
  fisheryName: z.string(),
  zone: z.string(),
  version: z.string().nullable(),
  title: z.string(),
  status: ChartStatus,
  withdrawnReason: z.string().nullable(),
  supersededBy: z.object({ id: z.uuid(), version: z.string() }).nullable(),
  surveyedFrom: z.iso.date(),
  surveyedTo: z.iso.date(),
  publishedAt: z.iso.datetime().nullable(),
  age: z.enum(['current', 'ageing', 'old', 'changed']),
  changes: z.array(ChartChange).optional(), // what dates it, newest first
  datumM: z.number(),
  levelNow: LevelNow.nullable(), // against this chart's datum
  contourStepM: z.number(),
  origin: Position,
  outline: LakePolygon,
  pegs: z.array(
    z.object({
      id: z.uuid(),
      number: z.string(),
      name: z.string(),
      xM: z.number(), // of the origin mark, on the lake's plane
      yM: z.number(),
      facingDeg: z.number(),
      status: z.enum(['open', 'limited', 'closed']),
    }),
  ),
  marks: z.array(
    z.object({ id: z.uuid(), code: z.string(), name: z.string(), xM: z.number(), yM: z.number() }),
  ),
  places: z.array(ShownPlace).optional(), // what is drawn beside them, as far as this reader is shown it
  frame: GridFrame.nullable(),
  depth: z.string().nullable(), // int16 cm below datum
  sigma: z.string().nullable(), // uint8
  isobaths: z
    .array(z.object({ levelM: z.number(), lines: z.array(z.array(z.number())) })) // x, y, x, y … metres, 0.01
    .nullable(),
  substrate: z.string().nullable(), // uint8 class, uint8 confidence interleaved as chart-encoding says
  cover: z.string().nullable(),
  soundings: z
    .array(
      z.object({
        id: z.string(),
        xM: z.number(),
        yM: z.number(),
        depthM: z.number(),
        sigmaM: z.number(),
        bottom: Bottom,
        grade: Grade,
        ofLog: z.boolean().optional(), // merged from a log's; those of logs are thinned for the eye
      }),
    )
    .nullable(),
  bottomPoints: z.array(BottomPoint).nullable().optional(), // casts that read no depth, most snags among them
  hypsography: z.array(z.object({ depthM: z.number(), areaM2: z.number(), volumeM3: z.number() })).nullable(),
  figures: z
    .object({
      areaM2: z.number(),
      volumeM3: z.number(),
      meanDepthM: z.number(),
      greatestDepthM: z.number(),
      shorelineDevelopment: z.number(),
      surveyedShare: z.number(),
    })
    .nullable(),
  surveyedBy: SurveyedBy.optional(), // absent until it is built
  layerNotes: LayerNotes,
  may: z.object({ report: z.boolean() }).default({ report: false }), // take raw casts and the report away
});
export type ChartView = z.infer<typeof ChartView>;

/** GET /api/charts/:chartId/geojson answers RFC 7946 with the same layers as ChartView for the same reader. */

export const SectionPoint = z.object({
  rangeM: z.number(),
  lineOutM: z.number(), // wound line that reaches it from this stance
  depthM: z.number().nullable(), // at datum; null: not surveyed
  sigmaM: z.number().nullable(),
  bottom: z.union([Substrate, Cover]).nullable(),
});
export type SectionPoint = z.infer<typeof SectionPoint>;

export const SpotDetails = z.strictObject({
  name: z.string().trim().min(1).max(80),
  position: Position,
  usableRadiusM: z.number().min(0.3).max(20),
  note: z.string().trim().max(500),
});
export type SpotDetails = z.infer<typeof SpotDetails>;
/** PUT /api/pegs/:pegId/spots/:spotId answers SpotKept; DELETE takes it away. */
export const PutSpot = z.strictObject({ details: SpotDetails, version: Version.nullable() });
export type PutSpot = z.infer<typeof PutSpot>;

export const SpotKept = z.object({ version: z.int() });
export type SpotKept = z.infer<typeof SpotKept>;

/** A spot as reached from this peg with the survey's sticks. */
export const SpotView = z.object({
  id: z.uuid(),
  name: z.string(),
  note: z.string(),
  xM: z.number(),
  yM: z.number(),
  usableRadiusM: z.number(),
  rangeM: z.number(), // over the water, from the peg's origin mark; with xM, yM to the metre when depths aren't shown
  lineOutM: z.number(),
  wrapsWhole: z.int(),
  remainderM: z.number(),
  stickSpacingM: z.number(),
  wrapReference: z.enum(['lead_to_rod_tip', 'lead_to_clip']),
  bearingDeg: z.number(),
  mark: z.object({ code: z.string(), name: z.string(), offsetDeg: z.number() }).nullable(), // right positive
  depthM: z.number().nullable(), // at datum
  depthSigmaM: z.number().nullable(),
  bottom: Bottom.nullable(),
  bottomConfidence: z.number().nullable(),
  /** What depth and bottom are quoted from: a cast within the usable radius, else the charted surface. */
  quotedFrom: z.enum(['cast', 'chart']).nullable(),
  surveyLevelM: z.number().nullable(), // the board at that cast, as `levelNow`; null when quoted from the chart
  depthAtSurveyM: z.number().nullable(), // below the water of that hour
  words: z.string(), // all of it in a sentence, lengths in metres
  grade: Grade.nullable(),
  surveyedOn: z.iso.date().nullable(),
  section: z.array(SectionPoint).nullable(),
  presentation: z.string().nullable(),
  water: PlaceWater.nullable().default(null), // whose water it lies in
  version: z.int(),
});
export type SpotView = z.infer<typeof SpotView>;

/** Another peg's spot that lies in this peg's water, as reached from here; its `version` is not for changing it here. */
export const NeighbourSpot = z.object({
  peg: z.object({ id: z.uuid(), number: z.string(), name: z.string() }),
  spot: SpotView,
});
export type NeighbourSpot = z.infer<typeof NeighbourSpot>;

/** The chart before a peg on a coarse grid; bytes as in ChartView, a layer that isn't this reader's is null. */
export const ExtractGrid = z.object({
  frame: GridFrame,
  depth: z.string().nullable(),
  substrate: z.string().nullable(),
  cover: z.string().nullable(),
});
export type ExtractGrid = z.infer<typeof ExtractGrid>;

/** GET /api/pegs/:pegId/page (no sign-in): what an angler reads before coming. ≤ 60 kB without photos. */
export const PegPageView = z.object({
  id: z.uuid(),
  number: z.string(),
  name: z.string(),
  fishery: z.object({
    id: z.uuid(),
    name: z.string(),
    zone: z.string(),
    dutyPhone: z.string(),
    meetingPoint: z.string(),
  }),
  lake: z.object({ id: z.uuid(), name: z.string(), emergencyAccess: z.string(), phoneSignal: z.string() }),
  details: z.unknown(), // PegDetails with notes beyond the reader's audience emptied; parsed by the client
  photos: z.array(PhotoView),
  chart: z
    .object({
      id: z.uuid(),
      version: z.string(),
      surveyedFrom: z.iso.date(),
      surveyedTo: z.iso.date(),
      datumM: z.number(),
      age: z.enum(['current', 'ageing', 'old', 'changed']),
      changes: z.array(ChartChange).optional(), // what dates it, newest first
    })
    .nullable(),
  levelNow: LevelNow.nullable(), // against this chart's datum
  spots: z.array(SpotView).nullable(),
  neighbourSpots: z.array(NeighbourSpot).nullable().default(null),
  extract: z // the piece of chart in front of the peg, on the lake's plane
    .object({
      originM: z.object({ xM: z.number(), yM: z.number() }), // the peg's origin mark
      facingDeg: z.number(),
      shore: z.array(z.array(z.number())), // x, y, x, y … metres
      water: z.array(z.array(z.number())), // rings, shore first, cut off at the extract's own box
      contourStepM: z.number(),
      grid: ExtractGrid.nullable(),
      isobaths: z.array(z.object({ levelM: z.number(), lines: z.array(z.array(z.number())) })),
    })
    .nullable(),
  layerNotes: LayerNotes,
  cautions: z.array(z.string()),
  rigCaution: z.string(), // beside every piece of advice on presentation
  emergencyWords: z.string(),
  cardUrl: z.string(), // GET /api/pegs/:pegId/card.pdf
  shortUrl: z.string(), // the peg's light page, as its card shows it: https://…/p/K7M3XD
  ticket: z.object({ from: z.iso.datetime(), until: z.iso.datetime() }).nullable(), // the reader's own, if any
});
export type PegPageView = z.infer<typeof PegPageView>;

/** GET /api/pegs/:pegId/section?bearingDeg=&toM= → { points } for a drawn cast, within the reader's audience. */
export const SectionAsked = z.object({
  bearingDeg: z.coerce.number().min(0).lt(360),
  toM: z.coerce.number().min(5).max(250),
});
export type SectionAsked = z.infer<typeof SectionAsked>;
export const SectionView = z.object({ points: z.array(SectionPoint) });
export type SectionView = z.infer<typeof SectionView>;
