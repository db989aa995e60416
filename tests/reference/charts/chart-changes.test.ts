import { unknownBottom, type ClassGrid } from '@mereward/shared/charts/bottom-map';
import { chartChanges } from '@mereward/shared/charts/chart-changes';
import type { ChartLayers } from '@mereward/shared/charts/chart-reading';
import { columnXM, emptyGrid, rowYM, type Grid, type GridFrame } from '@mereward/shared/charts/grid';
import { Cover } from '@mereward/shared/surveys/contract';
import { describe, expect, test } from 'vitest';

/**
 * Two charts of beds in closed form that differ by a known heap, so that area, mean and volume of the change are known. The
 * heap is a box, so its volume is exact to the cells it cuts: one ring of cells of 1 m.
 */
const frameOf = (xM: number, cellM: number, side: number): GridFrame => ({
  columns: side,
  rows: side,
  cellM,
  originM: { xM, yM: xM },
});
const NOW = frameOf(-30, 1, 61);
const THEN = frameOf(-30.3, 0.7, 88); // another frame: the older chart had a finer cell

function grid(frame: GridFrame, of: (x: number, y: number) => number): Grid {
  const out = emptyGrid(frame);
  out.values.forEach((_, node) => {
    out.values[node] = of(
      columnXM(frame, node % frame.columns),
      rowYM(frame, Math.floor(node / frame.columns)),
    );
  });
  return out;
}
const covers = (frame: GridFrame, of: (x: number, y: number) => Cover): ClassGrid => {
  const out = unknownBottom(frame);
  out.classes.forEach((_, node) => {
    const kind = of(columnXM(frame, node % frame.columns), rowYM(frame, Math.floor(node / frame.columns)));
    out.classes[node] = Cover.options.indexOf(kind);
    out.confidence[node] = 0.8;
  });
  return out;
};
type Bed = {
  depth: (x: number, y: number) => number;
  sigmaM?: number;
  cover?: (x: number, y: number) => Cover;
};
const chart = (frame: GridFrame, { depth, sigmaM = 0.1, cover = () => 'clear' }: Bed): ChartLayers => ({
  depth: grid(frame, depth),
  sigma: grid(frame, () => sigmaM),
  substrate: unknownBottom(frame),
  cover: covers(frame, cover),
});
const box = (x: number, y: number) => Math.abs(x - 8) <= 6 && Math.abs(y + 4) <= 4;
const slope = (x: number, y: number) => 2 + x / 40 + y / 60;
const BOTH = { depth: true, bottom: true };

describe('half a metre of silt on 12 × 8 m', () => {
  const now = chart(NOW, { depth: (x, y) => slope(x, y) - (box(x, y) ? 0.5 : 0) });
  const then = { layers: chart(THEN, { depth: slope }), shiftM: 0 };
  const { areas, comparedM2 } = chartChanges(now, then, BOTH);

  test('is found in its place, size, height and volume', () => {
    expect(areas).toHaveLength(1);
    const [silting] = areas;
    expect(silting).toMatchObject({ kind: 'shallower', meanChangeM: -0.5, meanSigmaM: 0.14 });
    expect(Math.abs(silting!.areaM2 - 96)).toBeLessThanOrEqual(40 * 0.6);
    expect(silting!.volumeM3).toBeCloseTo(-0.5 * silting!.areaM2, 0);
    expect([silting!.xM, silting!.yM]).toEqual([8, -4]);
    expect(silting!.words).toMatch(/^Shallower by 0\.50 m over \d+ m²: silting/);
    expect(comparedM2).toBe(61 * 61);
  });

  test('is no change when both charts could miss by as much', () => {
    const unsure = { layers: chart(THEN, { depth: slope, sigmaM: 0.3 }), shiftM: 0 }; // 1.96 × √(0.1² + 0.3²) = 0.62 m
    expect(chartChanges(now, unsure, BOTH).areas).toEqual([]);
  });
});

test('a datum lowered between two charts is no change of the bed', () => {
  const now = chart(NOW, { depth: (x, y) => slope(x, y) - 0.4 });
  const then = { layers: chart(THEN, { depth: slope }), shiftM: -0.4 };
  expect(chartChanges(now, then, BOTH).areas).toEqual([]);
  expect(chartChanges(now, { ...then, shiftM: 0 }, BOTH).areas[0]?.kind).toBe('shallower');
});

test('weed that went and left deeper water behind reads as cleared', () => {
  const now = chart(NOW, { depth: (x, y) => slope(x, y) + (box(x, y) ? 0.6 : 0) });
  const then = {
    layers: chart(THEN, { depth: slope, cover: (x, y) => (box(x, y) ? 'tall_weed' : 'clear') }),
    shiftM: 0,
  };
  const { areas } = chartChanges(now, then, BOTH);
  expect(areas.map(({ kind }) => kind).sort()).toEqual(['cover_lost', 'deeper']);
  expect(areas.find(({ kind }) => kind === 'deeper')?.words).toMatch(/cleared/);
  expect(areas.find(({ kind }) => kind === 'cover_lost')).toMatchObject({ from: 'tall_weed', to: 'clear' });
});

test('only what both surveyed is compared, and each layer only for whoever sees it', () => {
  const half = (x: number, y: number) => (x < 0 ? Number.NaN : slope(x, y) - 0.5);
  const now = chart(NOW, { depth: half });
  const then = { layers: chart(THEN, { depth: slope, cover: () => 'low_weed' }), shiftM: 0 };
  const { comparedM2, areas } = chartChanges(now, then, { depth: true, bottom: false });
  expect(comparedM2).toBe(31 * 61);
  expect(areas.map(({ kind }) => kind)).toEqual(['shallower']);
  expect(chartChanges(now, then, { depth: false, bottom: true }).areas.map(({ kind }) => kind)).toEqual([
    'cover_lost',
  ]);
});

test('scattered cells that cross 1.96 σ by chance are no change', () => {
  const speckled = (x: number, y: number) => slope(x, y) + (x % 4 === 0 && y % 4 === 0 ? 1 : 0);
  const now = chart(NOW, { depth: speckled });
  expect(chartChanges(now, { layers: chart(THEN, { depth: slope }), shiftM: 0 }, BOTH).areas).toEqual([]);
});
