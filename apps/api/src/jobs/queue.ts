import type { EntityManager } from 'typeorm';
import PgBoss from 'pg-boss';
import type { JobName, Jobs } from '../ctx';

const QUEUES: Record<JobName, { retryLimit: number; retryDelay: number; expireInSeconds: number }> = {
  'mail.send': { retryLimit: 8, retryDelay: 5, expireInSeconds: 60 },
  'chart.build': { retryLimit: 2, retryDelay: 5, expireInSeconds: 900 },
  // Twelve tries are five hours: the store of files may be away for a while, and what was sent is kept.
  'photo.resize': { retryLimit: 11, retryDelay: 5, expireInSeconds: 180 },
  'log.read': { retryLimit: 2, retryDelay: 5, expireInSeconds: 900 },
  'files.remove': { retryLimit: 11, retryDelay: 5, expireInSeconds: 60 },
  'picture.resize': { retryLimit: 11, retryDelay: 5, expireInSeconds: 180 },
  // Fourteen tries are some twenty hours, within the day a provider knows an idempotency key.
  'refund.ask': { retryLimit: 13, retryDelay: 5, expireInSeconds: 120 },
  'payment.close': { retryLimit: 11, retryDelay: 5, expireInSeconds: 120 },
  'closure.settle': { retryLimit: 11, retryDelay: 5, expireInSeconds: 120 },
  'booking.warn': { retryLimit: 5, retryDelay: 5, expireInSeconds: 60 },
  'booking.eve': { retryLimit: 8, retryDelay: 5, expireInSeconds: 60 },
  'booking.expire': { retryLimit: 5, retryDelay: 5, expireInSeconds: 60 },
};

/** `failed` is told what goes wrong between jobs, the database being away above all; the queue goes on trying. */
export async function openQueue(databaseUrl: string, failed: (error: Error) => void): Promise<PgBoss> {
  const boss = new PgBoss({ connectionString: databaseUrl, max: 4 });
  boss.on('error', failed);
  await boss.start();
  for (const [name, policy] of Object.entries(QUEUES))
    await boss.createQueue(name, { name, ...policy, retryBackoff: true });
  return boss;
}

/** Jobs as rows of the deed's own transaction: rolled back with it, run only once it is committed. */
export function jobsOn(boss: PgBoss): Jobs {
  const later: Jobs['later'] = async (tx: EntityManager, { name, payload, afterSeconds }) => {
    const executeSql = async (text: string, values: unknown[]) => ({ rows: await tx.query(text, values) });
    const when = { startAfter: Math.max(0, Math.ceil(afterSeconds)) };
    await boss.send(name, payload, { ...QUEUES[name], ...when, retryBackoff: true, db: { executeSql } });
  };
  return { later, send: (tx, name, payload) => later(tx, { name, payload, afterSeconds: 0 }) };
}
