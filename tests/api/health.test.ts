import { Client } from 'pg';
import request from 'supertest';
import { afterAll, beforeAll, expect, inject, test } from 'vitest';
import { aPerson } from '../support/people';
import { aServer, type TestServer } from '../support/server';

let here: TestServer;
beforeAll(async () => {
  here = await aServer();
});
afterAll(() => here.close());

const ask = (path: string) => request(here.app).get(path);

test('it says that it is up and ready, without counting the askers', async () => {
  expect((await ask('/api/health')).body).toEqual({ status: 'up' });
  const ready = await ask('/api/ready');
  expect([ready.status, ready.body]).toEqual([200, { status: 'ready' }]);
  expect(ready.get('RateLimit')).toBeUndefined();
});

test('with its database gone it is up, not ready, and answers a problem instead of falling over', async () => {
  const person = await aPerson(here);
  await here.startWorker(); // holds a connection of its own
  const name = new URL(here.server.config.databaseUrl).pathname.slice(1);
  const client = new Client({ connectionString: inject('clusterUrl') });
  await client.connect();
  await client.query(`ALTER DATABASE ${name} WITH ALLOW_CONNECTIONS false`);
  await client.query('SELECT pg_terminate_backend(pid) FROM pg_stat_activity WHERE datname = $1', [name]);
  const ready = await ask('/api/ready');
  expect([ready.status, ready.body]).toEqual([503, { status: 'waiting for the database' }]);
  expect((await ask('/api/health')).status).toBe(200);
  const me = await person.get('/accounts/me');
  expect([me.status, me.body.kind]).toEqual([500, 'internal']);
  await client.query(`ALTER DATABASE ${name} WITH ALLOW_CONNECTIONS true`);
  await client.end();
  expect((await ask('/api/ready')).status).toBe(200);
  expect((await person.get('/accounts/me')).status).toBe(200);
});

test('an address of the API that is none is a problem, also under a method that is none there', async () => {
  for (const answer of [await ask('/api/nothing'), await request(here.app).post('/api/accounts/me')]) {
    expect([answer.status, answer.type]).toEqual([404, 'application/problem+json']);
    expect(answer.body).toMatchObject({ kind: 'not-found', title: 'There is nothing at this address' });
  }
});

test('what can’t be read is said so', async () => {
  const send = (body: string) =>
    request(here.app).post('/api/accounts').set('content-type', 'application/json').send(body);
  expect((await send('{"name":')).body).toMatchObject({ status: 400, kind: 'invalid' });
  expect((await send(JSON.stringify('x'.repeat(7_000_000)))).body).toMatchObject({
    status: 413,
    kind: 'too-large',
  });
  const form = await request(here.app).post('/api/accounts').type('form').send({ name: 'x' });
  expect(form.body).toMatchObject({ status: 400, kind: 'invalid' });
});

test('pages and answers carry what keeps a browser from harm', async () => {
  const answer = await ask('/api/health');
  expect(answer.get('Content-Security-Policy')).toMatch(/script-src 'self';/);
  expect(answer.get('X-Content-Type-Options')).toBe('nosniff');
  expect(answer.get('Strict-Transport-Security')).toBeTruthy();
  expect(answer.get('X-Powered-By')).toBeUndefined();
  expect(answer.get('Access-Control-Allow-Origin')).toBeUndefined();
  expect((await ask('/api/fisheries')).get('Cache-Control')).toBe('private, no-cache');
});
