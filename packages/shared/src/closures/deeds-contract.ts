import { z } from 'zod';
import { Version } from '../fisheries/contract';
import { ClosureDetails, ClosureEffect, ClosureReason } from './contract';

/**
 * POST /api/fisheries/:fisheryId/closures (manager, owner; the head bailiff for pegs and dangers): closes, and puts
 * every booking in the way to its choice. The same id and content again changes nothing and finishes what was left.
 */
export const CloseWater = z.strictObject({
  id: z.uuid(),
  details: ClosureDetails,
  moveToLakeId: z.uuid().nullable(), // offered to those it hits
  chooseUntil: z.iso.datetime().nullable(), // null: ten the next morning, or a later start
});
export type CloseWater = z.infer<typeof CloseWater>;

/** POST /api/fisheries/:fisheryId/closures/preview: what it would hit, before it is made. */
export const PreviewClosure = CloseWater.pick({ details: true, moveToLakeId: true, chooseUntil: true });
export type PreviewClosure = z.infer<typeof PreviewClosure>;

const hits = z.object({
  bookings: z.int(), // that must choose or are refunded
  valuePence: z.int(), // taken for them
  currency: z.string(),
  told: z.int(), // season tickets that run on, and bookings only warned
  pegs: z.int(), // closed in the calendar
});

export const ClosurePreview = hits.extend({
  words: z.string(), // “Hits 40 bookings worth £1,116.00”
  kinds: z.array(z.object({ ticketName: z.string(), count: z.int(), valuePence: z.int() })),
});
export type ClosurePreview = z.infer<typeof ClosurePreview>;

/** What became of the bookings a closure hit; for staff. */
export const ClosureTally = hits.extend({
  waiting: z.int(),
  movedDate: z.int(),
  movedLake: z.int(),
  refunded: z.int(),
  cancelled: z.int(), // with nothing to give back
  refundedPence: z.int(), // given back or on its way
  keptPence: z.int(),
  refundFailed: z.int(),
});
export type ClosureTally = z.infer<typeof ClosureTally>;

/** A closure as everybody may see it; `tally` and the lift conditions' state are for staff. */
export const ClosureView = z.object({
  id: z.uuid(),
  fisheryId: z.uuid(),
  lakes: z.array(z.object({ id: z.uuid(), name: z.string() })),
  pegs: z.array(z.object({ id: z.uuid(), number: z.string() })),
  reason: ClosureReason,
  reasonWords: z.string(),
  effect: ClosureEffect,
  details: ClosureDetails,
  zone: z.string(),
  state: z.enum(['to_come', 'in_force', 'over']),
  chooseUntil: z.iso.datetime().nullable(),
  moveToLakeId: z.uuid().nullable(),
  liftedAt: z.iso.datetime().nullable(),
  lift: z.object({ ticked: z.array(z.string()), reason: z.string() }).nullable(),
  legal: z.boolean(), // law: it can't be set aside, only ended by its set end or its authority
  standsAgainstLifting: z.array(z.string()), // with nothing ticked; empty for those who may not lift
  version: z.int(),
  tally: ClosureTally.nullable(),
  may: z.object({ lift: z.boolean(), override: z.boolean() }),
});
export type ClosureView = z.infer<typeof ClosureView>;

/** GET /api/fisheries/:fisheryId/closures (open): in force and to come; `all=yes` for staff those over too. */
export const ClosureList = z.object({
  closures: z.array(ClosureView),
  may: z.object({ close: z.boolean() }),
});
export type ClosureList = z.infer<typeof ClosureList>;
export const ClosuresAsked = z.object({ all: z.enum(['yes', 'no']).default('no') });

/** POST /api/closures/:closureId/lift: with its conditions ticked; what is passed over needs a reason, and the owner. */
export const LiftClosure = z.strictObject({
  version: Version,
  ticked: z.array(z.uuid()).max(20),
  reason: z.string().trim().max(400),
});
export type LiftClosure = z.infer<typeof LiftClosure>;
