import { leaveOneOut, summarise } from './cross-validation';
import type { CrossValidation, LeaveOneOut } from './cross-validation';
import { DEFAULT_NEIGHBOURS } from './kriging';
import { krigeNeighbourhood } from './kriging-neighbourhood';
import { localSpread } from './local-spread';
import type { Misses } from './local-spread';
import type { KrigingSetup } from './kriging-setup';
import type { SamplePoints } from './sample-points';
import { fitShoreDrift, shoreDrift } from './shore-drift';
import { empiricalVariogram, VARIOGRAM_MODELS } from './variogram';
import type { LagBin, VariogramModel } from './variogram';
import { fitVariogram } from './variogram-fit';

const ESTIMATES = ['matheron', 'robust'] as const;

/** One way of making the surface, and how well it foretells soundings left out, from the nearest 24 samples. */
export type Candidate = {
  model: VariogramModel;
  estimate: (typeof ESTIMATES)[number];
  driftLengthM: number | null; // of the distance to the shore as drift; null: ordinary kriging
  setup: KrigingSetup;
  rmseM: number; // leave-one-out, over the soundings
  standardisedVariance: number;
  gapScore: number; // mean log density of the soundings when all others within half the gap are left out too
};

export type ChosenSurface = {
  best: Candidate;
  candidates: Candidate[];
  misses: Misses; // of the best, with each sounding's neighbourhood left out
  residuals: LeaveOneOut; // of the best, as the chart itself is kriged
  validation: CrossValidation;
  words: string;
};

export type ChoiceInput = {
  points: SamplePoints; // soundings first, shore points behind them
  soundingCount: number;
  shoreDistanceM: Float64Array; // of each sample
  gapM: number; // mean distance from a sounding to its nearest other
  maxGapM: number; // widest gap that is still drawn
};

const NEARLY_AS_GOOD = 1.04;
const MODEL_WORDS: Record<VariogramModel, string> = {
  spherical: 'spherical',
  exponential: 'exponential',
  gaussian: 'Gaussian',
  matern32: 'Matérn 3/2',
  matern52: 'Matérn 5/2',
};

/**
 * Fits every variogram model to both estimates of the variogram, with and without the distance to the shore as external
 * drift, and keeps the one that foretells left-out soundings best. Of those within 4 % of the least leave-one-out error
 * the one is taken that gives soundings most likelihood when everything within half the widest gap is left out too:
 * σ is needed between casts, where leaving out one of two close readings teaches nothing. Their sills are first scaled so
 * that such soundings are missed by what σ says, unless that would foretell worse. `report` hears the share done.
 */
export function chooseSurface(input: ChoiceInput, report: (share: number) => void): ChosenSurface {
  const candidates: Candidate[] = [];
  const trends = trendsOf(input);
  for (const trend of trends) {
    for (const model of VARIOGRAM_MODELS) {
      for (const estimate of ESTIMATES) candidates.push(tryModel(input, trend, { model, estimate }));
      report((0.6 * candidates.length) / (trends.length * VARIOGRAM_MODELS.length * ESTIMATES.length));
    }
  }
  const least = Math.min(...candidates.map((c) => c.rmseM));
  const near = candidates.filter((c) => c.rmseM <= least * NEARLY_AS_GOOD).map((c) => madeHonest(c, input));
  const best = near.reduce((a, b) => (b.gapScore > a.gapScore ? b : a));
  const misses = missesOf(best.setup, input);
  const residuals = spreadResiduals(leaveOneOut(best.setup), misses, input);
  report(1);
  const validation = summarise(residuals, input.soundingCount);
  return {
    best,
    candidates,
    misses,
    residuals,
    validation,
    words: reason(best, candidates, validation),
  };
}

type Trend = { driftLengthM: number | null; bins: LagBin[] };

function trendsOf(input: ChoiceInput): Trend[] {
  const { points, shoreDistanceM } = input;
  const plain: Trend = { driftLengthM: null, bins: binsOf(input, points) };
  const drift = fitShoreDrift(points, shoreDistanceM);
  if (drift === null) return [plain];
  return [plain, { driftLengthM: drift.lengthM, bins: binsOf(input, drift.residual) }];
}

/** Lags out to a dozen gaps between casts: kriging lives on the first few, so they get bins of their own. */
function binsOf({ gapM, soundingCount }: ChoiceInput, points: SamplePoints): LagBin[] {
  const fine = empiricalVariogram(points, { cutoffM: 12 * gapM, bins: 20, exactFrom: soundingCount });
  return fine.length >= 8 ? fine : empiricalVariogram(points, { exactFrom: soundingCount });
}

