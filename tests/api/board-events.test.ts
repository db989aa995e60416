import { makeApp } from '@mereward/api/app';
import { openBoardStreams } from '@mereward/api/bookings/board-streams';
import { listenTo } from '@mereward/api/http/database-listener';
import { makeLogger } from '@mereward/api/http/logging';
import { raw } from '@mereward/api/http/route';
import { randomUUID } from 'node:crypto';
import { mkdtempSync, rmSync } from 'node:fs';
import { createServer, type Server } from 'node:http';
import { connect, createServer as createRelay, type AddressInfo, type Socket } from 'node:net';
import { tmpdir } from 'node:os';
import { basename, join } from 'node:path';
import { Client } from 'pg';
import { afterAll, afterEach, beforeAll, expect, test, vi } from 'vitest';
import { enterable, startCluster } from '../../scripts/lib/cluster.mjs';
import { anEventStream, type OpenStream, type StreamEvent } from '../support/event-stream';
import { aServer, type TestServer } from '../support/server';
import { aTicket } from '../support/tickets';
import { aFishery, aLake, aPeg, type TestFishery, type TestLake } from '../support/waters';

vi.setConfig({ testTimeout: 60_000 });

let server: TestServer;
let here: TestFishery;
let lake: TestLake;
let http: Server;
let base: string;
const opened: OpenStream[] = [];

beforeAll(async () => {
  server = await aServer();
  here = await aFishery(server);
  lake = await aLake(server, here);
  http = createServer(server.app).listen(0, '127.0.0.1');
  await new Promise((listening) => http.once('listening', listening));
  base = `http://127.0.0.1:${(http.address() as AddressInfo).port}/api`;
});
afterEach(() => {
  for (const stream of opened.splice(0)) stream.close();
});
afterAll(async () => {
  http.closeAllConnections();
  http.close();
  await server.close();
});

async function watch(of = here.id, headers: Record<string, string> = {}): Promise<OpenStream> {
  const stream = await anEventStream(`${base}/fisheries/${of}/board/events`, headers);
  opened.push(stream);
  return stream;
}

const eraOf = ({ id }: StreamEvent) => id?.split('.')[0];
const numberOf = ({ id }: StreamEvent) => Number(id?.split('.')[1]);

let pegs = 0;
async function takeAPeg(on = lake): Promise<void> {
  const peg = await aPeg(server, on, { number: `E${(pegs += 1)}` });
  const from = '2027-07-17T11:00:00Z';
  await aTicket(server, { pegId: peg.id, holder: here.people.angler, from, until: '2027-07-18T11:00:00Z' });
}

/** A connection of its own to the same database. */
async function apart<T>(work: (client: Client) => Promise<T>): Promise<T> {
  const client = new Client({ connectionString: server.server.config.databaseUrl });
  await client.connect();
  try {
    return await work(client);
  } finally {
    await client.end();
  }
}

const killListeners = () =>
  apart(async (client) => {
    const { rowCount } = await client.query(
      `SELECT pg_terminate_backend(pid) FROM pg_stat_activity
        WHERE datname = current_database() AND pid <> pg_backend_pid() AND query IN ('LISTEN peg_time', 'SELECT 1')`,
    );
    return rowCount ?? 0;
  });

test('a stream is never packed or buffered, and begins with every lake', async () => {
  const stream = await watch();
  expect(stream.status).toBe(200);
  expect(stream.headers).toMatchObject({
    'content-type': 'text/event-stream; charset=utf-8',
    'cache-control': 'no-store, no-transform',
    'x-accel-buffering': 'no',
  });
  expect(stream.headers['content-encoding']).toBeUndefined();
  expect(JSON.parse((await stream.next()).data)).toEqual({ lakeId: lake.id });
});

test('a change that another connection made is told to that fishery’s readers and to no other’s', async () => {
  const elsewhere = await aFishery(server);
  const theirs = await aLake(server, elsewhere);
  const [mine, other] = [await watch(), await watch(elsewhere.id)];
  await Promise.all([mine.next(), other.next()]);
  await takeAPeg();
  const event = await mine.next();
  expect(event.data).toBe(JSON.stringify({ lakeId: lake.id })); // which lake, and nothing of who or what
  expect(event.id).toMatch(/^[0-9a-f]{8}\.\d+$/);
  await takeAPeg(theirs);
  expect(JSON.parse((await other.next()).data)).toEqual({ lakeId: theirs.id });
  expect(mine.events.every(({ data }) => !data.includes(theirs.id))).toBe(true);
});

