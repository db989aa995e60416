import type { Role } from '@mereward/shared/accounts/contract';
import { Problem } from '@mereward/shared/problems/problem';
import { holdsAny, rolesAt, type Actor } from '../ctx';

export const notFound = (what: string): Problem =>
  new Problem('not-found', `There is no such ${what}`, {
    detail: 'It may have been taken away, or the address was cut short. Go back and choose it anew.',
  });

/**
 * Lets the deed go on, or refuses it: a stranger is asked to sign in, somebody without a place at this fishery
 * finds nothing, and somebody whose roles don't reach is told which would.
 */
export function allowOnly(
  actor: Actor,
  at: { fisheryId: string; what: string },
  roles: readonly Role[],
): void {
  if (actor.kind === 'stranger') throw new Problem('not-signed-in', 'Sign in first');
  if (holdsAny(actor, at.fisheryId, roles)) return;
  if (rolesAt(actor, at.fisheryId).size === 0) throw notFound(at.what);
  throw new Problem('forbidden', 'Your roles here don’t reach that far', {
    detail: `It is for: ${roles.map((role) => ROLE_WORDS[role]).join(', ')}. Ask one of them.`,
  });
}

const ROLE_WORDS: Record<Role, string> = {
  owner: 'the owner',
  manager: 'a manager',
  head_bailiff: 'the head bailiff',
  bailiff: 'a bailiff',
  office: 'the office',
  member: 'members',
  angler: 'anglers',
};
