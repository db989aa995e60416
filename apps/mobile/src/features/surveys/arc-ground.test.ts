import { expect, test } from 'vitest';
import { shareCovered } from './arc-ground';

test('the share covered counts cells reached, however often, and is nought without water', () => {
  const cell = { fromDeg: 0, toDeg: 10, fromM: 7, toM: 14 };
  expect(
    shareCovered({
      cells: [
        { ...cell, casts: 3 },
        { ...cell, casts: 0 },
      ],
    }),
  ).toBe(0.5);
  expect(shareCovered({ cells: [] })).toBe(0);
});
