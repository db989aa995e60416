import { Fishery } from '@mereward/db/entities/fisheries/fishery';
import type { Lake } from '@mereward/db/entities/lakes/lake';
import { Mark } from '@mereward/db/entities/lakes/mark';
import { Peg } from '@mereward/db/entities/lakes/peg';
import { gradeNow, type AgeNow } from '@mereward/shared/charts/chart-age';
import type { BottomPoint } from '@mereward/shared/charts/bottom-quality-contract';
import { toBase64 } from '@mereward/shared/charts/chart-encoding';
import type { ChartChange } from '@mereward/shared/charts/chart-change-contract';
import type { ChartView, LayerNotes } from '@mereward/shared/charts/contract';
import { toPlane } from '@mereward/shared/geometry/plane';
import { placesInPlane } from '@mereward/shared/lakes/lake-places';
import { facingDeg } from '@mereward/shared/lakes/peg-rules';
import type { EntityManager } from 'typeorm';
import type { Ctx } from '../ctx';
import { originOfLake } from '../lakes/found';
import { levelNow } from '../lakes/levels';
import { lakeDetailsFor } from '../lakes/queries';
import { ageNow } from './chart-age-now';
import { logSoundings, surveyedBy } from './built-logs';
import { chartContent, type ChartContent } from './chart-layers';
import { chartToRead, type ChartFound, type LightChart } from './find-chart';
import { sightOnChart, type Sight } from './layers';

/** One chart as this reader may see it. Every other way out of a chart is made from this, so none shows more. */
export async function chartView(ctx: Ctx, chartId: string): Promise<ChartView> {
  const { tx } = ctx;
  const { chart, lake } = await chartToRead(ctx, chartId);
  const fishery = await tx.findOneByOrFail(Fishery, { id: lake.fisheryId });
  const sight = await sightOnChart(ctx, lake);
  const content = await chartContent(tx, chartId);
  const origin = content?.built.origin ?? [lake.originLon, lake.originLat];
  const days = surveyDays(chart);
  const aged = { lakeId: lake.id, ...days, datumM: chart.datumM, zone: fishery.zone, origin };
  const now = await ageNow(ctx, aged);
  const shown = content && (sight.staff || chart.status !== 'withdrawn') ? content : null;
  return {
    id: chart.id,
    lakeId: lake.id,
    lakeName: lake.name,
    fisheryName: fishery.name,
    zone: fishery.zone,
    version: chart.version,
    title: chart.title,
    status: chart.status,
    withdrawnReason: chart.withdrawnReason,
    supersededBy: await successor(tx, chart),
    ...days,
    publishedAt: chart.publishedAt?.toISOString() ?? null,
    age: now.age,
    changes: changesFor(now, sight),
    datumM: chart.datumM,
    levelNow: await levelNow(tx, lake.id, chart.datumM),
    contourStepM: chart.contourStepM,
    origin,
    outline: content?.built.outline ?? lake.details.outline,
    ...(await places(tx, lake)),
    places: placesInPlane(lakeDetailsFor(ctx.actor, lake).places ?? [], origin),
    ...(shown ? layersFor(shown, sight, now) : NOTHING),
    ...(content ? { surveyedBy: surveyedBy(content.built) } : {}),
    layerNotes: shown ? sight.notes : missingNotes({ chart, lake }, sight),
    may: { report: sight.staff && shown !== null },
  };
}

/** What happened and when is everybody's to know; where, as far as they may see the water at all. */
export const changesFor = ({ changes }: AgeNow, { sees }: Sight): ChartChange[] =>
  sees.depth || sees.bottom ? changes : changes.map((change) => ({ ...change, rings: change.rings && [] }));

type Layers = Pick<
  ChartView,
  | 'frame'
  | 'depth'
  | 'sigma'
  | 'isobaths'
  | 'substrate'
  | 'cover'
  | 'soundings'
  | 'bottomPoints'
  | 'hypsography'
  | 'figures'
>;

const NOTHING: Layers = {
  frame: null,
  depth: null,
  sigma: null,
  isobaths: null,
  substrate: null,
  cover: null,
  soundings: null,
  bottomPoints: null,
  hypsography: null,
  figures: null,
};

