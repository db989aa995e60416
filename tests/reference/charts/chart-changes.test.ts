import { unknownBottom, type ClassGrid } from '@mereward/shared/charts/bottom-map';
import { chartChanges, type SoundedChart } from '@mereward/shared/charts/chart-changes';
import type { ChartLayers } from '@mereward/shared/charts/chart-reading';
import { columnXM, emptyGrid, rowYM, type Grid, type GridFrame } from '@mereward/shared/charts/grid';
import { samplePoints } from '@mereward/shared/charts/sample-points';
import { Cover } from '@mereward/shared/surveys/contract';
import { describe, expect, test } from 'vitest';

/**
 * Two charts of beds in closed form that differ by a known heap, so that area, mean and volume of the change are known. The
 * heap is a box and so known exactly; the soundings are exact too, and two metres apart.
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
const chart = (frame: GridFrame, { depth, sigmaM = 0.1, cover = () => 'clear' }: Bed): SoundedChart => {
  const layers: ChartLayers = {
    depth: grid(frame, depth),
    sigma: grid(frame, () => sigmaM),
    substrate: unknownBottom(frame),
    cover: covers(frame, cover),
  };
  return { layers, bed: samplePoints(sounded(frame, { depth, sigmaM, cover })) };
};
/** Every second metre, the two charts not at the same places; exact, and told to be out by σ. */
function sounded(frame: GridFrame, { depth, sigmaM = 0.1 }: Bed): number[][] {
  const rows: number[][] = [];
  for (let y = -29; y <= 29; y += 2)
    for (let x = -29 + (frame === THEN ? 0.7 : 0); x <= 29; x += 2)
      if (!Number.isNaN(depth(x, y))) rows.push([x, y, depth(x, y), sigmaM * sigmaM]);
  return rows;
}
const box = (x: number, y: number) => Math.abs(x - 8) <= 6 && Math.abs(y + 4) <= 4;
const slope = (x: number, y: number) => 2 + x / 40 + y / 60;
const BOTH = { depth: true, bottom: true };

describe('half a metre of silt on 12 × 8 m', () => {
  const now = chart(NOW, { depth: (x, y) => slope(x, y) - (box(x, y) ? 0.5 : 0) });
  const then = { ...chart(THEN, { depth: slope }), shiftM: 0 };
  const { areas, comparedM2 } = chartChanges(now, then, BOTH);

  test('is found in its place, size, height and volume', () => {
    expect(areas).toHaveLength(1);
    const [silting] = areas;
    expect(silting).toMatchObject({ kind: 'shallower' });
    // Its edge is known to the 2 m between soundings; what runs out over it is held by the volume, within a seventh.
    expect(silting!.areaM2).toBeGreaterThan((12 - 2) * (8 - 2));
    expect(silting!.areaM2).toBeLessThan((12 + 4) * (8 + 4));
    expect(Math.abs(silting!.volumeM3! / (-0.5 * 12 * 8) - 1)).toBeLessThan(1 / 7);
    expect(Math.hypot(silting!.xM - 8, silting!.yM + 4)).toBeLessThan(1);
    expect(silting!.words).toMatch(/^Shallower by 0\.\d\d m over \d+ m²: silting/);
    expect(comparedM2).toBe(61 * 61);
  });

  test('is no change when one of the charts could miss by more', () => {
    const unsure = { ...chart(THEN, { depth: slope, sigmaM: 0.6 }), shiftM: 0 }; // out by more than the heap is high
    expect(chartChanges(now, unsure, BOTH).areas).toEqual([]);
  });
});

test('a datum lowered between two charts is no change of the bed', () => {
  const now = chart(NOW, { depth: (x, y) => slope(x, y) - 0.4 });
  const then = { ...chart(THEN, { depth: slope }), shiftM: -0.4 };
  expect(chartChanges(now, then, BOTH).areas).toEqual([]);
  expect(chartChanges(now, { ...then, shiftM: 0 }, BOTH).areas[0]?.kind).toBe('shallower');
});

test('weed that went and left deeper water behind reads as cleared', () => {
  const now = chart(NOW, { depth: (x, y) => slope(x, y) + (box(x, y) ? 0.6 : 0) });
  const then = {
    ...chart(THEN, { depth: slope, cover: (x, y) => (box(x, y) ? 'tall_weed' : 'clear') }),
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
  const then = { ...chart(THEN, { depth: slope, cover: () => 'low_weed' }), shiftM: 0 };
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
  expect(chartChanges(now, { ...chart(THEN, { depth: slope }), shiftM: 0 }, BOTH).areas).toEqual([]);
});
