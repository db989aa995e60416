import { krigedCovariance, preparePlaces } from '@mereward/shared/charts/kriged-covariance';
import { krige } from '@mereward/shared/charts/kriging';
import { solveGlobal } from '@mereward/shared/charts/kriging-global';
import type { KrigingSetup } from '@mereward/shared/charts/kriging-setup';
import { nextCasts, type Candidate } from '@mereward/shared/charts/next-casts';
import { samplePoints, type Targets } from '@mereward/shared/charts/sample-points';
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';

/**
 * Truth: the kriging itself, which is held against gstat elsewhere, solved anew with the point added. The update is the same
 * matrix algebra in another order, so both agree to rounding: 1e-9 of a variance of about 1 m².
 */
const rows = Array.from({ length: 24 }, (_, i) => {
  const x = (i * 37) % 100;
  const y = (i * 61) % 80;
  return [x, y, 2 + Math.sin(x / 15) + y / 60, 0.01 + (i % 3) * 0.01];
});
const variogram = { model: 'matern32', nuggetM2: 0.03, partialSillM2: 0.9, rangeM: 18 } as const;
const slope = (x: number, y: number) => 1 - Math.exp(-(x + 2 * y) / 60);

function setupOf(points: readonly (readonly number[])[], drift: boolean): KrigingSetup {
  const samples = samplePoints(points);
  const plain = { samples, variogram, nuggetIs: 'noise' } as const;
  return drift ? { ...plain, driftM: Float64Array.from(points, ([x = 0, y = 0]) => slope(x, y)) } : plain;
}
function targetsAt(places: readonly (readonly [number, number])[], drift: boolean): Targets {
  const plain = { xM: Float64Array.from(places, ([x]) => x), yM: Float64Array.from(places, ([, y]) => y) };
  return drift ? { ...plain, driftM: Float64Array.from(places, ([x, y]) => slope(x, y)) } : plain;
}
const water = Array.from({ length: 60 }, (_, i): [number, number] => [
  (i % 10) * 11 + 0.4,
  Math.floor(i / 10) * 15 + 0.7,
]);
const meanVariance = (points: readonly (readonly number[])[], drift: boolean): number => {
  const { varianceM2 } = krige(setupOf(points, drift), targetsAt(water, drift));
  return varianceM2.reduce((sum, v) => sum + v, 0) / varianceM2.length;
};
const candidateAt = ([xM, yM]: readonly [number, number], drift: boolean): Candidate => ({
  xM,
  yM,
  errorVarianceM2: 0.04,
  ...(drift ? { driftM: slope(xM, yM) } : {}),
});

describe.each([
  ['ordinary kriging', false],
  ['kriging with a drift', true],
])('with %s', (_, drift) => {
  const model = solveGlobal(setupOf(rows, drift));

  test('a chosen cast takes away exactly what kriging with it added takes away', () => {
    const places = [
      [5, 70],
      [52, 33],
      [90, 12],
      [30, 30],
    ] as const;
    const candidates = places.map((place) => candidateAt(place, drift));
    const { meanVarianceM2, casts } = nextCasts(model, targetsAt(water, drift), {
      pegs: [candidates],
      most: 4,
    });
    expect(meanVarianceM2).toBeCloseTo(meanVariance(rows, drift), 10);
    const added: number[][] = [];
    let before = meanVarianceM2;
    for (const { candidate, gainShare } of casts[0]!) {
      const [x, y] = places[candidate]!;
      added.push([x, y, 99, 0.04]); // the value read does not matter
      const after = meanVariance([...rows, ...added], drift);
      expect(Math.abs(gainShare * meanVarianceM2 - (before - after))).toBeLessThan(1e-9);
      before = after;
    }
    expect(added).toHaveLength(4);
  });

  test('the first cast of each peg is the best of all, tried one by one', () => {
    const pegs = [
      [
        [10, 10],
        [48, 52],
        [80, 70],
      ],
      [
        [95, 5],
        [62, 41],
      ],
    ] as [number, number][][];
    const asked = pegs.map((places) => places.map((place) => candidateAt(place, drift)));
    const { casts } = nextCasts(model, targetsAt(water, drift), { pegs: asked, most: 1 });
    casts.forEach((chosen, peg) => {
      const left = pegs[peg]!.map(([x, y]) => meanVariance([...rows, [x, y, 0, 0.04]], drift));
      expect(chosen[0]!.candidate).toBe(left.indexOf(Math.min(...left)));
    });
  });

  test('the covariance of a place with itself is its kriging variance', () => {
    const targets = targetsAt(water, drift);
    const prepared = preparePlaces(model, targets);
    const { varianceM2 } = krige(setupOf(rows, drift), targets);
    water.forEach((_place, t) => {
      expect(krigedCovariance([prepared, t], [prepared, t])).toBeCloseTo(varianceM2[t]!, 10);
    });
  });
});

test('no cast is chosen twice, and none makes anything less known', () => {
  const place = fc.tuple(
    fc.double({ min: 0, max: 100, noNaN: true }),
    fc.double({ min: 0, max: 80, noNaN: true }),
  );
  const model = solveGlobal(setupOf(rows, false));
  fc.assert(
    fc.property(fc.array(place, { minLength: 1, maxLength: 12 }), (places) => {
      const pegs = [places.map((at) => candidateAt(at, false))];
      const [chosen = []] = nextCasts(model, targetsAt(water, false), { pegs, most: 6 }).casts;
      const gains = chosen.map(({ gainShare }) => gainShare);
      expect(gains.every((gain) => gain > 0)).toBe(true);
      expect(gains.reduce((sum, gain) => sum + gain, 0)).toBeLessThan(1);
      expect(new Set(chosen.map(({ candidate }) => candidate)).size).toBe(chosen.length);
    }),
    { numRuns: 60 },
  );
});
