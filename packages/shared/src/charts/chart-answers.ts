import { z } from 'zod';
import { Position } from '../fisheries/contract';
import { LevelNow } from '../lakes/contract';
import { PlaceWater } from '../lakes/peg-water-contract';
import { Bottom, Cover, Grade, Substrate, WrapReference } from '../surveys/contract';

/**
 * What the chart can tell beyond its layers. Places are x, y metres on the lake's plane; rings are x, y, x, y … closed.
 * Depths are metres at chart datum; depth today = depth + levelNow.levelM − datumM. What a reader may not see is null with
 * the reason in `whyNot`; a chart built before an answer existed has none, and says so there too.
 */
const Ring = z.array(z.number());
const ChartNamed = z.object({
  id: z.uuid(),
  version: z.string().nullable(),
  surveyedTo: z.iso.date(),
  datumM: z.number(),
});

export const FeatureKind = z.enum(['bar', 'shelf', 'gully', 'hole']);
export type FeatureKind = z.infer<typeof FeatureKind>;

export const ChartFeature = z.object({
  key: z.string(), // 'bar-2': steady for this chart
  kind: FeatureKind,
  name: z.string(), // "Bar 2"
  words: z.string(), // "Bar 2: 34 m long, 9 m wide, top at 1.4 m, 1.1 m above what lies round it"
  xM: z.number(), // its shallowest place (bar), deepest (gully, hole), or middle (shelf)
  yM: z.number(),
  lengthM: z.number(),
  widthM: z.number(),
  areaM2: z.number(),
  axisDeg: z.number().nullable(), // 0 ≤ axis < 180, of the long way; null where it is about as wide as long
  depthM: z.number(), // top of a bar, foot of a gully or hole, mean of a shelf
  aroundM: z.number(), // depth of what lies round it; of a shelf: at the foot of its edge
  reliefM: z.number(), // how far it stands above (bar, shelf) or lies below (gully, hole), always positive
  reliefSigmaM: z.number(),
  certain: z.boolean(), // relief beyond 1.96 σ of the difference
  rings: z.array(Ring),
});
export type ChartFeature = z.infer<typeof ChartFeature>;

/** GET /api/charts/:chartId/features: the certain ones first, largest first within a kind. */
export const ChartFeatures = z.object({
  chart: ChartNamed,
  levelNow: LevelNow.nullable(),
  features: z.array(ChartFeature).nullable(),
  whyNot: z.string().nullable(),
  method: z.string(),
});
export type ChartFeatures = z.infer<typeof ChartFeatures>;

/** How a place is reached from a stance: on given sticks, over a far-bank mark. */
export const Cast = z.object({
  rangeM: z.number(),
  lineOutM: z.number(),
  wrapsWhole: z.int(),
  remainderM: z.number(),
  stickSpacingM: z.number(),
  wrapReference: WrapReference,
  countWords: z.string(), // "14 wraps + 0.62 m (12 ft)"
  bearingDeg: z.number(), // true
  mark: z.object({ code: z.string(), name: z.string(), offsetDeg: z.number() }).nullable(), // right positive
});
export type Cast = z.infer<typeof Cast>;

/** A small area whose bottom differs from what lies round it. */
export const StandOutPatch = z.object({
  rank: z.int(), // 1 stands out most
  layer: z.enum(['substrate', 'cover']),
  bottom: z.union([Substrate, Cover]),
  around: z.union([Substrate, Cover]), // commonest in the ring round it
  words: z.string(),
  xM: z.number(),
  yM: z.number(),
  areaM2: z.number(),
  acrossM: z.number(), // diameter of the circle of that area
  contrast: z.number(), // 0…1: how much likelier its bottom is inside than in the ring
  confidence: z.number(), // 0…1: mean probability of its bottom inside
  rings: z.array(Ring),
  /** Pegs that reach its middle within their longest cast and sight, whose water it is first, then nearest; at most 4. */
  reach: z.array(z.object({ pegId: z.uuid(), number: z.string(), own: z.boolean(), cast: Cast })),
});
export type StandOutPatch = z.infer<typeof StandOutPatch>;

