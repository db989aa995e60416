// Whole bank surveys of invented waters held against the beds they were cast over: what a band and a grade promise.
// Source of the truth: the analytic beds of tests/support/simulated-surveys, which neither reduction nor chart sees. Every cast
// carries the errors of the budget (surveys/error-budget: common practice, no published source), drawn with fixed seeds;
// none of these seeds was used to choose anything in the program. Some 45 s of one processor.
// Tolerances: the 95 % bands hold 93–97 % of all cells together (the house's own goal). A grade's limits are one σ, so at
// least 68 % of its casts lie within them, and nine in ten inside the wider bounds each states for itself (the goal is 95;
// near the margin a curved arc of aim is not quite an ellipse). Thousands of casts of each know a share to 0.01.
import { beforeAll, describe, expect, test } from 'vitest';
import { calibrate, type Calibration } from '../../support/calibration';

let seen: Calibration;

beforeAll(() => {
  seen = calibrate({ firstSeed: 50_000, surveys: 200 });
  process.stdout.write(`${seen.words}\n`);
}, 600_000);

test('the 95 % bands hold 93 to 97 % of the beds, all surveys together', () => {
  expect(seen.cells).toBeGreaterThan(200_000);
  expect(seen.heldShare).toBeGreaterThan(0.93);
  expect(seen.heldShare).toBeLessThan(0.97);
});

test('σ is of the size of the errors', () => {
  expect(seen.meanSquaredSigmas).toBeGreaterThan(0.6);
  expect(seen.meanSquaredSigmas).toBeLessThan(1.3);
});

describe.each(['A', 'B', 'C'] as const)('grade %s', (grade) => {
  test('means what it says: most casts lie within its limits along, across and in depth', () => {
    const { casts, withinLimits } = seen.grades[grade];
    expect(casts).toBeGreaterThan(1000);
    expect(withinLimits.along).toBeGreaterThan(0.68);
    expect(withinLimits.across).toBeGreaterThan(0.68);
    expect(withinLimits.depth).toBeGreaterThan(0.68);
  });

  test('casts lie inside their own stated 95 % bounds about that often', () => {
    const { ownEllipse, ownDepthBand } = seen.grades[grade];
    expect(ownEllipse).toBeGreaterThan(0.9);
    expect(ownDepthBand).toBeGreaterThan(0.9);
  });
});

test('a worse grade lies further out', () => {
  const { A, B, C, D } = seen.grades;
  expect(A.rmsPlaceM).toBeLessThan(B.rmsPlaceM);
  expect(B.rmsPlaceM).toBeLessThan(C.rmsPlaceM);
  expect(C.rmsPlaceM).toBeLessThan(D.rmsPlaceM);
});
