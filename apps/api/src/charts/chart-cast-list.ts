import { Fishery } from '@mereward/db/entities/fisheries/fishery';
import { Peg } from '@mereward/db/entities/lakes/peg';
import { SurveyCast } from '@mereward/db/entities/surveys/survey-cast';
import { SurveyVisit } from '@mereward/db/entities/surveys/survey-visit';
import type { ChartCastList, ChartCastView, LeftOutView } from '@mereward/shared/charts/left-out-contract';
import { In, IsNull } from 'typeorm';
import type { Ctx } from '../ctx';
import { mayBuildCharts, STAFF } from '../lakes/policy';
import { chartContent } from './chart-layers';
import { chartForStaff } from './find-chart';
import { leftOutViews } from './left-out-views';

/** Every cast of a chart's visits and how it stands in this chart, for the staff: by visit and as they were made. */
export async function chartCastList(ctx: Ctx, chartId: string): Promise<ChartCastList> {
  const { tx, actor } = ctx;
  const { chart, lake } = await chartForStaff(ctx, chartId, STAFF);
  const visits = await tx.find(SurveyVisit, {
    where: { id: In(chart.visitIds) },
    order: { startedAt: 'ASC', id: 'ASC' },
  });
  const casts = await tx.find(SurveyCast, {
    where: { visitId: In(chart.visitIds), undoneAt: IsNull() },
    order: { seq: 'ASC' },
  });
  const pegs = await tx.find(Peg, { where: { lakeId: lake.id }, select: { id: true, number: true } });
  const leftOut = (await leftOutViews(tx, chartId)).filter(({ putBack }) => putBack === null);
  const outOf = new Map(
    leftOut.flatMap((view) => (view.what.kind === 'cast' ? [[view.what.castId, view] as const] : [])),
  );
  const built = (await chartContent(tx, chartId))?.built ?? null;
  const used = built && new Set([...built.soundings, ...built.points].map(({ id }) => id));
  const whyNot = new Map(built?.leftOut.map(({ id, why }) => [id, why]));
  const open = chart.status === 'draft' || chart.status === 'submitted';
  return {
    chartId,
    lakeName: lake.name,
    zone: (await tx.findOneByOrFail(Fishery, { id: lake.fisheryId })).zone,
    title: chart.title,
    casts: visits.flatMap((visit) =>
      casts
        .filter(({ visitId }) => visitId === visit.id)
        .map((cast) => ({
          id: cast.id,
          visitId: visit.id,
          visitTitle: visit.title,
          castNumber: cast.seq,
          pegNumber: pegs.find(({ id }) => id === cast.pegId)?.number ?? null,
          ...reducedTo(cast),
          ...standing({ leftOut: outOf.get(cast.id) ?? null, used: used?.has(cast.id) ?? null }),
          why: outOf.get(cast.id)?.reason ?? whyNot.get(cast.id) ?? '',
        })),
    ),
    may: { leaveOut: open && mayBuildCharts(actor, lake.fisheryId) },
  };
}

type Reduced = Pick<ChartCastView, 'lineOutM' | 'bearingDeg' | 'depthM' | 'grade'>;

function reducedTo({ reduced }: SurveyCast): Reduced {
  if (!reduced.ok) return { lineOutM: null, bearingDeg: null, depthM: null, grade: null };
  const { lineOutM, bearingDeg, depthM, grade } = reduced.sounding;
  return { lineOutM, bearingDeg, depthM, grade };
}

type Standing = { leftOut: LeftOutView | null; used: boolean | null };

function standing({ leftOut, used }: Standing): Pick<ChartCastView, 'leftOut' | 'stands'> {
  if (leftOut) return { leftOut, stands: 'left_out' };
  if (used === null) return { leftOut, stands: 'not_built' };
  return { leftOut, stands: used ? 'charted' : 'not_charted' };
}
