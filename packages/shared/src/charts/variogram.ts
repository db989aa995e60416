import { decay } from './decay';
import { forEachBucketWithin, indexSamples } from './sample-index';
import type { SamplePoints } from './sample-points';

export const VARIOGRAM_MODELS = ['spherical', 'exponential', 'gaussian', 'matern32', 'matern52'] as const;
export type VariogramModel = (typeof VARIOGRAM_MODELS)[number];

/**
 * γ(h) = nugget + sill · (1 − ρ(h / range)) for h > 0, γ(0) = 0. Sills in the square of the sampled unit; `rangeM` is the
 * model's parameter: the spherical reaches its sill there, the exponential's practical range is three times it.
 * ρ: spherical 1 − 1.5 u + 0.5 u³; exponential e^−u; Gaussian e^−u²; Matérn 3/2 (1 + √3 u) e^−√3 u;
 * Matérn 5/2 (1 + √5 u + 5/3 u²) e^−√5 u. Source: Chilès & Delfiner, Geostatistics, 2012, section 2.5; the first three as
 * in gstat's vgm(), the Matérns with its range times √3 and √5.
 */
export type Variogram = { model: VariogramModel; nuggetM2: number; partialSillM2: number; rangeM: number };

/** A lag bin: mean distance and pair count, both estimates of γ, and the pairs' mean measurement error variance. */
export type LagBin = {
  lagM: number;
  pairs: number;
  matheronM2: number;
  robustM2: number;
  errorVarianceM2: number;
};

export type EmpiricalOptions = {
  cutoffM?: number; // default: a third of the diagonal of the samples' box
  bins?: number; // default 15, of equal width
  exactFrom?: number; // samples from this index on are shore points; pairs of two of them say nothing and are left out
};

/**
 * Empirical semivariogram by lag bins of equal width: Matheron's mean of squares and Cressie & Hawkins' robust estimate.
 * Empty bins are left out. Source: Cressie, Statistics for Spatial Data, 1993, eq. 2.4.2 and 2.4.12.
 */
export function empiricalVariogram(samples: SamplePoints, options: EmpiricalOptions = {}): LagBin[] {
  const cutoffM = options.cutoffM ?? diagonalM(samples) / 3;
  const bins = options.bins ?? 15;
  const exactFrom = options.exactFrom ?? samples.xM.length;
  const sums = new Float64Array(bins * 5); // pairs, Σh, ΣΔ², Σ√|Δ|, Σ error variance
  const { xM, yM, valueM, errorVarianceM2 } = samples;
  const perM = bins / cutoffM;
  const cutoff2 = cutoffM * cutoffM;
  const index = indexSamples(xM, yM);
  for (let i = 0; i < xM.length; i++) {
    // Each pair once: i with the soundings before it.
    const end = i < exactFrom ? i : Math.min(i, exactFrom);
    forEachBucketWithin(index, { xM: xM[i]!, yM: yM[i]!, reachM: cutoffM }, (from, to) => {
      for (let m = from; m < to; m++) {
        const j = index.members[m]!;
        if (j >= end) continue;
        const dx = xM[i]! - xM[j]!;
        const dy = yM[i]! - yM[j]!;
        const h2 = dx * dx + dy * dy;
        if (h2 >= cutoff2 || h2 === 0) continue;
        const h = Math.sqrt(h2);
        const difference = Math.abs(valueM[i]! - valueM[j]!);
        const p = Math.min(bins - 1, Math.floor(h * perM)) * 5;
        sums[p] = sums[p]! + 1;
        sums[p + 1] = sums[p + 1]! + h;
        sums[p + 2] = sums[p + 2]! + difference * difference;
        sums[p + 3] = sums[p + 3]! + Math.sqrt(difference);
        sums[p + 4] = sums[p + 4]! + (errorVarianceM2[i]! + errorVarianceM2[j]!) / 2;
      }
    });
  }
  return binsFrom(sums);
}

