import type { Request } from 'express';
import type { Ctx } from '../ctx';
import { serverOf } from './server';
import { actorOf } from './session';

/** One deed, one transaction: all of it or none of it, jobs and mail rows included. */
export async function inTransaction<T>(req: Request, deed: (ctx: Ctx) => Promise<T>): Promise<T> {
  const { source, jobs, clock, config } = serverOf(req);
  return source.transaction(async (tx) =>
    deed({ tx, actor: await actorOf(req, tx), now: clock(), jobs, publicUrl: config.publicUrl }),
  );
}

/** A read, outside any transaction of its own. */
export async function reading<T>(req: Request, read: (ctx: Ctx) => Promise<T>): Promise<T> {
  const { source, jobs, clock, config } = serverOf(req);
  const tx = source.manager;
  return read({ tx, actor: await actorOf(req, tx), now: clock(), jobs, publicUrl: config.publicUrl });
}