/** GET /api/charts/:chartId/patches */
export const StandOutPatches = z.object({
  chart: ChartNamed,
  patches: z.array(StandOutPatch).nullable(),
  whyNot: z.string().nullable(),
  ringM: z.number(), // width of the ring each is held against
  caution: z.string(), // "Where bottoms differ fish have often been feeding. Never promised …"
});
export type StandOutPatches = z.infer<typeof StandOutPatches>;

/** One cast to make next, and how much the whole lake's uncertainty falls by it, after those before it in the list. */
export const NextCast = z.object({
  order: z.int(),
  xM: z.number(),
  yM: z.number(),
  cast: Cast,
  gainShare: z.number(), // 0…1: share of the lake's mean variance it takes away
});
export type NextCast = z.infer<typeof NextCast>;

/**
 * GET /api/charts/:chartId/next-casts (staff): per peg, in walking order. Made with the chart; marks are today's.
 */
export const NextCasts = z.object({
  chart: ChartNamed,
  pegs: z
    .array(
      z.object({
        pegId: z.uuid(),
        number: z.string(),
        name: z.string(),
        gainShare: z.number(), // of all its casts together
        casts: z.array(NextCast),
        words: z.string(),
      }),
    )
    .nullable(),
  meanSigmaM: z.number().nullable(), // root of the lake's mean variance now
  whyNot: z.string().nullable(),
  method: z.string(),
});
export type NextCasts = z.infer<typeof NextCasts>;

/** GET /api/charts/:chartId/changes?since=: against an earlier version; without `since` the one published before it. */
export const ChangesAsked = z.object({ since: z.uuid().optional() });
export type ChangesAsked = z.infer<typeof ChangesAsked>;

export const ChangedArea = z.object({
  kind: z.enum(['shallower', 'deeper', 'cover_gained', 'cover_lost', 'bottom']),
  words: z.string(), // what changed and what it may mean
  xM: z.number(),
  yM: z.number(),
  areaM2: z.number(),
  meanChangeM: z.number().nullable(), // now less then, deeper positive; null for a change of bottom or cover
  meanSigmaM: z.number().nullable(), // of the difference at one place, mean over the area
  volumeM3: z.number().nullable(), // area × change, deeper positive
  from: z.union([Substrate, Cover]).nullable(),
  to: z.union([Substrate, Cover]).nullable(),
  rings: z.array(Ring),
});
export type ChangedArea = z.infer<typeof ChangedArea>;

export const ChartChanges = z.object({
  chart: ChartNamed,
  since: ChartNamed.nullable(), // null: there is no earlier version to hold it against
  earlier: z.array(z.object({ id: z.uuid(), version: z.string() })), // versions it may be held against, newest first
  comparedM2: z.number().nullable(), // surveyed in both
  areas: z.array(ChangedArea).nullable(), // largest first
  whyNot: z.string().nullable(),
  words: z.string(),
});
export type ChartChanges = z.infer<typeof ChartChanges>;

/** The reader's own sticks; left out, the survey's. */
const Sticks = {
  stickSpacingM: z.coerce.number().min(0.3).max(10).optional(),
  wrapReference: WrapReference.optional(),
};

/** GET /api/pegs/:pegId/cast-reading: a mark (with an offset, right positive) or a true bearing, never both. */
export const CastAsked = z
  .object({
    wrapsWhole: z.coerce.number().int().min(0).max(120),
    remainderM: z.coerce.number().min(0).max(10).default(0),
    ...Sticks,
    markId: z.uuid().optional(),
    offsetDeg: z.coerce.number().min(-90).max(90).default(0),
    bearingDeg: z.coerce.number().min(0).lt(360).optional(),
  })
  .refine(({ markId, bearingDeg }) => (markId === undefined) !== (bearingDeg === undefined), {
    message: 'Give a far-bank mark or a bearing, and not both.',
    path: ['markId'],
  });
export type CastAsked = z.infer<typeof CastAsked>;

