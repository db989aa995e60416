import type { Outline } from '../geometry/polygon';
import { outlineAreaM2, perimeterM } from '../geometry/polygon';
import type { CoverShares, SubstrateShares } from '../surveys/contract';
import { bottomLayers } from './bottom-layers';
import type { FeltBottom } from './bottom-layers';
import type { ClassGrid, ClassWeights } from './bottom-map';
import type { FeltPlace } from './cast-kernel';
import type { QualityView } from './contract';
import type { GridFrame, Grid } from './grid';
import { chooseCellM, frameOver } from './grid';
import { gridTriangles, hypsography, shorelineDevelopment } from './hypsography';
import type { HypsographicStep } from './hypsography';
import { deeperRegions, isobathLevels, isobaths } from './isobaths';
import type { Isobath } from './isobaths';
import { nearWater } from './near-water';
import { chartSamples, flagOutliers } from './samples';
import type { ChartSamples } from './samples';
import { requirePlaces, sortSoundings } from './sounding-roles';
import type { ChartSounding, LeftOut } from './sounding-roles';
import { chooseSurface, nameOf } from './surface-choice';
import type { Candidate } from './surface-candidates';
import type { ChosenSurface } from './surface-choice';
import { chartSurface } from './chart-surface';
import type { ChartSurface } from './chart-surface';
import { doPartsHere } from './surface-parts';
import type { DoParts } from './surface-parts';
import { placesOf, shoreDistancesM } from './water-nodes';

export type ChartInput = {
  outline: Outline;
  shoreSigmaM?: number; // of the outline's line, across it; default 0: it is believed
  soundings: (ChartSounding &
    Pick<FeltPlace, 'spread' | 'track'> & { substrate: SubstrateShares | null; cover: CoverShares | null })[];
  alsoFelt?: readonly FeltBottom[]; // casts that read no depth, and confirmed bottoms: for the bottom maps alone
  contourStepM: number;
  maxGapM: number; // widest gap between casts that is still drawn, 15 m at most
  cellM?: number; // default: the smallest of 0.5–5 m that fits 400 × 400
};

export type ChartFigures = {
  areaM2: number; // of the outline's water
  surveyedAreaM2: number;
  volumeM3: number; // of the surveyed water, at datum
  meanDepthM: number; // of the surveyed water
  greatestDepthM: number;
  shorelineDevelopment: number;
  surveyedShare: number;
};

export type BuiltChart = {
  frame: GridFrame;
  depth: Grid; // metres below datum
  sigma: Grid; // metres, one σ of the depth at a place
  isobaths: Isobath[];
  tints: Isobath[]; // closed rings to paint in order; see deeperRegions
  substrate: ClassGrid; // classes in the order of Substrate.options
  cover: ClassGrid; // classes in the order of Cover.options
  weights: { substrate: ClassWeights | null; cover: ClassWeights | null }; // what the bottom maps were chosen from
  chosen: Candidate; // how the depths were kriged
  hypsography: HypsographicStep[];
  figures: ChartFigures;
  quality: QualityView;
  points: ChartSounding[]; // every sounding that may be shown: grades A, B and C, by id
  leftOut: LeftOut[]; // and why
};

/**
 * The whole chart from reduced soundings at datum: samples, variogram by leave-one-out, kriging, mask, isobaths, bottom,
 * volumes, quality. Contours come from grades A and B alone; C is shown as points, D not at all. The same soundings give
 * the same bytes whatever their order. `report` hears each step in words with the share of the work done, rising to 1.
 * `doParts` shares the kriging out; whoever does it, the bytes are the same.
 * Throws RangeError with words for the surveyor when no chart can be made.
 */
