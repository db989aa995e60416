import type { Request } from 'express';
import { STRANGER, type Ctx } from '../ctx';
import { outOfDeadlock } from './deadlock';
import { serverOf } from './server';
import { actorOf } from './session';

/** One deed, one transaction: all of it or none of it, jobs and mail rows included. */
export async function inTransaction<T>(req: Request, deed: (ctx: Ctx) => Promise<T>): Promise<T> {
  const { source, jobs, clock, config } = serverOf(req);
  return outOfDeadlock(() =>
    source.transaction(async (tx) =>
      deed({ tx, actor: await actorOf(req, tx), now: clock(), jobs, publicUrl: config.publicUrl }),
    ),
  );
}

/** A read, outside any transaction of its own. */
export async function reading<T>(req: Request, read: (ctx: Ctx) => Promise<T>): Promise<T> {
  const { source, jobs, clock, config } = serverOf(req);
  const tx = source.manager;
  return read({ tx, actor: await actorOf(req, tx), now: clock(), jobs, publicUrl: config.publicUrl });
}

/** A deed that stands on a cookie, a mailed link or a password: an old access token sent along must not spoil it. */
export async function inOpenTransaction<T>(req: Request, deed: (ctx: Ctx) => Promise<T>): Promise<T> {
  const { source, jobs, clock, config } = serverOf(req);
  return source.transaction((tx) =>
    deed({ tx, actor: STRANGER, now: clock(), jobs, publicUrl: config.publicUrl }),
  );
}
