import type { EntityManager } from 'typeorm';
import type { Ctx, Jobs } from '../ctx';
import { OSTLEMERE_ID } from './fishery';
import type { DemoPerson } from './people';

/** The demo's past sends no mail and queues nothing: what a job would do is done on the spot where it is wanted. */
const NO_JOBS: Jobs = { send: async () => {}, later: async () => {} };

/** A service's context for one of the demo's people at an instant of its past. */
export function demoCtx(tx: EntityManager, { id, roles }: DemoPerson, at: Date): Ctx {
  return {
    tx,
    actor: { kind: 'account', id, roles: new Map([[OSTLEMERE_ID, new Set(roles)]]) },
    now: at,
    jobs: NO_JOBS,
    publicUrl: 'http://127.0.0.1',
    takesCards: true,
  };
}
