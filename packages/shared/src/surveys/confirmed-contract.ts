import { z } from 'zod';
import { Position } from '../fisheries/contract';
import { Cover, Substrate } from './contract';

/** How a bottom was made certain of. */
export const ConfirmedBy = z.enum(['grab', 'pronged_lead', 'drain_down', 'diver']);
export type ConfirmedBy = z.infer<typeof ConfirmedBy>;

/**
 * POST /api/lakes/:lakeId/confirmed-bottoms. With `castId` the place is the cast's own; else `position`, with how far
 * out it may be (one σ, metres). The id is made where it is typed.
 */
export const ConfirmBottom = z
  .strictObject({
    id: z.uuid(),
    castId: z.uuid().nullable(),
    position: Position.nullable(),
    positionSigmaM: z.number().min(0.1).max(20),
    substrate: Substrate.nullable(), // null: not seen
    cover: Cover.nullable(),
    method: ConfirmedBy,
    day: z.iso.date(),
    note: z.string().trim().max(500),
  })
  .refine(({ substrate, cover }) => substrate !== null || cover !== null, {
    path: ['substrate'],
    message: 'Say what the bottom is, what lies on it, or both.',
  })
  .refine(({ castId, position }) => (castId === null) !== (position === null), {
    path: ['position'],
    message: 'Choose a cast or a place on the map, one of the two.',
  });
export type ConfirmBottom = z.infer<typeof ConfirmBottom>;

export const ConfirmedBottomView = z.object({
  id: z.uuid(),
  castId: z.uuid().nullable(),
  position: Position,
  positionSigmaM: z.number(),
  substrate: Substrate.nullable(),
  cover: Cover.nullable(),
  method: ConfirmedBy,
  day: z.iso.date(),
  note: z.string(),
  by: z.string(),
  endedBy: z.string().nullable(), // the event after which it no longer counts, in words
  may: z.object({ takeBack: z.boolean() }),
});
export type ConfirmedBottomView = z.infer<typeof ConfirmedBottomView>;

/** GET /api/lakes/:lakeId/confirmed-bottoms: newest first. DELETE /api/confirmed-bottoms/:confirmedId takes one back. */
export const ConfirmedBottoms = z.object({
  confirmed: z.array(ConfirmedBottomView),
  may: z.object({ confirm: z.boolean() }),
});
export type ConfirmedBottoms = z.infer<typeof ConfirmedBottoms>;
