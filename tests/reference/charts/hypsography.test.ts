// Source: fixtures 04_volume.json: closed forms of six basins, and frustum tables that a sliced cone satisfies exactly.
// Tolerances are the fixture's: frustums 1e-9; a gridded basin 0.5 % of volume at 2 m and 0.1 % at 1 m (closed form against
// a linear surface); area 1 % of the surface's and volume 0.5 % at every depth.
import { describe, expect, test } from 'vitest';
import { z } from 'zod';
import type { Grid } from '@mereward/shared/charts/grid';
import {
  frustumVolumeM3,
  gridTriangles,
  hypsography,
  shorelineDevelopment,
  volumeBetweenM3,
  volumeDevelopment,
} from '@mereward/shared/charts/hypsography';
import { fixture } from './fixtures';

const Solid = z.object({
  kind: z.string(),
  params: z.record(z.string(), z.number()),
  max_depth: z.number(),
  surface_area: z.number(),
  volume: z.number(),
  perimeter: z.number(),
  mean_depth: z.number(),
  shoreline_development: z.number(),
  volume_development_Dv: z.number(),
  hypsography: z.array(
    z.object({ depth: z.number(), area_at_depth: z.number(), volume_below_depth: z.number() }),
  ),
});
const volume = fixture(
  '04_volume.json',
  z.object({
    solids: z.array(Solid),
    frustum_worked: z.array(
      z.object({
        id: z.string(),
        depth_area_table: z.array(z.array(z.number())),
        shoreline_m: z.number(),
        total_volume: z.number(),
        shoreline_development: z.number(),
        volume_development_Dv: z.number(),
        mean_depth: z.number(),
      }),
    ),
  }),
);

type Solid = z.infer<typeof Solid>;

/** Depth by the closed form; beyond the shore its smooth continuation (negative) where there is one. */
function depthOf({ kind, params, max_depth }: Solid): (x: number, y: number) => number {
  const p = (name: string) => params[name]!;
  switch (kind) {
    case 'cone':
      return (x, y) => max_depth * (1 - Math.hypot(x, y) / p('R'));
    case 'paraboloid':
      return (x, y) => max_depth * (1 - (x * x + y * y) / p('R') ** 2);
    case 'elliptic_paraboloid':
      return (x, y) => max_depth * (1 - (x / p('a')) ** 2 - (y / p('b')) ** 2);
    case 'hemisphere':
      return (x, y) => Math.sqrt(Math.max(0, p('R') ** 2 - x * x - y * y));
    case 'sinusoidal_rect':
      return (x, y) => max_depth * Math.cos((Math.PI * x) / p('L')) * Math.cos((Math.PI * y) / p('W'));
    case 'wedge':
      return (_, y) => max_depth * (0.5 + y / p('W'));
    default:
      throw new RangeError(`No closed form for ${kind}`);
  }
}

/** Half the width and height of the grid that holds the solid; the flat-sided ones end exactly at their sides. */
function halfSpans({ kind, params }: Solid): [number, number] {
  if (kind === 'wedge' || kind === 'sinusoidal_rect') return [params['L']! / 2, params['W']! / 2];
  const margin = kind === 'hemisphere' ? 1 : 10;
  return [(params['a'] ?? params['R']!) + margin, (params['b'] ?? params['R']!) + margin];
}

function gridOf(solid: Solid, cellM: number): Grid {
  const [halfX, halfY] = halfSpans(solid);
  const columns = Math.round((2 * halfX) / cellM) + 1;
  const rows = Math.round((2 * halfY) / cellM) + 1;
  const depth = depthOf(solid);
  const values = Float64Array.from({ length: columns * rows }, (_, i) =>
    depth(-halfX + (i % columns) * cellM, -halfY + Math.floor(i / columns) * cellM),
  );
  return { values, columns, rows, cellM, originM: { xM: -halfX, yM: -halfY } };
}

describe.each(volume.solids.map((solid) => [solid.kind, solid] as const))('%s', (kind, solid) => {
  // A vertical edge needs cells small beside its radius of 10 m: twentieths of the usual ones.
  const scale = kind === 'hemisphere' ? 1 / 20 : 1;

  test.each([
    [2, 0.005],
    [1, 0.001],
  ])('the volume converges: %d m cells', (cellM, tolerance) => {
    const [whole] = hypsography(gridTriangles(gridOf(solid, cellM * scale)), [0]);
    expect(Math.abs(whole!.volumeM3 / solid.volume - 1)).toBeLessThan(tolerance);
  });

  test('area and volume below every depth agree with the closed form', () => {
    const triangles = gridTriangles(gridOf(solid, scale));
    const steps = hypsography(
      triangles,
      solid.hypsography.map((h) => h.depth),
    );
    solid.hypsography.forEach((expected, k) => {
      expect(Math.abs(steps[k]!.areaM2 - expected.area_at_depth)).toBeLessThan(0.01 * solid.surface_area);
      expect(Math.abs(steps[k]!.volumeM3 - expected.volume_below_depth)).toBeLessThan(0.005 * solid.volume);
    });
    const half = solid.max_depth / 2;
    const parts = volumeBetweenM3(triangles, 0, half) + volumeBetweenM3(triangles, half, solid.max_depth);
    expect(Math.abs(parts / solid.volume - 1)).toBeLessThan(0.005);
  });

  test('the shape figures agree', () => {
    expect(shorelineDevelopment(solid.perimeter, solid.surface_area)).toBeCloseTo(
      solid.shoreline_development,
      9,
    );
    expect(volumeDevelopment(solid.mean_depth, solid.max_depth)).toBeCloseTo(solid.volume_development_Dv, 9);
  });
});

describe('frustum tables', () => {
  test.each(volume.frustum_worked.map((table) => [table.id, table] as const))('%s', (_, table) => {
    const rows = table.depth_area_table.map(([depthM, areaM2]) => ({ depthM: depthM!, areaM2: areaM2! }));
    const volumeM3 = frustumVolumeM3(rows);
    expect(Math.abs(volumeM3 / table.total_volume - 1)).toBeLessThan(1e-9);
    expect(Math.abs(volumeM3 / rows[0]!.areaM2 / table.mean_depth - 1)).toBeLessThan(1e-9);
    expect(shorelineDevelopment(table.shoreline_m, rows[0]!.areaM2)).toBeCloseTo(
      table.shoreline_development,
      9,
    );
  });
});
