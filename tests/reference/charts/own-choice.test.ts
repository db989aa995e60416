// Source: fixtures 02_interp_volcano_*.json: errors of scipy's linear surface, gstat's kriging with a fixed variogram and
// inverse distances against the truth. Tolerance is the fixture's for a method of one's own: better than inverse distances,
// within 10 % of the better of linear and kriging, since samples of one bed are one draw.
import { expect, test } from 'vitest';
import { krige } from '@mereward/shared/charts/kriging';
import { nearestDistancesM } from '@mereward/shared/charts/nearest';
import { chooseSurface } from '@mereward/shared/charts/surface-choice';
import { volcano } from './fixtures';

test.each([
  ['v150', 60],
  ['v400', 36],
  ['v1500', 18],
] as const)(
  'our own choice of surface foretells volcano %s as well as the better of the others',
  (name, gapM) => {
    const { samples, targets, checks, rmse } = volcano(name);
    const count = samples.xM.length;
    const input = {
      points: samples,
      soundingCount: count,
      shoreDistanceM: new Float64Array(count),
      gapM,
      maxGapM: 15,
      awayM: nearestDistancesM(samples, targets),
    };
    const { best, validation } = chooseSurface(input, () => undefined);
    const { valuesM } = krige(best.setup, targets, 24);
    const squares = checks.reduce((sum, check, i) => sum + (valuesM[i]! - check.truth) ** 2, 0);
    const own = Math.sqrt(squares / checks.length);
    expect(own).toBeLessThan(rmse['idw_p2_all']!);
    expect(own).toBeLessThan(1.1 * Math.min(rmse['tin_linear']!, rmse['ok_pred']!));
    expect(validation.coverage95).toBeGreaterThan(0.88);
  },
);
