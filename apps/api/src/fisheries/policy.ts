import type { Role } from '@mereward/shared/accounts/contract';
import { holdsAny, rolesAt, type Actor } from '../ctx';

/** Those who work at the fishery, paid or not: they are told the gate code. */
const STAFF = ['owner', 'manager', 'head_bailiff', 'bailiff', 'office'] as const satisfies readonly Role[];
const PEOPLE_READERS = ['owner', 'manager', 'office'] as const satisfies readonly Role[];

/** Those who read how the fishery's bottoms feel through the lead: every cast is read by it. */
export const FEEL_READERS = ['owner', 'manager', 'head_bailiff'] as const satisfies readonly Role[];

/** Which roles a holder may give and take away. Nobody but an owner makes or unmakes an owner or a manager. */
const GIVES: Partial<Record<Role, readonly Role[]>> = {
  owner: ['owner', 'manager', 'head_bailiff', 'bailiff', 'office', 'member', 'angler'],
  manager: ['head_bailiff', 'bailiff', 'office', 'member', 'angler'],
  office: ['member', 'angler'],
};

export const mayChangeFishery = (actor: Actor, fisheryId: string): boolean =>
  holdsAny(actor, fisheryId, ['owner', 'manager']);

export const mayAddLakes = mayChangeFishery;

export const maySeeGateCode = (actor: Actor, fisheryId: string): boolean => holdsAny(actor, fisheryId, STAFF);

export const maySeePeople = (actor: Actor, fisheryId: string): boolean =>
  holdsAny(actor, fisheryId, PEOPLE_READERS);

export const mayReadFeels = (actor: Actor, fisheryId: string): boolean =>
  holdsAny(actor, fisheryId, FEEL_READERS);

/** The roles this actor may give and take away there. */
export function givableRoles(actor: Actor, fisheryId: string): Role[] {
  const held = [...rolesAt(actor, fisheryId)].flatMap((role) => GIVES[role] ?? []);
  return [...new Set(held)];
}

/** Whether an actor belongs there in any way; to others what is not public is not there. */
export const isOneOfThem = (actor: Actor, fisheryId: string): boolean => rolesAt(actor, fisheryId).size > 0;
