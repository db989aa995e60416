import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { blendedVariance, krigeBlended } from './kriging-blend';
import { predictGlobal, solveGlobal } from './kriging-global';
import { krigeNeighbourhood } from './kriging-neighbourhood';
import type { KrigingSetup } from './kriging-setup';
import { NearestSet } from './nearest-set';
import { OctantSearch } from './octant-search';
import { indexSamples, NearestSearch } from './sample-index';
import { samplePoints } from './sample-points';

/** Soundings strewn over 120 m by a rule, with a wobble no variogram foresees. */
const COUNT = 900;
const strewn = samplePoints(
  Array.from({ length: COUNT }, (_, i) => {
    const x = 120 * ((i * 0.754877666) % 1); // after Roberts' R2 sequence: even, but no lattice
    const y = 120 * ((i * 0.569840291) % 1);
    return [x, y, 3 + Math.sin(x / 9) * Math.cos(y / 11) + 0.1 * Math.sin(7 * x + 5 * y), 0.0025];
  }),
);
const setup: KrigingSetup = {
  samples: strewn,
  variogram: { model: 'exponential', nuggetM2: 0.002, partialSillM2: 0.6, rangeM: 25 },
  nuggetIs: 'noise',
};
/** A walk across the middle, a step every millimetre and a half. */
const STEPS = 40_000;
const walk = {
  xM: Float64Array.from({ length: STEPS }, (_, i) => 30 + (60 * i) / STEPS),
  yM: Float64Array.from({ length: STEPS }, (_, i) => 45 + (25 * i) / STEPS),
};
const greatestStep = (values: Float64Array) =>
  values.reduce((most, value, i) => (i === 0 ? 0 : Math.max(most, Math.abs(value - values[i - 1]!))), 0);

describe('the variance of the blended surface', () => {
  const drifted: KrigingSetup = {
    ...setup,
    driftM: strewn.xM.map((x, i) => 1 - Math.exp(-(x + strewn.yM[i]!) / 50)),
  };
  const some = { xM: walk.xM.filter((_, i) => i % 400 === 0), yM: walk.yM.filter((_, i) => i % 400 === 0) };
  const someDrifted = { ...some, driftM: some.xM.map((x, i) => 1 - Math.exp(-(x + some.yM[i]!) / 50)) };

  test.each([
    ['without drift', setup, some],
    ['with a drift', drifted, someDrifted],
  ] as const)('is hardly more than that of all samples at once, and never less: %s', (_, of, targets) => {
    const varianceM2 = blendedVariance(of, targets);
    const { varianceM2: exact } = predictGlobal(solveGlobal(of), targets);
    varianceM2.forEach((v, t) => {
      expect(v).toBeGreaterThanOrEqual(exact[t]! * (1 - 1e-9));
      expect(v).toBeLessThan(exact[t]! * 1.1);
    });
  });
});

