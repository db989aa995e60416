import type { Role } from '@mereward/shared/accounts/contract';
import { Problem } from '@mereward/shared/problems/problem';
import type { EntityManager } from 'typeorm';

/** Who asks. A stranger has no account; roles are held at a fishery. */
export type Actor =
  { kind: 'stranger' } | { kind: 'account'; id: string; roles: ReadonlyMap<string, ReadonlySet<Role>> };

export const STRANGER: Actor = { kind: 'stranger' };

const NONE: ReadonlySet<Role> = new Set();

export function rolesAt(actor: Actor, fisheryId: string): ReadonlySet<Role> {
  return actor.kind === 'account' ? (actor.roles.get(fisheryId) ?? NONE) : NONE;
}

export function holdsAny(actor: Actor, fisheryId: string, roles: readonly Role[]): boolean {
  const held = rolesAt(actor, fisheryId);
  return roles.some((role) => held.has(role));
}

/** The account that asks; a stranger is asked to sign in. */
export function accountOf(actor: Actor): string {
  if (actor.kind === 'stranger') throw new Problem('not-signed-in', 'Sign in first');
  return actor.id;
}

/** The account that asks; null for a stranger, and for what the program does by itself. */
export const accountOrNull = (actor: Actor): string | null => (actor.kind === 'account' ? actor.id : null);

/** What the world outside the database is to a service: queued in the deed's transaction, done after it. */
export type Jobs = {
  send(tx: EntityManager, name: JobName, payload: object): Promise<void>;
  /** Queued now, done not before so many seconds have gone by. */
  later(tx: EntityManager, job: { name: JobName; payload: object; afterSeconds: number }): Promise<void>;
};

export type JobName =
  | 'mail.send'
  | 'chart.build'
  | 'photo.resize'
  | 'picture.resize'
  | 'files.remove'
  | 'log.read'
  | 'refund.ask'
  | 'payment.close'
  | 'closure.settle'
  | 'booking.expire'
  | 'booking.warn'
  | 'booking.eve';

/** Everything a service gets: never a request. */
export type Ctx = {
  tx: EntityManager;
  actor: Actor;
  now: Date;
  jobs: Jobs;
  publicUrl: string;
  takesCards: boolean; // on the web
};