function binsFrom(sums: Float64Array): LagBin[] {
  const bins: LagBin[] = [];
  for (let p = 0; p < sums.length; p += 5) {
    const pairs = sums[p]!;
    if (pairs === 0) continue;
    const meanRoot = sums[p + 3]! / pairs;
    bins.push({
      lagM: sums[p + 1]! / pairs,
      pairs,
      matheronM2: sums[p + 2]! / (2 * pairs),
      robustM2: meanRoot ** 4 / (2 * (0.457 + 0.494 / pairs + 0.045 / (pairs * pairs))),
      errorVarianceM2: sums[p + 4]! / pairs,
    });
  }
  return bins;
}

function diagonalM({ xM, yM }: SamplePoints): number {
  let west = Infinity;
  let east = -Infinity;
  let south = Infinity;
  let north = -Infinity;
  for (let i = 0; i < xM.length; i++) {
    west = Math.min(west, xM[i]!);
    east = Math.max(east, xM[i]!);
    south = Math.min(south, yM[i]!);
    north = Math.max(north, yM[i]!);
  }
  return Math.hypot(east - west, north - south);
}

/** Correlation ρ at distance h (≥ 0, metres) with no nugget. */
export function correlation(model: VariogramModel, rangeM: number, hM: number): number {
  const u = hM / rangeM;
  switch (model) {
    case 'spherical':
      return u >= 1 ? 0 : 1 - 1.5 * u + 0.5 * u * u * u;
    case 'exponential':
      return Math.exp(-u);
    case 'gaussian':
      return Math.exp(-u * u);
    case 'matern32':
      return (1 + Math.sqrt(3) * u) * Math.exp(-Math.sqrt(3) * u);
    case 'matern52':
      return (1 + Math.sqrt(5) * u + (5 / 3) * u * u) * Math.exp(-Math.sqrt(5) * u);
  }
}

/** Semivariance at distance h, metres. */
export function semivariance(variogram: Variogram, hM: number): number {
  if (hM === 0) return 0;
  const { model, nuggetM2, partialSillM2, rangeM } = variogram;
  return nuggetM2 + partialSillM2 * (1 - correlation(model, rangeM, hM));
}

/** Turns squared distances (m²) held in places `from` up to `to` of a buffer into covariances without nugget, in place. */
export type FillCovariances = (buffer: Float64Array, from: number, to: number) => void;

/** One loop a model, so that the choice is made once and not at every pair. */
export function covarianceFill({ model, partialSillM2: sill, rangeM }: Variogram): FillCovariances {
  const perRange = 1 / rangeM;
  switch (model) {
    case 'spherical':
      return (buffer, from, to) => {
        for (let i = from; i < to; i++) {
          const u = Math.sqrt(buffer[i]!) * perRange;
          buffer[i] = u >= 1 ? 0 : sill * (1 - u * (1.5 - 0.5 * u * u));
        }
      };
    case 'exponential':
      return (buffer, from, to) => {
        for (let i = from; i < to; i++) buffer[i] = sill * decay(Math.sqrt(buffer[i]!) * perRange);
      };
    case 'gaussian':
      return (buffer, from, to) => {
        for (let i = from; i < to; i++) buffer[i] = sill * decay(buffer[i]! * perRange * perRange);
      };
    case 'matern32':
      return (buffer, from, to) => {
        for (let i = from; i < to; i++) {
          const u = Math.sqrt(3 * buffer[i]!) * perRange;
          buffer[i] = sill * (1 + u) * decay(u);
        }
      };
    case 'matern52':
      return (buffer, from, to) => {
        for (let i = from; i < to; i++) {
          const u = Math.sqrt(5 * buffer[i]!) * perRange;
          buffer[i] = sill * (1 + u * (1 + u / 3)) * decay(u);
        }
      };
  }
}

/** The same of the first `count` places, asked for once. */
export function covariancesInPlace(buffer: Float64Array, count: number, variogram: Variogram): void {
  covarianceFill(variogram)(buffer, 0, count);
}