describe('the blended surface', () => {
  const blended = krigeBlended(setup, walk);
  const moving = krigeNeighbourhood(setup, walk, { neighbours: 24 }).valuesM;
  const { valuesM: exact } = predictGlobal(solveGlobal(setup), walk);

  test('has no steps where a moving neighbourhood has them of millimetres', () => {
    expect(greatestStep(moving)).toBeGreaterThan(0.002);
    // No step is longer than those of the solution from all samples at once, and a tenth.
    expect(greatestStep(blended)).toBeLessThan(1.1 * greatestStep(exact));
  });

  test('lies nearer to the solution from all samples than the moving neighbourhood', () => {
    const apart = (values: Float64Array) =>
      Math.sqrt(values.reduce((sum, value, i) => sum + (value - exact[i]!) ** 2, 0) / STEPS);
    expect(apart(blended)).toBeLessThan(0.5 * apart(moving));
  });

  test('of a part of the targets is that part of the whole', () => {
    const part = { xM: walk.xM.slice(7000, 9000), yM: walk.yM.slice(7000, 9000) };
    expect([...krigeBlended(setup, part)]).toEqual([...blended.slice(7000, 9000)]);
  });

  test('keeps a level bed level, however thick and thin it was sounded', () => {
    const rows = Array.from({ length: 600 }, (_, i) => {
      const crowd = i < 400 ? 3 : 100; // two in three of them within 3 m
      return [crowd * ((i * 0.754877666) % 1), crowd * ((i * 0.569840291) % 1), 2, 0.01];
    });
    const values = krigeBlended({ ...setup, samples: samplePoints(rows) }, walk);
    for (const value of values) expect(value).toBeCloseTo(2, 9);
  });

  test('with the drift at hand follows it beyond the samples', () => {
    const drift = { driftM: strewn.xM.map((x) => x / 10) };
    const samples = { ...strewn, valueM: strewn.xM.map((x) => 1 + x / 5) };
    const places = { xM: Float64Array.of(60, 130), yM: Float64Array.of(60, 60) };
    const values = krigeBlended(
      { ...setup, samples, ...drift },
      { ...places, driftM: places.xM.map((x) => x / 10) },
    );
    expect(values[0]).toBeCloseTo(13, 6);
    expect(values[1]).toBeCloseTo(27, 6);
  });
});

const coordinate = fc.integer({ min: -20, max: 20 }); // whole metres, so that ties happen
const places = fc.array(fc.tuple(coordinate, coordinate), { minLength: 1, maxLength: 120 });

test('the set of the nearest is what the search in order finds', () => {
  fc.assert(
    fc.property(places, coordinate, coordinate, fc.integer({ min: 0, max: 5 }), (at, x, y, apart) => {
      const xM = Float64Array.from(at, (p) => p[0]);
      const yM = Float64Array.from(at, (p) => p[1]);
      const most = Math.min(9, at.length);
      const index = indexSamples(xM, yM);
      const [set, inOrder] = [new NearestSet(index, most), new NearestSearch(index, most)];
      for (const search of [set, inOrder]) {
        search.without = 0;
        search.apartBelow = 50;
        search.apartM2 = apart * apart;
        search.find(x, y);
      }
      const sorted = (search: typeof set | typeof inOrder) =>
        [...search.ids.slice(0, search.found)].sort((a, b) => a - b);
      expect(sorted(set)).toEqual(sorted(inOrder));
    }),
  );
});

describe('the search by octant', () => {
  test('takes no more than an eighth from each eighth of the compass while others have some', () => {
    // A track along x = 0 at 0.5 m, and two more 8 m to either side.
    const rows = [-8, 0, 8].flatMap((x) => Array.from({ length: 81 }, (_, i) => [x, (i - 40) / 2, 1]));
    const { xM, yM } = samplePoints(rows);
    const search = new OctantSearch(indexSamples(xM, yM), 24);
    search.find(0.2, 0.1);
    const tracks = [...search.ids.slice(0, search.found)].map((id) => xM[id]);
    expect(search.found).toBe(24);
    const nearest = new NearestSet(indexSamples(xM, yM), 24);
    nearest.find(0.2, 0.1);
    expect([...nearest.ids].every((id) => xM[id] === 0)).toBe(true); // all on one line
    expect(tracks.filter((x) => x === 8).length).toBeGreaterThanOrEqual(5);
    expect(tracks.filter((x) => x === -8).length).toBeGreaterThanOrEqual(5);
  });

  test('fills up with the nearest left over where samples lie to one side', () => {
    const rows = Array.from({ length: 30 }, (_, i) => [1 + i, 0.5 + i / 100, 1]);
    const { xM, yM } = samplePoints(rows);
    const search = new OctantSearch(indexSamples(xM, yM), 16);
    search.find(0, 0);
    expect([...search.ids.slice(0, search.found)].sort((a, b) => a - b)).toEqual(
      Array.from({ length: 16 }, (_, i) => i),
    );
  });
});
