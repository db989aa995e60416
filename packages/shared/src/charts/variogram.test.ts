import { describe, expect, test } from 'vitest';
import { samplePoints } from './sample-points';
import { empiricalVariogram, semivariance, VARIOGRAM_MODELS } from './variogram';
import { fitVariogram } from './variogram-fit';

describe('the empirical variogram', () => {
  const line = samplePoints([
    [0, 0, 1, 0.02],
    [1, 0, 2, 0.04],
    [2, 0, 4, 0],
  ]);

  test('is Matheron’s half mean square by lag, beside the robust estimate and the mean error', () => {
    const bins = empiricalVariogram(line, { cutoffM: 2.5, bins: 2 });
    expect(bins.map((b) => [b.lagM, b.pairs])).toEqual([
      [1, 2],
      [2, 1],
    ]);
    expect(bins[0]!.matheronM2).toBeCloseTo((1 + 4) / 4, 12);
    expect(bins[1]!.matheronM2).toBeCloseTo(9 / 2, 12);
    // Cressie & Hawkins by hand: mean of √1 and √2, to the fourth, over 2 (0.457 + 0.494/2 + 0.045/4).
    expect(bins[0]!.robustM2).toBeCloseTo(((1 + Math.SQRT2) / 2) ** 4 / (2 * 0.71525), 12);
    expect(bins[0]!.errorVarianceM2).toBeCloseTo((0.03 + 0.02) / 2, 12);
  });

  test('pairs of two shore points are left out', () => {
    const bins = empiricalVariogram(line, { cutoffM: 2.5, bins: 2, exactFrom: 1 });
    expect(bins.map((b) => b.pairs)).toEqual([1, 1]);
  });
});

describe('the fit', () => {
  test.each(VARIOGRAM_MODELS)('finds the %s model that made the bins', (model) => {
    const truth = { model, nuggetM2: 0.05, partialSillM2: 0.8, rangeM: 22 };
    const bins = Array.from({ length: 15 }, (_, i) => {
      const lagM = 2 + 4 * i;
      const gamma = semivariance(truth, lagM) + 0.01;
      return { lagM, pairs: 100 + i, matheronM2: gamma, robustM2: gamma, errorVarianceM2: 0.01 };
    });
    for (const weights of ['pairs_over_lag2', 'pairs_over_model2'] as const) {
      const fit = fitVariogram(bins, model, { weights });
      expect(fit.rangeM).toBeCloseTo(22, 3);
      expect(fit.nuggetM2).toBeCloseTo(0.05, 5);
      expect(fit.partialSillM2).toBeCloseTo(0.8, 5);
    }
  });

  test('never gives a negative nugget or sill', () => {
    const rising = Array.from({ length: 8 }, (_, i) => {
      const gamma = Math.max(0, (i - 1) * 0.2);
      return { lagM: i + 1, pairs: 50, matheronM2: gamma, robustM2: gamma, errorVarianceM2: 0 };
    });
    const falling = rising.map((bin, i) => ({ ...bin, robustM2: 1 - 0.1 * i }));
    for (const model of VARIOGRAM_MODELS) {
      expect(fitVariogram(rising, model).nuggetM2).toBeGreaterThanOrEqual(0);
      const flat = fitVariogram(falling, model);
      expect(Math.min(flat.nuggetM2, flat.partialSillM2)).toBeGreaterThanOrEqual(0);
      expect(semivariance(flat, 8)).toBeCloseTo(semivariance(flat, 4), 2); // no fall can be modelled: level
    }
  });

  test('too few lags are refused in words', () => {
    expect(() => fitVariogram([], 'spherical')).toThrow('at least three lag bins');
  });
});
