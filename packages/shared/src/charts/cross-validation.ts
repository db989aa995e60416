import { dot, invertFactor } from './dense';
import { solveGlobal } from './kriging-global';
import type { GlobalKriging } from './kriging-global';
import { krigeNeighbourhood } from './kriging-neighbourhood';
import { DEFAULT_NEIGHBOURS, GLOBAL_LIMIT } from './kriging';
import type { KrigingSetup } from './kriging-setup';

/**
 * Each sample predicted from all the others. `residualM` is measured − predicted; `varianceM2` the variance of that
 * difference, so it holds the sample's own measurement error and the nugget (as gstat's krige.cv has the nugget).
 */
export type LeaveOneOut = { residualM: Float64Array; varianceM2: Float64Array };

/** In closed form up to 800 samples, above that from 24 by octant; `neighbours` asks for so many of the nearest. */
export function leaveOneOut(setup: KrigingSetup, neighbours?: number): LeaveOneOut {
  const count = setup.samples.xM.length;
  if (neighbours === undefined && count <= GLOBAL_LIMIT) return leaveOneOutGlobal(solveGlobal(setup));
  return leaveOneOutNear(setup, neighbours ?? DEFAULT_NEIGHBOURS, neighbours === undefined);
}

/**
 * Closed form from the inverse, no refitting: with P = K⁻¹ − K⁻¹F(FᵀK⁻¹F)⁻¹FᵀK⁻¹, the residual of sample i is
 * (P z)ᵢ / Pᵢᵢ and its variance 1 / Pᵢᵢ. Source: Dubrule, Mathematical Geology 15, 1983, 687–699.
 */
export function leaveOneOutGlobal(model: GlobalKriging): LeaveOneOut {
  const { factor, size, trend, trendInverse, dual } = model;
  const count = model.setup.samples.xM.length;
  const inverse = invertFactor(factor, size);
  const residualM = new Float64Array(count);
  const varianceM2 = new Float64Array(count);
  const order = trend.length;
  for (let i = 0; i < count; i++) {
    const row = inverse.subarray(i * size, (i + 1) * size);
    const weights = trend.map((column) => dot(row, column));
    let diagonal = dot(row, row);
    for (let r = 0; r < order; r++) {
      for (let c = 0; c < order; c++) diagonal -= weights[r]! * trendInverse[r * order + c]! * weights[c]!;
    }
    residualM[i] = dual[i]! / diagonal;
    varianceM2[i] = 1 / diagonal;
  }
  return { residualM, varianceM2 };
}

function leaveOneOutNear(setup: KrigingSetup, neighbours: number, byOctant: boolean): LeaveOneOut {
  const { xM, yM, valueM, errorVarianceM2 } = setup.samples;
  const targets = setup.driftM === undefined ? { xM, yM } : { xM, yM, driftM: setup.driftM };
  const predicted = krigeNeighbourhood(setup, targets, {
    neighbours,
    by: byOctant ? 'octant' : 'nearest',
    leaveOneOut: true,
  });
  const nuggetM2 = setup.nuggetIs === 'noise' ? setup.variogram.nuggetM2 : 0;
  return {
    residualM: valueM.map((value, i) => value - predicted.valuesM[i]!),
    varianceM2: predicted.varianceM2.map((variance, i) => variance + errorVarianceM2[i]! + nuggetM2),
  };
}

export type CrossValidation = {
  count: number;
  meanErrorM: number; // mean of predicted − measured; positive when the surface is too deep
  rmseM: number;
  standardisedVariance: number; // mean of residual² / variance; near 1 when σ is honest
  coverage95: number; // share of residuals within 1.96 σ
  worst: { sample: number; residualM: number; sigmas: number }[]; // the ten of largest |residual| / σ, worst first
};

/** Summary over the first `count` samples (the soundings; shore points stand behind them). */
export function summarise({ residualM, varianceM2 }: LeaveOneOut, count = residualM.length): CrossValidation {
  if (count === 0) throw new RangeError('There is nothing to cross-validate.');
  let sum = 0;
  let squares = 0;
  let standardised = 0;
  let within = 0;
  const each: CrossValidation['worst'] = [];
  for (let i = 0; i < count; i++) {
    const residual = residualM[i]!;
    const variance = varianceM2[i]!;
    const sigmas = variance > 0 ? Math.abs(residual) / Math.sqrt(variance) : residual === 0 ? 0 : Infinity;
    sum += residual;
    squares += residual * residual;
    standardised += sigmas * sigmas;
    if (sigmas <= 1.96) within++;
    each.push({ sample: i, residualM: residual, sigmas });
  }
  each.sort((a, b) => b.sigmas - a.sigmas || a.sample - b.sample);
  return {
    count,
    meanErrorM: -sum / count,
    rmseM: Math.sqrt(squares / count),
    standardisedVariance: standardised / count,
    coverage95: within / count,
    worst: each.slice(0, 10),
  };
}
