// Source: fixtures 02_interp_volcano_*.json, scipy 1.10.1 (Qhull Delaunay, barycentric) and nearest neighbour.
// Tolerances are the fixtures': 1e-6 for the linear surface (the triangulation is unique, doubles agree to 1e-9), exact
// for the nearest, 1e-6 for the errors against the truth.
import { describe, expect, test } from 'vitest';
import { frameOver } from '@mereward/shared/charts/grid';
import { nearestValues } from '@mereward/shared/charts/nearest';
import { interpolateTin, tinGrid, triangulate } from '@mereward/shared/charts/tin';
import { greatestDifference, volcano } from './fixtures';

describe.each(['v150', 'v400', 'v1500'] as const)('volcano %s', (name) => {
  const { samples, targets, checks, rmse, triangles } = volcano(name);
  const tin = triangulate(samples);

  test('has the triangles of the reference', () => {
    expect(tin.corners.length / 3).toBe(triangles);
  });

  test('linear values agree with scipy', () => {
    expect(
      greatestDifference(
        interpolateTin(tin, targets),
        checks.map((c) => c.tin_linear),
      ),
    ).toBeLessThan(1e-6);
  });

  test('nearest values agree exactly', () => {
    expect([...nearestValues(samples, targets)]).toEqual(checks.map((c) => c.nearest));
  });

  test('the error against the truth agrees', () => {
    const values = interpolateTin(tin, targets);
    const squares = checks.reduce((sum, check, i) => sum + (values[i]! - check.truth) ** 2, 0);
    expect(Math.abs(Math.sqrt(squares / checks.length) - rmse['tin_linear']!)).toBeLessThan(1e-6);
  });

  test('the grid by scan line holds the same surface as place by place', () => {
    const frame = frameOver(
      [
        { xM: 0, yM: 0 },
        { xM: 860, yM: 600 },
      ],
      5,
    );
    const grid = tinGrid(tin, frame);
    const nodes = {
      xM: grid.values.map((_, i) => frame.originM.xM + (i % frame.columns) * 5),
      yM: grid.values.map((_, i) => frame.originM.yM + Math.floor(i / frame.columns) * 5),
    };
    const placed = interpolateTin(tin, nodes);
    const both = [...grid.values.keys()].filter((i) => !Number.isNaN(placed[i]!));
    expect(both.length).toBeGreaterThan(20000);
    expect(
      greatestDifference(
        both.map((i) => grid.values[i]!),
        both.map((i) => placed[i]!),
      ),
    ).toBeLessThan(1e-6);
  });
});
