import { buildChart, type BuiltChart, type ChartInput } from '@mereward/shared/charts/build-chart';
import { encodeClasses, encodeDepth, encodeSigma } from '@mereward/shared/charts/chart-encoding';
import type { LeftOut } from '@mereward/shared/charts/sounding-roles';
import type { GridFrame } from '@mereward/shared/charts/contract';
import { doPartsHere, type DoParts } from '@mereward/shared/charts/surface-parts';
import { reduceAll } from '../surveys/reduce-visit';
import type { BuildSource, SourceReport, SourceVisit } from './build-source';
import type { Built } from './built';
import { chartEvidence } from './chart-evidence';
import { reducedLogs, mergedPlaces } from './chart-logs';
import { makeTellings } from './make-tellings';
import { withoutLeftOut } from './source-left-out';
import { sourceChecks } from './source-checks';
import { shoreSigmaM } from '@mereward/shared/lakes/outline-source';

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

/** Share of the work that is the chart itself; the rest is finding out what it tells. */
const BUILDING = 0.75;

/**
 * Reduces every cast and builds the chart. Runs in a thread; the same source gives the same bytes. Throws RangeError,
 * in words for the surveyor, when no chart can be made of it.
 */
export function makeChart(
  whole: BuildSource,
  report: (step: string, share: number) => void,
  doParts: DoParts = doPartsHere,
): MadeChart {
  const { source, leftOut } = withoutLeftOut(whole);
  report('Reducing the casts', 0);
  const answers = new Map(source.visits.flatMap(({ site, casts }) => [...reduceAll(site, casts)]));
  const evidence = chartEvidence(source, answers);
  if (source.visits.some(({ logs }) => logs.length > 0)) report('Merging the soundings of logs', 0);
  const logs = reducedLogs(source);
  const { lake } = source;
  const outline = source.visits[0]?.site.outline;
  if (!outline) throw new RangeError('The visits of this chart are gone. Make a new draft.');
  const input: ChartInput = {
    outline,
    shoreSigmaM: shoreSigmaM(lake.details.outlineFrom),
    soundings: [...evidence.soundings, ...logs.soundings],
    alsoFelt: evidence.alsoFelt,
    contourStepM: source.contourStepM,
    maxGapM: lake.details.maxGapM,
  };
  const chart = buildChart(input, (step, share) => report(step, BUILDING * share), doParts);
  const tellings = makeTellings({ source, outline, chart }, (step, share) =>
    report(step, BUILDING + (1 - BUILDING) * share),
  );
  const days = [
    ...[...evidence.built, ...evidence.points].map(({ observedOn }) => observedOn),
    ...logs.days,
  ].sort();
  return {
    frame: chart.frame,
    depth: encodeDepth(chart.depth),
    sigma: encodeSigma(chart.sigma),
    substrate: encodeClasses(chart.substrate),
    cover: encodeClasses(chart.cover),
    built: {
      origin: [lake.originLon, lake.originLat],
      outline: lake.details.outline,
      ...(lake.details.outlineFrom ? { outlineFrom: lake.details.outlineFrom } : {}),
      maxGapM: lake.details.maxGapM,
      visits: source.visits.map(builtVisit),
      soundings: evidence.built.sort(byId),
      points: evidence.points.sort(byId),
      logs: logs.built,
      merged: mergedPlaces(logs, missedIds(chart)),
      leftOut: [...leftOut, ...[...evidence.leftOut, ...chart.leftOut].map(byRule)].sort(byId),
      ended: evidence.ended,
      bottomTable: source.tableVersion,
      isobaths: roundedLines(chart.isobaths),
      hypsography: chart.hypsography,
      figures: shownFigures(chart.figures),
      quality: chart.quality,
      reports: evidence.reports.map(builtReport),
      checks: sourceChecks(source, answers),
      tellings,
    },
    surveyedFrom: days[0] ?? '',
    surveyedTo: days.at(-1) ?? '',
  };
}

const byRule = (out: LeftOut): Built['leftOut'][number] => ({ ...out, byHand: false });

const missedIds = ({ quality: { worst, flaggedBy } }: BuiltChart): string[] => [
  ...new Set([...worst, ...flaggedBy].map(({ id }) => id)),
];

function builtReport(report: SourceReport): Built['reports'][number] {
  const { id, pegId, observedOn, xM, yM, ellipse, depthM, sigmaM, grade, bottom } = report;
  return { id, pegId, observedOn, xM, yM, ellipse, depthM, sigmaM, grade, bottom };
}

function builtVisit({ site: { visit }, surveyorName, day }: SourceVisit): Built['visits'][number] {
  const { id, title, surveyorId, kit, gaugeStartM, gaugeEndM } = visit;
  return { id, title, surveyorId, surveyorName, day, kit, gaugeStartM, gaugeEndM };
}

const byId = (a: { id: string }, b: { id: string }): number => (a.id < b.id ? -1 : 1);

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
