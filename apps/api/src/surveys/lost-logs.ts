import { randomUUID } from 'node:crypto';
import type { EntityManager } from 'typeorm';
import type { Jobs } from '../ctx';
import type { Server } from '../http/server';

/** A run that has said nothing for this long was lost with the process that had it. */
const LOST_AFTER_S = 15;
const LOOK_EVERY_S = 5;
/** A log that takes the process down with it is not tried for ever. */
const MOST_TRIES = 3;

type Lost = { id: string; tries: number; cancelled: boolean };

/** Takes up readings whose process died: cancelled when that was asked, given up after some tries, else queued again. */
export async function takeUpLostLogs(
  { source, jobs }: Pick<Server, 'source' | 'jobs'>,
  silentS = LOST_AFTER_S,
): Promise<number> {
  return source.transaction(async (tx) => {
    const lost = await tx.query<Lost[]>(
      `SELECT id, tries, cancel_asked_at IS NOT NULL AS cancelled FROM sounding_import
        WHERE state = 'running' AND updated_at <= clock_timestamp() - make_interval(secs => $1)
        FOR UPDATE SKIP LOCKED`,
      [silentS],
    );
    for (const each of lost) await takeUp(tx, jobs, each);
    return lost.length;
  });
}

async function takeUp(tx: EntityManager, jobs: Jobs, { id, tries, cancelled }: Lost): Promise<void> {
  const attempt = randomUUID();
  const end = { state: 'queued', step: 'Waiting for its turn again', words: null as string | null };
  if (cancelled) Object.assign(end, { state: 'cancelled', step: 'Cancelled' });
  else if (tries >= MOST_TRIES)
    Object.assign(end, {
      state: 'failed',
      step: 'Stopped',
      words: `The reading was cut short ${tries} times. Nothing was taken in. Bring the log in parts.`,
    });
  await tx.query(
    `UPDATE sounding_import SET attempt = $2, state = $3, step = $4, error = $5, share = 0, updated_at = clock_timestamp()
      WHERE id = $1`,
    [id, attempt, end.state, end.step, end.words],
  );
  if (end.state === 'queued') await jobs.send(tx, 'log.read', { logId: id, attempt });
}

/** Looks for lost readings now and every few seconds; answers how to stop. */
export function watchLogs(
  server: Pick<Server, 'source' | 'jobs'>,
  onError: (error: unknown) => void,
): () => void {
  const look = () => void takeUpLostLogs(server).catch(onError);
  look();
  const timer = setInterval(look, LOOK_EVERY_S * 1000);
  timer.unref();
  return () => clearInterval(timer);
}
