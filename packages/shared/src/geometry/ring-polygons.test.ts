import { expect, test } from 'vitest';
import type { Point } from './point';
import { outlineAreaM2 } from './polygon';
import { polygonsOf, turnedByNesting } from './ring-polygons';

const square = (xM: number, yM: number, sideM: number): Point[] => [
  { xM, yM },
  { xM: xM + sideM, yM },
  { xM: xM + sideM, yM: yM + sideM },
  { xM, yM: yM + sideM },
];
const hole = (xM: number, yM: number, sideM: number): Point[] => square(xM, yM, sideM).reverse();

test('a hole goes to the smallest ring about it, an island in it stands alone', () => {
  const polygons = polygonsOf([
    hole(2, 2, 6),
    square(0, 0, 10),
    square(3, 3, 4),
    hole(4, 4, 1),
    square(20, 0, 2),
  ]);
  expect(polygons.map((each) => [each.islands.length, outlineAreaM2(each)])).toEqual([
    [0, 4],
    [1, 15],
    [1, 64],
  ]);
});

test('rings that hold nothing are let go', () => {
  expect(polygonsOf([square(0, 0, 0), [{ xM: 1, yM: 1 }], hole(5, 5, 1)])).toEqual([]);
});

test('rings of any turn are put right by how they lie in one another', () => {
  const wrong = [hole(0, 0, 10), square(2, 2, 6), hole(3, 3, 4)];
  const polygons = polygonsOf(turnedByNesting(wrong));
  expect(polygons.map(outlineAreaM2)).toEqual([16, 64]);
});
