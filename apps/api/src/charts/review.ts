import { Account } from '@mereward/db/entities/accounts/account';
import { Chart } from '@mereward/db/entities/charts/chart';
import { ChartBuild } from '@mereward/db/entities/charts/chart-build';
import { Fishery } from '@mereward/db/entities/fisheries/fishery';
import { Lake } from '@mereward/db/entities/lakes/lake';
import type { BuildView, ChartList, ChartListItem, ChartReview } from '@mereward/shared/charts/contract';
import { In, type EntityManager } from 'typeorm';
import { holdsAny, type Ctx } from '../ctx';
import { notFound } from '../http/deny';
import { CHART_APPROVERS, isStaff, mayBuildCharts, STAFF } from '../lakes/policy';
import { logViews } from './built-logs';
import { checksOf } from './checks';
import { leftOutViews } from './left-out-views';
import { logMisses } from './log-misses';
import { chartContent } from './chart-layers';
import { chartForStaff, LIGHT, type LightChart } from './find-chart';
import { whyNotApprove } from './policy';
import { soundingMisses } from './sounding-misses';
import { surveyorsOf } from './surveyors';

const SHOWN_TO_ALL = ['published', 'superseded', 'withdrawn'] as const;

/** The charts of a lake, newest first; drafts only for its staff. */
export async function listCharts({ tx, actor }: Ctx, lakeId: string): Promise<ChartList> {
  const lake = await tx.findOneBy(Lake, { id: lakeId });
  if (!lake) throw notFound('lake');
  const staff = isStaff(actor, lake.fisheryId);
  const charts = await tx.find(Chart, {
    where: { lakeId, ...(staff ? {} : { status: In(SHOWN_TO_ALL) }) },
    select: LIGHT,
    order: { draftedAt: 'DESC', id: 'ASC' },
  });
  const items = await listItems(tx, charts);
  return {
    charts: staff ? items : items.map(forVisitors),
    may: { build: mayBuildCharts(actor, lake.fisheryId) },
  };
}

/** Who did what is the staff's own. */
const forVisitors = (item: ChartListItem): ChartListItem => ({
  ...item,
  submittedBy: null,
  approvedBy: null,
  build: null,
});

async function listItems(tx: EntityManager, charts: readonly LightChart[]): Promise<ChartListItem[]> {
  const builds = await tx.findBy(ChartBuild, { chartId: In(charts.map((chart) => chart.id)) });
  const ids = charts.flatMap((chart) => [chart.submittedBy, chart.approvedBy]).filter((id) => id !== null);
  const people = await tx.findBy(Account, { id: In([...new Set(ids)]) });
  const nameOf = (id: string | null) => people.find((person) => person.id === id)?.name ?? null;
  return charts.map((chart) => ({
    id: chart.id,
    version: chart.version,
    title: chart.title,
    status: chart.status,
    surveyedFrom: chart.surveyedFrom,
    surveyedTo: chart.surveyedTo,
    submittedBy: nameOf(chart.submittedBy),
    approvedBy: nameOf(chart.approvedBy),
    publishedAt: chart.publishedAt?.toISOString() ?? null,
    build: buildView(builds.find((build) => build.chartId === chart.id)),
  }));
}

const buildView = (build: ChartBuild | undefined): BuildView | null =>
  build ? { state: build.state, step: build.step, share: build.share, error: build.error } : null;

/** A chart before the eyes of the staff: its checks, its quality, and what this person may do. */
export async function chartReview(ctx: Ctx, chartId: string): Promise<ChartReview> {
  const { tx, actor } = ctx;
  const found = await chartForStaff(ctx, chartId, STAFF);
  const { chart, lake } = found;
  const [item] = await listItems(tx, [chart]);
  if (!item) throw notFound('chart');
  const content = await chartContent(tx, chartId);
  const checks = await checksOf(tx, found);
  const blocked = checks.some((check) => check.state === 'failed' && check.blocks);
  const surveyors = await surveyorsOf(tx, chart.visitIds);
  const why = whyNotApprove(actor, { fisheryId: lake.fisheryId, submittedBy: chart.submittedBy, surveyors });
  const building = item.build?.state === 'queued' || item.build?.state === 'running';
  const open = chart.status === 'draft' || chart.status === 'submitted';
  const builder = mayBuildCharts(actor, lake.fisheryId);
  const approver = holdsAny(actor, lake.fisheryId, CHART_APPROVERS);
  return {
    chart: item,
    lakeId: lake.id,
    lakeName: lake.name,
    zone: (await tx.findOneByOrFail(Fishery, { id: lake.fisheryId })).zone,
    checks,
    quality: content?.built.quality ?? null,
    ended: content?.built.ended ?? [],
    bottomTable: content?.built.bottomTable ?? 0,
    misses: content ? await soundingMisses(tx, content.built) : [],
    logMisses: content ? logMisses(content.built) : [],
    leftOut: await leftOutViews(tx, chartId),
    logs: content ? logViews(content.built) : [],
    may: {
      leaveOut: builder && open,
      submit: builder && chart.status === 'draft' && !building && !blocked,
      approve: chart.status === 'submitted' && why === null && !blocked,
      approveWhyNot:
        chart.status === 'submitted' ? (why ?? (blocked ? 'A check stands against it.' : null)) : null,
      rebuild: builder && open && !building,
      cancelBuild: builder && building,
      withdraw: approver && (chart.status === 'published' || chart.status === 'superseded'),
      discard: builder && open,
    },
  };
}
