import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { shownOf, thinLog, thinningCellM, type LogSounding } from './log-thinning';

const sure = { positionM: 0.5, levelKnown: true };
const at = (xM: number, yM: number, depthM: number, wishes: Partial<LogSounding> = {}): LogSounding => ({
  ...{ xM, yM, depthM, noiseM: 0.1, sharedM: 0 },
  ...wishes,
});

describe('soundings of a log', () => {
  test('in one cell become one, surer by the root of their number', () => {
    const [merged, ...others] = thinLog(
      [0.1, 0.3, 0.5, 0.7].map((xM) => at(xM, 0.5, 2)),
      1,
      sure,
    );
    expect(others).toEqual([]);
    expect(merged).toMatchObject({ depthM: 2, count: 4, grade: 'A' });
    expect(merged?.xM).toBeCloseTo(0.4, 12);
    expect(merged?.sigmaM).toBeCloseTo(0.05, 12);
  });

  test('that scatter more than their σ says are less sure', () => {
    const [merged] = thinLog([at(0.2, 0.2, 1.5), at(0.4, 0.4, 2.5)], 1, sure);
    // χ² = 2 · (0.5 / 0.1)² = 50 over one degree of freedom; σ² = 50 · 0.01 / 2
    expect(merged?.sigmaM).toBeCloseTo(0.5, 12);
  });

  test('weigh by how sure each is', () => {
    const [merged] = thinLog([at(0.5, 0.5, 2, { noiseM: 0.1 }), at(0.5, 0.5, 3, { noiseM: 0.3 })], 1, sure);
    expect(merged?.depthM).toBeCloseTo(2.1, 12);
  });

  test('keep the error that all of them share, however many there are', () => {
    const many = Array.from({ length: 400 }, () => at(0.5, 0.5, 2, { sharedM: 0.2 }));
    expect(thinLog(many, 1, sure)[0]?.sigmaM).toBeCloseTo(Math.hypot(0.005, 0.2), 12);
  });

  test('are graded by where they lie as well as by how deep', () => {
    const grade = (positionM: number, levelKnown = true) =>
      thinLog([at(0, 0, 2)], 1, { positionM, levelKnown })[0]?.grade;
    expect([0.5, 1.5, 3, 5].map((positionM) => grade(positionM))).toEqual(['A', 'B', 'C', 'D']);
    expect(grade(0.5, false)).toBe('C');
  });

  test('either side of a cell’s edge stay two, left of the origin as right of it', () => {
    expect(thinLog([at(-0.01, 0.5, 2), at(0.01, 0.5, 2)], 1, sure)).toHaveLength(2);
  });

  test('are never more than are wanted, and lose none of their number', () => {
    const place = fc.double({ min: -200, max: 200, noNaN: true });
    const log = fc.array(fc.record({ xM: place, yM: place }), { minLength: 1, maxLength: 300 });
    fc.assert(
      fc.property(log, fc.integer({ min: 1, max: 60 }), (points, most) => {
        const cellM = thinningCellM([points], 0.8, most);
        const soundings = points.map(({ xM, yM }) => at(xM, yM, 1));
        const thinned = thinLog(soundings, cellM, sure);
        expect(thinned.length).toBeLessThanOrEqual(Math.max(4, most));
        expect(thinned.reduce((sum, { count }) => sum + count, 0)).toBe(points.length);
      }),
    );
  });
});

test('cells are half a chart’s cell, never less than a metre', () => {
  expect(thinningCellM([[{ xM: 0, yM: 0 }]], 0.5, 100)).toBe(1);
  expect(thinningCellM([[{ xM: 0, yM: 0 }]], 5, 100)).toBe(2.5);
});

test('shown points are measured ones, one to a cell, and all of them when they are few', () => {
  const points = Array.from({ length: 900 }, (_, i) => ({ xM: i % 30, yM: Math.floor(i / 30) }));
  const shown = shownOf(points, 100);
  expect(shown.length).toBeLessThanOrEqual(100);
  expect(shown.length).toBeGreaterThan(40);
  expect(shown.every((point) => points.includes(point))).toBe(true);
  expect(shownOf(points, 900)).toEqual(points);
});
