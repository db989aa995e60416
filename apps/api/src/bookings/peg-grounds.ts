import type { PegGround } from '@mereward/shared/bookings/availability-contract';
import { chartedPegs } from '../charts/charted-pegs';
import type { Ctx } from '../ctx';
import type { LetLake } from './lake-hours';

const toCentimetres = (depthM: number): number => Math.round(depthM * 100) / 100;

/** What the published charts say of the pegs’ waters, as far as the reader may see it, by the peg. */
export async function groundsOf(ctx: Ctx, lakes: readonly LetLake[]): Promise<Map<string, PegGround>> {
  const grounds = new Map<string, PegGround>();
  for (const { id } of lakes)
    for (const [pegId, { shallowestM, deepestM, bottoms }] of await chartedPegs(ctx, id))
      grounds.set(pegId, {
        shallowestM: toCentimetres(shallowestM),
        deepestM: toCentimetres(deepestM),
        bottoms,
      });
  return grounds;
}
