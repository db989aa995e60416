import { expect, test } from 'vitest';
import { decay } from './decay';

test('decay is the exponential function to the last digits, up to where that ends', () => {
  let worst = 0;
  for (let v = 0; v < 60; v += 0.001_7) worst = Math.max(worst, Math.abs(decay(v) / Math.exp(-v) - 1));
  expect(worst).toBeLessThan(1e-15);
  expect(decay(0)).toBe(1);
  expect(decay(1000)).toBe(0);
});
