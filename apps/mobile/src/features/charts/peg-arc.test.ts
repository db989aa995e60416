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
  const facing = (xM: number, yM: number) => towardsWaterDeg(square, { xM, yM }) ?? NaN;
  expect(Math.cos((facing(50, -0.4) * Math.PI) / 180)).toBeCloseTo(1, 6); // north, on whichever side of 360°
  expect(facing(100.4, 50)).toBeCloseTo(270, 6);
  expect(facing(-0.3, -0.3)).toBeCloseTo(45, 6);
});

test('in the middle of the water, and far from it, no way is better than another', () => {
  expect(towardsWaterDeg(square, { xM: 50, yM: 50 })).toBeNull();
  expect(towardsWaterDeg(square, { xM: 500, yM: 500 })).toBeNull();
});

test('the offered stance stands a metre behind the edge and looks a quarter turn wide', () => {
  const stance = offeredStance(square, { xM: 50, yM: -0.4 });
  expect(stance?.origin.yM).toBeCloseTo(-1.4, 6);
  expect(stance).toMatchObject({ fromDeg: 315, toDeg: 45 });
});