function tryModel(input: ChoiceInput, trend: Trend, kind: Pick<Candidate, 'model' | 'estimate'>): Candidate {
  const { points, shoreDistanceM } = input;
  const fit = fitVariogram(trend.bins, kind.model, { estimate: kind.estimate });
  // A flat bed leaves no variation to model; the least sill keeps the system solvable and σ at a millimetre.
  const partialSillM2 = Math.max(fit.partialSillM2, 1e-6);
  // A Gaussian without nugget is singular to rounding; one part in a thousand of the sill is the usual cure.
  const nuggetM2 = kind.model === 'gaussian' ? Math.max(fit.nuggetM2, 1e-3 * partialSillM2) : fit.nuggetM2;
  const { driftLengthM } = trend;
  const setup: KrigingSetup = {
    samples: points,
    variogram: { model: kind.model, nuggetM2, partialSillM2, rangeM: fit.rangeM },
    nuggetIs: 'noise',
    ...(driftLengthM === null ? {} : { driftM: shoreDrift(shoreDistanceM, driftLengthM) }),
  };
  const alone = foretell(setup, input, 0);
  const { rmseM, standardisedVariance } = summarise(alone);
  const gapScore = meanLogDensity(foretell(setup, input, input.maxGapM / 2));
  return { ...kind, driftLengthM, setup, rmseM, standardisedVariance, gapScore };
}

/**
 * The candidate with sill and nugget scaled together until soundings left out with their neighbourhood are missed by what σ
 * says: standardised variance 1, in three steps. Left as it was when that would foretell single soundings worse.
 */
function madeHonest(candidate: Candidate, input: ChoiceInput): Candidate {
  let { setup } = candidate;
  for (let step = 0; step < 3; step++) {
    const { standardisedVariance } = summarise(foretell(setup, input, input.maxGapM / 2));
    const { variogram } = setup;
    const scale = Math.min(10, Math.max(0.1, standardisedVariance));
    setup = {
      ...setup,
      variogram: {
        ...variogram,
        nuggetM2: variogram.nuggetM2 * scale,
        partialSillM2: variogram.partialSillM2 * scale,
      },
    };
  }
  const { rmseM, standardisedVariance } = summarise(foretell(setup, input, 0));
  if (rmseM > candidate.rmseM) return candidate; // σ alone is scaled then, place by place
  const gapScore = meanLogDensity(foretell(setup, input, input.maxGapM / 2));
  return { ...candidate, setup, rmseM, standardisedVariance, gapScore };
}

function missesOf(setup: KrigingSetup, input: ChoiceInput): Misses {
  const { residualM, varianceM2 } = foretell(setup, input, input.maxGapM / 2);
  return {
    xM: setup.samples.xM.slice(0, input.soundingCount),
    yM: setup.samples.yM.slice(0, input.soundingCount),
    squaredSigmas: residualM.map((r, i) => (r * r) / varianceM2[i]!),
  };
}

/** Leave-one-out of the soundings with the variance the chart itself states: kriging's part widened place by place. */
function spreadResiduals(
  { residualM, varianceM2 }: LeaveOneOut,
  misses: Misses,
  input: ChoiceInput,
): LeaveOneOut {
  const spread = localSpread(misses, misses, input.maxGapM);
  const { errorVarianceM2 } = input.points;
  return {
    residualM: residualM.slice(0, input.soundingCount),
    varianceM2: spread.map((s, i) => (varianceM2[i]! - errorVarianceM2[i]!) * s + errorVarianceM2[i]!),
  };
}

/** Each sounding from its nearest 24, itself and the soundings within `withinM` metres left out. */
function foretell(setup: KrigingSetup, { soundingCount }: ChoiceInput, withinM: number): LeaveOneOut {
  const { xM, yM, valueM, errorVarianceM2 } = setup.samples;
  const targets = { xM: xM.subarray(0, soundingCount), yM: yM.subarray(0, soundingCount) };
  const { driftM } = setup;
  const found = krigeNeighbourhood(
    setup,
    driftM === undefined ? targets : { ...targets, driftM: driftM.subarray(0, soundingCount) },
    { neighbours: DEFAULT_NEIGHBOURS, leaveOneOut: true, leaveNearOut: { withinM, count: soundingCount } },
  );
  return {
    residualM: found.valuesM.map((value, i) => valueM[i]! - value),
    varianceM2: found.varianceM2.map((v, i) => v + errorVarianceM2[i]! + setup.variogram.nuggetM2),
  };
}

function meanLogDensity({ residualM, varianceM2 }: LeaveOneOut): number {
  let sum = 0;
  for (let i = 0; i < residualM.length; i++) {
    const variance = Math.max(varianceM2[i]!, 1e-9);
    sum -= 0.5 * (Math.log(2 * Math.PI * variance) + (residualM[i]! * residualM[i]!) / variance);
  }
  return sum / residualM.length;
}

/** In words, for the report: "Matérn 3/2 variogram, fitted robustly, with the distance to the shore". */
export function nameOf({ model, estimate, driftLengthM }: Candidate): string {
  const fitted = estimate === 'robust' ? ', fitted robustly' : '';
  return `${MODEL_WORDS[model]} variogram${fitted}${driftLengthM === null ? '' : ', with the distance to the shore'}`;
}

function reason(best: Candidate, candidates: readonly Candidate[], validation: CrossValidation): string {
  const cm = (metres: number) => `${Math.round(metres * 100)} cm`;
  const worst = Math.max(...candidates.map((c) => c.rmseM));
  return (
    `${nameOf(best)}: left out one at a time, soundings are foretold within ${cm(validation.rmseM)} (root mean square); ` +
    `the ${candidates.length} ways tried ran up to ${cm(worst)}, and of those nearly as good this one is the most ` +
    'truthful about its own error between casts.'
  );
}
