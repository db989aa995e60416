import { bedFeatures } from '@mereward/shared/charts/bed-features';
import type { BuiltChart } from '@mereward/shared/charts/build-chart';
import { castCandidates, type CastCandidate } from '@mereward/shared/charts/cast-candidates';
import { gridAt } from '@mereward/shared/charts/chart-reading';
import { columnXM, rowYM, type GridFrame } from '@mereward/shared/charts/grid';
import { solveGlobal } from '@mereward/shared/charts/kriging-global';
import { mergedSamples } from '@mereward/shared/charts/merged-samples';
import { nextCasts } from '@mereward/shared/charts/next-casts';
import type { Targets } from '@mereward/shared/charts/sample-points';
import { shoreDrift } from '@mereward/shared/charts/shore-drift';
import { standOutPatches } from '@mereward/shared/charts/stand-out-patches';
import { placesOf, shoreDistancesM, waterNodes } from '@mereward/shared/charts/water-nodes';
import type { Outline } from '@mereward/shared/geometry/polygon';
import { ownerAt } from '@mereward/shared/lakes/peg-waters';
import { UNREAD_DEPTH } from '@mereward/shared/surveys/error-budget';
import type { BuildSource } from './build-source';
import type { BuiltNextCasts, BuiltTellings } from './built-tellings';

/** Solved as they are up to so many samples; more are merged by cells, for the whole solve takes n³. */
const MOST_SAMPLES = 2000;
const MERGED_TO = 1500;
const CASTS_A_PEG = 5;
/** Places of the water the mean variance is held over. */
const WATER_PLACES = 300;

type Made = { source: BuildSource; outline: Outline; chart: BuiltChart };

/** What the finished chart tells: features, patches, and where each peg's next casts would teach most. */
export function makeTellings(made: Made, report: (step: string, share: number) => void): BuiltTellings {
  const { outline, chart } = made;
  report('Looking for bars, shelves, gullies and holes', 0);
  const features = bedFeatures(chart.depth, chart.sigma, shoreDistanceGrid(outline, chart.frame));
  const patches = standOutPatches([
    { layer: 'substrate', map: chart.substrate, weights: chart.weights.substrate },
    { layer: 'cover', map: chart.cover, weights: chart.weights.cover },
  ]);
  report('Choosing where to cast next', 0.2);
  const casts = castsNext(made);
  report('Done', 1);
  return { features, patches, nextCasts: casts };
}

function shoreDistanceGrid(outline: Outline, frame: GridFrame): Float64Array {
  const { nodes, xM, yM } = placesOf(waterNodes(outline, frame), frame);
  const distanceM = shoreDistancesM(outline, { xM, yM });
  const grid = new Float64Array(frame.columns * frame.rows).fill(Number.NaN);
  nodes.forEach((node, i) => (grid[node] = distanceM[i]!));
  return grid;
}

function castsNext({ source, outline, chart }: Made): BuiltNextCasts | null {
  const { setup, driftLengthM } = chart.chosen;
  const kit = newestKit(source);
  if (kit === null) return null;
  const isMerged = setup.samples.xM.length > MOST_SAMPLES;
  const drift = (places: { xM: Float64Array; yM: Float64Array }): Float64Array | null =>
    driftLengthM === null ? null : shoreDrift(shoreDistancesM(outline, places), driftLengthM);
  const water = withDrift(waterPlaces(outline, chart.frame), drift);
  const { waters } = source;
  const depthM = (xM: number, yM: number) => gridAt(chart.depth, { xM, yM }) ?? UNREAD_DEPTH.depthM;
  const candidates = waters.stances.map((stance, peg) =>
    castCandidates(stance, kit, { depthM, isOwn: (xM, yM) => ownerAt(waters.waters, { xM, yM }) === peg }),
  );
  const errorVarianceM2 = usualVarianceM2(chart);
  const pegs = candidates.map((own) => {
    const { driftM } = withDrift(columnsOf(own), drift);
    return own.map(({ xM, yM }, i) => ({
      xM,
      yM,
      errorVarianceM2,
      ...(driftM ? { driftM: driftM[i]! } : {}),
    }));
  });
  const model = solveGlobal(isMerged ? mergedSamples(setup, MERGED_TO) : setup);
  const { meanVarianceM2, varianceErrorM2, casts } = nextCasts(model, water, { pegs, most: CASTS_A_PEG });
  return {
    stickSpacingM: kit.stickSpacingM,
    wrapReference: kit.wrapReference,
    meanSigmaM: thousandth(Math.sqrt(meanVarianceM2)),
    places: water.xM.length,
    isMerged,
    meanErrorShare: thousandth(varianceErrorM2 / Math.max(meanVarianceM2, 1e-12)),
    pegs: waters.pegs.map(({ id }, peg) => ({
      pegId: id,
      casts: casts[peg]!.map(({ candidate, gainShare }) =>
        builtCast(candidates[peg]![candidate]!, gainShare),
      ),
    })),
  };
}

function builtCast({ xM, yM, bearingDeg, rangeM, wrapsWhole, lineOutM }: CastCandidate, gainShare: number) {
  const hundredth = (value: number) => Math.round(value * 100) / 100;
  return {
    xM: hundredth(xM),
    yM: hundredth(yM),
    bearingDeg: hundredth(bearingDeg) % 360,
    rangeM: hundredth(rangeM),
    wrapsWhole,
    lineOutM: hundredth(lineOutM),
    gainShare: Math.round(gainShare * 1e5) / 1e5,
  };
}

const thousandth = (value: number): number => Math.round(value * 1000) / 1000;

function newestKit({ visits }: BuildSource) {
  const newest = [...visits].sort((a, b) =>
    a.day < b.day ? 1 : a.day > b.day ? -1 : a.site.visit.id < b.site.visit.id ? -1 : 1,
  );
  return newest[0]?.site.visit.kit ?? null;
}

const columnsOf = (casts: readonly CastCandidate[]) => ({
  xM: Float64Array.from(casts, ({ xM }) => xM),
  yM: Float64Array.from(casts, ({ yM }) => yM),
});

type Columns = { xM: Float64Array; yM: Float64Array };

function withDrift(places: Columns, drift: (places: Columns) => Float64Array | null): Targets {
  const driftM = drift(places);
  return driftM === null ? places : { ...places, driftM };
}

/** About 300 places evenly over all the water, surveyed or not. */
function waterPlaces(outline: Outline, frame: GridFrame): Columns {
  const { nodes } = placesOf(waterNodes(outline, frame), frame);
  const step = Math.max(1, Math.round(Math.sqrt(nodes.length / WATER_PLACES)));
  const from = step >> 1;
  const kept = nodes.filter(
    (node) => (node % frame.columns) % step === from && Math.floor(node / frame.columns) % step === from,
  );
  const used = kept.length > 0 ? kept : nodes;
  return {
    xM: Float64Array.from(used, (node) => columnXM(frame, node % frame.columns)),
    yM: Float64Array.from(used, (node) => rowYM(frame, Math.floor(node / frame.columns))),
  };
}

/** What a cast here is usually good for: the middle of the soundings' own error variances. */
function usualVarianceM2({ chosen: { setup } }: BuiltChart): number {
  const read = setup.samples.errorVarianceM2.filter((variance) => variance > 0).sort();
  return read[read.length >> 1] ?? 0.01;
}
