import { backSolve, dot, factorise, forwardSolve, paddedMatrix, paddedOrder } from './dense';
import { priorVarianceM2, requireDrift } from './kriging-setup';
import type { KrigingSetup, Prediction } from './kriging-setup';
import type { Targets } from './sample-points';
import { covariancesInPlace } from './variogram';

/** A factorised system over all samples. Vectors have the padded length `size`, zero beyond the samples. */
export type GlobalKriging = {
  setup: KrigingSetup;
  size: number;
  factor: Float64Array; // lower triangle L of the samples' covariance, row-major
  trend: Float64Array[]; // L⁻¹ F, one vector a column of F: ones, then the drift
  trendInverse: number[]; // (Fᵀ K⁻¹ F)⁻¹, row-major
  coefficients: number[]; // generalised least squares trend
  dual: Float64Array; // K⁻¹ (z − F β)
  jitterM2: number; // added to the diagonal to keep it positive definite; 0 unless samples all but coincide
};

/** Factorises ordinary kriging, or kriging with one external drift, over all samples: n³/3 operations. */
export function solveGlobal(setup: KrigingSetup): GlobalKriging {
  const count = setup.samples.xM.length;
  if (count < 2) throw new RangeError('Kriging needs at least two samples.');
  const size = paddedOrder(count);
  const { factor, jitterM2 } = factorWithJitter(setup, size);
  const ones = new Float64Array(size).fill(1, 0, count);
  const columns = setup.driftM === undefined ? [ones] : [ones, padded(setup.driftM, size)];
  const trend = columns.map((column) => {
    const solved = column.slice();
    forwardSolve(factor, size, solved);
    return solved;
  });
  const dual = padded(setup.samples.valueM, size);
  forwardSolve(factor, size, dual);
  const trendInverse = invertSmall(trend.flatMap((a) => trend.map((b) => dot(a, b))));
  const moments = trend.map((column) => dot(column, dual));
  const coefficients = trend.map((_, r) =>
    moments.reduce((sum, moment, c) => sum + trendInverse[r * trend.length + c]! * moment, 0),
  );
  trend.forEach((column, c) => {
    for (let i = 0; i < size; i++) dual[i] = dual[i]! - coefficients[c]! * column[i]!;
  });
  backSolve(factor, size, dual);
  return { setup, size, factor, trend, trendInverse, coefficients, dual, jitterM2 };
}

function padded(values: Float64Array, size: number): Float64Array {
  const out = new Float64Array(size);
  out.set(values);
  return out;
}

/** Samples that all but coincide make the matrix singular to rounding; the least jitter that cures it is found and told. */
function factorWithJitter(setup: KrigingSetup, size: number): { factor: Float64Array; jitterM2: number } {
  const scale = setup.variogram.partialSillM2 + setup.variogram.nuggetM2;
  for (const share of [0, 1e-10, 1e-8, 1e-6, 1e-4]) {
    const factor = covarianceMatrix(setup, share * scale);
    if (factorise(factor, size)) return { factor, jitterM2: share * scale };
  }
  throw new RangeError(
    'The samples do not make a solvable system: are several at one place with no error stated?',
  );
}

function covarianceMatrix({ samples, variogram }: KrigingSetup, jitterM2: number): Float64Array {
  const { xM, yM, errorVarianceM2 } = samples;
  const count = xM.length;
  const size = paddedOrder(count);
  const matrix = paddedMatrix(count);
  for (let i = 0; i < count; i++) {
    const row = matrix.subarray(i * size, i * size + i);
    for (let j = 0; j < i; j++) {
      const dx = xM[i]! - xM[j]!;
      const dy = yM[i]! - yM[j]!;
      row[j] = dx * dx + dy * dy;
    }
    covariancesInPlace(row, i, variogram);
    matrix[i * size + i] = variogram.partialSillM2 + variogram.nuggetM2 + errorVarianceM2[i]! + jitterM2;
  }
  return matrix;
}

/** Inverse of a symmetric positive definite matrix of order one or two, row-major. */
function invertSmall(m: readonly number[]): number[] {
  if (m.length === 1) return [1 / m[0]!];
  const determinant = m[0]! * m[3]! - m[1]! * m[2]!;
  if (!(determinant > 1e-14 * m[0]! * m[3]!))
    throw new RangeError('The drift is the same at every sample, so it says nothing.');
  return [m[3]! / determinant, -m[1]! / determinant, -m[2]! / determinant, m[0]! / determinant];
}

/** Covariances of one target with every sample into `out` (length size), with the nugget where they coincide. */
function targetCovariances(
  { setup }: GlobalKriging,
  targets: { x: number; y: number },
  out: Float64Array,
): void {
  const { xM, yM } = setup.samples;
  const count = xM.length;
  const { x, y } = targets;
  let coincident = -1;
  for (let i = 0; i < count; i++) {
    const dx = xM[i]! - x;
    const dy = yM[i]! - y;
    const h2 = dx * dx + dy * dy;
    out[i] = h2;
    if (h2 === 0) coincident = i;
  }
  covariancesInPlace(out, count, setup.variogram);
  if (coincident >= 0 && setup.nuggetIs === 'field')
    out[coincident] = out[coincident]! + setup.variogram.nuggetM2;
}

/** Predicted values alone, by the dual weights: one pass over the samples a target, no solve. */
export function predictValues(model: GlobalKriging, targets: Targets): Float64Array {
  requireDrift(model.setup, targets);
  const row = new Float64Array(model.size);
  const valuesM = new Float64Array(targets.xM.length);
  for (let t = 0; t < valuesM.length; t++) {
    targetCovariances(model, { x: targets.xM[t]!, y: targets.yM[t]! }, row);
    valuesM[t] = dot(row, model.dual) + trendAt(model, targets, t);
  }
  return valuesM;
}

function trendAt({ coefficients }: GlobalKriging, { driftM }: Targets, t: number): number {
  return coefficients[0]! + (driftM === undefined ? 0 : coefficients[1]! * driftM[t]!);
}

/** Predicted values and exact kriging variances from all samples: n² operations a target. */
export function predictGlobal(model: GlobalKriging, targets: Targets): Prediction {
  requireDrift(model.setup, targets);
  const { factor, size, trend } = model;
  const row = new Float64Array(size);
  const valuesM = new Float64Array(targets.xM.length);
  const varianceM2 = new Float64Array(valuesM.length);
  const prior = priorVarianceM2(model.setup);
  for (let t = 0; t < valuesM.length; t++) {
    targetCovariances(model, { x: targets.xM[t]!, y: targets.yM[t]! }, row);
    valuesM[t] = dot(row, model.dual) + trendAt(model, targets, t);
    forwardSolve(factor, size, row);
    const short = trend.map((column, c) => (c === 0 ? 1 : targets.driftM![t]!) - dot(column, row));
    varianceM2[t] = Math.max(0, prior - dot(row, row) + quadratic(model.trendInverse, short));
  }
  return { valuesM, varianceM2 };
}

function quadratic(matrix: readonly number[], v: readonly number[]): number {
  let sum = 0;
  for (let r = 0; r < v.length; r++)
    for (let c = 0; c < v.length; c++) sum += v[r]! * matrix[r * v.length + c]! * v[c]!;
  return sum;
}
