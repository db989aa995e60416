import { setTimeout as wait } from 'node:timers/promises';
import { QueryFailedError } from 'typeorm';
import { z } from 'zod';

const Coded = z.object({ code: z.string() });
const DEADLOCK = '40P01';
const ATTEMPTS = 4;

/** Did PostgreSQL end this transaction because two waited for each other? It is then rolled back whole. */
export function isDeadlock(error: unknown): boolean {
  if (!(error instanceof QueryFailedError)) return false;
  return Coded.safeParse(error.driverError).data?.code === DEADLOCK;
}

/** Runs a whole transaction, and anew when it was the one given up in a deadlock; nothing of it was kept. */
export async function outOfDeadlock<T>(transaction: () => Promise<T>): Promise<T> {
  for (let attempt = 1; ; attempt += 1) {
    try {
      return await transaction();
    } catch (error) {
      if (!isDeadlock(error) || attempt >= ATTEMPTS) throw error;
      await wait(10 * attempt);
    }
  }
}
