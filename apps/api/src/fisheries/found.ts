import { Fishery } from '@mereward/db/entities/fisheries/fishery';
import { FisheryRole } from '@mereward/db/entities/fisheries/fishery-role';
import type { Role } from '@mereward/shared/accounts/contract';
import { Problem } from '@mereward/shared/problems/problem';
import type { EntityManager } from 'typeorm';
import { accountOf, type Actor, type Ctx } from '../ctx';
import { notFound } from '../http/deny';
import { isOneOfThem } from './policy';

const noSuch = () => notFound('fishery');

/** A fishery's public face. */
export async function fisheryFound(tx: EntityManager, id: string): Promise<Fishery> {
  const fishery = await tx.findOneBy(Fishery, { id });
  if (!fishery) throw noSuch();
  return fishery;
}

/**
 * Lets in those it is for. Whoever has no part in the fishery is told that there is nothing there; its own people
 * are told that it is not for them.
 */
export function admit(actor: Actor, fisheryId: string, allowed: boolean): void {
  if (allowed) return;
  accountOf(actor);
  if (!isOneOfThem(actor, fisheryId)) throw noSuch();
  throw new Problem('forbidden', 'Your roles at this fishery don’t allow this', {
    detail: 'Ask its owner or manager to do it, or to give you the role.',
  });
}

/** Holds a fishery's roles still: whoever changes them next waits, and sees what was done. */
export async function lockRoles(tx: EntityManager, id: string): Promise<Fishery> {
  const fishery = await tx.findOne(Fishery, { where: { id }, lock: { mode: 'pessimistic_write' } });
  if (!fishery) throw noSuch();
  return fishery;
}

export type RoleHolder = { fisheryId: string; accountId: string };

export async function heldBy(tx: EntityManager, whose: RoleHolder): Promise<Set<Role>> {
  const rows = await tx.findBy(FisheryRole, whose);
  return new Set(rows.map(({ role }) => role));
}

/** The actor by the roles of this moment, to be read under the lock: another deed may just have taken one away. */
export async function actorNow({ tx, actor }: Ctx, fisheryId: string): Promise<Actor> {
  if (actor.kind === 'stranger') return actor;
  const held = await heldBy(tx, { fisheryId, accountId: actor.id });
  return { ...actor, roles: new Map([...actor.roles, [fisheryId, held]]) };
}
