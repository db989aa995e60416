import { Lake } from '@mereward/db/entities/lakes/lake';
import { SoundingFile } from '@mereward/db/entities/surveys/sounding-file';
import { SoundingImport } from '@mereward/db/entities/surveys/sounding-import';
import { SurveyVisit } from '@mereward/db/entities/surveys/survey-visit';
import { outlineInPlane } from '@mereward/shared/geometry/outline';
import { reportOf } from '@mereward/shared/surveys/log-preview';
import { randomUUID } from 'node:crypto';
import type pino from 'pino';
import type { DataSource, EntityManager } from 'typeorm';
import { z } from 'zod';
import { runThread, type Progress } from '../jobs/run-thread';
import type { Handler } from '../jobs/worker';
import { originOfLake } from '../lakes/found';
import type { LogWord, LogWork, SoundingRows } from './log.worker';

export const ReadLogJob = z.object({ logId: z.uuid(), attempt: z.uuid() });

/**
 * Looks at one log or takes it in. Each run has an id of its own in `sounding_import.attempt`: whatever happens to this
 * process, a run that is no longer the log's own writes nothing, and soundings come in all together or not at all.
 */
export const readLogJob: Handler = (job, { source, clock }, logger) =>
  readLogRun({ source, now: clock() }, ReadLogJob.parse(job.payload), logger);

type Ground = { source: DataSource; now: Date };
type Run = { logId: string; id: string };

/** One run of a queued reading, on the spot. */
export async function readLogRun(
  { source, now }: Ground,
  { logId, attempt }: z.infer<typeof ReadLogJob>,
  logger: pino.Logger,
): Promise<void> {
  const run = { logId, id: randomUUID() };
  if (!(await claim(source, run, attempt))) return;
  try {
    const log = await source.manager.findOneByOrFail(SoundingImport, { id: logId });
    const work = await workOf(source.manager, log, now);
    const span = log.goal === 'keep' ? READING_SHARE : 1;
    const mayGoOn = ({ step, share }: Progress) => tellProgress(source, run, { step, share: share * span });
    const end = await runThread<LogWord>('surveys/log', work, mayGoOn);
    if (end === null) await cancelled(source, run);
    else if (end.kind === 'refused') await fail(source, run, end.words);
    else if (log.goal === 'look') await looked(source, run, end);
    else if (end.preview.kept !== log.preview?.kept) await fail(source, run, NOT_AS_SHOWN);
    else await takeIn(source, run, end);
  } catch (error) {
    logger.error({ logId, err: error }, 'a log could not be read');
    await fail(
      source,
      run,
      `The reading stopped by a fault of the program (written down as ${run.id}). Nothing was taken in. Try it once more.`,
    );
  }
}

const NOT_AS_SHOWN =
  'What would be taken in is not what was shown: the visit or the outline was changed since. Read it again and look.';

/** Of the whole, when the soundings are to be written afterwards. */
const READING_SHARE = 0.7;

async function workOf(tx: EntityManager, log: SoundingImport, now: Date): Promise<LogWork> {
  const visit = await tx.findOneByOrFail(SurveyVisit, { id: log.visitId });
  const lake = await tx.findOneByOrFail(Lake, { id: visit.lakeId });
  const files = await tx.find(SoundingFile, { where: { importId: log.id }, order: { seq: 'ASC' } });
  const origin = originOfLake(lake);
  const startedMs = visit.startedAt.getTime();
  return {
    packed: files.map(({ name, packed }) => ({ name, bytes: packed })),
    options: log.options,
    keep: log.goal === 'keep',
    ground: {
      origin,
      outline: outlineInPlane(origin, lake.details.outline),
      startedMs,
      endedMs: visit.endedAt?.getTime() ?? null,
      nowMs: now.getTime(),
      visitDayMs: startedMs - (startedMs % 86_400_000),
    },
  };
}

const firstRow = async (db: DataSource | EntityManager, sql: string, values: unknown[]): Promise<boolean> => {
  const [rows] = await db.query<[unknown[], number]>(sql, values); // an UPDATE answers rows and their number
  return rows.length > 0;
};

