import { makeApp } from '@mereward/api/app';
import { readConfig } from '@mereward/api/config';
import { makeLogger } from '@mereward/api/http/logging';
import { raw } from '@mereward/api/http/route';
import { routes } from '@mereward/api/routes';
import { makeDataSource } from '@mereward/db/data-source';
import { createServer, type RequestListener } from 'node:http';
import { createRequire } from 'node:module';
import { fileURLToPath } from 'node:url';
import { z } from 'zod';

// A server for the bench, alone in its process: `ours` or `bare`. It tells its port, and its CPU time when asked.
const BODY = { peg: 'FO7', state: 'open', depthM: 2.3 };

type Answer = { json: (body: object) => void };
type Express = { get: (path: string, handler: (req: object, res: Answer) => void) => void } & RequestListener;

/** Express with one handler and nothing before it, answering what ours answers. */
function bare(): RequestListener {
  const fromApi = createRequire(fileURLToPath(import.meta.resolve('@mereward/api/app')));
  const express: () => Express = fromApi('express');
  const app = express();
  app.get('/api/bench', (_req, res) => res.json(BODY));
  return app;
}

/** The whole chain before a route that asks no database. */
function ours(): RequestListener {
  const url = 'postgres://127.0.0.1:1/none';
  const config = readConfig({ DATABASE_URL: url, WEB_DIR: '.', LOG_LEVEL: 'info', TRUST_PROXY: '1' });
  const jobs = { send: () => Promise.resolve(), later: () => Promise.resolve() };
  const server = { config, source: makeDataSource(url), jobs, clock: () => new Date() };
  const spec = { method: 'get', path: '/bench', summary: 'The bench', signIn: 'open' } as const;
  const route = raw(spec, async (_req, res) => void res.json(BODY));
  return makeApp(server, makeLogger(config, { write: () => {} }), { routes: [...routes, route] });
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
