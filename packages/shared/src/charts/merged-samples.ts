import type { KrigingSetup } from './kriging-setup';

const WIDER = 1.2;
const LEAST_VARIANCE_M2 = 1e-6;

/**
 * The same kriging from `most` samples at most: those of one square cell are merged by inverse variance at their weighted mean
 * place, cells as small as that allows. What is left unknown between samples hardly changes while cells are small beside the
 * variogram's range and the gaps that matter; `tests/reference/charts/merged-samples` holds by how much. As it was when
 * there are no more samples than that.
 */
export function mergedSamples(setup: KrigingSetup, most: number): KrigingSetup {
  const { xM, yM, valueM, errorVarianceM2 } = setup.samples;
  const count = xM.length;
  if (count <= most) return setup;
  const { nuggetM2 } = setup.variogram;
  const cells = cellsOf(setup, most);
  const columns = { xM: [], yM: [], valueM: [], errorVarianceM2: [], driftM: [] } as Record<Column, number[]>;
  for (const ids of cells) {
    const weights = ids.map((id) => 1 / (errorVarianceM2[id]! + nuggetM2 + LEAST_VARIANCE_M2));
    const total = weights.reduce((sum, weight) => sum + weight, 0);
    const mean = (of: Float64Array) => ids.reduce((sum, id, i) => sum + weights[i]! * of[id]!, 0) / total;
    columns.xM.push(mean(xM));
    columns.yM.push(mean(yM));
    columns.valueM.push(mean(valueM));
    if (setup.driftM) columns.driftM.push(mean(setup.driftM));
    // The nugget stands on the diagonal once more for the merged sample.
    columns.errorVarianceM2.push(Math.max(0, 1 / total - nuggetM2));
  }
  const { driftM, ...merged } = columns;
  const samples = {
    xM: Float64Array.from(merged.xM),
    yM: Float64Array.from(merged.yM),
    valueM: Float64Array.from(merged.valueM),
    errorVarianceM2: Float64Array.from(merged.errorVarianceM2),
  };
  return { ...setup, samples, ...(setup.driftM ? { driftM: Float64Array.from(driftM) } : {}) };
}

type Column = 'xM' | 'yM' | 'valueM' | 'errorVarianceM2' | 'driftM';

function cellsOf({ samples: { xM, yM } }: KrigingSetup, most: number): number[][] {
  const span = (of: Float64Array) =>
    of.reduce((a, b) => Math.max(a, b)) - of.reduce((a, b) => Math.min(a, b));
  let sideM = Math.max(0.1, Math.sqrt((span(xM) * span(yM)) / most) / 4);
  for (;;) {
    const cells = new Map<string, number[]>();
    for (let i = 0; i < xM.length; i++) {
      const key = `${Math.floor(xM[i]! / sideM)} ${Math.floor(yM[i]! / sideM)}`;
      const cell = cells.get(key);
      if (cell) cell.push(i);
      else cells.set(key, [i]);
    }
    if (cells.size <= most) return [...cells.values()];
    sideM *= WIDER;
  }
}
