import { gaussian, seeded } from '../bench/beds';
import { buildChart, type ChartInput } from '@mereward/shared/charts/build-chart';
import type { SoundedChart } from '@mereward/shared/charts/chart-changes';
import { samplePoints } from '@mereward/shared/charts/sample-points';

/** A square water 80 m across. */
const SHORE = [
  { xM: -40, yM: -40 },
  { xM: 40, yM: -40 },
  { xM: 40, yM: 40 },
  { xM: -40, yM: 40 },
];
const APART_M = 5.5;
export const CAST_SIGMA_M = 0.1;
const PLACE_SIGMA_M = 0.4;

/** A chart of a bed from casts some 5.5 m apart, each with an error of its own in place and depth, all from one seed. */
export function surveyed(depthM: (x: number, y: number) => number, seed: number): SoundedChart {
  const random = seeded(seed);
  const from = -38 + APART_M * random() * 0.5;
  const soundings: ChartInput['soundings'] = [];
  for (let row = 0; from + row * APART_M < 38; row++) {
    for (let column = 0; from + column * APART_M < 38; column++) {
      const xM = from + column * APART_M + 1.2 * gaussian(random);
      const yM = from + row * APART_M + 1.2 * gaussian(random);
      if (Math.max(Math.abs(xM), Math.abs(yM)) > 39) continue;
      const lay = [xM + PLACE_SIGMA_M * gaussian(random), yM + PLACE_SIGMA_M * gaussian(random)] as const;
      soundings.push({
        id: String(soundings.length).padStart(4, '0'),
        xM,
        yM,
        depthM: Math.max(0.1, depthM(...lay) + CAST_SIGMA_M * gaussian(random)),
        sigmaM: CAST_SIGMA_M,
        grade: 'A',
        substrate: null,
        cover: null,
      });
    }
  }
  const outline = { shore: SHORE, islands: [] };
  const chart = buildChart({ outline, soundings, contourStepM: 0.5, maxGapM: 8, cellM: 1 }, () => undefined);
  const samples = samplePoints(soundings.map((s) => [s.xM, s.yM, s.depthM, CAST_SIGMA_M ** 2]));
  const { depth, sigma, substrate, cover } = chart;
  return { layers: { depth, sigma, substrate, cover }, bed: samples };
}
