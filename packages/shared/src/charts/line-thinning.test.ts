import fc from 'fast-check';
import { expect, test } from 'vitest';
import { clipLine, thinLine } from './line-thinning';

const box = { westM: 0, eastM: 10, southM: 0, northM: 10 };

test('points on a straight run are left out and corners are kept', () => {
  expect(thinLine([0, 0, 1, 0.01, 2, 0, 2, 5, 2, 9], 0.1)).toEqual([0, 0, 2, 0, 2, 9]);
});

test('a closed line keeps its shape', () => {
  expect(thinLine([0, 0, 5, 0, 5, 5, 0, 5, 0, 0], 0.1)).toHaveLength(10);
});

test('no point of a line is farther from the thinned one than the tolerance', () => {
  const points = fc.array(
    fc.tuple(fc.double({ min: -50, max: 50, noNaN: true }), fc.double({ min: -50, max: 50, noNaN: true })),
    {
      minLength: 2,
      maxLength: 40,
    },
  );
  fc.assert(
    fc.property(points, (line) => {
      const thinned = thinLine(line.flat(), 2);
      for (const point of line) expect(distanceM(point, thinned)).toBeLessThanOrEqual(2 + 1e-6);
    }),
  );
});

function distanceM([x, y]: readonly [number, number], line: readonly number[]): number {
  let best = Math.hypot(x - (line[0] ?? 0), y - (line[1] ?? 0));
  for (let i = 0; i + 3 < line.length; i += 2) {
    const [ax = 0, ay = 0, bx = 0, by = 0] = line.slice(i, i + 4);
    const square = (bx - ax) ** 2 + (by - ay) ** 2;
    const share =
      square > 0 ? Math.min(1, Math.max(0, ((x - ax) * (bx - ax) + (y - ay) * (by - ay)) / square)) : 0;
    best = Math.min(best, Math.hypot(x - ax - share * (bx - ax), y - ay - share * (by - ay)));
  }
  return best;
}

test('a line is cut at the edges of the box, in as many pieces as it enters', () => {
  expect(clipLine([-5, 5, 15, 5], box)).toEqual([[0, 5, 10, 5]]);
  expect(clipLine([5, 5, 5, 15, 8, 15, 8, 5], box)).toEqual([
    [5, 5, 5, 10],
    [8, 10, 8, 5],
  ]);
  expect(clipLine([20, 20, 30, 30], box)).toEqual([]);
  expect(clipLine([1, 1, 2, 2, 3, 1], box)).toEqual([[1, 1, 2, 2, 3, 1]]);
});
