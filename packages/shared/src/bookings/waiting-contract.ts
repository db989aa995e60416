import { z } from 'zod';
import { WaitingWish } from './contract';

/**
 * POST /api/lakes/:lakeId/waiting: joins the line for a day, at its end. Once for each lake and day. Refused while a
 * peg that would do is free, and for days that are over.
 */
export const JoinWaiting = z.strictObject({ id: z.uuid(), day: z.iso.date(), wish: WaitingWish });
export type JoinWaiting = z.infer<typeof JoinWaiting>;

/**
 * One’s own place in a line; nobody else’s is ever shown. `offered`: a peg is held, and is theirs when they finish the
 * booking by `claimUntil`. DELETE /api/waiting/:waitingId leaves; POST /api/waiting/:waitingId/pass lets an offer go by
 * and keeps the place.
 */
export const WaitingView = z.object({
  id: z.uuid(),
  fisheryId: z.uuid(),
  fisheryName: z.string(),
  lakeId: z.uuid(),
  lakeName: z.string(),
  zone: z.string(),
  day: z.iso.date(),
  wish: WaitingWish,
  ticketName: z.string(),
  pegs: z.array(z.string()), // numbers wished for; empty: any
  place: z.int().nullable(), // from 1; null when no longer waiting
  status: z.enum(['waiting', 'offered', 'claimed', 'passed', 'left']), // passed: the day came without a peg
  joinedAt: z.iso.datetime(),
  bookingId: z.uuid().nullable(), // while offered or claimed
  claimUntil: z.iso.datetime().nullable(),
});
export type WaitingView = z.infer<typeof WaitingView>;

/** GET /api/waiting/mine: those of days to come, the next day first. */
export const WaitingList = z.object({ waiting: z.array(WaitingView) });
export type WaitingList = z.infer<typeof WaitingList>;
