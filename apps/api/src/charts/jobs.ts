import { Chart } from '@mereward/db/entities/charts/chart';
import { randomUUID } from 'node:crypto';
import type pino from 'pino';
import type { DataSource, EntityManager } from 'typeorm';
import { z } from 'zod';
import type { Jobs } from '../ctx';
import {
  cancelRun,
  endRun,
  failRun,
  runClaimed,
  tellProgress,
  type Run,
  type WorkTable,
} from '../jobs/claimed-run';
import type { Handler } from '../jobs/worker';
import { buildSource, withSoundings, type BuildSource, type Wanted } from './build-source';
import { keepMade } from './keep-made';
import { runBuild, type BuildEnd } from './run-build';

export const BuildChartJob = z.object({ chartId: z.uuid(), attempt: z.uuid() });

export const CHART_BUILDS: WorkTable = {
  name: 'chart_build',
  key: 'chart_id',
  job: 'chart.build',
  payload: (chartId, attempt): z.infer<typeof BuildChartJob> => ({ chartId, attempt }),
  cutShort: (tries) => `The building was cut short ${tries} times. Ask whoever runs the server to look.`,
};

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

/** Builds one chart. */
export const buildChartJob: Handler = (job, { source }, logger) =>
  buildChartRun(source, BuildChartJob.parse(job.payload), logger);

/** One run of a queued build, on the spot. */
export async function buildChartRun(
  source: DataSource,
  { chartId, attempt }: z.infer<typeof BuildChartJob>,
  logger: pino.Logger,
): Promise<void> {
  await runClaimed(
    source,
    { table: CHART_BUILDS, rowId: chartId, attempt },
    {
      logger,
      faultWords: (runId) =>
        `The building stopped by a fault of the program (written down as ${runId}). Try it once more.`,
      act: async (run) => {
        const made = await sourceOf(source, chartId);
        const end = await runBuild(made, (progress) => tellProgress(source, run, progress));
        await finish(source, run, { source: made, end });
      },
    },
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

const CHART_WANTED = {
  id: true,
  lakeId: true,
  visitIds: true,
  contourStepM: true,
  draftedAt: true,
} as const satisfies Record<keyof Wanted, true>;

async function finish(
  db: DataSource,
  run: Run,
  { source, end }: { source: BuildSource; end: BuildEnd },
): Promise<void> {
  if (end.kind === 'refused') return failRun(db, run, end.words);
  if (end.kind === 'stopped') return cancelRun(db, run);
  await db.transaction(async (tx) => {
    await tx.query('SELECT id FROM chart WHERE id = $1 FOR NO KEY UPDATE', [run.rowId]); // before its build: as every deed does
    if (await endRun(tx, run, { state: 'done', step: 'Done' }))
      await keepMade(tx, { chartId: run.rowId, source, chart: end.chart });
    else await cancelRun(tx, run);
  });
}
