/**
 * Source: fixtures/05_uncertainty.json. Limits from IHO S-44 edition 6.1.0, table 1; propagation and combination are
 * root-sum-square (GUM) worked independently. Tolerances are the fixture's own: 1e-9 for limits, 1e-6 for propagation.
 */
import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { z } from 'zod';
import { combineDepths, principalAxes, spotCovariance } from '@mereward/shared/surveys/covariance';
import {
  orderWithin,
  S44_ORDERS,
  sigmaOnSlopeM,
  thu95M,
  thuLimitM,
  tvu95M,
  tvuLimitM,
} from '@mereward/shared/surveys/hydrographic-yardstick';

const Fixture = z.object({
  table: z.array(z.record(z.string(), z.number())),
  propagation: z.array(
    z.object({
      id: z.string(),
      depth_m: z.number(),
      vertical_components_1sigma_m: z.record(z.string(), z.number()),
      distance_m: z.number(),
      sigma_distance_m: z.number(),
      sigma_bearing_deg: z.number(),
      sigma_peg_m: z.number(),
      bottom_slope: z.number(),
      sigma_vertical_m: z.number(),
      TVU95_m: z.number(),
      sigma_cross_m: z.number(),
      sigma_major_m: z.number(),
      sigma_minor_m: z.number(),
      THU95_circular_approx_m: z.number(),
      sigma_vertical_incl_slope_m: z.number(),
      best_S44_order_met: z.string(),
    }),
  ),
  combination: z.array(
    z.object({
      id: z.string(),
      depths: z.array(z.number()),
      sigmas: z.array(z.number()),
      weighted_mean: z.number(),
      sigma_weighted_mean: z.number(),
      chi2: z.number(),
      dof: z.int(),
    }),
  ),
});
const fixture = Fixture.parse(
  JSON.parse(readFileSync(new URL('../fixtures/05_uncertainty.json', import.meta.url), 'utf8')),
);
const within = (got: number, expected: number, tolerance: number) =>
  expect(Math.abs(got - expected)).toBeLessThanOrEqual(tolerance);

describe('hydrographic limits by depth', () => {
  test.each(fixture.table)('at $depth_m m', (row) => {
    const depthM = row['depth_m'] ?? Number.NaN;
    for (const order of S44_ORDERS) {
      within(tvuLimitM(order, depthM), row[`TVU_max ${order.name}`] ?? Number.NaN, 1e-9);
      within(thuLimitM(order, depthM), row[`THU_max ${order.name}`] ?? Number.NaN, 1e-9);
    }
  });
});

describe('error propagation', () => {
  // The bearing of the line turns the ellipse and must not change its axes.
  test.each(
    fixture.propagation.flatMap((c) => [0, 37, 123.4, 270].map((bearingDeg) => ({ ...c, bearingDeg }))),
  )('$id along $bearingDeg°', (c) => {
    const acrossM = (c.distance_m * c.sigma_bearing_deg * Math.PI) / 180;
    within(acrossM, c.sigma_cross_m, 1e-6);
    const parts = { alongM: c.sigma_distance_m, acrossM, stanceM: c.sigma_peg_m };
    const covariance = spotCovariance(c.bearingDeg, parts);
    const { majorM, minorM } = principalAxes(covariance);
    within(majorM, c.sigma_major_m, 1e-6);
    within(minorM, c.sigma_minor_m, 1e-6);
    const verticalM = Math.hypot(...Object.values(c.vertical_components_1sigma_m));
    within(verticalM, c.sigma_vertical_m, 1e-6);
    within(tvu95M(verticalM), c.TVU95_m, 1e-6);
    within(thu95M(covariance), c.THU95_circular_approx_m, 1e-6);
    within(sigmaOnSlopeM(verticalM, c.bottom_slope, covariance), c.sigma_vertical_incl_slope_m, 1e-6);
    const order = orderWithin(c.depth_m, tvu95M(verticalM), thu95M(covariance));
    expect(c.best_S44_order_met.startsWith(order ?? 'none')).toBe(true);
  });
});

describe('readings of one depth', () => {
  test.each(fixture.combination)('$id combine by their weights', (c) => {
    const answer = combineDepths(
      c.depths.map((depthM, i) => ({ depthM, sigmaM: c.sigmas[i] ?? Number.NaN })),
    );
    within(answer.depthM, c.weighted_mean, 1e-6);
    within(answer.sigmaM, c.sigma_weighted_mean, 1e-6);
    within(answer.chi2, c.chi2, 1e-6);
    expect(answer.freedom).toBe(c.dof);
  });
});
