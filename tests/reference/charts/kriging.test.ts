// Source: fixtures 02_kriging_meuse_zinc.json (data: meuse, Rikken & Van Rijn 1993, as in R package sp; for tests only) and
// 02_interp_volcano_*.json, both computed with R 4.2.2 and gstat 2.1-0 at a fixed variogram.
// Tolerance 1e-6: the fixtures' own, "direct dense solve, condition number small"; both sides solve the same system.
import { describe, expect, test } from 'vitest';
import { leaveOneOut, summarise } from '@mereward/shared/charts/cross-validation';
import { krige } from '@mereward/shared/charts/kriging';
import { predictGlobal, solveGlobal } from '@mereward/shared/charts/kriging-global';
import type { KrigingSetup } from '@mereward/shared/charts/kriging-setup';
import { samplePoints } from '@mereward/shared/charts/sample-points';
import { fixture, greatestDifference, volcano } from './fixtures';
import { z } from 'zod';

const TOLERANCE = 1e-6;

const Meuse = z.object({
  samples: z.array(z.array(z.number())),
  predictions: z.array(z.object({ x: z.number(), y: z.number(), ok_pred: z.number(), ok_var: z.number() })),
  loo: z.array(z.object({ ok_pred: z.number(), ok_var: z.number() })),
  loo_stats: z.object({ ok_mean_error: z.number(), ok_rmse: z.number(), ok_msdr: z.number() }),
});

describe('meuse, log zinc', () => {
  const meuse = fixture('02_kriging_meuse_zinc.json', Meuse);
  const samples = samplePoints(meuse.samples.map(([x, y, , value]) => [x!, y!, value!]));
  const setup: KrigingSetup = {
    samples,
    variogram: { model: 'spherical', nuggetM2: 0.05, partialSillM2: 0.59, rangeM: 897 },
    nuggetIs: 'field',
  };
  const targets = {
    xM: Float64Array.from(meuse.predictions, (p) => p.x),
    yM: Float64Array.from(meuse.predictions, (p) => p.y),
  };

  test('predictions and variances agree with gstat', () => {
    const got = krige(setup, targets);
    expect(
      greatestDifference(
        got.valuesM,
        meuse.predictions.map((p) => p.ok_pred),
      ),
    ).toBeLessThan(TOLERANCE);
    expect(
      greatestDifference(
        got.varianceM2,
        meuse.predictions.map((p) => p.ok_var),
      ),
    ).toBeLessThan(TOLERANCE);
  });

  test('leave-one-out agrees with gstat at every sample, in closed form and by neighbourhood alike', () => {
    for (const neighbours of [undefined, 154]) {
      const got = leaveOneOut(setup, neighbours);
      const predicted = samples.valueM.map((value, i) => value - got.residualM[i]!);
      expect(
        greatestDifference(
          predicted,
          meuse.loo.map((p) => p.ok_pred),
        ),
      ).toBeLessThan(TOLERANCE);
      expect(
        greatestDifference(
          got.varianceM2,
          meuse.loo.map((p) => p.ok_var),
        ),
      ).toBeLessThan(TOLERANCE);
    }
  });

  test('the summary of leave-one-out agrees with gstat', () => {
    const summary = summarise(leaveOneOut(setup));
    expect(Math.abs(summary.meanErrorM - meuse.loo_stats.ok_mean_error)).toBeLessThan(TOLERANCE);
    expect(Math.abs(summary.rmseM - meuse.loo_stats.ok_rmse)).toBeLessThan(TOLERANCE);
    expect(Math.abs(summary.standardisedVariance - meuse.loo_stats.ok_msdr)).toBeLessThan(TOLERANCE);
  });

  test('at a sample the datum comes back with variance nought when the nugget belongs to the field', () => {
    const at = { xM: samples.xM.slice(0, 5), yM: samples.yM.slice(0, 5) };
    const got = krige(setup, at);
    expect(greatestDifference(got.valuesM, samples.valueM.slice(0, 5))).toBeLessThan(TOLERANCE);
    expect(greatestDifference(got.varianceM2, new Float64Array(5))).toBeLessThan(TOLERANCE);
  });
});

const FIELD: Omit<KrigingSetup, 'samples'> = {
  variogram: { model: 'spherical', nuggetM2: 1, partialSillM2: 1500, rangeM: 900 },
  nuggetIs: 'field',
};

describe.each(['v150', 'v400', 'v1500'] as const)('volcano %s', (name) => {
  const { samples, targets, checks } = volcano(name);
  const setup: KrigingSetup = { samples, ...FIELD };

  test('predictions and variances from all points agree with gstat', () => {
    const got = predictGlobal(solveGlobal(setup), targets);
    expect(
      greatestDifference(
        got.valuesM,
        checks.map((c) => c.ok_pred),
      ),
    ).toBeLessThan(TOLERANCE);
    expect(
      greatestDifference(
        got.varianceM2,
        checks.map((c) => c.ok_var),
      ),
    ).toBeLessThan(TOLERANCE);
  });

  test('predictions from the sixteen nearest agree with gstat', () => {
    const got = krige(setup, targets, 16);
    expect(
      greatestDifference(
        got.valuesM,
        checks.map((c) => c.ok16_pred),
      ),
    ).toBeLessThan(TOLERANCE);
  });
});

/** The reference left one out on the two smaller sets; of fifteen hundred points it holds the predictions alone. */
describe.each(['v150', 'v400'] as const)('volcano %s', (name) => {
  const { samples, loo } = volcano(name);

  test('leave-one-out predictions and variances agree with gstat', () => {
    expect(loo).toHaveLength(samples.valueM.length);
    const got = leaveOneOut({ samples, ...FIELD });
    const predicted = samples.valueM.map((value, i) => value - got.residualM[i]!);
    expect(
      greatestDifference(
        predicted,
        (loo ?? []).map((l) => l[0]!),
      ),
    ).toBeLessThan(TOLERANCE);
    expect(
      greatestDifference(
        got.varianceM2,
        (loo ?? []).map((l) => l[1]!),
      ),
    ).toBeLessThan(TOLERANCE);
  });
});
