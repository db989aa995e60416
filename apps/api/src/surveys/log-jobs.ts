import { Lake } from '@mereward/db/entities/lakes/lake';
import { SoundingFile } from '@mereward/db/entities/surveys/sounding-file';
import { SoundingImport } from '@mereward/db/entities/surveys/sounding-import';
import { SurveyVisit } from '@mereward/db/entities/surveys/survey-visit';
import { outlineInPlane } from '@mereward/shared/geometry/outline';
import { reportOf } from '@mereward/shared/surveys/log-preview';
import type pino from 'pino';
import type { DataSource, EntityManager } from 'typeorm';
import type { z } from 'zod';
import { cancelRun, endRun, failRun, runClaimed, tellProgress, type Run } from '../jobs/claimed-run';
import { runThread, type Progress } from '../jobs/run-thread';
import type { Handler } from '../jobs/worker';
import { originOfLake } from '../lakes/found';
import { LOG_READINGS, ReadLogJob } from './log-queue';
import type { LogWord, LogWork, SoundingRows } from './log.worker';

/** Looks at one log or takes it in; soundings come in all together or not at all. */
export const readLogJob: Handler = (job, { source, clock }, logger) =>
  readLogRun({ source, now: clock() }, ReadLogJob.parse(job.payload), logger);

type Ground = { source: DataSource; now: Date };

/** One run of a queued reading, on the spot. */
export async function readLogRun(
  { source, now }: Ground,
  { logId, attempt }: z.infer<typeof ReadLogJob>,
  logger: pino.Logger,
): Promise<void> {
  await runClaimed(
    source,
    { table: LOG_READINGS, rowId: logId, attempt },
    {
      logger,
      faultWords: (runId) =>
        `The reading stopped by a fault of the program (written down as ${runId}). Nothing was taken in. Try it once more.`,
      act: (run) => read({ source, now }, run),
    },
  );
}

async function read({ source, now }: Ground, run: Run): Promise<void> {
  const log = await source.manager.findOneByOrFail(SoundingImport, { id: run.rowId });
  const work = await workOf(source.manager, log, now);
  const span = log.goal === 'keep' ? READING_SHARE : 1;
  const mayGoOn = ({ step, share }: Progress) => tellProgress(source, run, { step, share: share * span });
  const end = await runThread<LogWord>('surveys/log', work, mayGoOn);
  if (end === null) await cancelRun(source, run);
  else if (end.kind === 'refused') await failRun(source, run, end.words);
  else if (log.goal === 'look') await looked(source, run, end);
  else if (end.preview.kept !== log.preview?.kept) await failRun(source, run, NOT_AS_SHOWN);
  else await takeIn(source, run, end);
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

type LogEnd = Extract<LogWord, { kind: 'read' }>;

async function looked(db: DataSource, run: Run, { preview }: LogEnd): Promise<void> {
  const mine = await endRun(db, run, { state: 'looked', step: 'Read', also: { preview } });
  if (!mine) await cancelRun(db, run);
}

/** The soundings have to be let go of again: the run was cancelled, or is another's by now. */
class LetGo extends Error {}

async function takeIn(db: DataSource, run: Run, { preview, rows }: LogEnd): Promise<void> {
  try {
    await db.transaction(async (tx) => {
      let seq = 0;
      for (const [i, part] of rows.entries()) {
        await insertRows(tx, { logId: run.rowId, seq }, part);
        seq += part.count;
        const share = READING_SHARE + (1 - READING_SHARE) * ((i + 1) / (rows.length + 1));
        if (!(await tellProgress(db, run, { step: 'Writing the soundings', share }))) throw new LetGo();
      }
      const also = { report: reportOf(preview), preview };
      const mine = await endRun(tx, run, { state: 'done', step: 'Done', also });
      if (!mine) throw new LetGo();
    });
  } catch (error) {
    if (!(error instanceof LetGo)) throw error;
    await cancelRun(db, run);
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
