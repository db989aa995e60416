import { Chart } from '@mereward/db/entities/charts/chart';
import { Fishery } from '@mereward/db/entities/fisheries/fishery';
import { Lake } from '@mereward/db/entities/lakes/lake';
import { SurveyVisit } from '@mereward/db/entities/surveys/survey-visit';
import { CONTOUR_STEPS_M, type DraftChart } from '@mereward/shared/charts/contract';
import { Problem } from '@mereward/shared/problems/problem';
import { civilDay } from '@mereward/shared/time/civil-day';
import { In } from 'typeorm';
import { accountOf, type Ctx } from '../ctx';
import { allowOnly, notFound } from '../http/deny';
import { CHART_BUILDERS } from '../lakes/policy';
import { insertOnce, mustRepeat } from '../repeat';
import { chartToChange } from './find-chart';
import { queueBuild } from './jobs';

/** Makes a draft of some visits and queues its building, in one deed. */
export async function draftChart(ctx: Ctx, lakeId: string, input: DraftChart): Promise<string> {
  const { tx, actor, now, jobs } = ctx;
  const draftedBy = accountOf(actor);
  const lake = await tx.findOneBy(Lake, { id: lakeId });
  if (!lake) throw notFound('lake');
  allowOnly(actor, { fisheryId: lake.fisheryId, what: 'lake' }, CHART_BUILDERS);
  const content = {
    lakeId,
    title: input.title,
    visitIds: [...new Set(input.visitIds)].sort(),
    contourStepM: input.contourStepM,
  };
  const days = await visitDays(ctx, lake, content);
  const made = await insertOnce(tx, Chart, {
    ...content,
    id: input.id,
    status: 'draft',
    version: null,
    datumM: lake.datumM,
    surveyedFrom: days[0] ?? null,
    surveyedTo: days.at(-1) ?? null,
    draftedBy,
    draftedAt: now,
  });
  if (made) await queueBuild(tx, jobs, input.id);
  else await mustBeKept(ctx, input.id, content);
  return input.id;
}

type Content = Pick<Chart, 'lakeId' | 'title' | 'visitIds' | 'contourStepM'>;

async function visitDays({ tx }: Ctx, lake: Lake, { visitIds, contourStepM }: Content): Promise<string[]> {
  const visits = await tx.findBy(SurveyVisit, { id: In(visitIds), lakeId: lake.id });
  const errors = visitIds
    .map((id, i) => ({ id, i }))
    .filter(({ id }) => !visits.some((visit) => visit.id === id))
    .map(({ i }) => ({ pointer: `/visitIds/${i}`, detail: 'This is not a survey visit of this lake.' }));
  if (!CONTOUR_STEPS_M.some((step) => Math.abs(step - contourStepM) < 1e-9))
    errors.push({
      pointer: '/contourStepM',
      detail: 'Choose one of the steps offered: 0.25, 0.5 or 1 m, 1, 2 or 5 ft.',
    });
  if (errors.length > 0) throw new Problem('invalid', 'This draft can’t be made', { errors });
  const { zone } = await tx.findOneByOrFail(Fishery, { id: lake.fisheryId });
  return visits.map((visit) => civilDay(visit.startedAt, zone)).sort();
}

async function mustBeKept({ tx, actor }: Ctx, id: string, content: Content): Promise<void> {
  const kept = await tx.findOneOrFail(Chart, {
    where: { id },
    select: { id: true, lakeId: true, title: true, visitIds: true, contourStepM: true, draftedBy: true },
  });
  if (kept.lakeId !== content.lakeId) throw notFound('chart');
  const { lakeId, title, visitIds, contourStepM } = kept;
  mustRepeat(
    { by: accountOf(actor), content },
    { by: kept.draftedBy, content: { lakeId, title, visitIds, contourStepM } },
  );
}

/** Builds a draft again from what its visits hold now. A submitted chart goes back to being a draft. */
export async function rebuildChart(ctx: Ctx, chartId: string): Promise<void> {
  const { tx, jobs } = ctx;
  const { chart } = await chartToChange(ctx, chartId, CHART_BUILDERS);
  if (chart.status !== 'draft' && chart.status !== 'submitted')
    throw new Problem('conflict', 'A published chart is never built again', {
      detail: 'Make a new draft instead.',
    });
  const [running] = await tx.query<{ state: string }[]>(
    `SELECT state FROM chart_build WHERE chart_id = $1 AND state IN ('queued', 'running') FOR UPDATE`,
    [chartId],
  );
  if (running)
    throw new Problem('conflict', 'This chart is being built already', {
      detail: 'Wait for it, or cancel it first.',
    });
  await tx.update(Chart, { id: chartId }, { status: 'draft', submittedBy: null, submittedAt: null });
  await queueBuild(tx, jobs, chartId);
}

/** Asks for a build to stop: at once while it waits, within moments while it runs. */
export async function cancelBuild(ctx: Ctx, chartId: string): Promise<void> {
  const { tx } = ctx;
  await chartToChange(ctx, chartId, CHART_BUILDERS);
  const [rows] = await tx.query<[unknown[], number]>(
    `UPDATE chart_build
        SET cancel_asked_at = clock_timestamp(),
            state = CASE WHEN state = 'queued' THEN 'cancelled' ELSE state END,
            step = CASE WHEN state = 'queued' THEN 'Cancelled' ELSE step END
      WHERE chart_id = $1 AND state IN ('queued', 'running') RETURNING chart_id`,
    [chartId],
  );
  if (rows.length === 0)
    throw new Problem('conflict', 'This chart is not being built', {
      detail: 'Look at it again: it is done or was stopped.',
    });
}

/** Throws a draft away. What it was made from stays. */
export async function discardChart(ctx: Ctx, chartId: string): Promise<void> {
  const { chart } = await chartToChange(ctx, chartId, CHART_BUILDERS);
  if (chart.status !== 'draft' && chart.status !== 'submitted')
    throw new Problem('conflict', 'A published chart is kept', {
      detail: 'It can be withdrawn, with a reason.',
    });
  await ctx.tx.delete(Chart, { id: chartId });
}
