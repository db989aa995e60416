import { summarise } from './cross-validation';
import { foretell, meanLogDensity } from './foretelling';
import type { Asked } from './foretelling';
import type { KrigingSetup } from './kriging-setup';
import type { SamplePoints } from './sample-points';
import { fitShoreDrift, shoreDrift } from './shore-drift';
import { empiricalVariogram, VARIOGRAM_MODELS } from './variogram';
import type { LagBin, Variogram, VariogramModel } from './variogram';
import { fitVariogram } from './variogram-fit';

const ESTIMATES = ['matheron', 'robust'] as const;
type Estimate = (typeof ESTIMATES)[number];

/** One way of making the surface, and how well it foretells soundings left out, from 24 samples by octant. */
export type Candidate = {
  model: VariogramModel;
  estimate: Estimate;
  driftLengthM: number | null; // of the distance to the shore as drift; null: ordinary kriging
  setup: KrigingSetup;
  rmseM: number; // leave-one-out, over the soundings
  standardisedVariance: number;
  gapScore: number; // mean log density of the soundings when those round about are left out too
};

export type CandidateInput = {
  points: SamplePoints; // soundings first, shore points behind them
  soundingCount: number;
  shoreDistanceM: Float64Array; // of each sample
  gapM: number; // mean distance from a sounding to its nearest other
};

/**
 * Every variogram model, with and without the distance to the shore as external drift. Of the fits to the two estimates of
 * the variogram the one that foretells better is kept, and then its nugget and range are moved where that foretells left-out
 * soundings better still: lag bins say little of what the bed does within the gap between two casts.
 */
export function surfaceCandidates(
  input: CandidateInput,
  asked: Asked,
  report: (share: number) => void,
): Candidate[] {
  const candidates: Candidate[] = [];
  const trends = trendsOf(input);
  for (const trend of trends) {
    for (const model of VARIOGRAM_MODELS) {
      candidates.push(tryModel({ input, asked, trend }, model));
      report(candidates.length / (trends.length * VARIOGRAM_MODELS.length));
    }
  }
  return candidates;
}

type Trend = { driftLengthM: number | null; bins: LagBin[] };

function trendsOf(input: CandidateInput): Trend[] {
  const { points, shoreDistanceM } = input;
  const plain: Trend = { driftLengthM: null, bins: binsOf(input, points) };
  const drift = fitShoreDrift(points, shoreDistanceM);
  if (drift === null) return [plain];
  return [plain, { driftLengthM: drift.lengthM, bins: binsOf(input, drift.residual) }];
}

/** Lags out to a dozen gaps between casts: kriging lives on the first few, so they get bins of their own. */
function binsOf({ gapM, soundingCount }: CandidateInput, points: SamplePoints): LagBin[] {
  const fine = empiricalVariogram(points, { cutoffM: 12 * gapM, bins: 20, exactFrom: soundingCount });
  return fine.length >= 8 ? fine : empiricalVariogram(points, { exactFrom: soundingCount });
}

type Trial = { input: CandidateInput; asked: Asked; trend: Trend };
type Tried = { setup: KrigingSetup; rmseM: number };

function tryModel({ input, asked, trend }: Trial, model: VariogramModel): Candidate {
  const { driftLengthM, bins } = trend;
  const tryOne = (variogram: Variogram): Tried => {
    const setup: KrigingSetup = {
      samples: input.points,
      variogram: solvable(variogram),
      nuggetIs: 'noise',
      ...(driftLengthM === null ? {} : { driftM: shoreDrift(input.shoreDistanceM, driftLengthM) }),
    };
    return { setup, rmseM: summarise(foretell(setup, asked, 'alone')).rmseM };
  };
  const fits = ESTIMATES.map((estimate) => ({
    estimate,
    tried: tryOne(fitVariogram(bins, model, { estimate })),
  }));
  const { estimate, tried } = fits.reduce((a, b) => (b.tried.rmseM < a.tried.rmseM ? b : a));
  const { setup } = tuned(tried, tryOne);
  const { rmseM, standardisedVariance } = summarise(foretell(setup, asked, 'alone'));
  const gapScore = meanLogDensity(foretell(setup, asked, 'apart'));
  return { model, estimate, driftLengthM, setup, rmseM, standardisedVariance, gapScore };
}

/** A flat bed leaves no variation to model, and a Gaussian without nugget is singular to rounding. */
function solvable({ model, nuggetM2, partialSillM2, rangeM }: Variogram): Variogram {
  const sillM2 = Math.max(partialSillM2, 1e-6); // keeps the system solvable and σ at a millimetre
  return {
    model,
    nuggetM2: model === 'gaussian' ? Math.max(nuggetM2, GAUSSIAN_NUGGET * sillM2) : nuggetM2,
    partialSillM2: sillM2,
    rangeM,
  };
}

const GAUSSIAN_NUGGET = 1e-6; // of the sill
const BETTER = 0.99; // a move must foretell soundings better by a hundredth, or the fit to the variogram stands

function tuned(start: Tried, tryOne: (variogram: Variogram) => Tried): Tried {
  let best = start;
  const tryMove = (change: Partial<Variogram>): boolean => {
    const moved = tryOne({ ...best.setup.variogram, ...change });
    if (moved.rmseM > best.rmseM * BETTER) return false;
    best = moved;
    return true;
  };
  if (best.setup.variogram.nuggetM2 > 0) {
    tryMove({ nuggetM2: best.setup.variogram.nuggetM2 / 8 });
    tryMove({ nuggetM2: 0 });
  }
  for (const factor of [2, 0.5])
    for (let move = 0; move < 3; move++) {
      if (!tryMove({ rangeM: best.setup.variogram.rangeM * factor })) break;
    }
  return best;
}
