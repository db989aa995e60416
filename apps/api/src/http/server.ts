import type { Request } from 'express';
import type { DataSource } from 'typeorm';
import type { Config } from '../config';
import type { Jobs } from '../ctx';

/** What every request stands on: made once by main, or by a test. */
export type Server = {
  config: Config;
  source: DataSource;
  jobs: Jobs;
  /** Now, in one place, so that a test can say when it is. */
  clock: () => Date;
};

const SERVERS = new WeakMap<object, Server>();

export function standOn(app: object, server: Server): void {
  SERVERS.set(app, server);
}

export function serverOf(req: Request): Server {
  const server = SERVERS.get(req.app);
  if (!server) throw new Error('This application was not made by makeApp');
  return server;
}
