// A whole survey held against the bed it was cast over. Source of the truth: the analytic bed of the invented lake
// (apps/api/src/demo/bed.ts), which the chart never sees. The casts carry the errors of a careful bank survey (line 0.15 m,
// aim 0.6°, rod 4°, stance 0.15 m, pull 2 %: common practice, no published source), drawn with a fixed seed.
// Tolerances: RMSE within the 0.30 m that a grade B depth may be out (1 σ 0.15 m) plus what casting 4–8 m apart can't see of
// bars 12 m wide; the 95 % bands must hold between 92 and 99 % of the bed, since one lake is one draw of the calibration.
import { farOstleBed } from '@mereward/api/demo/bed';
import { FAR_OSTLE_LAKE } from '@mereward/api/demo/fishery';
import { demoReduced } from '@mereward/api/demo/reduce-simulated';
import { buildChart, type BuiltChart } from '@mereward/shared/charts/build-chart';
import { columnXM, isSurveyed, rowYM } from '@mereward/shared/charts/grid';
import { beforeAll, expect, test } from 'vitest';

let chart: BuiltChart;

beforeAll(() => {
  const soundings = demoReduced(FAR_OSTLE_LAKE, farOstleBed, 7);
  chart = buildChart(
    { outline: FAR_OSTLE_LAKE.water.outline, soundings, contourStepM: 0.5, maxGapM: 12 },
    () => {},
  );
}, 60_000);

function heldAgainstBed() {
  const { depth, sigma, frame } = chart;
  const seen = { cells: 0, squares: 0, inside: 0 };
  for (let row = 0; row < frame.rows; row++)
    for (let column = 0; column < frame.columns; column++) {
      const at = row * frame.columns + column;
      const bed = farOstleBed({ xM: columnXM(frame, column), yM: rowYM(frame, row) });
      const charted = depth.values[at] ?? Number.NaN;
      if (!bed || !isSurveyed(charted)) continue;
      const errorM = charted - bed.depthM;
      seen.cells += 1;
      seen.squares += errorM * errorM;
      if (Math.abs(errorM) <= 1.96 * (sigma.values[at] ?? 0)) seen.inside += 1;
    }
  return { rmseM: Math.sqrt(seen.squares / seen.cells), coverage: seen.inside / seen.cells, ...seen };
}

test('the chart of the simulated casts lies on the invented bed within its own bands', () => {
  const { rmseM, coverage, cells } = heldAgainstBed();
  process.stdout.write(
    `Far Ostle against its bed: RMSE ${rmseM.toFixed(3)} m, 95 % bands hold ${(100 * coverage).toFixed(1)} % of ${cells} cells\n`,
  );
  expect(cells).toBeGreaterThan(20_000);
  expect(rmseM).toBeLessThan(0.3);
  expect(coverage).toBeGreaterThan(0.92);
  expect(coverage).toBeLessThan(0.99);
});

test('volume, mean and greatest depth agree with the bed summed over the surveyed cells', () => {
  const { depth, frame, figures } = chart;
  let sumM = 0;
  let cells = 0;
  let greatestM = 0;
  for (let row = 0; row < frame.rows; row++)
    for (let column = 0; column < frame.columns; column++) {
      const bed = farOstleBed({ xM: columnXM(frame, column), yM: rowYM(frame, row) });
      if (!bed || !isSurveyed(depth.values[row * frame.columns + column] ?? Number.NaN)) continue;
      sumM += bed.depthM;
      cells += 1;
      greatestM = Math.max(greatestM, bed.depthM);
    }
  expect(Math.abs(figures.meanDepthM - sumM / cells)).toBeLessThan(0.1);
  expect(Math.abs(figures.greatestDepthM - greatestM)).toBeLessThan(0.5);
  expect(figures.areaM2).toBeCloseTo(64_000, 0);
});
