import { passwordFits, passwordHash } from '@mereward/api/accounts/password';
import { verifiedClaims } from '@mereward/api/http/session';
import { fork, type ChildProcess } from 'node:child_process';
import { createSecretKey, randomBytes } from 'node:crypto';
import { once } from 'node:events';
import { Agent, request } from 'node:http';
import { fileURLToPath } from 'node:url';
import { z } from 'zod';
import { handMadeToken } from '../support/hand-made-token';
import { median } from './median';

const ROUNDS = 5;
const REQUESTS = 2000;
const AT_ONCE = 16;

type Target = { child: ChildProcess; port: number; agent: Agent };

async function target(kind: 'bare' | 'ours'): Promise<Target> {
  const file = fileURLToPath(new URL('./http-server.ts', import.meta.url));
  const child = fork(file, [kind], { execArgv: ['--import', 'tsx'] });
  const [said] = await once(child, 'message');
  const { port } = z.object({ port: z.number().positive() }).parse(said);
  return { child, port, agent: new Agent({ keepAlive: true, maxSockets: AT_ONCE }) };
}

async function cpuUs({ child }: Target): Promise<number> {
  child.send('cpu');
  const [said] = await once(child, 'message');
  return z.object({ cpuUs: z.number() }).parse(said).cpuUs;
}

let asked = 0;

/** One request, each from the next of many addresses, so that no limit turns it away. */
function ask({ port, agent }: Target): Promise<void> {
  const headers = { 'x-forwarded-for': `192.0.2.${(asked += 1) % 250}` };
  return new Promise((done, failed) => {
    request({ host: '127.0.0.1', port, agent, path: '/api/bench', headers }, (answer) => {
      if (answer.statusCode !== 200) failed(new Error(`The bench was answered ${answer.statusCode}`));
      answer.resume().on('end', done);
    })
      .on('error', failed)
      .end();
  });
}

/** CPU time of the server alone for one request, microseconds. */
async function perRequestUs(to: Target, requests: number): Promise<number> {
  const before = await cpuUs(to);
  let left = requests;
  const asker = async () => {
    while (left > 0) {
      left -= 1;
      await ask(to);
    }
  };
  await Promise.all(Array.from({ length: AT_ONCE }, asker));
  return ((await cpuUs(to)) - before) / requests;
}

function verifyUs(): number {
  const secret = randomBytes(32).toString('base64');
  const key = createSecretKey(Buffer.from(secret));
  const claims = { sub: '00000000-0000-4000-8000-000000000000', iat: 1_800_000_000, exp: 1_800_000_600 };
  const token = handMadeToken({ alg: 'HS256', typ: 'JWT' }, claims, secret);
  const now = new Date(1_800_000_060_000);
  const times = 5000;
  const before = process.cpuUsage();
  for (let n = 0; n < times; n += 1) verifiedClaims(key, token, now);
  const { user, system } = process.cpuUsage(before);
  return (user + system) / times;
}

/** Eight sign-ins at once while the file system is asked: the longest it kept anybody waiting, ms. */
async function longestFileWaitMs(): Promise<{ waitMs: number; hashMs: number }> {
  const { stat } = await import('node:fs/promises');
  const hash = await passwordHash('a password of the bench');
  const one = performance.now();
  await passwordFits(hash, 'a password of the bench');
  const hashMs = performance.now() - one;
  let going = true;
  const signIns = Promise.all(
    Array.from({ length: 8 }, () => passwordFits(hash, 'a password of the bench')),
  ).finally(() => (going = false));
  let waitMs = 0;
  while (going) {
    const asked = performance.now();
    await stat('.');
    waitMs = Math.max(waitMs, performance.now() - asked);
    await new Promise((next) => setTimeout(next, 2));
  }
  await signIns;
  return { waitMs, hashMs };
}

const line = (parts: readonly (string | number)[]): string =>
  parts.map((part) => (typeof part === 'number' ? part.toFixed(2) : part)).join(' | ');

/** The lines of sign-in: what a request costs with all that stands before it, and what proving who asks adds. */
export async function benchAuth(): Promise<string[]> {
  const [bare, ours] = [await target('bare'), await target('ours')];
  try {
    const figures = { bare: [] as number[], ours: [] as number[], verify: [] as number[] };
    await perRequestUs(bare, 500);
    await perRequestUs(ours, 500);
    for (let round = 0; round < ROUNDS; round += 1) {
      figures.bare.push(await perRequestUs(bare, REQUESTS));
      figures.ours.push(await perRequestUs(ours, REQUESTS));
      figures.verify.push(verifyUs());
    }
    const [bareUs, oursUs, checkUs] = [median(figures.bare), median(figures.ours), median(figures.verify)];
    const { waitMs, hashMs } = await longestFileWaitMs();
    return [
      line([
        'auth: the whole chain, µs CPU',
        oursUs,
        'bare express',
        bareUs,
        'ratio',
        oursUs / bareUs,
        'goal ≤ 2.2',
      ]),
      line([
        'auth: verify a token, µs CPU',
        checkUs,
        'bare request',
        bareUs,
        'ratio',
        checkUs / bareUs,
        'goal ≤ 0.10',
      ]),
      line([
        'auth: a file’s wait beside 8 sign-ins, ms',
        waitMs,
        'one hash',
        hashMs,
        'ratio',
        waitMs / hashMs,
        'goal ≤ 1',
      ]),
    ];
  } finally {
    bare.child.disconnect();
    ours.child.disconnect();
    bare.agent.destroy();
    ours.agent.destroy();
  }
}
