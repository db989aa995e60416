import type { Outline } from '@mereward/shared/geometry/polygon';
import { expect, test } from 'vitest';
import { offeredStance, towardsWaterDeg } from './peg-arc';

const square: Outline = {
  shore: [
    { xM: 0, yM: 0 },
    { xM: 100, yM: 0 },
    { xM: 100, yM: 100 },
    { xM: 0, yM: 100 },
  ],
  islands: [],
};

test('from each side of a square the water lies straight across', () => {
  expect(towardsWaterDeg(square, { xM: 50, yM: 0 })).toBeCloseTo(0, 6);
  expect(towardsWaterDeg(square, { xM: 100, yM: 50 })).toBeCloseTo(270, 6);
  expect(towardsWaterDeg(square, { xM: 0, yM: 0 })).toBeCloseTo(45, 6);
});

test('in the middle of the water, and far from it, no way is better than another', () => {
  expect(towardsWaterDeg(square, { xM: 50, yM: 50 })).toBeNull();
  expect(towardsWaterDeg(square, { xM: 500, yM: 500 })).toBeNull();
});

test('the offered stance stands a metre behind the edge and looks a quarter turn wide', () => {
  const stance = offeredStance(square, { xM: 50, yM: 0 });
  expect(stance?.origin.yM).toBeCloseTo(-1, 6);
  expect(stance).toMatchObject({ fromDeg: 315, toDeg: 45 });
});
