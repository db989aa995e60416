import { dot, forwardSolve } from './dense';
import type { GlobalKriging } from './kriging-global';
import { priorVarianceM2, requireDrift } from './kriging-setup';
import type { Targets } from './sample-points';
import { correlation, covariancesInPlace } from './variogram';

/**
 * Places prepared for asking how what is not known of one hangs together with what is not known of another: L⁻¹ k, and what
 * the trend leaves, f − Fᵀ K⁻¹ k, a place a row.
 */
export type PreparedPlaces = {
  model: GlobalKriging;
  targets: Targets;
  solved: Float64Array; // rows × size
  short: Float64Array; // rows × trend columns
  varianceM2: Float64Array; // kriging variance of each, as `predictGlobal` gives it
};

/** n² operations a place. Throws RangeError where the setup's drift and the targets' don't match. */
export function preparePlaces(model: GlobalKriging, targets: Targets): PreparedPlaces {
  requireDrift(model.setup, targets);
  const { size, factor, trend, setup } = model;
  const { xM, yM } = setup.samples;
  const count = targets.xM.length;
  const solved = new Float64Array(count * size);
  const short = new Float64Array(count * trend.length);
  const prepared: PreparedPlaces = { model, targets, solved, short, varianceM2: new Float64Array(count) };
  for (let t = 0; t < count; t++) {
    const row = solved.subarray(t * size, (t + 1) * size);
    for (let i = 0; i < xM.length; i++)
      row[i] = (xM[i]! - targets.xM[t]!) ** 2 + (yM[i]! - targets.yM[t]!) ** 2;
    covariancesInPlace(row, xM.length, setup.variogram);
    forwardSolve(factor, size, row);
    trend.forEach((column, c) => {
      short[t * trend.length + c] = (c === 0 ? 1 : targets.driftM![t]!) - dot(column, row);
    });
    prepared.varianceM2[t] = Math.max(
      0,
      priorVarianceM2(setup) - dot(row, row) + trendPart([prepared, t], [prepared, t]),
    );
  }
  return prepared;
}

type Place = readonly [places: PreparedPlaces, row: number];

/** Covariance of what kriging leaves unknown at two places, m²; at one place its kriging variance. */
export function krigedCovariance(a: Place, b: Place): number {
  const [{ model, targets, solved }, i] = a;
  const [other, j] = b;
  const { size, setup } = model;
  const hM = Math.hypot(targets.xM[i]! - other.targets.xM[j]!, targets.yM[i]! - other.targets.yM[j]!);
  const { variogram } = setup;
  let sum = variogram.partialSillM2 * correlation(variogram.model, variogram.rangeM, hM);
  if (hM === 0 && setup.nuggetIs === 'field') sum += variogram.nuggetM2;
  const theirs = other.solved;
  for (let k = 0, p = i * size, q = j * size; k < size; k++, p++, q++) sum -= solved[p]! * theirs[q]!;
  return sum + trendPart(a, b);
}

function trendPart([a, i]: Place, [b, j]: Place): number {
  const columns = a.model.trend.length;
  let sum = 0;
  for (let r = 0; r < columns; r++)
    for (let c = 0; c < columns; c++)
      sum += a.short[i * columns + r]! * a.model.trendInverse[r * columns + c]! * b.short[j * columns + c]!;
  return sum;
}
