import { expect, test } from 'vitest';
import { clipRing } from './ring-clip';

const box = { westM: 0, eastM: 10, southM: 0, northM: 10 };

test('a ring inside the box stays as it is', () => {
  expect(clipRing([1, 1, 9, 1, 5, 9], box)).toEqual([1, 1, 9, 1, 5, 9]);
});

test('a ring across an edge is cut along it', () => {
  const ring = clipRing([-10, 2, 5, 2, 5, 8, -10, 8], box);
  expect(ring.filter((_, i) => i % 2 === 0).every((x) => x >= 0 && x <= 5)).toBe(true);
  expect(ring).toEqual(expect.arrayContaining([0, 2, 5, 8]));
});

test('a ring round the box becomes the box, one beside it nothing', () => {
  expect(clipRing([-50, -50, 50, -50, 50, 50, -50, 50], box)).toHaveLength(8);
  expect(clipRing([20, 0, 30, 0, 25, 10], box)).toEqual([]);
});
