import { readFileSync } from 'node:fs';
import { z } from 'zod';
import { samplePoints } from '@mereward/shared/charts/sample-points';

const folder = new URL('../fixtures/', import.meta.url);

export function fixtureText(name: string): string {
  return readFileSync(new URL(name, folder), 'utf8');
}

export function fixture<T extends z.ZodType>(name: string, shape: T): z.infer<T> {
  return shape.parse(JSON.parse(fixtureText(name)));
}

export function greatestDifference(got: ArrayLike<number>, expected: ArrayLike<number>): number {
  if (got.length !== expected.length) throw new RangeError(`${got.length} values against ${expected.length}`);
  let greatest = 0;
  for (let i = 0; i < got.length; i++) {
    const difference = Math.abs(got[i]! - expected[i]!);
    if (!(difference <= greatest)) greatest = Number.isNaN(difference) ? Infinity : difference;
  }
  return greatest;
}

const Volcano = z.object({
  samples: z.array(z.array(z.number())),
  checks: z.array(
    z.object({
      x: z.number(),
      y: z.number(),
      truth: z.number(),
      tin_linear: z.number(),
      nearest: z.number(),
      ok_pred: z.number(),
      ok_var: z.number(),
      ok16_pred: z.number(),
    }),
  ),
  rmse_vs_truth: z.record(z.string(), z.number()),
  delaunay_triangles: z.number(),
  loo_ok: z.array(z.array(z.number())).optional(), // prediction, variance
});

export function volcano(name: 'v150' | 'v400' | 'v1500') {
  const read = fixture(`02_interp_volcano_${name}.json`, Volcano);
  const targets = {
    xM: Float64Array.from(read.checks, (c) => c.x),
    yM: Float64Array.from(read.checks, (c) => c.y),
  };
  return {
    samples: samplePoints(read.samples),
    targets,
    checks: read.checks,
    loo: read.loo_ok,
    rmse: read.rmse_vs_truth,
    triangles: read.delaunay_triangles,
  };
}

/** The volcano grid, row-major from the south-west: 87 columns east by 61 rows north, 10 m apart, corner at 0, 0. */
export function volcanoGrid() {
  const lines = fixtureText('02_volcano_grid.csv')
    .split('\n')
    .filter((line) => /^\d/.test(line))
    .map((line) => line.split(',').map(Number));
  const columns = lines.length;
  const rows = lines[0]!.length;
  const values = new Float64Array(columns * rows);
  lines.forEach((heights, column) =>
    heights.forEach((height, row) => (values[row * columns + column] = height)),
  );
  return { values, columns, rows, cellM: 10, originM: { xM: 0, yM: 0 } };
}
