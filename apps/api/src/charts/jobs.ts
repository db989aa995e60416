import { Chart } from '@mereward/db/entities/charts/chart';
import { randomUUID } from 'node:crypto';
import type pino from 'pino';
import type { DataSource, EntityManager } from 'typeorm';
import { z } from 'zod';
import type { Jobs } from '../ctx';
import type { Server } from '../http/server';
import type { Handler } from '../jobs/worker';
import { buildSource, withSoundings, type BuildSource } from './build-source';
import { keepMade } from './keep-made';
import { runBuild, type BuildEnd, type Progress } from './run-build';

export const BuildChartJob = z.object({ chartId: z.uuid(), attempt: z.uuid() });

/** Puts the building of a chart in the queue, as part of the deed that asks for it. */
export async function queueBuild(tx: EntityManager, jobs: Jobs, chartId: string): Promise<void> {
  const attempt = randomUUID();
  await tx.query(
    `INSERT INTO chart_build (chart_id, attempt, state, step, share, updated_at)
     VALUES ($1, $2, 'queued', 'Waiting for its turn', 0, clock_timestamp())
     ON CONFLICT (chart_id) DO UPDATE SET attempt = excluded.attempt, state = 'queued', step = excluded.step, share = 0,
       error = NULL, cancel_asked_at = NULL, tries = 0, updated_at = excluded.updated_at`,
    [chartId, attempt],
  );
  await jobs.send(tx, 'chart.build', { chartId, attempt });
}

/**
 * Builds one chart. Each run has an id of its own in `chart_build.attempt`: whatever happens to this process, a run
 * that is no longer the chart's own writes nothing.
 */
export const buildChartJob: Handler = (job, { source }, logger) =>
  buildChartRun(source, BuildChartJob.parse(job.payload), logger);

/** One run of a queued build, on the spot. */
export async function buildChartRun(
  source: DataSource,
  { chartId, attempt }: z.infer<typeof BuildChartJob>,
  logger: pino.Logger,
): Promise<void> {
  const run = { chartId, id: randomUUID() };
  if (!(await claim(source, run, attempt))) return;
  try {
    const made = await sourceOf(source, chartId);
    const end = await runBuild(made, (progress) => tellProgress(source, run, progress));
    await finish(source, run, { source: made, end });
  } catch (error) {
    logger.error({ chartId, err: error }, 'a chart could not be built');
    await fail(
      source,
      run,
      `The building stopped by a fault of the program (written down as ${run.id}). Try it once more.`,
    );
  }
}

type Run = { chartId: string; id: string };

const firstRow = async (db: DataSource | EntityManager, sql: string, values: unknown[]): Promise<boolean> => {
  const [rows] = await db.query<[unknown[], number]>(sql, values); // an UPDATE answers rows and their number
  return rows.length > 0;
};

function claim(db: DataSource, run: Run, attempt: string): Promise<boolean> {
  return firstRow(
    db,
    `UPDATE chart_build SET attempt = $3, state = 'running', step = 'Beginning', share = 0, tries = tries + 1,
            updated_at = clock_timestamp()
      WHERE chart_id = $1 AND attempt = $2 AND state = 'queued' RETURNING chart_id`,
    [run.chartId, attempt, run.id],
  );
}

async function sourceOf(db: DataSource, chartId: string): Promise<BuildSource> {
  return db.transaction('REPEATABLE READ', async (tx) =>
    withSoundings(
      tx,
      await buildSource(tx, await tx.findOneOrFail(Chart, { where: { id: chartId }, select: CHART_WANTED })),
    ),
  );
}

const CHART_WANTED = { id: true, lakeId: true, visitIds: true, contourStepM: true } as const;

/** Writes how far the build is; answers false when it was cancelled or is no longer this run's. */
function tellProgress(db: DataSource, { chartId, id }: Run, { step, share }: Progress): Promise<boolean> {
  return firstRow(
    db,
    `UPDATE chart_build SET step = $3, share = $4, updated_at = clock_timestamp()
      WHERE chart_id = $1 AND attempt = $2 AND state = 'running' AND cancel_asked_at IS NULL RETURNING chart_id`,
    [chartId, id, step, share],
  );
}