function claim(db: DataSource, run: Run, attempt: string): Promise<boolean> {
  return firstRow(
    db,
    `UPDATE sounding_import SET attempt = $3, state = 'running', step = 'Beginning', share = 0, tries = tries + 1,
            updated_at = clock_timestamp()
      WHERE id = $1 AND attempt = $2 AND state = 'queued' AND undone_at IS NULL RETURNING id`,
    [run.logId, attempt, run.id],
  );
}

const MINE = `id = $1 AND attempt = $2 AND state = 'running'`;

/** Writes how far the reading is; answers false when it was cancelled or is no longer this run's. */
function tellProgress(db: DataSource, { logId, id }: Run, { step, share }: Progress): Promise<boolean> {
  return firstRow(
    db,
    `UPDATE sounding_import SET step = $3, share = $4, updated_at = clock_timestamp()
      WHERE ${MINE} AND cancel_asked_at IS NULL RETURNING id`,
    [logId, id, step, share],
  );
}

async function cancelled(db: DataSource, { logId, id }: Run): Promise<void> {
  await db.query(
    `UPDATE sounding_import SET state = 'cancelled', step = 'Cancelled', updated_at = clock_timestamp() WHERE ${MINE}`,
    [logId, id],
  );
}

async function fail(db: DataSource, { logId, id }: Run, words: string): Promise<void> {
  await db.query(
    `UPDATE sounding_import SET state = 'failed', step = 'Stopped', error = $3, updated_at = clock_timestamp() WHERE ${MINE}`,
    [logId, id, words],
  );
}

type LogEnd = Extract<LogWord, { kind: 'read' }>;

async function looked(db: DataSource, { logId, id }: Run, { preview }: LogEnd): Promise<void> {
  const mine = await firstRow(
    db,
    `UPDATE sounding_import SET state = 'looked', step = 'Read', share = 1, preview = $3, updated_at = clock_timestamp()
      WHERE ${MINE} AND cancel_asked_at IS NULL RETURNING id`,
    [logId, id, preview],
  );
  if (!mine) await cancelled(db, { logId, id });
}

/** The soundings have to be let go of again: the run was cancelled, or is another's by now. */
class LetGo extends Error {}

async function takeIn(db: DataSource, run: Run, { preview, rows }: LogEnd): Promise<void> {
  try {
    await db.transaction(async (tx) => {
      let seq = 0;
      for (const [i, part] of rows.entries()) {
        await insertRows(tx, { logId: run.logId, seq }, part);
        seq += part.count;
        const share = READING_SHARE + (1 - READING_SHARE) * ((i + 1) / (rows.length + 1));
        if (!(await tellProgress(db, run, { step: 'Writing the soundings', share }))) throw new LetGo();
      }
      const mine = await firstRow(
        tx,
        `UPDATE sounding_import SET state = 'done', step = 'Done', share = 1, report = $3, preview = $4,
                updated_at = clock_timestamp()
          WHERE ${MINE} AND cancel_asked_at IS NULL RETURNING id`,
        [run.logId, run.id, reportOf(preview), preview],
      );
      if (!mine) throw new LetGo();
    });
  } catch (error) {
    if (!(error instanceof LetGo)) throw error;
    await cancelled(db, run);
  }
}

async function insertRows(
  tx: EntityManager,
  { logId, seq }: { logId: string; seq: number },
  { lon, lat, depthM, atS }: SoundingRows,
): Promise<void> {
  await tx.query(
    `INSERT INTO sounding (import_id, seq, lon, lat, depth_as_read_m, observed_at)
     SELECT $1, $2::int + ord, lon, lat, depth_m, to_timestamp(at_s)
       FROM unnest($3::float8[], $4::float8[], $5::float8[], $6::float8[]) WITH ORDINALITY AS read (lon, lat, depth_m, at_s, ord)`,
    [logId, seq, lon, lat, depthM, atS],
  );
}
