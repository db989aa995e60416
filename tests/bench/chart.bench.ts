import { buildChart } from '@mereward/shared/charts/build-chart';
import type { ChartInput } from '@mereward/shared/charts/build-chart';
import { columnXM, isSurveyed, rowYM } from '@mereward/shared/charts/grid';
import { chartSamples } from '@mereward/shared/charts/samples';
import { tinGrid, triangulate } from '@mereward/shared/charts/tin';
import { gaussian, seeded } from './beds';
import type { Comparison } from './measure';

const CASTS = 500;
const shoreRadiusM = (angle: number) =>
  88 * (1 + 0.15 * Math.cos(2 * angle + 1) + 0.08 * Math.cos(3 * angle));

/** A bowl with a bar, 4 m deep. */
function depthAt(x: number, y: number): number {
  const share = Math.hypot(x, y) / shoreRadiusM(Math.atan2(y, x));
  const bar = 1 - 0.4 * Math.exp(-(((x - 20) / 17) ** 2) - ((y + 10) / 40) ** 2);
  return 4 * Math.max(0, 1 - share * share) ** 0.7 * bar;
}

/** A bank survey: 500 casts, 300 shore points, a grid of nearly 400 × 400. */
function bankSurvey(): ChartInput {
  const random = seeded(7);
  const shore = Array.from({ length: 300 }, (_, i) => {
    const angle = (i * Math.PI) / 150;
    return { xM: shoreRadiusM(angle) * Math.cos(angle), yM: shoreRadiusM(angle) * Math.sin(angle) };
  });
  const soundings: ChartInput['soundings'] = [];
  while (soundings.length < CASTS) {
    const [xM, yM] = [220 * (random() - 0.5), 220 * (random() - 0.5)];
    if (Math.hypot(xM, yM) > shoreRadiusM(Math.atan2(yM, xM)) - 1) continue;
    soundings.push({
      id: String(soundings.length).padStart(5, '0'),
      xM,
      yM,
      depthM: depthAt(xM, yM) + 0.08 * gaussian(random),
      sigmaM: 0.08,
      grade: 'A',
      substrate: { silt: 0.6, clay: 0.1, sand: 0.1, gravel: 0.1, stones: 0.1 },
      cover: { clear: 0.8, low_weed: 0.05, tall_weed: 0.05, leaf_litter: 0.05, snag: 0.05 },
    });
  }
  return { outline: { shore, islands: [] }, soundings, contourStepM: 0.5, maxGapM: 8 };
}

export function chartComparison(): Comparison {
  const survey = bankSurvey();
  return {
    name: 'a bank survey: 500 casts + 300 shore points, whole chart',
    goal: '≤ 5000 ms',
    ours: () => {
      const { depth, sigma, frame } = buildChart(survey, () => undefined);
      let [squares, inside, count] = [0, 0, 0];
      depth.values.forEach((value, i) => {
        if (!isSurveyed(value)) return;
        const truth = depthAt(
          columnXM(frame, i % frame.columns),
          rowYM(frame, Math.floor(i / frame.columns)),
        );
        squares += (value - truth) ** 2;
        if (Math.abs(value - truth) <= 1.96 * sigma.values[i]!) inside++;
        count++;
      });
      const words = `RMSE ${Math.sqrt(squares / count).toFixed(3)} m, 95 % band holds ${((100 * inside) / count).toFixed(1)} %`;
      return `${frame.columns} × ${frame.rows}, ${words}`;
    },
    peer: null,
  };
}

/** The quick look while the chart is building. */
export function previewComparison(): Comparison {
  const survey = bankSurvey();
  const { frame } = buildChart(survey, () => undefined);
  return {
    name: 'the same by linear surface, for a preview',
    goal: '≤ 150 ms at a quarter of this speed',
    ours: () => {
      tinGrid(triangulate(chartSamples(survey.soundings, survey.outline).points), frame);
      return null;
    },
    peer: null,
  };
}
