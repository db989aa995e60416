import type { EntityManager } from 'typeorm';
import { STRANGER, type Actor, type Ctx } from '../ctx';
import type { Server } from './server';

/** What a service gets, on a server and in a transaction. Without an actor the program acts by itself. */
export const ctxOf = (server: Server, tx: EntityManager, actor: Actor = STRANGER): Ctx => ({
  tx,
  actor,
  now: server.clock(),
  jobs: server.jobs,
  publicUrl: server.config.publicUrl,
  takesCards: server.config.cards !== null,
});