test('who comes back learns what changed meanwhile, and nothing twice', async () => {
  const second = await aLake(server, here, { name: 'Second Water' });
  const [keeps, leaves] = [await watch(), await watch()];
  const started = numberOf(await leaves.next());
  await takeAPeg();
  let last = await leaves.next();
  while (numberOf(last) === started) last = await leaves.next();
  leaves.close();
  await takeAPeg(second);
  while (numberOf(await keeps.next()) <= numberOf(last));
  const back = await watch(here.id, { 'Last-Event-ID': last.id ?? '' });
  expect((await back.next()).data).toContain(second.id);
  expect(back.events).toHaveLength(1);
  const unknown = await watch(here.id, { 'Last-Event-ID': 'another.7' });
  const told = [(await unknown.next()).data, (await unknown.next()).data].join();
  expect(told).toContain(lake.id);
  expect(told).toContain(second.id);
});

test('a killed connection is made anew, all lakes are told, and changes come again', async () => {
  const stream = await watch();
  const before = eraOf(await stream.next());
  expect(await killListeners()).toBeGreaterThan(0);
  let event = await stream.next();
  while (eraOf(event) === before) event = await stream.next();
  const number = numberOf(event);
  await takeAPeg();
  while (numberOf(event) === number) event = await stream.next();
  expect(eraOf(event)).not.toBe(before);
});

test('a database that was stopped and started is listened to again', async () => {
  const made = mkdtempSync(join(tmpdir(), 'mereward-restart-'));
  const folder = enterable(made, join('/var/tmp', basename(made)));
  const begin = () => startCluster(folder, () => undefined);
  let target = await begin();
  const sockets = new Set<Socket>();
  // The second server has another port: what stands between stays where it was.
  const relay = createRelay((socket) => {
    const onward = connect(Number(new URL(target.url('mereward')).port), '127.0.0.1');
    sockets.add(socket).add(onward);
    for (const [one, other] of [
      [socket, onward],
      [onward, socket],
    ] as const) {
      one.pipe(other);
      one.on('error', () => other.destroy()).on('close', () => other.destroy());
    }
  }).listen(0, '127.0.0.1');
  await new Promise((listening) => relay.once('listening', listening));
  const address = new URL(target.url('mereward'));
  address.port = String((relay.address() as AddressInfo).port);
  const heard: string[] = [];
  let listening = 0;
  const faults: unknown[] = [];
  const listener = listenTo(address.href, 'peg_time', {
    heard: (payload) => heard.push(payload),
    listening: () => (listening += 1),
    failed: (error) => faults.push(error),
  });
  const tell = async (word: string) => {
    const client = new Client({ connectionString: target.url('mereward') });
    await client.connect();
    await client.query('SELECT pg_notify($1, $2)', ['peg_time', word]);
    await client.end();
  };
  await vi.waitFor(() => expect(listening).toBe(1), { timeout: 20_000 });
  await tell('before');
  await target.stop();
  await vi.waitFor(() => expect(faults.length).toBeGreaterThan(0), { timeout: 20_000 });
  target = await begin();
  await vi.waitFor(() => expect(listening).toBe(2), { timeout: 30_000 });
  await tell('after');
  await vi.waitFor(() => expect(heard).toEqual(['before', 'after']), { timeout: 20_000 });
  await listener.stop();
  relay.close();
  for (const socket of sockets) socket.destroy();
  await target.stop();
  for (const each of [made, folder]) rmSync(each, { recursive: true, force: true });
});

test('streams beat, are limited for one address, and end when the server stops', async () => {
  const streams = openBoardStreams(server.server, { beatMs: 30 });
  const spec = { method: 'get', path: '/stream', summary: 'A stream', signIn: 'open' } as const;
  const route = raw(spec, async (req, res) => streams.open(req, res, here.id));
  const logger = makeLogger(server.server.config);
  const small = createServer(makeApp(server.server, logger, { routes: [route] })).listen(0, '127.0.0.1');
  await new Promise((ready) => small.once('listening', ready));
  const url = `http://127.0.0.1:${(small.address() as AddressInfo).port}/api/stream`;
  const all = await Promise.all(Array.from({ length: 60 }, () => anEventStream(url)));
  expect(all.map(({ status }) => status)).toEqual(Array<number>(60).fill(200));
  await all[0]?.next('beat');
  expect((await anEventStream(url)).status).toBe(429);
  all[0]?.close();
  await vi.waitFor(() => expect(streams.count()).toBe(59), { timeout: 10_000 });
  await streams.close();
  await Promise.all(all.map(({ ended }) => ended));
  expect(streams.count()).toBe(0);
  small.close();
});

test('there is no stream of a fishery that is not', async () => {
  expect((await watch(randomUUID())).status).toBe(404);
});
