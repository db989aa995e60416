import type { PegGround } from '@mereward/shared/bookings/availability-contract';
import type { Ctx } from '../ctx';
import type { LetLake } from './lake-hours';

/** What the published charts say of the pegs’ waters, as far as the reader may see it. */
export async function groundsOf(_ctx: Ctx, _lakes: readonly LetLake[]): Promise<Map<string, PegGround>> {
  return new Map();
}
