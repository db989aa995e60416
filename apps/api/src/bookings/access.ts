import type { EntityManager } from 'typeorm';
import { Problem } from '@mereward/shared/problems/problem';
import { accountOf, type Ctx } from '../ctx';
import { fisheryFound } from '../fisheries/found';
import { notFound } from '../http/deny';
import { standingTo, type Standing } from './policy';
import { findStay, lockStay, type Stay } from './stay';

export type Reached = { stay: Stay; zone: string; standing: Standing };

/** A booking as somebody reaches it; to whom it is nothing, it isn't there. */
export const reachBooking = (ctx: Ctx, bookingId: string): Promise<Reached> =>
  reach(ctx, bookingId, findStay);

/** The same, held for this deed. */
export const lockBooking = (ctx: Ctx, bookingId: string): Promise<Reached> => reach(ctx, bookingId, lockStay);

async function reach(
  { tx, actor, now }: Ctx,
  bookingId: string,
  find: (tx: EntityManager, id: string) => Promise<Stay>,
): Promise<Reached> {
  accountOf(actor);
  const stay = await find(tx, bookingId);
  const { zone } = await fisheryFound(tx, stay.fisheryId);
  const standing = standingTo(actor, { ...stay, zone }, now);
  if (!standing) throw notFound('booking');
  return { stay, zone, standing };
}

/** Refuses a deed on a booking that its reader sees but may not do. */
export function allow(allowed: boolean, who: string): void {
  if (allowed) return;
  throw new Problem('forbidden', 'This is not yours to do', { detail: `It is for ${who}.` });
}
