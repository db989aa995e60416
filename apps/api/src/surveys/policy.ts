import type { Role } from '@mereward/shared/accounts/contract';
import { holdsAny, type Actor } from '../ctx';
import { FEEL_READERS } from '../fisheries/policy';
import { LAKE_CHANGERS, PEG_CHANGERS, STAFF, SURVEYORS } from '../lakes/policy';

/** Open a visit, keep and take back casts, correct a visit's constants. */
export const CAST_KEEPERS: readonly Role[] = SURVEYORS;
/** Raw casts are for the people who work on the water, and its owner. */
export const CAST_READERS: readonly Role[] = [...SURVEYORS, 'owner'];

/** The fishery's table of feels: how every cast is read hangs on it. */
export const TABLE_CHANGERS: readonly Role[] = LAKE_CHANGERS;
export const TABLE_READERS: readonly Role[] = FEEL_READERS;
/** Take back what another confirmed. */
export const CONFIRMED_SETTLERS: readonly Role[] = LAKE_CHANGERS;
/** Works and seasons that end what was known of a bottom: recorded by those who change pegs, read by all staff. */
export const EVENT_RECORDERS: readonly Role[] = PEG_CHANGERS;
export const EVENT_READERS: readonly Role[] = STAFF;

export const mayKeepCasts = (actor: Actor, fisheryId: string): boolean =>
  holdsAny(actor, fisheryId, CAST_KEEPERS);
