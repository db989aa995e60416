import argon2 from 'argon2';
import { gate } from './gate';

/** OWASP Password Storage Cheat Sheet: argon2id with m = 19 MiB, t = 2, p = 1. */
const SETTINGS = { type: argon2.argon2id, memoryCost: 19_456, timeCost: 2, parallelism: 1 } as const;

// More at once would fill libuv's pool of four threads, and files and look-ups would wait for seconds.
const twoAtOnce = gate(2);

export const passwordHash = (password: string): Promise<string> =>
  twoAtOnce(() => argon2.hash(password, SETTINGS));

let decoy: Promise<string> | undefined;

/** Whether the password is the hash's. Without a hash the same work is done, so that the time tells nothing. */
export async function passwordFits(hash: string | null, password: string): Promise<boolean> {
  const against = hash ?? (await (decoy ??= passwordHash('nobody’s password')));
  const fits = await twoAtOnce(() => argon2.verify(against, password));
  return hash !== null && fits;
}