/** The layers this reader sees. */
export function layersFor(
  { built, frame, depth, sigma, substrate, cover }: ChartContent,
  { sees, staff }: Sight,
  now: AgeNow,
): Layers {
  return {
    frame: sees.depth || sees.bottom ? frame : null,
    depth: sees.depth ? toBase64(depth) : null,
    sigma: sees.depth ? toBase64(sigma) : null,
    isobaths: sees.depth ? built.isobaths : null,
    substrate: sees.bottom ? toBase64(substrate) : null,
    cover: sees.bottom ? toBase64(cover) : null,
    soundings: sees.soundings
      ? [...soundingsFor(built, { bottom: sees.bottom, staff, now }), ...logPointsFor(built, { staff, now })]
      : null,
    bottomPoints: sees.soundings && sees.bottom ? pointsFor(built, { staff, now }) : null,
    hypsography: sees.depth ? built.hypsography : null,
    figures: sees.depth ? built.figures : null,
  };
}

function soundingsFor(
  { soundings, reports }: ChartContent['built'],
  sees: { bottom: boolean; staff: boolean; now: AgeNow },
): NonNullable<ChartView['soundings']> {
  const measured = reports.flatMap(({ depthM, sigmaM, ...report }) =>
    depthM === null || sigmaM === null ? [] : [{ ...report, depthM, sigmaM }],
  );
  return [...soundings, ...measured]
    .filter((sounding) => sees.staff || sounding.grade !== 'D')
    .map(({ id, xM, yM, depthM, sigmaM, bottom, grade }) => ({
      id,
      xM,
      yM,
      depthM,
      sigmaM,
      bottom: sees.bottom ? bottom : 'unknown',
      grade: gradeNow(grade, { xM, yM }, sees.now),
    }));
}

function logPointsFor({ logs }: ChartContent['built'], { staff, now }: { staff: boolean; now: AgeNow }) {
  return logSoundings(logs, staff).map((each) => ({ ...each, grade: gradeNow(each.grade, each, now) }));
}

/** Casts and reports that tell of the bottom without a depth. */
function pointsFor(
  { points, reports }: ChartContent['built'],
  { staff, now }: { staff: boolean; now: AgeNow },
): BottomPoint[] {
  const felt = reports.filter(({ depthM }) => depthM === null);
  return [...points, ...felt]
    .filter(({ grade }) => staff || grade !== 'D')
    .map(({ id, xM, yM, bottom, grade }) => ({
      id,
      xM,
      yM,
      bottom,
      grade: gradeNow(grade, { xM, yM }, now),
    }));
}

function missingNotes({ chart }: ChartFound, { notes }: Sight): LayerNotes {
  const words = chart.status === 'withdrawn' ? 'This chart was withdrawn.' : 'This chart is not built yet.';
  return {
    depth: notes.depth ?? words,
    bottom: notes.bottom ?? words,
    spots: notes.spots ?? words,
    soundings: notes.soundings ?? words,
  };
}

/** The days of a chart's first and last cast; the day it was drafted stands in until it is built. */
export function surveyDays({ surveyedFrom, surveyedTo, draftedAt }: LightChart): {
  surveyedFrom: string;
  surveyedTo: string;
} {
  const drafted = draftedAt.toISOString().slice(0, 10);
  return { surveyedFrom: surveyedFrom ?? drafted, surveyedTo: surveyedTo ?? drafted };
}

async function successor(
  tx: EntityManager,
  { supersededBy }: LightChart,
): Promise<ChartView['supersededBy']> {
  if (supersededBy === null) return null;
  const [next] = await tx.query<{ id: string; version: string }[]>(
    'SELECT id, version FROM chart WHERE id = $1',
    [supersededBy],
  );
  return next ?? null;
}

async function places(tx: EntityManager, lake: Lake): Promise<Pick<ChartView, 'pegs' | 'marks'>> {
  const origin = originOfLake(lake);
  const pegs = await tx.find(Peg, {
    where: { lakeId: lake.id },
    order: { walkingOrder: 'ASC', number: 'ASC' },
  });
  const marks = await tx.find(Mark, { where: { lakeId: lake.id }, order: { code: 'ASC' } });
  return {
    pegs: pegs.map(({ id, number, details }) => ({
      id,
      number,
      name: details.name,
      ...toPlane(origin, details.origin),
      facingDeg: facingDeg(details),
      status: details.status,
    })),
    marks: marks.map(({ id, code, details }) => ({
      id,
      code,
      name: details.name,
      ...toPlane(origin, details.position),
    })),
  };
}
