import { Chart } from '@mereward/db/entities/charts/chart';
import { Lake } from '@mereward/db/entities/lakes/lake';
import type { Role } from '@mereward/shared/accounts/contract';
import type { EntityManager } from 'typeorm';
import type { Ctx } from '../ctx';
import { allowOnly, notFound } from '../http/deny';
import { isStaff } from '../lakes/policy';

/** A chart without its grids and lines: those are only read where they are sent. */
export const LIGHT = {
  id: true,
  lakeId: true,
  title: true,
  visitIds: true,
  contourStepM: true,
  status: true,
  version: true,
  datumM: true,
  surveyedFrom: true,
  surveyedTo: true,
  inputSha256: true,
  builtAt: true,
  draftedBy: true,
  draftedAt: true,
  submittedBy: true,
  submittedAt: true,
  approvedBy: true,
  publishedAt: true,
  supersededBy: true,
  withdrawnReason: true,
  withdrawnAt: true,
} as const;

export type LightChart = Pick<Chart, keyof typeof LIGHT>;
export type ChartFound = { chart: LightChart; lake: Lake };

async function find(tx: EntityManager, chartId: string, held: boolean): Promise<ChartFound> {
  const chart = await tx.findOne(Chart, {
    where: { id: chartId },
    select: LIGHT,
    ...(held ? { lock: { mode: 'pessimistic_write' } as const } : {}),
  });
  if (!chart) throw notFound('chart');
  return { chart, lake: await tx.findOneByOrFail(Lake, { id: chart.lakeId }) };
}

/** A chart this reader may know of: a draft only by the staff of its fishery. */
export async function chartToRead({ tx, actor }: Ctx, chartId: string): Promise<ChartFound> {
  const found = await find(tx, chartId, false);
  const open = found.chart.status !== 'draft' && found.chart.status !== 'submitted';
  if (!open && !isStaff(actor, found.lake.fisheryId)) throw notFound('chart');
  return found;
}

/** A chart to change, by one of these roles; held until the deed is done. */
export async function chartToChange(
  { tx, actor }: Ctx,
  chartId: string,
  roles: readonly Role[],
): Promise<ChartFound> {
  const found = await find(tx, chartId, true);
  allowOnly(actor, { fisheryId: found.lake.fisheryId, what: 'chart' }, roles);
  return found;
}

/** A chart for the staff's own pages. */
export async function chartForStaff(
  { tx, actor }: Ctx,
  chartId: string,
  roles: readonly Role[],
): Promise<ChartFound> {
  const found = await find(tx, chartId, false);
  allowOnly(actor, { fisheryId: found.lake.fisheryId, what: 'chart' }, roles);
  return found;
}
