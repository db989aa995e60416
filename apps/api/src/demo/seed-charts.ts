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
import { BOAT_VISIT, seedLog } from './seed-log';
import { seedAccepted } from './seed-reports';
import { seedSpots } from './seed-spots';
import { demoVisitId } from './seed-survey';
import type { DemoDays } from './survey-days';

export const FAR_OSTLE_AUTUMN_CHART = demoId('chart FO autumn');
export const FAR_OSTLE_CHART = demoId('chart FO');
export const OSTLE_POOL_CHART = demoId('chart OP');

const DAY_MS = 86_400_000;

const AUTUMN_VISITS = [demoVisitId({ key: 'FO 0' }), BOAT_VISIT];
const SPRING_VISITS = ['FO 1', 'FO 2', 'FO 3'].map((key) => demoVisitId({ key }));

/**
 * Far Ostle's west end charted in autumn, works done, an angler's report accepted, and the whole of it charted in spring;
 * Ostle Pool's chart left a draft. What is there already stays.
 */
export async function seedCharts(source: DataSource, days: DemoDays): Promise<void> {
  await Promise.all([farOstle(source, days), ostlePool(source, days)]); // two threads build at once
}

async function farOstle(source: DataSource, days: DemoDays): Promise<void> {
  await seedLog(source, days);
  await published(source, days.farOstleAutumnPublished, {
    id: FAR_OSTLE_AUTUMN_CHART,
    lakeId: FAR_OSTLE_LAKE.id,
    title: 'The west end and the gully',
    visitIds: AUTUMN_VISITS,
  });
  await source.transaction((tx) => seedAccepted(tx, days.reported));
  await published(source, days.farOstlePublished, {
    id: FAR_OSTLE_CHART,
    lakeId: FAR_OSTLE_LAKE.id,
    title: 'Spring survey',
    visitIds: SPRING_VISITS,
    withSpots: true,
  });
}

const ostlePool = (source: DataSource, days: DemoDays): Promise<void> =>
  draftOnce(source, new Date(days.ostlePool.getTime() + 2 * DAY_MS), {
    id: OSTLE_POOL_CHART,
    lakeId: OSTLE_POOL_LAKE.id,
    title: 'First look',
    visitIds: [demoVisitId({ key: 'OP 1' })],
  });

/** Drafted and built, then published by two people, once. */
async function published(source: DataSource, at: Date, draft: Draft): Promise<void> {
  await draftOnce(source, at, draft);
  const { status } = await source.manager.findOneByOrFail(Chart, { id: draft.id });
  if (status !== 'draft') return;
  await source.transaction(async (tx) => {
    await submitChart(demoCtx(tx, JOAN, at), draft.id);
    await approveChart(demoCtx(tx, IDRIS, at), draft.id);
    if (draft.withSpots) await seedSpots(demoCtx(tx, JOAN, at), FAR_OSTLE_LAKE, draft.visitIds);
  });
}

type Draft = { id: string; lakeId: string; title: string; visitIds: string[]; withSpots?: boolean };

/** The draft made and built, once: a start that was cut short goes on where it was. */
async function draftOnce(
  source: DataSource,
  at: Date,
  { id, lakeId, title, visitIds }: Draft,
): Promise<void> {
  const build = await source.manager.findOneBy(ChartBuild, { chartId: id });
  if (build?.state === 'done') return;
  await source.transaction(async (tx) => {
    const ctx = demoCtx(tx, JOAN, at);
    if (build === null) await draftChart(ctx, lakeId, { id, title, visitIds, contourStepM: 0.5 });
    else if (build.state !== 'queued') await rebuildChart(ctx, id);
  });
  const { attempt } = await source.manager.findOneByOrFail(ChartBuild, { chartId: id });
  await buildChartRun(source, { chartId: id, attempt }, pino({ level: 'warn' }));
  const after = await source.manager.findOneByOrFail(ChartBuild, { chartId: id });
  if (after.state !== 'done') throw new Error(`The demo's chart was not built: ${after.error ?? after.step}`);
}
