import { z } from 'zod';

export const ClosureReason = z.enum([
  'byelaw_close_season',
  'own_close_season',
  'spawning',
  'oxygen',
  'algae',
  'flood',
  'ice',
  'wind',
  'works',
  'netting',
  'match',
  'disease_control',
  'incident',
  'private_event',
]);
export type ClosureReason = z.infer<typeof ClosureReason>;

/** What is closed: all of the fishery, lakes, pegs, or one way of fishing on some lakes (null: on all). */
export const ClosureScope = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('fishery') }),
  z.strictObject({ kind: z.literal('lakes'), lakeIds: z.array(z.uuid()).min(1).max(50) }),
  z.strictObject({ kind: z.literal('pegs'), pegIds: z.array(z.uuid()).min(1).max(500) }),
  z.strictObject({
    kind: z.literal('method'),
    method: z.enum(['keepnets', 'boats', 'night']),
    lakeIds: z.array(z.uuid()).min(1).max(50).nullable(),
  }),
]);
export type ClosureScope = z.infer<typeof ClosureScope>;

/** What it does to bookings: no new ones only, a choice of move or refund, a refund, or a warning. */
export const ClosureEffect = z.enum(['block', 'move', 'refund', 'allow_with_warning']);
export type ClosureEffect = z.infer<typeof ClosureEffect>;

/** What must be so before it is lifted: a thing ticked by a person, or oxygen at so many dawns running. */
export const LiftCondition = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('tick'), id: z.uuid(), words: z.string().trim().min(1).max(200) }),
  z.strictObject({
    kind: z.literal('dawn_oxygen'),
    leastMgL: z.number().min(0).max(20),
    dawns: z.int().min(1).max(10),
  }),
]);
export type LiftCondition = z.infer<typeof LiftCondition>;

export const ClosureDetails = z
  .strictObject({
    scope: ClosureScope,
    reason: ClosureReason,
    effect: ClosureEffect,
    from: z.iso.datetime(),
    until: z.iso.datetime().nullable(), // null: until lifted
    publicWords: z.string().trim().min(1).max(400),
    liftConditions: z.array(LiftCondition).max(20),
  })
  .refine(({ from, until }) => until === null || Date.parse(until) > Date.parse(from), {
    path: ['until'],
    error: 'It ends before it begins',
  });
export type ClosureDetails = z.infer<typeof ClosureDetails>;

export const ClosureChoice = z.enum(['move_date', 'move_lake', 'refund']);
export type ClosureChoice = z.infer<typeof ClosureChoice>;
