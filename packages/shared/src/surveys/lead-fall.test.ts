import { describe, expect, test } from 'vitest';
import { beyondCalibrationWords, calibrateLead, fallDepth, uncalibratedFallWords } from './lead-fall';

describe('calibrating a lead', () => {
  test('the rate is the regression through the origin with its standard error', () => {
    // Through the origin by hand: rate = Σtd / Σt², s² = Σ(d − rate·t)² / (n − 1), error s / √Σt².
    const falls = [
      { seconds: 1, depthM: 2.5 },
      { seconds: 2, depthM: 3.4 },
      { seconds: 3, depthM: 7.4 },
    ];
    const answer = calibrateLead(falls);
    if (!answer.ok) throw new Error(answer.reason);
    const rate = (2.5 + 6.8 + 22.2) / 14;
    const scatter = Math.sqrt(((2.5 - rate) ** 2 + (3.4 - 2 * rate) ** 2 + (7.4 - 3 * rate) ** 2) / 2);
    expect(answer.calibration.rateMPerS).toBeCloseTo(rate, 12);
    expect(answer.calibration.scatterM).toBeCloseTo(scatter, 12);
    expect(answer.calibration.rateSigmaMPerS).toBeCloseTo(scatter / Math.sqrt(14), 12);
    expect(answer.calibration.spots).toBe(3);
  });

  test('a perfect fit is still no better than a hand can time', () => {
    const answer = calibrateLead([1, 2, 3].map((seconds) => ({ seconds, depthM: seconds * 1.5 })));
    expect(answer.ok && answer.calibration.scatterM).toBeCloseTo(0.3, 12);
  });

  test('the depth of a fall carries the error of the rate and of the count', () => {
    const lead = { rateMPerS: 1.5, rateSigmaMPerS: 0.1, scatterM: 0.3, spots: 5 };
    expect(fallDepth(2, lead)).toEqual({ depthM: 3, sigmaM: Math.hypot(0.2, 0.3) });
  });

  test('a count well beyond those it was calibrated on is called a guess', () => {
    const lead = { rateMPerS: 1.5, rateSigmaMPerS: 0.1, scatterM: 0.3, spots: 5, longestS: 3 };
    expect(beyondCalibrationWords(4.5, lead)).toBeNull();
    expect(beyondCalibrationWords(4.6, lead)).toMatch(/3 s at most/);
  });

  test.each([
    ['two spots', [1, 2].map((seconds) => ({ seconds, depthM: seconds }))],
    ['one depth only', [1, 1.1, 0.9].map((seconds) => ({ seconds, depthM: 2 }))],
    ['a count of nothing', [0, 1, 2].map((seconds) => ({ seconds, depthM: seconds + 1 }))],
    ['a missing depth', [1, 2, Number.NaN].map((depthM) => ({ seconds: 1, depthM }))],
  ])('%s is refused with what to do', (_, falls) => {
    const answer = calibrateLead(falls);
    expect(answer.ok ? '' : answer.remedy).not.toBe('');
    expect(answer.ok).toBe(false);
  });

  test('an uncalibrated count is told with its range and never as a depth', () => {
    expect(uncalibratedFallWords(10)).toMatch(/about 3\.0 m on a held line.*not used as a depth/);
  });
});
