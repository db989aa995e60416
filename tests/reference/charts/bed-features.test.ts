import { bedFeatures } from '@mereward/shared/charts/bed-features';
import type { ChartFeature, FeatureKind } from '@mereward/shared/charts/chart-answers';
import { columnXM, emptyGrid, rowYM, type Grid } from '@mereward/shared/charts/grid';
import { describe, expect, test } from 'vitest';

/**
 * Beds in closed form, so that every feature's place, size and relief is known. A bar of height A and half-width s across
 * (A e^(−y²/2s²), tapered the same way along) stands at half its height over √(2 ln 2) s to each side.
 * Tolerances: a cell is 1 m, so an end is known to half a metre each side (1 m a length); within 20 m a bell of s = 4 m has
 * all but gone (e^−12.5), so relief is right to a centimetre of rounding and the cell nearest the top.
 */
const SIDE = 121;
const frame = { columns: SIDE, rows: SIDE, cellM: 1, originM: { xM: -60, yM: -60 } };
const HALF_HEIGHT = Math.sqrt(2 * Math.LN2);

function bed(depthM: (x: number, y: number) => number): Grid {
  const grid = emptyGrid(frame);
  for (let node = 0; node < SIDE * SIDE; node++) {
    const x = columnXM(frame, node % SIDE);
    const y = rowYM(frame, Math.floor(node / SIDE));
    if (Math.abs(x) <= 58 && Math.abs(y) <= 58) grid.values[node] = depthM(x, y);
  }
  return grid;
}
const evenly = (sigmaM: number): Grid => ({ ...bed(() => sigmaM) });
/** A square pond: distance to its nearest side. */
const toShore = bed((x, y) => 58.5 - Math.max(Math.abs(x), Math.abs(y))).values;

const featuresOf = (depth: Grid, sigmaM = 0.05): ChartFeature[] =>
  bedFeatures(depth, evenly(sigmaM), toShore);
const only = (features: readonly ChartFeature[], kind: FeatureKind): ChartFeature => {
  expect(features.map((feature) => feature.kind)).toEqual([kind]);
  return features[0]!;
};

/** Length over which a bell along u (with a flat middle of half-length m) stands above half. */
const bell = (d: number, s: number) => Math.exp((-d * d) / (2 * s * s));
const beyond = (d: number, flat: number) => Math.max(0, Math.abs(d) - flat);

describe('a bar 1.5 m high, running north-east', () => {
  const turn = Math.PI / 4;
  const along = (x: number, y: number) => x * Math.sin(turn) + y * Math.cos(turn);
  const across = (x: number, y: number) => x * Math.cos(turn) - y * Math.sin(turn);
  const depth = bed(
    (x, y) => 3 - 1.5 * bell(across(x - 10, y + 5), 4) * bell(beyond(along(x - 10, y + 5), 12), 4),
  );
  const bar = only(featuresOf(depth), 'bar');

  test('is found alike again', () => {
    expect(featuresOf(depth)).toEqual([bar]);
  });

  test('is found where it lies, as long, as wide and as high as it is', () => {
    expect(Math.hypot(bar.xM - 10, bar.yM + 5)).toBeLessThanOrEqual(12.5); // anywhere on its level crest
    expect(Math.abs(bar.lengthM - (24 + 2 * HALF_HEIGHT * 4))).toBeLessThanOrEqual(1.5);
    expect(Math.abs(bar.widthM - 2 * HALF_HEIGHT * 4)).toBeLessThanOrEqual(1.5); // mean width: its ends are rounded
    expect(bar.axisDeg).toBeGreaterThanOrEqual(44);
    expect(bar.axisDeg).toBeLessThanOrEqual(46);
    expect(bar.depthM).toBeCloseTo(1.5, 1);
    expect(bar.reliefM).toBeCloseTo(1.5, 1);
    expect(bar.aroundM).toBeCloseTo(3, 1);
  });

  test('is told in words', () => {
    expect(bar.words).toMatch(
      /^Bar 1: 3\d m long, \d m wide, top at 1\.5 m, 1\.5 m above what lies round it$/,
    );
  });
});

test('a gully 1 m deep across a level bed is found with its line', () => {
  const gully = only(featuresOf(bed((x, y) => 2 + bell(x + 20, 3) * bell(beyond(y, 20), 3))), 'gully');
  expect(gully.axisDeg).toBe(0);
  expect(gully.depthM).toBeCloseTo(3, 1);
  expect(gully.reliefM).toBeCloseTo(1, 1);
  expect(Math.abs(gully.lengthM - (40 + 2 * HALF_HEIGHT * 3))).toBeLessThanOrEqual(1.5);
  expect(gully.xM).toBeCloseTo(-20, 0);
});