/** What the chart says of one place to this reader. */
export const PlaceReading = z.object({
  xM: z.number(),
  yM: z.number(),
  position: Position,
  depthM: z.number().nullable(),
  depthSigmaM: z.number().nullable(),
  depthTodayM: z.number().nullable(), // null also where no level was read; ≤ 0: dry today
  bottom: Bottom.nullable(),
  bottomConfidence: z.number().nullable(),
  grade: Grade.nullable(), // of the cast it is quoted from; null when from the charted surface
  quotedFrom: z.enum(['cast', 'chart']).nullable(),
  surveyedOn: z.iso.date().nullable(),
  water: PlaceWater,
});
export type PlaceReading = z.infer<typeof PlaceReading>;

/** Where a cast lands and what lies there, or why it can't be told, in words. */
export const CastReading = z.discriminatedUnion('ok', [
  z.object({
    ok: z.literal(true),
    pegId: z.uuid(),
    chart: ChartNamed,
    age: z.enum(['current', 'ageing', 'old', 'changed']),
    cast: Cast, // as asked, on the asked sticks
    place: PlaceReading,
    spreadM: z.number(), // 95 % of casts so counted and aimed land within this of the place
    warnings: z.array(z.string()),
    words: z.string(),
    whyNot: z.string().nullable(), // a layer kept from this reader, or not surveyed
  }),
  z.object({ ok: z.literal(false), reason: z.string(), remedy: z.string() }),
]);
export type CastReading = z.infer<typeof CastReading>;

/** GET /api/pegs/:pegId/same-spot: a spot of any peg of the lake, or any place of its water; never both. */
export const SameSpotAsked = z
  .object({
    spotId: z.uuid().optional(),
    lon: z.coerce.number().min(-180).max(180).optional(),
    lat: z.coerce.number().min(-90).max(90).optional(),
    ...Sticks,
  })
  .refine(({ spotId, lon, lat }) => (spotId === undefined) === (lon !== undefined && lat !== undefined), {
    message: 'Give a spot, or a longitude and a latitude.',
    path: ['spotId'],
  });
export type SameSpotAsked = z.infer<typeof SameSpotAsked>;

export const SameSpotView = z.discriminatedUnion('ok', [
  z.object({
    ok: z.literal(true),
    pegId: z.uuid(),
    spot: z.object({ id: z.uuid(), name: z.string(), pegId: z.uuid(), pegNumber: z.string() }).nullable(),
    place: PlaceReading,
    surveySticks: Cast,
    yourSticks: Cast.nullable(), // null: none were given, or they are the survey's
    marks: z.array(z.object({ code: z.string(), name: z.string(), offsetDeg: z.number() })), // nearest first, at most 3
    reachable: z.object({ inArc: z.boolean(), inRange: z.boolean(), inSight: z.boolean() }),
    warnings: z.array(z.string()), // "Beyond this peg’s longest cast (80 m)." "In peg 8’s water."
    words: z.string(),
    whyNot: z.string().nullable(),
  }),
  z.object({ ok: z.literal(false), reason: z.string(), remedy: z.string() }),
]);
export type SameSpotView = z.infer<typeof SameSpotView>;

/**
 * GET /api/pegs/:pegId/similar: open pegs of this lake first, then of the fishery's other lakes, most alike first (to a
 * tenth, then the nearest); at most 8.
 */
export const SimilarPeg = z.object({
  pegId: z.uuid(),
  number: z.string(),
  name: z.string(),
  lakeId: z.uuid(),
  lakeName: z.string(),
  sameLake: z.boolean(),
  distanceM: z.number(), // straight, stance to stance
  likeness: z.number(), // 0…1 over what could be compared
  alike: z.array(z.string()), // "Mostly gravel too (62 % and 58 %)"
  differs: z.array(z.string()), // "3 steps; this peg has none"
  stepFree: z.enum(['measured_suitable', 'assisted', 'not_suitable', 'unknown']),
  status: z.enum(['open', 'limited', 'closed']),
});
export type SimilarPeg = z.infer<typeof SimilarPeg>;
export const SimilarPegs = z.object({
  pegId: z.uuid(),
  pegs: z.array(SimilarPeg),
  compared: z.string(), // what the likeness is made of for this reader, in words
});
export type SimilarPegs = z.infer<typeof SimilarPegs>;