export function buildChart(
  input: ChartInput,
  report: (step: string, share: number) => void,
  doParts: DoParts = doPartsHere,
): BuiltChart {
  report('Laying out the samples', 0);
  const roles = sortSoundings(input.soundings, input.outline);
  const corners = [...input.outline.shore];
  const frame = frameOver(corners, input.cellM ?? chooseCellM(corners));
  const samples = chartSamples(roles.surface, input.outline, input.shoreSigmaM);
  const soundingCount = samples.soundingIds.length;
  requirePlaces(soundingCount);
  const shoreDistanceM = shoreDistancesM(input.outline, samples.points);
  const near = nearWater({ outline: input.outline, frame, samples, maxGapM: input.maxGapM });
  report('Choosing the variogram', 0.05);
  const chosen = chooseSurface(
    { ...samples, soundingCount, shoreDistanceM, maxGapM: input.maxGapM, awayM: near.soundingDistanceM },
    (share) => report('Choosing the variogram', (5 + 40 * share) / 100),
  );
  report('Kriging the depths', 0.45);
  const surface = chartSurface(
    {
      outline: input.outline,
      frame,
      samples,
      chosen: chosen.best,
      misses: chosen.misses,
      near,
      maxGapM: input.maxGapM,
    },
    (share) => report('Kriging the depths', (45 + 40 * share) / 100),
    doParts,
  );
  report('Drawing the isobaths', 0.85);
  const levels = isobathLevels(surface.depth, input.contourStepM);
  const lines = isobaths(surface.withRim, levels);
  const tints = deeperRegions(surface.withRim, levels);
  report('Mapping the bottom', 0.9);
  const { bottom, ...bottoms } = mapBottoms(input, surface, frame);
  report('Measuring the water', 0.97);
  const measured = measureWater(input, surface);
  const quality = {
    ...qualityOf(samples, chosen, measured.figures.surveyedShare),
    bottom,
  };
  report('Done', 1);
  return {
    frame,
    depth: surface.depth,
    sigma: surface.sigma,
    isobaths: lines,
    tints,
    ...bottoms,
    chosen: chosen.best,
    ...measured,
    quality,
    points: roles.shown,
    leftOut: roles.leftOut,
  };
}

function mapBottoms({ soundings, alsoFelt = [] }: ChartInput, surface: ChartSurface, frame: GridFrame) {
  const nodes = { frame, nodes: placesOf(surface.surveyed, frame).nodes };
  return bottomLayers([...soundings, ...alsoFelt], nodes);
}

function measureWater(
  { outline, contourStepM }: ChartInput,
  { depth, withRim, surveyed, water }: ChartSurface,
) {
  let greatestDepthM = 0;
  for (const value of depth.values) if (value > greatestDepthM) greatestDepthM = value;
  const steps = [0, ...isobathLevels(depth, contourStepM)];
  const curve = hypsography(gridTriangles(withRim), steps);
  const areaM2 = outlineAreaM2(outline);
  const { areaM2: surveyedAreaM2, volumeM3 } = curve[0]!;
  const count = (marks: Uint8Array) => marks.reduce((sum, mark) => sum + mark, 0);
  const figures: ChartFigures = {
    areaM2,
    surveyedAreaM2: Math.min(surveyedAreaM2, areaM2),
    volumeM3,
    meanDepthM: surveyedAreaM2 > 0 ? volumeM3 / surveyedAreaM2 : 0,
    greatestDepthM,
    shorelineDevelopment: shorelineDevelopment(perimeterM(outline), areaM2),
    surveyedShare: count(surveyed) / Math.max(1, count(water)),
  };
  return { hypsography: curve, figures };
}

function qualityOf(
  samples: ChartSamples,
  { best, candidates, words, residuals, validation }: ChosenSurface,
  surveyedShare: number,
): QualityView {
  const { setup } = best;
  const idOf = (row: number) => samples.soundingIds[row]![0]!;
  const flagged = flagOutliers(residuals, validation.count);
  const missOf = (row: number) => ({
    errorM: -residuals.residualM[row]!,
    standardised: Math.abs(residuals.residualM[row]!) / Math.sqrt(residuals.varianceM2[row]!),
  });
  return {
    soundings: validation.count,
    meanErrorM: validation.meanErrorM,
    rmseM: validation.rmseM,
    standardisedVariance: validation.standardisedVariance,
    coverage95: validation.coverage95,
    surveyedShare,
    worst: validation.worst.map(({ sample, residualM, sigmas }) => ({
      id: idOf(sample),
      errorM: -residualM,
      standardised: sigmas,
    })),
    flagged: flagged.flatMap((row) => samples.soundingIds[row]!),
    flaggedBy: flagged.flatMap((row) => samples.soundingIds[row]!.map((id) => ({ id, ...missOf(row) }))),
    variogram: {
      model: setup.variogram.model,
      nugget: setup.variogram.nuggetM2,
      sill: setup.variogram.partialSillM2,
      rangeM: setup.variogram.rangeM,
    },
    models: candidates.map((c) => ({
      model: nameOf(c),
      rmseM: c.rmseM,
      standardisedVariance: c.standardisedVariance,
    })),
    words,
  };
}
