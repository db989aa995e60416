import { expect, test } from 'vitest';
import { bordersOnce } from './water-marks';

const lengthOf = (lines: number[][]): number =>
  lines.reduce((sum, line) => {
    for (let i = 0; i + 3 < line.length; i += 2) {
      const [ax = 0, ay = 0, bx = 0, by = 0] = line.slice(i, i + 4);
      sum += Math.hypot(bx - ax, by - ay);
    }
    return sum;
  }, 0);

test('a side that two waters share is drawn once, whichever way round each runs', () => {
  const left = [0, 0, 1, 0, 1, 1, 0, 1, 0, 0];
  const right = [1, 0, 1, 1, 2, 1, 2, 0, 1, 0];
  expect(lengthOf(bordersOnce([left]))).toBe(4);
  expect(lengthOf(bordersOnce([left, right]))).toBe(7); // two squares side by side: eight sides, one shared
});
