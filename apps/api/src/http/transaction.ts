import type { Request } from 'express';
import type { Ctx } from '../ctx';
import { ctxOf } from './ctx-of';
import { outOfDeadlock } from './deadlock';
import { serverOf } from './server';
import { actorOf } from './session';

/** One deed, one transaction: all of it or none of it, jobs and mail rows included. */
export async function inTransaction<T>(req: Request, deed: (ctx: Ctx) => Promise<T>): Promise<T> {
  const server = serverOf(req);
  return outOfDeadlock(() =>
    server.source.transaction(async (tx) => deed(ctxOf(server, tx, await actorOf(req, tx)))),
  );
}

/** A read, outside any transaction of its own. */
export async function reading<T>(req: Request, read: (ctx: Ctx) => Promise<T>): Promise<T> {
  const server = serverOf(req);
  const tx = server.source.manager;
  return read(ctxOf(server, tx, await actorOf(req, tx)));
}

/** A deed that stands on a cookie, a mailed link or a password: an old access token sent along must not spoil it. */
export async function inOpenTransaction<T>(req: Request, deed: (ctx: Ctx) => Promise<T>): Promise<T> {
  const server = serverOf(req);
  return server.source.transaction((tx) => deed(ctxOf(server, tx)));
}
