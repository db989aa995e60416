import { Account } from '@mereward/db/entities/accounts/account';
import { ChartLeftOut } from '@mereward/db/entities/charts/chart-left-out';
import { SoundingImport } from '@mereward/db/entities/surveys/sounding-import';
import { SurveyCast } from '@mereward/db/entities/surveys/survey-cast';
import type { LeaveOut, LeftOutWhat } from '@mereward/shared/charts/left-out-contract';
import { Problem } from '@mereward/shared/problems/problem';
import { In, IsNull, type EntityManager } from 'typeorm';
import { accountOf, type Ctx } from '../ctx';
import { notFound } from '../http/deny';
import { CHART_BUILDERS } from '../lakes/policy';
import { insertOnce, mustRepeat } from '../repeat';
import { chartToChange, type LightChart } from './find-chart';
import { keyOf, whatOf } from './source-left-out';

/**
 * Leaves a cast, or a part of a boat's log, out of one chart that is not published yet. What was observed stays as it is,
 * and every other chart too; this one has to be built again.
 */
export async function leaveOut(ctx: Ctx, chartId: string, { id, what, reason }: LeaveOut): Promise<void> {
  const { tx, actor, now } = ctx;
  const { chart } = await chartToChange(ctx, chartId, CHART_BUILDERS);
  const kept = await tx.findOneBy(ChartLeftOut, { id });
  if (kept) {
    if (kept.chartId !== chartId) throw notFound('chart');
    mustRepeat(
      { by: accountOf(actor), content: { what: keyOf(what), reason } },
      { by: kept.leftOutBy, content: { what: keyOf(whatOf(kept)), reason: kept.reason } },
    );
    return;
  }
  refusePublished(chart);
  await refuseStrange(tx, chart, what);
  await refuseTwice(tx, chartId, what);
  const made = await insertOnce(tx, ChartLeftOut, {
    id,
    chartId,
    castId: what.kind === 'cast' ? what.castId : null,
    logId: what.kind === 'cast' ? null : what.logId,
    part: what.kind === 'cast' ? null : what,
    reason,
    leftOutBy: accountOf(actor),
    leftOutAt: now,
    putBackBy: null,
    putBackAt: null,
  });
  if (!made) throw notFound('chart'); // the id was taken meanwhile, on another chart
}

/** Takes in again what was left out. That it was left out, by whom and why, stays on record. */
export async function putBack(ctx: Ctx, chartId: string, leftOutId: string): Promise<void> {
  const { tx, actor, now } = ctx;
  const { chart } = await chartToChange(ctx, chartId, CHART_BUILDERS);
  const row = await tx.findOneBy(ChartLeftOut, { id: leftOutId, chartId });
  if (!row) throw notFound('cast or sounding left out');
  const putBackBy = accountOf(actor);
  if (row.putBackBy === putBackBy) return;
  if (row.putBackBy !== null)
    throw new Problem('conflict', `This was put back already, by ${await nameOf(tx, row.putBackBy)}`, {
      detail: 'Nothing was changed by you. It counts again once the chart is built.',
    });
  refusePublished(chart);
  await tx.update(ChartLeftOut, { id: leftOutId }, { putBackBy, putBackAt: now });
}

function refusePublished({ status }: LightChart): void {
  if (status === 'draft' || status === 'submitted') return;
  throw new Problem('conflict', 'A published chart never changes', {
    detail: 'Make a new draft of the same visits, and leave it out of that.',
  });
}

/** Only what the chart's visits hold can be left out of it. */
async function refuseStrange(tx: EntityManager, { visitIds }: LightChart, what: LeftOutWhat): Promise<void> {
  const of = { visitId: In(visitIds), undoneAt: IsNull() };
  const found =
    what.kind === 'cast'
      ? await tx.existsBy(SurveyCast, { id: what.castId, ...of })
      : await tx.existsBy(SoundingImport, { id: what.logId, state: 'done', ...of });
  if (!found) throw notFound(what.kind === 'cast' ? 'cast in this chart' : 'log in this chart');
  if (what.kind === 'run' && what.toSeq < what.fromSeq) {
    const title = 'The last sounding lies before the first';
    throw new Problem('invalid', title, {
      detail: 'Nothing was left out. Put the two numbers the other way round.',
      errors: [{ pointer: '/what/toSeq', detail: title }],
    });
  }
}

async function refuseTwice(tx: EntityManager, chartId: string, what: LeftOutWhat): Promise<void> {
  const rows = await tx.findBy(ChartLeftOut, { chartId, putBackAt: IsNull() });
  const there = rows.find((row) => keyOf(whatOf(row)) === keyOf(what));
  if (!there) return;
  throw new Problem('conflict', `This is left out already, by ${await nameOf(tx, there.leftOutBy)}`, {
    detail: `Nothing was changed by you. The reason kept: ${there.reason}`,
  });
}

const nameOf = async (tx: EntityManager, id: string): Promise<string> =>
  (await tx.findOneBy(Account, { id }))?.name ?? 'somebody';
