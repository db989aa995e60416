// Source: fixtures 14_end_to_end.json, a synthetic lake with known depth, 160 noisy casts; Delaunay by scipy 1.10.1, exact
// volume by quadrature. Tolerances are the fixture's: the same linear surface's volume 1e-3 (any local projection); any
// method's volume within 6 % of the exact; depths within 3 σ of the truth plus the linear surface's own error there.
import { describe, expect, test } from 'vitest';
import { z } from 'zod';
import { buildChart } from '@mereward/shared/charts/build-chart';
import { gridAt } from '@mereward/shared/charts/chart-reading';
import { hypsography } from '@mereward/shared/charts/hypsography';
import { krige } from '@mereward/shared/charts/kriging';
import { samplePoints } from '@mereward/shared/charts/sample-points';
import { chartSamples } from '@mereward/shared/charts/samples';
import { VARIOGRAM_MODELS } from '@mereward/shared/charts/variogram';
import { placesOf, waterNodes } from '@mereward/shared/charts/water-nodes';
import { tinTriangles, triangulate } from '@mereward/shared/charts/tin';
import { toPlane } from '@mereward/shared/geometry/plane';
import { insideOutline } from '@mereward/shared/geometry/polygon';
import { fixture } from './fixtures';

const VariogramModel = z.enum(VARIOGRAM_MODELS);
const lake = fixture(
  '14_end_to_end.json',
  z.object({
    lat0: z.number(),
    lon0: z.number(),
    outline_lat_lon: z.array(z.array(z.number())),
    casts: z.array(
      z.object({
        east_m: z.number(),
        north_m: z.number(),
        true_depth_m: z.number(),
        measured_depth_m: z.number(),
      }),
    ),
    expected: z.object({
      tin_triangles: z.number(),
      tin_volume_true_depths_m3: z.number(),
      tin_volume_measured_m3: z.number(),
      exact_volume_m3: z.number(),
      exact_area_m2: z.number(),
      hypsography_exact: z.array(z.object({ depth: z.number(), area_deeper_m2: z.number() })),
      test_points: z.array(
        z.object({
          east_m: z.number(),
          north_m: z.number(),
          true_depth: z.number(),
          tin_measured: z.number(),
        }),
      ),
    }),
  }),
);
const { casts, expected } = lake;
const shore = lake.outline_lat_lon.map(([lat, lon]) => toPlane([lake.lon0, lake.lat0], [lon!, lat!]));
const outline = { shore, islands: [] };

describe('the linear surface with the shore at depth 0', () => {
  test.each([
    ['true', (c: (typeof casts)[number]) => c.true_depth_m, expected.tin_volume_true_depths_m3],
    ['measured', (c: (typeof casts)[number]) => c.measured_depth_m, expected.tin_volume_measured_m3],
  ] as const)('holds the volume of the reference from %s depths', (_, depthOf, volumeM3) => {
    const rows = [
      ...casts.map((cast) => [cast.east_m, cast.north_m, depthOf(cast)]),
      ...shore.map(({ xM, yM }) => [xM, yM, 0]),
    ];
    const tin = triangulate(samplePoints(rows));
    expect(tin.corners.length / 3).toBe(expected.tin_triangles);
    const triangles = tinTriangles(tin, (middle) => insideOutline(outline, middle));
    const [whole] = hypsography(triangles, [0]);
    expect(Math.abs(whole!.volumeM3 / volumeM3 - 1)).toBeLessThan(1e-3);
  });
});

describe('the chart built from the measured casts', () => {
  const soundings = casts.map((cast, i) => ({
    id: `cast-${String(i).padStart(3, '0')}`,
    xM: cast.east_m,
    yM: cast.north_m,
    depthM: cast.measured_depth_m,
    sigmaM: 0.08,
    grade: 'A' as const,
    substrate: null,
    cover: null,
  }));
  const chart = buildChart({ outline, soundings, contourStepM: 0.5, maxGapM: 15 }, () => undefined);

  test('its surface, kriged over the whole water, holds the exact volume within 6 %', () => {
    const places = placesOf(waterNodes(outline, chart.frame), chart.frame);
    const samples = chartSamples(soundings, outline);
    const { model, nugget, sill, rangeM } = chart.quality.variogram;
    const variogram = { model: VariogramModel.parse(model), nuggetM2: nugget, partialSillM2: sill, rangeM };
    const depths = krige({ samples: samples.points, variogram, nuggetIs: 'noise' }, places, 24).valuesM;
    const volumeM3 = depths.reduce((sum, depth) => sum + Math.max(0, depth), 0) * chart.frame.cellM ** 2;
    expect(Math.abs(volumeM3 / expected.exact_volume_m3 - 1)).toBeLessThan(0.06);
    expect(Math.abs(chart.figures.areaM2 / expected.exact_area_m2 - 1)).toBeLessThan(0.01);
  });

  test('leaves what nobody cast near unsurveyed, and its volume is that of the rest', () => {
    const { surveyedShare, volumeM3, surveyedAreaM2, areaM2 } = chart.figures;
    expect(surveyedShare).toBeGreaterThan(0.8);
    expect(surveyedShare).toBeLessThan(1);
    expect(volumeM3).toBeLessThan(expected.exact_volume_m3);
    expect(Math.abs(surveyedAreaM2 / areaM2 - surveyedShare)).toBeLessThan(0.03);
  });

  test('reads the truth at the surveyed test points within three sigma and the linear surface’s own error', () => {
    const surveyed = expected.test_points.filter(
      (point) => gridAt(chart.depth, { xM: point.east_m, yM: point.north_m }) !== null,
    );
    expect(surveyed.length).toBeGreaterThanOrEqual(3);
    for (const point of surveyed) {
      const place = { xM: point.east_m, yM: point.north_m };
      const allowed = 3 * gridAt(chart.sigma, place)! + Math.abs(point.tin_measured - point.true_depth);
      expect(Math.abs(gridAt(chart.depth, place)! - point.true_depth)).toBeLessThan(allowed);
    }
  });

  test('foretells left-out soundings inside their 95 % band about that often', () => {
    expect(chart.quality.coverage95).toBeGreaterThan(0.88);
    expect(chart.quality.soundings).toBe(casts.length);
  });
});
