import { SoundingImport } from '@mereward/db/entities/surveys/sounding-import';
import { Problem } from '@mereward/shared/problems/problem';
import type { LogView, LookAgain } from '@mereward/shared/surveys/log-contract';
import type { EntityManager } from 'typeorm';
import type { Ctx } from '../ctx';
import { logToChange, type LogFound } from './find-log';
import { queueLog } from './log-queue';
import { logView } from './log-view';

/** Reads the files again in another way. What is asked last counts. */
export async function lookAgain(ctx: Ctx, logId: string, { options }: LookAgain): Promise<LogView> {
  const found = await logToChange(ctx, logId);
  refuseDone(found.log);
  refuseBeingTakenIn(found.log);
  await queueLog(ctx.tx, ctx.jobs, { logId, goal: 'look', options });
  return asItIs(ctx, found);
}

/** Takes in what was shown last, in the way it was shown. Asked twice, it is done once. */
export async function startLog(ctx: Ctx, logId: string): Promise<LogView> {
  const found = await logToChange(ctx, logId);
  const { log } = found;
  const { preview, state, goal } = log;
  if (state === 'done' || (goal === 'keep' && isBusy(log))) return logView(ctx, found);
  if (isBusy(log) || preview === null || (goal === 'look' && state !== 'looked'))
    throw new Problem('conflict', 'This log has not been looked at yet', {
      detail: 'Wait until it is read, look whether it says what was meant, then take it in.',
    });
  const [ask] = preview.asks;
  if (ask)
    throw new Problem('conflict', 'Something about this log has to be said first', {
      detail: ask.words,
      errors: preview.asks.map(({ option, words }) => ({ pointer: `/options/${option}`, detail: words })),
    });
  if (preview.kept === 0)
    throw new Problem('conflict', 'There are no soundings to take in', {
      detail: 'Everything was left out; the reasons stand beside the log.',
    });
  await queueLog(ctx.tx, ctx.jobs, { logId, goal: 'keep', options: preview.guessed });
  return asItIs(ctx, found);
}

/** Asks for the reading to stop: at once while it waits, within moments while it runs. Nothing is taken in then. */
export async function cancelLog(ctx: Ctx, logId: string): Promise<LogView> {
  const found = await logToChange(ctx, logId);
  if (!isBusy(found.log))
    throw new Problem('conflict', 'This log is not being read', {
      detail: 'Look at it again: it is done or was stopped.',
    });
  await ctx.tx.query(
    `UPDATE sounding_import
        SET cancel_asked_at = clock_timestamp(),
            state = CASE WHEN state = 'queued' THEN 'cancelled' ELSE state END,
            step = CASE WHEN state = 'queued' THEN 'Cancelled' ELSE step END
      WHERE id = $1`,
    [logId],
  );
  return asItIs(ctx, found);
}

/** Takes a log back, soundings, files and all. That it was brought, and its report, stay on record. */
export async function undoLog(ctx: Ctx, logId: string): Promise<void> {
  const { tx, now } = ctx;
  const { log } = await logToChange(ctx, logId);
  if (isBusy(log))
    throw new Problem('conflict', 'This log is being read just now', {
      detail: 'Cancel that first, then take the log back.',
    });
  if (log.state === 'done') await refusePublished(tx, log);
  await tx.query('DELETE FROM sounding WHERE import_id = $1', [logId]);
  await tx.query('DELETE FROM sounding_file WHERE import_id = $1', [logId]);
  await tx.update(SoundingImport, { id: logId }, { undoneAt: now, preview: null });
}

const isBusy = ({ state }: SoundingImport): boolean => state === 'queued' || state === 'running';

function refuseDone({ state }: SoundingImport): void {
  if (state !== 'done') return;
  throw new Problem('conflict', 'This log is taken in already', {
    detail: 'Take it back first, then bring it again in another way.',
  });
}

function refuseBeingTakenIn(log: SoundingImport): void {
  if (log.goal !== 'keep' || !isBusy(log)) return;
  throw new Problem('conflict', 'This log is being taken in just now', {
    detail: 'Wait for it, or cancel it first.',
  });
}

/** The charts of the visit are held meanwhile, so that none is published of soundings that are going. */
async function refusePublished(tx: EntityManager, { id, visitId }: SoundingImport): Promise<void> {
  const charts = await tx.query<{ version: string | null; status: string; uses: boolean }[]>(
    `SELECT version, status, coalesce(built->'logs', '[]') @> jsonb_build_array(jsonb_build_object('id', $2::text)) AS uses
       FROM chart WHERE $1 = ANY (visit_ids) ORDER BY id FOR SHARE`,
    [visitId, id],
  );
  const using = charts.filter(
    ({ status, uses }) => uses && (status === 'published' || status === 'superseded'),
  );
  if (using.length === 0) return;
  const versions = using.map(({ version }) => version ?? '').join(', ');
  throw new Problem('conflict', 'A published chart was made from this log', {
    detail: `It stands in version ${versions}. Leave it: what a published chart was made from is kept.`,
  });
}

async function asItIs(ctx: Ctx, found: LogFound): Promise<LogView> {
  return logView(ctx, { ...found, log: await ctx.tx.findOneByOrFail(SoundingImport, { id: found.log.id }) });
}
