import { buildChart, type BuiltChart, type ChartInput } from '@mereward/shared/charts/build-chart';
import { encodeClasses, encodeDepth, encodeSigma } from '@mereward/shared/charts/chart-encoding';
import type { GridFrame } from '@mereward/shared/charts/contract';
import type { SoundingView } from '@mereward/shared/surveys/contract';
import { reduceAll } from '../surveys/reduce-visit';
import type { BuildSource, SourceCast, SourceReport, SourceVisit } from './build-source';
import type { Built, BuiltSounding } from './built';
import { sourceChecks, type Reductions } from './source-checks';

/** A chart as its row keeps it. */
export type MadeChart = {
  frame: GridFrame;
  depth: Uint8Array;
  sigma: Uint8Array;
  substrate: Uint8Array;
  cover: Uint8Array;
  built: Built;
  surveyedFrom: string;
  surveyedTo: string;
};

/**
 * Reduces every cast and builds the chart. Runs in a thread; the same source gives the same bytes. Throws RangeError,
 * in words for the surveyor, when no chart can be made of it.
 */
export function makeChart(source: BuildSource, report: (step: string, share: number) => void): MadeChart {
  const leftOut: Built['leftOut'] = [];
  report('Reducing the casts', 0);
  const answers = new Map(source.visits.flatMap(({ site, casts }) => [...reduceAll(site, casts)]));
  const reduced = source.visits.flatMap((visit) => reducedCasts([visit, answers], leftOut));
  const { lake } = source;
  const outline = source.visits[0]?.site.outline;
  if (!outline) throw new RangeError('The visits of this chart are gone. Make a new draft.');
  const input: ChartInput = {
    outline,
    soundings: [
      ...reduced.map(({ view, built }) => ({ ...built, substrate: view.substrate, cover: view.cover })),
      ...source.reports.flatMap(measuredReport),
    ],
    contourStepM: source.contourStepM,
    maxGapM: lake.details.maxGapM,
  };
  const chart = buildChart(input, report);
  const days = reduced.map(({ built }) => built.observedOn).sort();
  return {
    frame: chart.frame,
    depth: encodeDepth(chart.depth),
    sigma: encodeSigma(chart.sigma),
    substrate: encodeClasses(chart.substrate),
    cover: encodeClasses(chart.cover),
    built: {
      origin: [lake.originLon, lake.originLat],
      outline: lake.details.outline,
      maxGapM: lake.details.maxGapM,
      visits: source.visits.map(builtVisit),
      soundings: reduced.map(({ built }) => built).sort((a, b) => (a.id < b.id ? -1 : 1)),
      leftOut: [...leftOut, ...chart.leftOut].sort((a, b) => (a.id < b.id ? -1 : 1)),
      isobaths: roundedLines(chart.isobaths),
      hypsography: chart.hypsography,
      figures: shownFigures(chart.figures),
      quality: chart.quality,
      reports: source.reports.map(builtReport),
      checks: sourceChecks(source, answers),
    },
    surveyedFrom: days[0] ?? '',
    surveyedTo: days.at(-1) ?? '',
  };
}

/** A report with a depth stands among the soundings, by its own grade. */
function measuredReport(report: SourceReport): ChartInput['soundings'] {
  const { depthM, sigmaM } = report;
  return depthM === null || sigmaM === null ? [] : [{ ...report, depthM, sigmaM }];
}

function builtReport(report: SourceReport): Built['reports'][number] {
  const { id, pegId, observedOn, xM, yM, ellipse, depthM, sigmaM, grade, bottom } = report;
  return { id, pegId, observedOn, xM, yM, ellipse, depthM, sigmaM, grade, bottom };
}

type ReducedCast = { view: SoundingView; built: BuiltSounding };

function reducedCasts(
  [visit, answers]: readonly [SourceVisit, Reductions],
  leftOut: Built['leftOut'],
): ReducedCast[] {
  return visit.casts.flatMap((cast) => {
    const answer = answers.get(cast.id);
    if (!answer?.ok) {
      leftOut.push({ id: cast.id, why: answer?.reason ?? 'It could not be reduced.' });
      return [];
    }
    const built = builtSounding(visit, cast, answer.sounding);
    if (built) return [{ view: answer.sounding, built }];
    leftOut.push({ id: cast.id, why: 'No depth was read: it tells of the bottom only.' });
    return [];
  });
}

function builtSounding({ site }: SourceVisit, cast: SourceCast, view: SoundingView): BuiltSounding | null {
  if (view.depthM === null || view.depthAsReadM === null || view.depthSigmaM === null) return null;
  const { aim, wrapsWhole, remainderM } = cast.observation;
  const shares = [...Object.values(view.substrate ?? {}), ...Object.values(view.cover ?? {})];
  return {
    id: cast.id,
    visitId: site.visit.id,
    pegId: cast.pegId,
    seq: cast.seq,
    observedOn: cast.observedOn,
    xM: view.xM,
    yM: view.yM,
    ellipse: view.ellipse,
    depthM: view.depthM,
    depthAsReadM: view.depthAsReadM,
    sigmaM: view.depthSigmaM,
    grade: view.grade,
    bottom: view.bottom,
    bottomShare: shares.length > 0 ? Math.max(...shares) : null,
    wrapsWhole,
    remainderM,
    lineOutM: view.lineOutM,
    bearingDeg: view.bearingDeg,
    markId: aim.by === 'mark' ? aim.markId : null,
    markOffsetDeg: aim.by === 'mark' ? aim.offsetDeg : 0,
  };
}

function builtVisit({ site: { visit }, surveyorName, day }: SourceVisit): Built['visits'][number] {
  const { id, title, surveyorId, kit, gaugeStartM, gaugeEndM } = visit;
  return { id, title, surveyorId, surveyorName, day, kit, gaugeStartM, gaugeEndM };
}

const toCentimetres = (lengthM: number): number => Math.round(lengthM * 100) / 100;

function roundedLines(isobaths: BuiltChart['isobaths']): Built['isobaths'] {
  return isobaths.map(({ levelM, lines }) => ({
    levelM,
    lines: lines.map((line) => Array.from(line, toCentimetres)),
  }));
}

function shownFigures(figures: BuiltChart['figures']): Built['figures'] {
  const { areaM2, volumeM3, meanDepthM, greatestDepthM, shorelineDevelopment, surveyedShare } = figures;
  return { areaM2, volumeM3, meanDepthM, greatestDepthM, shorelineDevelopment, surveyedShare };
}
