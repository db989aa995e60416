import { makeApp } from '@mereward/api/app';
import { readConfig } from '@mereward/api/config';
import { makeLogger } from '@mereward/api/http/logging';
import { makeDataSource } from '@mereward/db/data-source';
import { createServer, type RequestListener } from 'node:http';
import { createRequire } from 'node:module';
import { fileURLToPath } from 'node:url';
import { z } from 'zod';

// A server for the bench, alone in its process: `ours` or `bare`. It tells its port, and its CPU time when asked.
const BODY = { type: 'about:blank', title: 'There is nothing at this address', status: 404 };

type Answer = { status: (status: number) => Answer; json: (body: object) => void };
type Express = { use: (handler: (req: object, res: Answer) => void) => void } & RequestListener;

/** Express with one handler and nothing before it, answering as much as our own answer to the same request. */
function bare(): RequestListener {
  const fromApi = createRequire(fileURLToPath(import.meta.resolve('@mereward/api/app')));
  const express: () => Express = fromApi('express');
  const app = express();
  app.use((_req, res) => res.status(404).json(BODY));
  return app;
}

/** The whole chain, up to an address at which there is nothing: no database is asked. */
function ours(): RequestListener {
  const url = 'postgres://127.0.0.1:1/none';
  const config = readConfig({ DATABASE_URL: url, WEB_DIR: '.', LOG_LEVEL: 'info' });
  const jobs = { send: () => Promise.resolve() };
  const server = { config, source: makeDataSource(url), jobs, clock: () => new Date() };
  return makeApp(server, makeLogger(config, { write: () => {} }));
}

const http = createServer(process.argv[2] === 'ours' ? ours() : bare());
http.listen(0, '127.0.0.1', () => {
  const address = http.address();
  process.send?.({ port: address && typeof address === 'object' ? address.port : 0 });
});
process.on('message', (asked) => {
  if (z.literal('cpu').safeParse(asked).success) {
    const { user, system } = process.cpuUsage();
    process.send?.({ cpuUs: user + system });
  }
});
process.on('disconnect', () => process.exit(0));
