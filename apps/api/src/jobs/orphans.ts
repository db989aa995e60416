import type { DataSource } from 'typeorm';

/** Held shared by each process that works jobs, for as long as it lives: the database lets go of a dead one's. */
const WORKERS = 7_404_141;

/** An orphan that has no try left has failed; the others wait anew and are taken at once. */
const FREE = `
  UPDATE pgboss.job
  SET state = (CASE WHEN retry_count < retry_limit THEN 'retry' ELSE 'failed' END)::pgboss.job_state,
    start_after = now()
  WHERE state = 'active' AND name = ANY ($1)`;

/**
 * Frees the jobs a killed process had in hand, which otherwise wait until their time is over. It may do so only when
 * no other process works jobs: then nobody can have them in hand. Answers what says, on leaving, that this one is gone.
 */
export async function takeUpOrphans(
  source: DataSource,
  names: readonly string[],
): Promise<() => Promise<void>> {
  const session = source.createQueryRunner();
  await session.connect();
  const [row] = await session.query('SELECT pg_try_advisory_lock($1) AS alone', [WORKERS]);
  if (row.alone === true) await session.query(FREE, [names]);
  await session.query('SELECT pg_advisory_lock_shared($1)', [WORKERS]);
  if (row.alone === true) await session.query('SELECT pg_advisory_unlock($1)', [WORKERS]);
  return async () => {
    // A database that went away meanwhile has let go already.
    await session.query('SELECT pg_advisory_unlock_shared($1)', [WORKERS]).catch(() => undefined);
    await session.release();
  };
}
