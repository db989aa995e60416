// Source of the truth: the noisy-track bed of tests/bench/true-beds in closed form, sounded in wandering tracks with an error of
// 5 cm each, as boats sound. σ belongs to the surface that is used (blended patches of a hundred or so samples), so the 95 % bands
// hold 93–97 % of the places, the house's own goal; from 16 neighbours it was half as wide again and held 98 %. 40,000 places
// of some 5,000 independent ones know a share to under 0.01.
import { blendedVariance, krigeBlended } from '@mereward/shared/charts/kriging-blend';
import { localSpread } from '@mereward/shared/charts/local-spread';
import { nearestDistancesM } from '@mereward/shared/charts/nearest';
import { chooseSurface } from '@mereward/shared/charts/surface-choice';
import { expect, test } from 'vitest';
import { metreCells } from '../../bench/beds';
import { TRUE_BEDS } from '../../bench/true-beds';

const cells = metreCells();
const bed = TRUE_BEDS.find(({ name }) => name === 'noisy tracks')!;

test.each([12_000, 20_000, 50_000])(
  'of %i noisy soundings in tracks the bands of 19 in 20 hold 93 to 97 in 100',
  (count) => {
    const points = bed.soundings(count);
    const awayM = nearestDistancesM(points, cells);
    const { best, misses } = chooseSurface(
      {
        points,
        soundingCount: count,
        shoreDistanceM: new Float64Array(count),
        gapM: awayM.reduce((sum, d) => sum + d, 0) / awayM.length,
        maxGapM: 8,
        awayM,
      },
      () => undefined,
    );
    const depths = krigeBlended(best.setup, cells);
    const varianceM2 = blendedVariance(best.setup, cells);
    const spread = localSpread(misses, cells, 8);
    const held = depths.filter((depthM, t) => {
      const sigmaM = Math.sqrt((varianceM2[t]! + best.setup.variogram.nuggetM2) * spread[t]!);
      return Math.abs(depthM - bed.depthM(cells.xM[t]!, cells.yM[t]!)) <= 1.96 * sigmaM;
    }).length;
    expect(held / depths.length).toBeGreaterThan(0.93);
    expect(held / depths.length).toBeLessThan(0.97);
  },
);
