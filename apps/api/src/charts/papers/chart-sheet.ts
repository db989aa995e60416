import { Account } from '@mereward/db/entities/accounts/account';
import { Chart } from '@mereward/db/entities/charts/chart';
import { Lake } from '@mereward/db/entities/lakes/lake';
import type { ChartView } from '@mereward/shared/charts/contract';
import { civilDay } from '@mereward/shared/time/civil-day';
import type { EntityManager } from 'typeorm';
import type { Ctx } from '../../ctx';
import { isStaff } from '../../lakes/policy';
import { chartContent } from '../chart-layers';
import type { ChartSheet, PaperSize } from './chart-sheet-pdf';
import type { SheetPeople } from './chart-sheet-words';
import { chartView } from '../chart-view';
import { drawPaper } from './draw-paper';
import { fileName } from '../file-name';

/** A lake's chart as a sheet to print, true to scale: what the reader's own screen of it holds, and no more. */
export async function chartSheet(
  ctx: Ctx,
  chartId: string,
  paper: PaperSize,
): Promise<{ filename: string; pdf: Buffer }> {
  const chart = await chartView(ctx, chartId);
  const sheet: ChartSheet = {
    chart,
    people: await peopleOf(ctx, chart),
    printedOn: civilDay(ctx.now, chart.zone),
    printedAt: ctx.now,
    paper,
  };
  const pdf = await drawPaper({ kind: 'sheet', sheet });
  return { filename: `${fileName(chart.lakeName, 'chart', chart.version ?? 'draft', paper)}.pdf`, pdf };
}

/** Whose work a chart is; that is the staff's own. */
async function peopleOf({ tx, actor }: Ctx, { id, lakeId }: ChartView): Promise<SheetPeople | null> {
  const { fisheryId } = await tx.findOneByOrFail(Lake, { id: lakeId });
  if (!isStaff(actor, fisheryId)) return null;
  const content = await chartContent(tx, id);
  const surveyors = (content?.built.visits ?? []).map(({ surveyorName }) => surveyorName);
  return { surveyors: [...new Set(surveyors)].sort(), approvedBy: await approverOf(tx, id) };
}

export async function approverOf(tx: EntityManager, chartId: string): Promise<string | null> {
  const chart = await tx.findOne(Chart, { where: { id: chartId }, select: { id: true, approvedBy: true } });
  if (!chart?.approvedBy) return null;
  return (await tx.findOneByOrFail(Account, { id: chart.approvedBy })).name;
}
