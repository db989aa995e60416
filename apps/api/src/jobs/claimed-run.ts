import { randomUUID } from 'node:crypto';
import type pino from 'pino';
import type { DataSource, EntityManager } from 'typeorm';
import type { JobName, Jobs } from '../ctx';
import type { Server } from '../http/server';
import type { Progress } from './run-thread';

type Db = DataSource | EntityManager;

/**
 * A table whose rows are long work, one run at a time: `attempt`, `state` ('queued', 'running', 'cancelled', 'failed' and
 * ends of its own), `step`, `share`, `tries`, `error`, `cancel_asked_at`, `updated_at`.
 */
export type WorkTable = {
  name: string;
  key: string;
  /** What else must hold of a row for a run to take it. */
  takenWhen?: string;
  job: JobName;
  payload: (id: string, attempt: string) => object;
  /** Why it is given up after being cut short so often. */
  cutShort: (tries: number) => string;
};

/** Each run has an id of its own, kept as its row's `attempt`: a run that is no longer the row's writes nothing. */
export type Run = { table: WorkTable; rowId: string; id: string };

type Queued = { table: WorkTable; rowId: string; attempt: string };
type Doing = { logger: pino.Logger; faultWords: (runId: string) => string; act: (run: Run) => Promise<void> };

/** Does one queued run on the spot, if it still waits; what it throws is written down, and told as `faultWords` says. */
export async function runClaimed(
  db: DataSource,
  queued: Queued,
  { logger, faultWords, act }: Doing,
): Promise<void> {
  const run = await claim(db, queued);
  if (!run) return;
  try {
    await act(run);
  } catch (error) {
    logger.error({ job: run.table.job, row: run.rowId, run: run.id, err: error }, 'long work has failed');
    await failRun(db, run, faultWords(run.id));
  }
}

const changed = async (db: Db, sql: string, values: unknown[]): Promise<boolean> => {
  const [rows] = await db.query<[unknown[], number]>(sql, values); // an UPDATE answers rows and their number
  return rows.length > 0;
};

async function claim(db: Db, { table, rowId, attempt }: Queued): Promise<Run | null> {
  const { name, key, takenWhen = 'true' } = table;
  const id = randomUUID();
  const mine = await changed(
    db,
    `UPDATE ${name} SET attempt = $3, state = 'running', step = 'Beginning', share = 0, tries = tries + 1,
            updated_at = clock_timestamp()
      WHERE ${key} = $1 AND attempt = $2 AND state = 'queued' AND (${takenWhen}) RETURNING ${key}`,
    [rowId, attempt, id],
  );
  return mine ? { table, rowId, id } : null;
}

const mineIn = ({ key }: WorkTable): string => `${key} = $1 AND attempt = $2 AND state = 'running'`;

/** Writes how far the run is; answers false when it was cancelled or is no longer the row's own. */
export function tellProgress(db: Db, { table, rowId, id }: Run, { step, share }: Progress): Promise<boolean> {
  return changed(
    db,
    `UPDATE ${table.name} SET step = $3, share = $4, updated_at = clock_timestamp()
      WHERE ${mineIn(table)} AND cancel_asked_at IS NULL RETURNING ${table.key}`,
    [rowId, id, step, share],
  );
}

type End = { state: string; step: string; also?: Readonly<Record<string, unknown>> };

/** Ends a run well, with what else the row keeps of it (`also`, by column); false as in `tellProgress`, with nothing written. */
export function endRun(db: Db, { table, rowId, id }: Run, { state, step, also = {} }: End): Promise<boolean> {
  const kept = Object.keys(also).map((column, i) => `${column} = $${String(i + 5)},`);
  return changed(
    db,
    `UPDATE ${table.name} SET state = $3, step = $4, share = 1, error = NULL, ${kept.join(' ')} updated_at = clock_timestamp()
      WHERE ${mineIn(table)} AND cancel_asked_at IS NULL RETURNING ${table.key}`,
    [rowId, id, state, step, ...Object.values(also)],
  );
}

export async function cancelRun(db: Db, { table, rowId, id }: Run): Promise<void> {
  await db.query(
    `UPDATE ${table.name} SET state = 'cancelled', step = 'Cancelled', updated_at = clock_timestamp() WHERE ${mineIn(table)}`,
    [rowId, id],
  );
}

export async function failRun(db: Db, { table, rowId, id }: Run, words: string): Promise<void> {
  await db.query(
    `UPDATE ${table.name} SET state = 'failed', step = 'Stopped', error = $3, updated_at = clock_timestamp()
      WHERE ${mineIn(table)}`,
    [rowId, id, words],
  );
}

/** A run that has said nothing for this long was lost with the process that had it. */
const LOST_AFTER_S = 15;
const LOOK_EVERY_S = 5;
/** What takes the process down with it is not tried for ever. */
const MOST_TRIES = 3;

type Lost = { id: string; tries: number; cancelled: boolean };
type Ground = Pick<Server, 'source' | 'jobs'>;

/** Takes up what a dead process had in hand: cancelled when that was asked, given up after some tries, else queued again. */
export async function takeUpLost(
  { source, jobs }: Ground,
  table: WorkTable,
  silentS = LOST_AFTER_S,
): Promise<number> {
  return source.transaction(async (tx) => {
    const lost = await tx.query<Lost[]>(
      `SELECT ${table.key} AS id, tries, cancel_asked_at IS NOT NULL AS cancelled FROM ${table.name}
        WHERE state = 'running' AND updated_at <= clock_timestamp() - make_interval(secs => $1)
        FOR UPDATE SKIP LOCKED`,
      [silentS],
    );
    for (const each of lost) await takeUp({ tx, jobs }, table, each);
    return lost.length;
  });
}

async function takeUp(
  { tx, jobs }: { tx: EntityManager; jobs: Jobs },
  table: WorkTable,
  { id, tries, cancelled }: Lost,
): Promise<void> {
  const attempt = randomUUID();
  const end = cancelled
    ? { state: 'cancelled', step: 'Cancelled', words: null }
    : tries >= MOST_TRIES
      ? { state: 'failed', step: 'Stopped', words: table.cutShort(tries) }
      : { state: 'queued', step: 'Waiting for its turn again', words: null };
  await tx.query(
    `UPDATE ${table.name} SET attempt = $2, state = $3, step = $4, error = $5, share = 0, updated_at = clock_timestamp()
      WHERE ${table.key} = $1`,
    [id, attempt, end.state, end.step, end.words],
  );
  if (end.state === 'queued') await jobs.send(tx, table.job, table.payload(id, attempt));
}

/** Looks for lost runs now and every few seconds; answers how to stop. */
export function watchLost(ground: Ground, table: WorkTable, onError: (error: unknown) => void): () => void {
  const look = () => void takeUpLost(ground, table).catch(onError);
  look();
  const timer = setInterval(look, LOOK_EVERY_S * 1000);
  timer.unref();
  return () => clearInterval(timer);
}
