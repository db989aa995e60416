import { Account } from '@mereward/db/entities/accounts/account';
import { Chart } from '@mereward/db/entities/charts/chart';
import { Fishery } from '@mereward/db/entities/fisheries/fishery';
import type { Lake } from '@mereward/db/entities/lakes/lake';
import type { WithdrawChart } from '@mereward/shared/charts/contract';
import { Problem } from '@mereward/shared/problems/problem';
import { civilDay } from '@mereward/shared/time/civil-day';
import { In, type EntityManager } from 'typeorm';
import { accountOf, type Ctx } from '../ctx';
import { CHART_APPROVERS, CHART_BUILDERS } from '../lakes/policy';
import { chartPublishedMessage, chartWaitingMessage } from '../mail/messages';
import { post } from '../mail/send';
import { chartToChange, type ChartFound } from './find-chart';
import { whyNotApprove } from './policy';
import { checksOf } from './checks';
import { surveyorsOf } from './surveyors';

const NOTHING_DONE = 'Nothing was changed by you. Look at the chart again to see how it stands.';

/** Puts a draft before those who may approve it. Refused while a check blocks it. */
export async function submitChart(ctx: Ctx, chartId: string): Promise<void> {
  const { tx, actor, now } = ctx;
  const found = await chartToChange(ctx, chartId, CHART_BUILDERS);
  if (found.chart.status !== 'draft')
    throw new Problem(
      'conflict',
      found.chart.status === 'submitted'
        ? 'This chart is submitted already'
        : 'This chart is published already',
      { detail: NOTHING_DONE },
    );
  await refuseBlocked(tx, found);
  const submittedBy = accountOf(actor);
  await tx.update(Chart, { id: chartId }, { status: 'submitted', submittedBy, submittedAt: now });
  await tellApprovers(ctx, found, submittedBy);
}

/**
 * Publishes a submitted chart under the next number of its year; the one before is superseded. The lake is held
 * meanwhile, so that of two approvals at once each gets its own number.
 */
export async function approveChart(ctx: Ctx, chartId: string): Promise<void> {
  const { tx, actor, now } = ctx;
  const found = await chartToChange(ctx, chartId, CHART_APPROVERS);
  const { chart, lake } = found;
  if (chart.status === 'draft')
    throw new Problem('conflict', 'This chart has not been submitted', {
      detail: 'Its surveyor submits it first.',
    });
  if (chart.status !== 'submitted')
    throw new Problem('conflict', 'This chart has been published already', { detail: NOTHING_DONE });
  const why = whyNotApprove(actor, {
    fisheryId: lake.fisheryId,
    submittedBy: chart.submittedBy,
    surveyors: await surveyorsOf(tx, chart.visitIds),
  });
  if (why) throw new Problem('forbidden', why, { detail: 'Ask another manager or the owner.' });
  await refuseBlocked(tx, found);
  await tx.query('SELECT id FROM lake WHERE id = $1 FOR NO KEY UPDATE', [lake.id]);
  const version = await nextVersion(tx, lake, now);
  await tx.update(
    Chart,
    { lakeId: lake.id, status: 'published' },
    { status: 'superseded', supersededBy: chartId },
  );
  await tx.update(
    Chart,
    { id: chartId },
    { status: 'published', version, approvedBy: accountOf(actor), publishedAt: now },
  );
  await tellSurveyors(ctx, found, version);
}

/** Takes a published chart away from its readers, saying why. It stays on record. */
export async function withdrawChart(ctx: Ctx, chartId: string, { reason }: WithdrawChart): Promise<void> {
  const { chart } = await chartToChange(ctx, chartId, CHART_APPROVERS);
  if (chart.status === 'withdrawn')
    throw new Problem('conflict', 'This chart is withdrawn already', { detail: NOTHING_DONE });
  if (chart.status !== 'published' && chart.status !== 'superseded')
    throw new Problem('conflict', 'Only a published chart can be withdrawn', {
      detail: 'A draft is discarded instead.',
    });
  await ctx.tx.update(
    Chart,
    { id: chartId },
    { status: 'withdrawn', withdrawnReason: reason, withdrawnAt: ctx.now },
  );
}

async function refuseBlocked(tx: EntityManager, found: ChartFound): Promise<void> {
  const blocking = (await checksOf(tx, found)).filter((check) => check.state === 'failed' && check.blocks);
  if (blocking.length === 0) return;
  throw new Problem('conflict', 'This chart can’t be published yet', {
    detail: blocking.map((check) => check.words).join(' '),
    errors: blocking.map((check) => ({ pointer: `/checks/${check.key}`, detail: check.words })),
  });
}

async function nextVersion(tx: EntityManager, lake: Lake, now: Date): Promise<string> {
  const { zone } = await tx.findOneByOrFail(Fishery, { id: lake.fisheryId });
  const year = civilDay(now, zone).slice(0, 4);
  const [last] = await tx.query<{ n: number }[]>(
    `SELECT coalesce(max(split_part(version, '.', 2)::int), 0) AS n FROM chart
      WHERE lake_id = $1 AND split_part(version, '.', 1) = $2`,
    [lake.id, year],
  );
  return `${year}.${(last?.n ?? 0) + 1}`;
}

async function wordsOf(tx: EntityManager, lake: Lake): Promise<{ lake: string; fishery: string }> {
  const fishery = await tx.findOneByOrFail(Fishery, { id: lake.fisheryId });
  return { lake: lake.name, fishery: fishery.name };
}

async function tellApprovers(ctx: Ctx, { chart, lake }: ChartFound, submittedBy: string): Promise<void> {
  const { tx, publicUrl } = ctx;
  const surveyors = await surveyorsOf(tx, chart.visitIds);
  const rows = await tx.query<{ id: string; name: string; email: string }[]>(
    `SELECT DISTINCT a.id, a.name, a.email FROM fishery_role r JOIN account a ON a.id = r.account_id
      WHERE r.fishery_id = $1 AND r.role = ANY ($2) ORDER BY a.email`,
    [lake.fisheryId, CHART_APPROVERS],
  );
  const submitter = await tx.findOneByOrFail(Account, { id: submittedBy });
  const words = await wordsOf(tx, lake);
  for (const { id, name, email } of rows) {
    if (id === submittedBy || surveyors.has(id)) continue;
    const to = { name, email, ...words, submittedBy: submitter.name };
    await post(ctx, chartWaitingMessage(to, `${publicUrl}/office/charts/${chart.id}`));
  }
}

async function tellSurveyors(ctx: Ctx, { chart, lake }: ChartFound, version: string): Promise<void> {
  const { tx, publicUrl } = ctx;
  const ids = new Set([
    ...(await surveyorsOf(tx, chart.visitIds)),
    ...(chart.submittedBy ? [chart.submittedBy] : []),
  ]);
  const people = await tx.find(Account, { where: { id: In([...ids]) }, order: { email: 'ASC' } });
  const words = await wordsOf(tx, lake);
  for (const { name, email } of people)
    await post(
      ctx,
      chartPublishedMessage({ name, email, ...words, version }, `${publicUrl}/water/charts/${chart.id}`),
    );
}
