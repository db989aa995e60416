import { expect, test } from 'vitest';
import { aimedAt, drawnCast, lineOutAt, openWaterM } from './drawn-cast';

const from = { xM: 0, yM: 0 };
const points = Array.from({ length: 21 }, (_, i) => ({
  rangeM: i * 2,
  lineOutM: i * 2 + 1,
  depthM: 1,
  sigmaM: 0.1,
  bottom: 'silt' as const,
}));

test('a drag becomes a bearing to half a degree and a length, within the longest cast', () => {
  expect(aimedAt(from, { xM: 10, yM: 10 }, 60)).toEqual({ bearingDeg: 45, lineOutM: Math.hypot(10, 10) });
  expect(aimedAt(from, { xM: -200, yM: 0 }, 60)).toEqual({ bearingDeg: 270, lineOutM: 60 });
  expect(aimedAt(from, { xM: -0.001, yM: 50 }, 60).bearingDeg).toBe(0);
});

test('line and ground follow the section, not each other', () => {
  expect(lineOutAt(points, 11)).toBeCloseTo(12, 9);
  const cast = drawnCast(from, { bearingDeg: 90, lineOutM: 21 }, { points, stickSpacingM: 4 });
  expect(cast.rangeM).toBeCloseTo(20, 9);
  expect(cast.wrapRangesM.slice(0, 3)).toEqual([3, 7, 11]);
  expect(cast.ellipse?.semiMajorM).toBeGreaterThan(0);
});

test('before the section is here the cast has no ticks', () => {
  expect(drawnCast(from, { bearingDeg: 0, lineOutM: 30 }, { points: [], stickSpacingM: 4 })).toMatchObject({
    rangeM: 30,
    wrapRangesM: [],
  });
});

const square = (from: number, to: number) => [
  { xM: from, yM: from },
  { xM: to, yM: from },
  { xM: to, yM: to },
  { xM: from, yM: to },
];

test('a cast ends where its line meets land: an island, the far bank, or the bank it points at', () => {
  const lake = { shore: square(0, 60), islands: [[...square(25, 35)].reverse()] };
  const stance = { xM: -1, yM: 30 };
  expect(openWaterM(lake, stance, { bearingDeg: 90, mostM: 100 })).toBe(25.5);
  expect(openWaterM(lake, { xM: -1, yM: 10 }, { bearingDeg: 90, mostM: 100 })).toBe(60.5);
  expect(openWaterM(lake, { xM: -1, yM: 10 }, { bearingDeg: 90, mostM: 40 })).toBe(40);
  expect(openWaterM(lake, stance, { bearingDeg: 270, mostM: 100 })).toBe(5);
});
