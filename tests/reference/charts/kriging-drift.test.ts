// Source: fixture 02_kriging_drift_meuse.json, made once with gstat 2.1-0 (krige, krige.cv) on meuse, log zinc with the root
// of the distance to the river as external drift; the commands stand in the file. Data: Rikken & Van Rijn 1993, as in the
// R package sp; for tests only. Tolerance 1e-6: both sides solve the same well-conditioned systems in doubles.
import { describe, expect, test } from 'vitest';
import { z } from 'zod';
import { leaveOneOut } from '@mereward/shared/charts/cross-validation';
import { krige } from '@mereward/shared/charts/kriging';
import type { KrigingSetup } from '@mereward/shared/charts/kriging-setup';
import { samplePoints } from '@mereward/shared/charts/sample-points';
import { VARIOGRAM_MODELS } from '@mereward/shared/charts/variogram';
import { fixture, greatestDifference } from './fixtures';

const TOLERANCE = 1e-6;

const { samples, targets, cases } = fixture(
  '02_kriging_drift_meuse.json',
  z.object({
    samples: z.array(z.array(z.number())), // x, y, drift, value
    targets: z.array(z.array(z.number())), // x, y, drift
    cases: z.array(
      z.object({
        name: z.string(),
        model: z.enum(VARIOGRAM_MODELS),
        drift: z.boolean(),
        nmax: z.number().nullable(),
        nugget: z.number(),
        sill: z.number(),
        range: z.number(),
        pred: z.array(z.number()),
        var: z.array(z.number()),
        loo_pred: z.array(z.number()).optional(),
        loo_var: z.array(z.number()).optional(),
      }),
    ),
  }),
);
type Case = (typeof cases)[number];

const points = samplePoints(samples.map(([x, y, , value]) => [x!, y!, value!]));
const column = (rows: number[][], c: number) => Float64Array.from(rows, (row) => row[c]!);
const places = { xM: column(targets, 0), yM: column(targets, 1) };

const setupOf = ({ model, nugget, sill, range, drift }: Case): KrigingSetup => ({
  samples: points,
  variogram: { model, nuggetM2: nugget, partialSillM2: sill, rangeM: range },
  nuggetIs: 'field',
  ...(drift ? { driftM: column(samples, 2) } : {}),
});

describe.each(cases)('$name', (each) => {
  const setup = setupOf(each);

  test('predictions and variances agree with gstat', () => {
    const at = each.drift ? { ...places, driftM: column(targets, 2) } : places;
    const got = krige(setup, at, each.nmax ?? undefined);
    expect(greatestDifference(got.valuesM, each.pred)).toBeLessThan(TOLERANCE);
    expect(greatestDifference(got.varianceM2, each.var)).toBeLessThan(TOLERANCE);
  });

  test.runIf(each.loo_pred)('leave-one-out agrees with gstat at every sample', () => {
    const got = leaveOneOut(setup);
    const predicted = points.valueM.map((value, i) => value - got.residualM[i]!);
    expect(greatestDifference(predicted, each.loo_pred ?? [])).toBeLessThan(TOLERANCE);
    expect(greatestDifference(got.varianceM2, each.loo_var ?? [])).toBeLessThan(TOLERANCE);
  });
});

test('every model of ours is held against gstat with and without drift', () => {
  const held = (drift: boolean) => new Set(cases.filter((c) => c.drift === drift).map((c) => c.model));
  expect([...held(true)].sort()).toEqual([...VARIOGRAM_MODELS].sort());
  expect([...held(false)].sort()).toEqual(VARIOGRAM_MODELS.filter((m) => m !== 'spherical').sort());
});
