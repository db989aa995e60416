import type { Role } from '@mereward/shared/accounts/contract';
import { holdsAny, type Actor } from '../ctx';
import { SURVEYORS } from '../lakes/policy';

/** Open a visit, keep and take back casts, correct a visit's constants. */
export const CAST_KEEPERS: readonly Role[] = SURVEYORS;
/** Raw casts are for the people who work on the water, and its owner. */
export const CAST_READERS: readonly Role[] = [...SURVEYORS, 'owner'];

export const mayKeepCasts = (actor: Actor, fisheryId: string): boolean =>
  holdsAny(actor, fisheryId, CAST_KEEPERS);
