import type { Outline } from '../geometry/polygon';
import { insideOutline } from '../geometry/polygon';
import { nearestShore } from '../geometry/shore-distance';
import { columnXM, emptyGrid, rowYM } from './grid';
import type { Grid, GridFrame } from './grid';
import { solveGlobal } from './kriging-global';
import { predictByTable } from './kriging-table';
import type { KrigingSetup } from './kriging-setup';
import { surveyedPlaces } from './mask';
import type { NearWater } from './near-water';
import type { Targets } from './sample-points';
import type { ChartSamples } from './samples';
import { shoreDrift } from './shore-drift';
import { localSpread } from './local-spread';
import type { Misses } from './local-spread';
import type { Candidate } from './surface-candidates';
import { AT_ONCE_LIMIT, partsOf } from './surface-parts';
import type { DoParts } from './surface-parts';
import { rimNodes, shoreDistancesM } from './water-nodes';

export type SurfaceInput = {
  outline: Outline;
  frame: GridFrame;
  samples: ChartSamples;
  chosen: Candidate;
  misses: Misses;
  near: NearWater;
  maxGapM: number;
};

export type ChartSurface = {
  depth: Grid; // surveyed water only
  sigma: Grid;
  /** Depth with one rim of cells across the shore, mirrored so that depth 0 falls on the shore itself: for drawing. */
  withRim: Grid;
  water: Uint8Array; // 1 on water
  surveyed: Uint8Array; // 1 on surveyed water
};

/**
 * Depth and σ at every water node near enough to a sounding. Depths use all samples at once (blended patches above
 * 2000, and σ from the same); up to 2000 σ uses 16 by octant, which never understates the σ of all. σ holds the nugget: what
 * the bed does between casts is part of not knowing the depth at a place, while the drawn depth leaves it out; and it is widened or narrowed by how well the
 * soundings round about were foretold.
 */
export function chartSurface(
  input: SurfaceInput,
  report: (share: number) => void,
  doParts: DoParts,
): ChartSurface {
  const { outline, frame, samples, chosen, misses, maxGapM } = input;
  const { water, soundingDistanceM, ...places } = input.near;
  const shoreDistanceM = shoreDistancesM(outline, places);
  const targets = withDrift(chosen, places, shoreDistanceM);
  const variance = doParts(partsOf('variance', chosen.setup, targets), (share) => report(0.3 * share));
  const spread = localSpread(misses, places, maxGapM);
  const sigmaM = variance.map((v, t) => Math.sqrt((v + chosen.setup.variogram.nuggetM2) * spread[t]!));
  const spreadM = spreadOf(samples);
  const kept = surveyedPlaces({ soundingDistanceM, sigmaM, spreadM }, maxGapM);
  const surveyed = new Uint8Array(water.length);
  places.nodes.forEach((node, t) => (surveyed[node] = kept[t]!));
  const predict = predictorOf(chosen.setup, doParts);
  const wet = predict(pick(targets, kept), (share) => report(0.3 + 0.65 * share));
  const depth = emptyGrid(frame);
  const sigma = emptyGrid(frame);
  let next = 0;
  places.nodes.forEach((node, t) => {
    if (kept[t] !== 1) return;
    depth.values[node] = Math.max(0, wet[next++]!);
    sigma.values[node] = sigmaM[t]!;
  });
  const withRim = { ...depth, values: depth.values.slice() };
  fillRim(input, { withRim, water, surveyed, predict });
  report(1);
  return { depth, sigma, withRim, water, surveyed };
}

function withDrift({ driftLengthM }: Candidate, places: Targets, shoreDistanceM: Float64Array): Targets {
  const { xM, yM } = places;
  return driftLengthM === null ? { xM, yM } : { xM, yM, driftM: shoreDrift(shoreDistanceM, driftLengthM) };
}

type Predict = (targets: Targets, report: (share: number) => void) => Float64Array;

function predictorOf(setup: KrigingSetup, doParts: DoParts): Predict {
  if (setup.samples.xM.length <= AT_ONCE_LIMIT) {
    const model = solveGlobal(setup);
    return (targets, report) => {
      const depths = predictByTable(model, targets);
      report(1);
      return depths;
    };
  }
  return (targets, report) => doParts(partsOf('depth', setup, targets), report);
}

function pick(targets: Targets, kept: Uint8Array): Targets {
  const part = {
    xM: targets.xM.filter((_, t) => kept[t] === 1),
    yM: targets.yM.filter((_, t) => kept[t] === 1),
  };
  return targets.driftM ? { ...part, driftM: targets.driftM.filter((_, t) => kept[t] === 1) } : part;
}

/** Standard deviation of all samples' depths, the shore's noughts among them, metres. */
function spreadOf({ points }: ChartSamples): number {
  const depths = points.valueM;
  const mean = depths.reduce((sum, d) => sum + d, 0) / depths.length;
  return Math.sqrt(depths.reduce((sum, d) => sum + (d - mean) ** 2, 0) / depths.length);
}

type RimWork = { withRim: Grid; water: Uint8Array; surveyed: Uint8Array; predict: Predict };

/** Gives every rim node beside surveyed water minus the depth of its mirror image across the nearest shore. */
function fillRim(
  { outline, frame, chosen }: SurfaceInput,
  { withRim, water, surveyed, predict }: RimWork,
): void {
  const rim = rimNodes(surveyed, frame);
  const nodes = [...rim.keys()].filter((node) => rim[node] === 1 && water[node] === 0);
  const mirrored = nodes.map((node) => {
    const row = Math.floor(node / frame.columns);
    const place = { xM: columnXM(frame, node - row * frame.columns), yM: rowYM(frame, row) };
    const { point, distanceM } = nearestShore(outline, place);
    const image = { xM: 2 * point.xM - place.xM, yM: 2 * point.yM - place.yM };
    return { node, image, distanceM, wet: insideOutline(outline, image) };
  });
  const part = {
    xM: Float64Array.from(mirrored, (m) => m.image.xM),
    yM: Float64Array.from(mirrored, (m) => m.image.yM),
  };
  const distancesM = Float64Array.from(mirrored, (m) => m.distanceM);
  const depths = predict(withDrift(chosen, part, distancesM), () => undefined);
  mirrored.forEach(({ node, wet }, t) => (withRim.values[node] = wet ? -Math.max(0, depths[t]!) : 0));
}
