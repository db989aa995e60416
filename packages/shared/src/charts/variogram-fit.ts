import { correlation } from './variogram';
import type { LagBin, Variogram, VariogramModel } from './variogram';

export type FitOptions = {
  estimate?: 'matheron' | 'robust'; // default robust
  weights?: 'pairs_over_lag2' | 'pairs_over_model2'; // default the second (Cressie 1985); the first is gstat's own
};

export type VariogramFit = Variogram & { weightedResidual: number };

const SWEEPS = 4; // reweightings by the fitted model; the weights settle within three
const RANGE_TRIALS = 40;

/**
 * Weighted least squares fit of one model to lag bins. The pairs' mean measurement error is taken off each bin first, so
 * the nugget is what the bed itself does between casts. For a given range nugget and sill are a two-term non-negative
 * linear fit; the range is found on a fixed logarithmic ladder and refined by golden section, so the same bins always
 * give the same model. Source: Cressie, Mathematical Geology 17, 1985, 563–586.
 */
export function fitVariogram(
  bins: readonly LagBin[],
  model: VariogramModel,
  options: FitOptions = {},
): VariogramFit {
  if (bins.length < 3)
    throw new RangeError('A variogram needs pairs in at least three lag bins; there are too few casts.');
  const gamma = bins.map((bin) =>
    Math.max(0, (options.estimate === 'matheron' ? bin.matheronM2 : bin.robustM2) - bin.errorVarianceM2),
  );
  const longestM = bins[bins.length - 1]!.lagM;
  let weights = bins.map((bin) => bin.pairs / (bin.lagM * bin.lagM));
  let fit = bestRange({ bins, gamma, weights, model }, longestM);
  if (options.weights !== 'pairs_over_lag2') {
    for (let sweep = 0; sweep < SWEEPS; sweep++) {
      const floor = 1e-6 * (fit.nuggetM2 + fit.partialSillM2) + Number.MIN_VALUE;
      weights = bins.map((bin) => {
        const modelled = fit.nuggetM2 + fit.partialSillM2 * (1 - correlation(model, fit.rangeM, bin.lagM));
        return bin.pairs / Math.max(modelled, floor) ** 2;
      });
      fit = bestRange({ bins, gamma, weights, model }, longestM);
    }
  }
  return fit;
}

type Fitting = {
  bins: readonly LagBin[];
  gamma: readonly number[]; // the bins' semivariance with measurement error taken off
  weights: readonly number[];
  model: VariogramModel;
};
type Fitter = (rangeM: number) => VariogramFit;

function bestRange(fitting: Fitting, longestM: number): VariogramFit {
  const at: Fitter = (rangeM) => sillsAt(fitting, rangeM);
  // Ranges well inside the first lag cannot be told from one another.
  const lowest = Math.log(Math.max(longestM / 50, fitting.bins[0]!.lagM / 2));
  const step = (Math.log(longestM * 3) - lowest) / RANGE_TRIALS;
  let best = 0;
  let bestFit = at(Math.exp(lowest));
  for (let trial = 1; trial <= RANGE_TRIALS; trial++) {
    const fit = at(Math.exp(lowest + trial * step));
    if (fit.weightedResidual < bestFit.weightedResidual) {
      best = trial;
      bestFit = fit;
    }
  }
  return goldenSection(at, lowest + (best - 1) * step, lowest + Math.min(best + 1, RANGE_TRIALS) * step);
}

function goldenSection(at: Fitter, fromLog: number, toLog: number): VariogramFit {
  const ratio = (Math.sqrt(5) - 1) / 2;
  let low = fromLog;
  let high = toLog;
  for (let i = 0; i < 40; i++) {
    const a = high - ratio * (high - low);
    const b = low + ratio * (high - low);
    if (at(Math.exp(a)).weightedResidual <= at(Math.exp(b)).weightedResidual) high = b;
    else low = a;
  }
  return at(Math.exp((low + high) / 2));
}

/** Non-negative weighted fit of γ = nugget + sill · g, g = 1 − ρ, at a fixed range. */
function sillsAt({ bins, gamma, weights, model }: Fitting, rangeM: number): VariogramFit {
  let w = 0;
  let wg = 0;
  let wgg = 0;
  let wy = 0;
  let wgy = 0;
  const shape = bins.map((bin) => 1 - correlation(model, rangeM, bin.lagM));
  for (let i = 0; i < bins.length; i++) {
    const weight = weights[i]!;
    const g = shape[i]!;
    w += weight;
    wg += weight * g;
    wgg += weight * g * g;
    wy += weight * gamma[i]!;
    wgy += weight * g * gamma[i]!;
  }
  const determinant = w * wgg - wg * wg;
  let nuggetM2 = determinant > 1e-12 * w * wgg ? (wy * wgg - wgy * wg) / determinant : 0;
  let partialSillM2 = determinant > 1e-12 * w * wgg ? (w * wgy - wg * wy) / determinant : 0;
  if (nuggetM2 <= 0) {
    nuggetM2 = 0;
    partialSillM2 = wgg > 0 ? Math.max(0, wgy / wgg) : 0;
  } else if (partialSillM2 < 0) {
    nuggetM2 = wy / w;
    partialSillM2 = 0;
  }
  let weightedResidual = 0;
  for (let i = 0; i < bins.length; i++) {
    weightedResidual += weights[i]! * (gamma[i]! - nuggetM2 - partialSillM2 * shape[i]!) ** 2;
  }
  return { model, nuggetM2, partialSillM2, rangeM, weightedResidual };
}