async function finish(
  db: DataSource,
  run: Run,
  { source, end }: { source: BuildSource; end: BuildEnd },
): Promise<void> {
  if (end.kind === 'refused') return fail(db, run, end.words);
  if (end.kind === 'stopped') {
    await db.query(
      `UPDATE chart_build SET state = 'cancelled', step = 'Cancelled', updated_at = clock_timestamp()
        WHERE chart_id = $1 AND attempt = $2 AND state = 'running'`,
      [run.chartId, run.id],
    );
    return;
  }
  const { chart } = end;
  await db.transaction(async (tx) => {
    await tx.query('SELECT id FROM chart WHERE id = $1 FOR NO KEY UPDATE', [run.chartId]); // before its build: as every deed does
    const mine = await firstRow(
      tx,
      `UPDATE chart_build SET state = 'done', step = 'Done', share = 1, error = NULL, updated_at = clock_timestamp()
        WHERE chart_id = $1 AND attempt = $2 AND state = 'running' AND cancel_asked_at IS NULL RETURNING chart_id`,
      [run.chartId, run.id],
    );
    if (!mine) return;
    await keepMade(tx, { chartId: run.chartId, source, chart });
  });
}

async function fail(db: DataSource, { chartId, id }: Run, words: string): Promise<void> {
  await db.query(
    `UPDATE chart_build SET state = 'failed', step = 'Stopped', error = $3, updated_at = clock_timestamp()
      WHERE chart_id = $1 AND attempt = $2 AND state = 'running'`,
    [chartId, id, words],
  );
}

/** A run that has said nothing for this long was lost with the process that had it. */
const LOST_AFTER_S = 15;
const LOOK_EVERY_S = 5;
/** A build that takes the process down with it is not tried for ever. */
const MOST_TRIES = 3;

/** Takes up builds whose process died: cancelled when that was asked, given up after some tries, else queued again. */
export async function takeUpLostBuilds(
  { source, jobs }: Pick<Server, 'source' | 'jobs'>,
  silentS = LOST_AFTER_S,
): Promise<number> {
  return source.transaction(async (tx) => {
    const lost = await tx.query<{ chart_id: string; tries: number; cancelled: boolean }[]>(
      `SELECT chart_id, tries, cancel_asked_at IS NOT NULL AS cancelled FROM chart_build
        WHERE state = 'running' AND updated_at <= clock_timestamp() - make_interval(secs => $1)
        FOR UPDATE SKIP LOCKED`,
      [silentS],
    );
    for (const { chart_id: chartId, tries, cancelled } of lost)
      await takeUp(tx, jobs, { chartId, tries, cancelled });
    return lost.length;
  });
}

async function takeUp(
  tx: EntityManager,
  jobs: Jobs,
  lost: { chartId: string; tries: number; cancelled: boolean },
): Promise<void> {
  const attempt = randomUUID();
  if (!lost.cancelled && lost.tries < MOST_TRIES) {
    await tx.query(
      `UPDATE chart_build SET attempt = $2, state = 'queued', step = 'Waiting for its turn again', share = 0,
              updated_at = clock_timestamp() WHERE chart_id = $1`,
      [lost.chartId, attempt],
    );
    await jobs.send(tx, 'chart.build', { chartId: lost.chartId, attempt });
    return;
  }
  const words = lost.cancelled
    ? null
    : `The building was cut short ${lost.tries} times. Ask whoever runs the server to look.`;
  await tx.query(
    `UPDATE chart_build SET attempt = $2, state = $3, step = $4, error = $5, updated_at = clock_timestamp()
      WHERE chart_id = $1`,
    [
      lost.chartId,
      attempt,
      lost.cancelled ? 'cancelled' : 'failed',
      lost.cancelled ? 'Cancelled' : 'Stopped',
      words,
    ],
  );
}

/** Looks for lost builds now and every few seconds; answers how to stop. */
export function watchBuilds(
  server: Pick<Server, 'source' | 'jobs'>,
  onError: (error: unknown) => void,
): () => void {
  const look = () => void takeUpLostBuilds(server).catch(onError);
  look();
  const timer = setInterval(look, LOOK_EVERY_S * 1000);
  timer.unref();
  return () => clearInterval(timer);
}