test('a round hole is a hole, with no axis', () => {
  const hole = only(featuresOf(bed((x, y) => 2 + 1.2 * bell(Math.hypot(x - 15, y - 15), 5))), 'hole');
  expect([hole.xM, hole.yM]).toEqual([15, 15]);
  expect(hole.axisDeg).toBeNull();
  expect(hole.depthM).toBeCloseTo(3.2, 1);
  expect(hole.reliefM).toBeCloseTo(1.2, 1);
  // Its foot is a circle of half-height radius: area within the ring of cells it cuts.
  const radiusM = HALF_HEIGHT * 5;
  expect(Math.abs(hole.areaM2 - Math.PI * radiusM ** 2)).toBeLessThanOrEqual(Math.PI * radiusM);
});

test('a shelf at 1 m under the west bank, with an edge of 1.5 m, is found with its edge', () => {
  // 1 m deep from 2 m to 10 m off the west bank, then falling over 5 m to a floor of 2.5 m; the other banks slope evenly.
  const fromWest = (x: number) => x + 58.5;
  const profile = (d: number) => (d < 2 ? d / 2 : d < 10 ? 1 : d < 15 ? 1 + (1.5 * (d - 10)) / 5 : 2.5);
  const shelf = only(featuresOf(bed((x) => profile(fromWest(x)))), 'shelf');
  expect(shelf.depthM).toBeCloseTo(1, 1);
  expect(shelf.aroundM).toBeCloseTo(2.5, 1);
  expect(shelf.axisDeg).toBe(0);
  expect(Math.abs(shelf.widthM - 8)).toBeLessThanOrEqual(2); // gentle to the middle of a cell at both its edges
  expect(shelf.lengthM).toBeGreaterThan(90); // the whole bank but its corners, whose nearest shore is another
});

test.each([
  ['a level bed', () => 2],
  ['an even slope', (x: number) => 2 + x / 60],
  ['a bowl', (x: number, y: number) => 4 * (1 - (x * x + y * y) / (120 * 120))],
  [
    'the top of a slope, which falls on one side only',
    (x: number) => (x < 0 ? 1.5 : 1.5 + Math.min(2, x / 8)),
  ],
])('%s has no features', (_, depthM) => {
  expect(featuresOf(bed(depthM))).toEqual([]);
});

test('a feature lower than 1.96 σ of its two depths is told of, and not called certain', () => {
  const depth = bed((x, y) => 3 - 0.4 * bell(y, 4) * bell(beyond(x, 10), 4));
  expect(only(featuresOf(depth, 0.1), 'bar').certain).toBe(true); // 1.96 × 0.1 √2 = 0.28 m
  const unsure = only(featuresOf(depth, 0.16), 'bar'); // 1.96 × 0.16 √2 = 0.44 m
  expect(unsure.certain).toBe(false);
  expect(unsure.words).toMatch(/not sure/);
});

test('two bars keep their names when one grows', () => {
  const two = (east: number, west: number) =>
    bed(
      (x, y) =>
        3 - east * bell(x - 30, 4) * bell(beyond(y, 8), 4) - west * bell(x + 30, 4) * bell(beyond(y, 8), 4),
    );
  const placeOf = (name: string, features: readonly ChartFeature[]) =>
    features.find((feature) => feature.name === name)?.xM;
  const small = featuresOf(two(0.6, 1.2));
  const grown = featuresOf(two(1.6, 1.2));
  expect(placeOf('Bar 1', small)).toBe(30);
  expect(placeOf('Bar 1', grown)).toBe(30);
});

test('neither a round bay’s margin nor an island’s is taken for a gully or a bar', () => {
  // A round pond of 50 m with an island of 8 m: beside a curved shore every line along it rises, or falls, on both sides.
  const fromShore = (x: number, y: number) => Math.min(50 - Math.hypot(x, y), Math.hypot(x - 15, y) - 8);
  const grid = emptyGrid(frame);
  const shoreM = new Float64Array(SIDE * SIDE).fill(Number.NaN);
  for (let node = 0; node < SIDE * SIDE; node++) {
    const d = fromShore(columnXM(frame, node % SIDE), rowYM(frame, Math.floor(node / SIDE)));
    if (d < 0) continue;
    grid.values[node] = 3 * (1 - Math.exp(-d / 7));
    shoreM[node] = d;
  }
  expect(bedFeatures(grid, evenly(0.05), shoreM)).toEqual([]);
});

test('a hole too wide for the narrow look is found by the wide one', () => {
  const hole = only(featuresOf(bed((x, y) => 2 + 1.4 * bell(Math.hypot(x, y), 13))), 'hole');
  expect(hole.reliefM).toBeGreaterThan(0.9); // the look ends at 36 m, and the lesser of both looks counts
  expect(Math.abs(hole.lengthM - 2 * HALF_HEIGHT * 13)).toBeLessThanOrEqual(4);
});
