import { Problem } from '@mereward/shared/problems/problem';
import argon2 from 'argon2';
import { gate, GateFull } from './gate';

/** OWASP Password Storage Cheat Sheet: argon2id with m = 19 MiB, t = 2, p = 1. */
export const ARGON2 = {
  type: argon2.argon2id,
  memoryCost: 19_456,
  timeCost: 2,
  parallelism: 1,
} as const;

// More at once would fill libuv's pool of four threads, and files and look-ups would wait for seconds.
const twoAtOnce = gate(2, 100);

async function inTurn<T>(work: () => Promise<T>): Promise<T> {
  try {
    return await twoAtOnce(work);
  } catch (error) {
    if (!(error instanceof GateFull)) throw error;
    throw new Problem('too-many', 'Very many people are signing in at this moment', {
      detail: 'Try again in a few seconds.',
    });
  }
}

/** One password typed on two keyboards can arrive as different code points (NIST SP 800-63B §5.1.1.2). */
const normal = (password: string): string => password.normalize('NFKC');

/** Takes some 40 ms of one core and waits its turn: never inside a transaction, which would hold its connection. */
export const passwordHash = (password: string): Promise<string> =>
  inTurn(() => argon2.hash(normal(password), ARGON2));

let decoy: Promise<string> | undefined;

/** Whether the password is the hash's. Without a hash the same work is done, so that the time tells nothing. */
export async function passwordFits(hash: string | null, password: string): Promise<boolean> {
  const against = hash ?? (await (decoy ??= passwordHash('nobody has this password')));
  const fits = await inTurn(() => argon2.verify(against, normal(password)));
  return hash !== null && fits;
}
