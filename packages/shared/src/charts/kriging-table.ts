import type { GlobalKriging } from './kriging-global';
import { requireDrift } from './kriging-setup';
import type { Targets } from './sample-points';
import { covariancesInPlace } from './variogram';

const ENTRIES = 16_384;

/**
 * Predicted values by the dual weights like `predictValues`, with the covariance read from a table by distance and joined
 * by straight lines instead of worked out at every pair: several times faster over a grid, for values within a tenth of a
 * millimetre where a chart rounds to a centimetre. Only for `noise` nuggets, whose surface has no spikes at the samples.
 */
export function predictByTable(model: GlobalKriging, targets: Targets): Float64Array {
  requireDrift(model.setup, targets);
  if (model.setup.nuggetIs !== 'noise')
    throw new RangeError('The table holds no nugget; krige with a noise nugget.');
  const { xM, yM } = model.setup.samples;
  const { dual, coefficients } = model;
  const { table, perM } = covarianceTable(model, targets);
  const count = xM.length;
  const valuesM = new Float64Array(targets.xM.length);
  for (let t = 0; t < valuesM.length; t++) {
    const x = targets.xM[t]!;
    const y = targets.yM[t]!;
    let sum = coefficients[0]!;
    if (targets.driftM !== undefined) sum += coefficients[1]! * targets.driftM[t]!;
    for (let i = 0; i < count; i++) {
      const dx = xM[i]! - x;
      const dy = yM[i]! - y;
      const at = Math.sqrt(dx * dx + dy * dy) * perM;
      const entry = at | 0;
      const low = table[entry]!;
      sum += dual[i]! * (low + (at - entry) * (table[entry + 1]! - low));
    }
    valuesM[t] = sum;
  }
  return valuesM;
}

function covarianceTable({ setup }: GlobalKriging, targets: Targets): { table: Float64Array; perM: number } {
  const longestM = Math.hypot(spanOf(setup.samples.xM, targets.xM), spanOf(setup.samples.yM, targets.yM));
  const perM = (ENTRIES - 2) / Math.max(longestM, 1e-6);
  const table = Float64Array.from({ length: ENTRIES }, (_, entry) => (entry / perM) ** 2);
  covariancesInPlace(table, ENTRIES, setup.variogram);
  return { table, perM };
}

function spanOf(a: Float64Array, b: Float64Array): number {
  let least = Infinity;
  let most = -Infinity;
  for (const values of [a, b]) {
    for (const value of values) {
      if (value < least) least = value;
      if (value > most) most = value;
    }
  }
  return most - least;
}
