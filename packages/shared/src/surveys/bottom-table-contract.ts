import { z } from 'zod';
import { CameBack, Cover, Drag, Drop, Substrate } from './contract';

/** A feel that says something: "unsure" is no evidence and has no likelihood. */
const FeltDrop = Drop.exclude(['unsure']);
const FeltDrag = Drag.exclude(['unsure']);

/** How far a row's sum may be from 1 and still be a row of shares typed by hand. */
const ROUNDING = 1e-6;
/** A likelihood of nothing would let one feel overrule all others for ever. */
export const LEAST_LIKELIHOOD = 0.0001;

const Share = z
  .number()
  .min(LEAST_LIKELIHOOD, `Nothing is impossible at the water: ${LEAST_LIKELIHOOD} at least`)
  .max(1);

function row<Name extends z.ZodEnum>(names: Name) {
  return z
    .record(names, Share)
    .refine((shares) => isWhole(Object.values(shares)), 'The row must add up to 1');
}

/** Whether the shares of a row add up to 1. */
export const isWhole = (shares: readonly number[]): boolean =>
  Math.abs(shares.reduce((sum, share) => sum + share, 0) - 1) <= ROUNDING;

const LikelihoodRows = z.strictObject({
  drop: row(FeltDrop),
  drag: row(FeltDrag),
  cameBack: row(CameBack),
  smell: row(z.enum(['none', 'bad_eggs'])),
});

const tableOf = <Class extends z.ZodEnum>(classes: Class) =>
  z.strictObject({
    source: z.string().trim().min(1).max(300),
    prior: row(classes),
    of: z.record(classes, LikelihoodRows),
  });

/** Months after which a cover that comes and goes with the season is worth half of what it was when seen. */
export const FadeMonths = z.strictObject({
  low_weed: z.number().min(0.5).max(240),
  tall_weed: z.number().min(0.5).max(240),
  leaf_litter: z.number().min(0.5).max(240),
});
export type FadeMonths = z.infer<typeof FadeMonths>;

/** What a fishery knows of how bottoms feel: P(feel | class), the chances before any feel, and how fast covers fade. */
export const BottomFeel = z.strictObject({
  substrate: tableOf(Substrate),
  cover: tableOf(Cover),
  fadeMonths: FadeMonths,
});
export type BottomFeel = z.infer<typeof BottomFeel>;

/** `usual`: back to the built-in; `edited`: typed by a person; `learnt`: from confirmed bottoms. */
export const BottomTableKind = z.enum(['usual', 'edited', 'learnt']);
export type BottomTableKind = z.infer<typeof BottomTableKind>;

/** One version of a fishery's table. Version 0 is the built-in one, which nobody made. */
export const BottomTableVersion = z.object({
  version: z.int().min(0),
  kind: BottomTableKind,
  reason: z.string(),
  madeBy: z.string().nullable(),
  madeAt: z.iso.datetime().nullable(),
  confirmedCasts: z.int().min(0), // casts over confirmed bottoms that its figures hold
});
export type BottomTableVersion = z.infer<typeof BottomTableVersion>;

/** GET /api/fisheries/:fisheryId/bottom-table: the table in force, and every version, newest first. */
export const BottomTableView = z.object({
  inForce: BottomTableVersion,
  feel: BottomFeel,
  history: z.array(BottomTableVersion),
  may: z.object({ change: z.boolean() }),
});
export type BottomTableView = z.infer<typeof BottomTableView>;

/** GET /api/fisheries/:fisheryId/bottom-table/:version */
export const BottomTableThen = z.object({ made: BottomTableVersion, feel: BottomFeel });
export type BottomTableThen = z.infer<typeof BottomTableThen>;

const reason = z.string().trim().min(1).max(300);

/**
 * POST /api/fisheries/:fisheryId/bottom-table: a new version, in force at once. `after` is the version that was looked
 * at. `feel` null goes back to the built-in table.
 */
export const KeepBottomTable = z.strictObject({
  id: z.uuid(),
  after: z.int().min(0),
  feel: BottomFeel.nullable(),
  reason,
});
export type KeepBottomTable = z.infer<typeof KeepBottomTable>;

/** For one class: how many casts were felt over confirmed bottoms of it. */
export const ConfirmedCount = z.object({ name: z.union([Substrate, Cover]), casts: z.int() });
export type ConfirmedCount = z.infer<typeof ConfirmedCount>;

/** GET /api/fisheries/:fisheryId/bottom-table/learning: what confirmed bottoms would make of the table. */
export const BottomLearning = z.object({
  after: z.int(), // the version in force it was worked out beside
  digest: z.string(), // of what it was learnt from; accepted only while that still stands
  confirmed: z.int(), // confirmed bottoms looked at
  paired: z.int(), // casts within their reach
  counts: z.array(ConfirmedCount),
  worthCasts: z.number(), // how many casts the table before counts for, each class
  reachWords: z.string(),
  before: BottomFeel,
  learnt: BottomFeel,
});
export type BottomLearning = z.infer<typeof BottomLearning>;

/** POST /api/fisheries/:fisheryId/bottom-table/learning: a person takes the proposal up as a new version. */
export const AcceptLearning = z.strictObject({
  id: z.uuid(),
  after: z.int().min(0),
  digest: z.string().min(1).max(200),
  reason,
});
export type AcceptLearning = z.infer<typeof AcceptLearning>;
