import { Chart } from '@mereward/db/entities/charts/chart';
import { ChartBuild } from '@mereward/db/entities/charts/chart-build';
import pino from 'pino';
import type { DataSource } from 'typeorm';
import { draftChart, rebuildChart } from '../charts/draft-chart';
import { buildChartRun } from '../charts/jobs';
import { approveChart, submitChart } from '../charts/publish-chart';
import { demoCtx } from './demo-ctx';
import { FAR_OSTLE_LAKE, OSTLE_POOL_LAKE } from './fishery';
import { IDRIS, JOAN } from './people';
import { demoId } from './random';
import { seedSpots } from './seed-spots';
import { demoVisitId } from './seed-survey';
import type { DemoDays } from './survey-days';

export const FAR_OSTLE_CHART = demoId('chart FO');
export const OSTLE_POOL_CHART = demoId('chart OP');

const DAY_MS = 86_400_000;

/** Far Ostle's chart built, checked and published by two people; Ostle Pool's left a draft. What is there already stays. */
export async function seedCharts(source: DataSource, days: DemoDays): Promise<void> {
  await draftOnce(source, days.farOstlePublished, {
    id: FAR_OSTLE_CHART,
    lakeId: FAR_OSTLE_LAKE.id,
    title: 'Spring survey',
    visitIds: [demoVisitId({ key: 'FO 1' }), demoVisitId({ key: 'FO 2' })],
  });
  await draftOnce(source, new Date(days.ostlePool.getTime() + 2 * DAY_MS), {
    id: OSTLE_POOL_CHART,
    lakeId: OSTLE_POOL_LAKE.id,
    title: 'First look',
    visitIds: [demoVisitId({ key: 'OP 1' })],
  });
  const { status } = await source.manager.findOneByOrFail(Chart, { id: FAR_OSTLE_CHART });
  if (status !== 'draft') return;
  await source.transaction(async (tx) => {
    await submitChart(demoCtx(tx, JOAN, days.farOstlePublished), FAR_OSTLE_CHART);
    await approveChart(demoCtx(tx, IDRIS, days.farOstlePublished), FAR_OSTLE_CHART);
    await seedSpots(demoCtx(tx, JOAN, days.farOstlePublished), FAR_OSTLE_LAKE);
  });
}

type Draft = { id: string; lakeId: string; title: string; visitIds: string[] };

/** The draft made and built, once: a start that was cut short goes on where it was. */
async function draftOnce(source: DataSource, at: Date, { lakeId, ...draft }: Draft): Promise<void> {
  const build = await source.manager.findOneBy(ChartBuild, { chartId: draft.id });
  if (build?.state === 'done') return;
  await source.transaction(async (tx) => {
    const ctx = demoCtx(tx, JOAN, at);
    if (build === null) await draftChart(ctx, lakeId, { ...draft, contourStepM: 0.5 });
    else if (build.state !== 'queued') await rebuildChart(ctx, draft.id);
  });
  const { attempt } = await source.manager.findOneByOrFail(ChartBuild, { chartId: draft.id });
  await buildChartRun(source, { chartId: draft.id, attempt }, pino({ level: 'warn' }));
  const after = await source.manager.findOneByOrFail(ChartBuild, { chartId: draft.id });
  if (after.state !== 'done') throw new Error(`The demo's chart was not built: ${after.error ?? after.step}`);
}
