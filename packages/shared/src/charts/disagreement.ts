import { z } from 'zod';
import { Position } from '../fisheries/contract';
import { Bottom, Grade, WrapReference } from '../surveys/contract';

/** "It isn't like that": what somebody found at a peg that the chart tells otherwise. */

export const DepthBy = z.enum(['float', 'lead_count', 'other']);
export type DepthBy = z.infer<typeof DepthBy>;

/** The place it was found at. A spot and a count over a mark are marked places; a touch on the chart is not. */
export const FoundAt = z.discriminatedUnion('by', [
  z.strictObject({ by: z.literal('spot'), spotId: z.uuid() }),
  z.strictObject({ by: z.literal('place'), position: Position }), // touched, or the end of a drawn cast
  z.strictObject({
    by: z.literal('count'),
    markId: z.uuid(),
    offsetDeg: z.number().min(-90).max(90), // right of the mark positive
    wrapsWhole: z.int().min(0).max(120),
    remainderM: z.number().min(0).max(10),
    stickSpacingM: z.number().min(0.3).max(10),
    wrapReference: WrapReference,
  }),
]);
export type FoundAt = z.infer<typeof FoundAt>;

/** What was found. Depth in metres below the water of that day. */
export const Found = z.strictObject({
  depthM: z.number().min(0.05).max(60).nullable(),
  depthBy: DepthBy.nullable(), // with a depth, and only then
  bottom: Bottom.exclude(['unknown', 'snag', 'weed_low', 'weed_thick']).nullable(),
  snag: z.boolean(),
  weed: z.enum(['clear', 'low', 'thick']).nullable(), // null: not said
  note: z.string().trim().max(500),
});
export type Found = z.infer<typeof Found>;

const saysSomething = ({ depthM, bottom, snag, weed }: Found): boolean =>
  depthM !== null || bottom !== null || snag || weed !== null;

/** POST /api/pegs/:pegId/disagreements. The id is made where it is typed, so that sending twice is harmless. */
export const Disagree = z.strictObject({
  id: z.uuid(),
  day: z.iso.date(), // civil day at the lake
  at: FoundAt,
  found: Found.refine(saysSomething, {
    error: 'Say what you found: a depth, the bottom, a snag or weed.',
    path: ['depthM'],
  }).refine(({ depthM, depthBy }) => (depthM === null) === (depthBy === null), {
    error: 'Say how the depth was measured.',
    path: ['depthBy'],
  }),
});
export type Disagree = z.infer<typeof Disagree>;

export const DisagreementStatus = z.enum(['waiting', 'accepted', 'declined', 'taken_back']);
export type DisagreementStatus = z.infer<typeof DisagreementStatus>;

/** Re-measured by the fishery's own staff: what they found there, which then stands in place of the report. */
export const Remeasured = z.strictObject({
  day: z.iso.date(),
  depthM: z.number().min(0.05).max(60).nullable(), // below the water of that day; null: the bottom only
});
export type Remeasured = z.infer<typeof Remeasured>;

/** POST /api/disagreements/:disagreementId/decide, answered with DisagreementForReview. */
export const DecideDisagreement = z.discriminatedUnion('decision', [
  z.strictObject({
    decision: z.literal('accept'),
    remeasured: Remeasured.nullable(),
    reason: z.string().trim().max(300),
  }),
  z.strictObject({
    decision: z.literal('decline'),
    reason: z.string().trim().min(1, 'Say why: the angler reads it.').max(300),
  }),
]);
export type DecideDisagreement = z.infer<typeof DecideDisagreement>;

/** POST /api/disagreements/:disagreementId/take-back: what was accepted counts no more in charts built from now on. */
export const TakeBackDisagreement = z.strictObject({
  reason: z.string().trim().min(1, 'Say why: the angler reads it.').max(300),
});
export type TakeBackDisagreement = z.infer<typeof TakeBackDisagreement>;

/** GET /api/disagreements/mine: the reader's own, newest first. It tells nothing of the chart. */
export const DisagreementView = z.object({
  id: z.uuid(),
  pegId: z.uuid(),
  pegNumber: z.string(),
  lakeId: z.uuid(),
  lakeName: z.string(),
  day: z.iso.date(),
  reportedAt: z.iso.datetime(),
  placeWords: z.string(), // "14 wraps + 0.30 m (12 ft) over the pump-house chimney"
  found: Found,
  status: DisagreementStatus,
  decidedAt: z.iso.datetime().nullable(),
  reason: z.string(),
  grade: Grade.nullable(), // as evidence, once accepted
  takenBack: z.object({ at: z.iso.datetime(), reason: z.string() }).nullable().default(null), // after it was accepted
  /** Charts made with it; to its reporter published ones only. */
  charts: z.array(z.object({ id: z.uuid(), version: z.string().nullable(), title: z.string() })),
});
export type DisagreementView = z.infer<typeof DisagreementView>;
export const DisagreementList = z.object({ disagreements: z.array(DisagreementView) });
export type DisagreementList = z.infer<typeof DisagreementList>;

/** A sounding near the reported place, nearest first. */
export const DoubtedSounding = z.object({
  id: z.uuid(),
  label: z.string(), // "FO7, cast 17"
  awayM: z.number(),
  depthM: z.number(), // at datum
  sigmaM: z.number(),
  bottom: Bottom,
  grade: Grade,
  observedOn: z.iso.date(),
  surveyor: z.string(),
});
export type DoubtedSounding = z.infer<typeof DoubtedSounding>;

/** GET /api/lakes/:lakeId/disagreements (who decides them): those that wait first, then the newest decided. */
export const DisagreementForReview = DisagreementView.extend({
  reporter: z.string(),
  decidedBy: z.string().nullable(),
  takenBackBy: z.string().nullable().default(null),
  xM: z.number(), // on the lake's plane
  yM: z.number(),
  ellipse: z.object({ semiMajorM: z.number(), semiMinorM: z.number(), bearingDeg: z.number() }), // 95 %
  /** Depth found, at datum, by the gauge board of that day; null without a depth or a reading near it. */
  foundDepthM: z.number().nullable(),
  foundSigmaM: z.number().nullable(),
  levelWords: z.string(), // how it was brought to datum, or why it could not be
  /** What the published chart says there, at datum; null when there is none. */
  chart: z
    .object({
      id: z.uuid(),
      version: z.string(),
      depthM: z.number().nullable(),
      sigmaM: z.number().nullable(),
      bottom: z.string().nullable(), // in words
      bottomConfidence: z.number().nullable(),
    })
    .nullable(),
  apartM: z.number().nullable(), // found less charted
  apartSigmas: z.number().nullable(), // in σ of the difference
  nearest: z.array(DoubtedSounding),
  gradeIfAccepted: Grade,
  gradeWords: z.string(),
  may: z.object({
    decide: z.boolean(),
    takeBack: z.boolean().default(false),
    whyNot: z.string().nullable(),
  }),
});
export type DisagreementForReview = z.infer<typeof DisagreementForReview>;
export const DisagreementReviewList = z.object({ disagreements: z.array(DisagreementForReview) });
export type DisagreementReviewList = z.infer<typeof DisagreementReviewList>;
