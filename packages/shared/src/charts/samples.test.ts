import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { flagOutliers, chartSamples } from './samples';
import { surveyedPlaces } from './mask';
import { indexSamples, NearestSearch } from './sample-index';

const square = [
  { xM: 0, yM: 0 },
  { xM: 60, yM: 0 },
  { xM: 60, yM: 60 },
  { xM: 0, yM: 60 },
];
const island = [
  { xM: 28, yM: 28 },
  { xM: 28, yM: 33 },
  { xM: 33, yM: 33 },
  { xM: 33, yM: 28 },
];
const sounding = (id: string, xM: number, yM: number, depthM = 2, sigmaM = 0.1) => ({
  id,
  xM,
  yM,
  depthM,
  sigmaM,
});

describe('the samples of a chart', () => {
  test('readings at one place merge by inverse variance and keep their ids', () => {
    const { points, soundingIds } = chartSamples(
      [sounding('b', 10.1, 10, 2.2, 0.2), sounding('a', 10, 10, 2, 0.1), sounding('c', 20, 10)],
      { shore: square, islands: [] },
    );
    expect(soundingIds).toEqual([['a', 'b'], ['c']]);
    expect(points.valueM[0]).toBeCloseTo((2 / 0.01 + 2.2 / 0.04) / 125, 12);
    expect(points.errorVarianceM2[0]).toBeCloseTo(1 / 125, 12);
  });

  test('readings at one place that disagree widen their error', () => {
    const { points } = chartSamples([sounding('a', 10, 10, 2), sounding('b', 10, 10.1, 3)], {
      shore: square,
      islands: [],
    });
    expect(points.valueM[0]).toBeCloseTo(2.5, 12);
    expect(points.errorVarianceM2[0]).toBeCloseTo(0.25, 12); // χ² 50 on one degree, times 0.005
  });

  test('the shore and the island stand at depth 0, no wider apart than the mean gap', () => {
    const soundings = Array.from({ length: 36 }, (_, i) =>
      sounding(`s${i}`, 5 + 10 * (i % 6), 5 + 10 * Math.floor(i / 6)),
    );
    const { points, soundingIds, shoreSpacingM } = chartSamples(soundings, {
      shore: square,
      islands: [island],
    });
    expect(shoreSpacingM).toBeCloseTo(10, 9);
    const shore = [...points.valueM.keys()].slice(soundingIds.length);
    expect(shore.every((i) => points.valueM[i] === 0 && points.errorVarianceM2[i] === 0)).toBe(true);
    expect(
      shore.filter(
        (i) => points.xM[i]! > 27 && points.xM[i]! < 34 && points.yM[i]! > 27 && points.yM[i]! < 34,
      ).length,
    ).toBeGreaterThanOrEqual(2);
    const round = shore.filter((i) => points.xM[i]! % 60 === 0 || points.yM[i]! % 60 === 0);
    for (let k = 1; k < round.length; k++) {
      const [i, j] = [round[k]!, round[k - 1]!];
      expect(Math.hypot(points.xM[i]! - points.xM[j]!, points.yM[i]! - points.yM[j]!)).toBeLessThan(
        10 + 1e-9,
      );
    }
  });

  test('only what lies beyond three and a half robust sigma is flagged', () => {
    const residualM = Float64Array.of(0.1, -0.1, 0.05, -0.05, 0.02, 0, 2, 0.3);
    const varianceM2 = new Float64Array(8).fill(1);
    expect(flagOutliers({ residualM, varianceM2 }, 8)).toEqual([6]);
    expect(flagOutliers({ residualM, varianceM2 }, 6)).toEqual([]);
  });
});

describe('what counts as surveyed', () => {
  const at = (distanceM: number, sigmaM = 0.1) =>
    surveyedPlaces(
      {
        soundingDistanceM: Float64Array.of(distanceM),
        sigmaM: Float64Array.of(sigmaM),
        spreadM: 1,
      },
      8,
    )[0];

  test('within the gap of a cast it does, beyond it does not', () => {
    expect(at(8)).toBe(1);
    expect(at(8.1)).toBe(0);
  });

  test('a place whose σ is over its share of the lake’s spread does not', () => {
    expect(at(5, 0.39)).toBe(1);
    expect(at(5, 0.41)).toBe(0);
  });

  test('a limit over fifteen metres is refused', () => {
    const none = { soundingDistanceM: Float64Array.of(1), sigmaM: Float64Array.of(0.1), spreadM: 1 };
    expect(() => surveyedPlaces(none, 15.1)).toThrow('at most 15 m');
  });
});

test('the nearest search agrees with looking at every sample', () => {
  const coordinate = fc.integer({ min: -20, max: 20 }); // whole metres, so that ties happen
  fc.assert(
    fc.property(
      fc.array(fc.tuple(coordinate, coordinate), { minLength: 1, maxLength: 60 }),
      coordinate,
      coordinate,
      (places, x, y) => {
        const xM = Float64Array.from(places, (p) => p[0]);
        const yM = Float64Array.from(places, (p) => p[1]);
        const search = new NearestSearch(indexSamples(xM, yM), Math.min(7, places.length));
        search.find(x + 0.5, y);
        const expected = [...xM.keys()]
          .map((i) => ({ i, d: (xM[i]! - x - 0.5) ** 2 + (yM[i]! - y) ** 2 }))
          .sort((a, b) => a.d - b.d || a.i - b.i)
          .slice(0, 7);
        expect([...search.ids.slice(0, search.found)]).toEqual(expected.map((e) => e.i));
      },
    ),
  );
});

describe('a shore whose line is unsure', () => {
  const outline = { shore: square, islands: [] };
  const depthOf = (shoreSigmaM: number) => {
    const { points, soundingIds } = chartSamples(
      [sounding('a', 30, 3, 1.5), sounding('b', 30, 30, 4)],
      outline,
      shoreSigmaM,
    );
    const first = soundingIds.length;
    const near = [...points.xM.keys()]
      .slice(first)
      .sort(
        (i, j) =>
          Math.hypot(points.xM[i]! - 30, points.yM[i]!) - Math.hypot(points.xM[j]! - 30, points.yM[j]!),
      )[0]!;
    return {
      awayM: Math.hypot(points.xM[near]! - 30, points.yM[near]! - 3),
      sigmaM: Math.sqrt(points.errorVarianceM2[near]!),
    };
  };

  test('is as unsure in depth as the bed falls there, by how far off the line may lie', () => {
    const { awayM, sigmaM } = depthOf(1);
    expect(sigmaM).toBeCloseTo(1.5 / awayM, 9);
    expect(depthOf(0).sigmaM).toBe(0);
  });

  test('is never unsurer than the nearest depth itself', () => {
    expect(depthOf(40).sigmaM).toBeCloseTo(1.5, 9);
  });
});
