import type { Role } from '@mereward/shared/accounts/contract';
import { holdsAny, type Actor } from '../ctx';

/** Who sets what a fishery sells and for how much. Everybody may read it. */
export const PRICE_SETTERS = ['owner', 'manager', 'office'] as const satisfies readonly Role[];

export const maySetPrices = (actor: Actor, fisheryId: string): boolean =>
  holdsAny(actor, fisheryId, PRICE_SETTERS);
