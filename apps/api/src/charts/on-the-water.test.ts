import { insideOutline, outlineAreaM2, type Outline } from '@mereward/shared/geometry/polygon';
import { expect, test } from 'vitest';
import { onTheWater } from './on-the-water';

const box = (fromM: number, toM: number) => [
  { xM: fromM, yM: fromM },
  { xM: toM, yM: fromM },
  { xM: toM, yM: toM },
  { xM: fromM, yM: toM },
];
const water: Outline = { shore: box(0, 10), islands: [box(4, 6).reverse()] };
const areaM2 = (polygons: readonly Outline[]) =>
  polygons.reduce((sum, polygon) => sum + outlineAreaM2(polygon), 0);

test('an area that runs over the shore and an island ends at both', () => {
  const clipped = onTheWater([{ shore: box(-1, 11), islands: [] }], water);
  expect(areaM2(clipped)).toBeCloseTo(96, 9);
  expect(areaM2(onTheWater([{ shore: box(-1, 5), islands: [] }], water))).toBeCloseTo(24, 9);
});

test('a hole stays a hole, what lies on land is let go, and what lies on the water stays as it is', () => {
  const holed = { shore: box(-1, 3), islands: [box(1, 2).reverse()] };
  expect(areaM2(onTheWater([holed], water))).toBeCloseTo(8, 9);
  expect(onTheWater([{ shore: box(12, 14), islands: [] }], water)).toEqual([]);
  expect(areaM2(onTheWater([{ shore: box(1, 3), islands: [] }], water))).toBeCloseTo(4, 9);
});

test('two areas apart stay two, and a bay is not bridged', () => {
  const bayed: Outline = {
    shore: [
      { xM: 0, yM: 0 },
      { xM: 10, yM: 0 },
      { xM: 10, yM: 10 },
      { xM: 6, yM: 10 },
      { xM: 5, yM: 2 },
      { xM: 4, yM: 10 },
      { xM: 0, yM: 10 },
    ],
    islands: [],
  };
  const clipped = onTheWater([{ shore: box(3, 9), islands: [] }], bayed);
  expect(clipped).toHaveLength(2);
  expect(insideOutline(clipped[0]!, { xM: 5, yM: 5 })).toBe(false);
});
