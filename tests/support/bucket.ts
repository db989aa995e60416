import { mkdtempSync, rmSync } from 'node:fs';
import { connect, createServer, type Socket } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import S3rver from 's3rver';

/** How the way to the store behaves: open, broken off at once, silent, or cut after so many bytes of a body. */
export type Way =
  | { kind: 'open' }
  | { kind: 'away' }
  | { kind: 'silent' }
  | { kind: 'cut'; going: 'to' | 'from'; afterBytes: number };

/** An S3-compatible store with one bucket, and a gate before it. */
export type TestBucket = {
  /** The settings that lead a server to it, through the gate. */
  env: { FILES_S3_BUCKET: string; FILES_S3_ENDPOINT: string; FILES_S3_REGION: string };
  name: string;
  endpoint: string;
  go: (way: Way) => void;
  close: () => Promise<void>;
};

const NAME = 'mereward-test';

export async function aBucket(): Promise<TestBucket> {
  process.env.AWS_ACCESS_KEY_ID = 'S3RVER'; // the test store's own, known to all
  process.env.AWS_SECRET_ACCESS_KEY = 'S3RVER';
  const directory = mkdtempSync(join(tmpdir(), 'mereward-bucket-'));
  const settings = { address: '127.0.0.1', port: 0, silent: true, directory };
  const store = new S3rver({ ...settings, configureBuckets: [{ name: NAME }] });
  const { port } = await store.run();
  let way: Way = { kind: 'open' };
  const sockets = new Set<Socket>();
  const gate = createServer((outer) => {
    sockets.add(outer.once('close', () => sockets.delete(outer)));
    outer.on('error', () => undefined);
    pass(outer, port, () => way);
  });
  await new Promise<void>((listening) => gate.listen(0, '127.0.0.1', listening));
  const address = gate.address();
  const endpoint = `http://127.0.0.1:${address && typeof address === 'object' ? address.port : 0}`;
  return {
    env: { FILES_S3_BUCKET: NAME, FILES_S3_ENDPOINT: endpoint, FILES_S3_REGION: 'eu-west-2' },
    name: NAME,
    endpoint,
    go(next) {
      way = next;
      for (const socket of sockets) socket.destroy(); // what was kept open went the old way
    },
    async close() {
      for (const socket of sockets) socket.destroy();
      await new Promise((closed) => gate.close(closed));
      await store.close();
      rmSync(directory, { recursive: true, force: true });
    },
  };
}

function pass(outer: Socket, port: number, wayNow: () => Way): void {
  const way = wayNow();
  if (way.kind === 'away') return void outer.destroy();
  if (way.kind === 'silent') return void outer.resume();
  const inner = connect(port, '127.0.0.1');
  const end = (): void => {
    outer.destroy();
    inner.destroy();
  };
  inner.on('error', end).once('close', end);
  outer.once('close', end);
  const carry = (from: Socket, to: Socket, going: 'to' | 'from'): void => {
    let bytes = 0;
    from.on('data', (chunk: Buffer) => {
      bytes += chunk.length;
      if (way.kind === 'cut' && way.going === going && bytes > way.afterBytes) return void setImmediate(end);
      to.write(chunk);
    });
  };
  carry(outer, inner, 'to');
  carry(inner, outer, 'from');
}
