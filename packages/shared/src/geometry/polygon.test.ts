import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { Point } from './plane';
import {
  boundsOf,
  insideOutline,
  outlineAreaM2,
  perimeterM,
  ringLengthM,
  signedAreaM2,
  type Outline,
} from './polygon';
import { distanceToShoreM, nearestShore, segmentCrossing, shoreCrossings, waterRunM } from './shore-distance';

const point = (xM: number, yM: number): Point => ({ xM, yM });
const square = (x0: number, y0: number, side: number): Point[] => [
  point(x0, y0),
  point(x0 + side, y0),
  point(x0 + side, y0 + side),
  point(x0, y0 + side),
];
/** 100 m square with a 20 m island in its middle. */
const lake: Outline = { shore: square(0, 0, 100), islands: [square(40, 40, 20).reverse()] };

describe('area and shoreline', () => {
  test('islands are taken off the water and added to the shoreline', () => {
    expect(outlineAreaM2(lake)).toBe(9600);
    expect(perimeterM(lake)).toBe(480);
    expect(ringLengthM(lake.shore)).toBe(400);
    expect(boundsOf(lake)).toEqual({ minXM: 0, minYM: 0, maxXM: 100, maxYM: 100 });
  });

  test('winding gives the sign', () => {
    expect(signedAreaM2(lake.shore)).toBe(10_000);
    expect(signedAreaM2([...lake.shore].reverse())).toBe(-10_000);
    expect(signedAreaM2([])).toBe(0);
  });

  test('moving and turning the lake keeps area, shoreline and what is on the water', () => {
    const metres = fc.double({ min: -5000, max: 5000, noNaN: true });
    const turns = fc.double({ min: 0, max: 2 * Math.PI, noNaN: true });
    const spots = fc.record({
      xM: fc.double({ min: -20, max: 120, noNaN: true }),
      yM: fc.double({ min: -20, max: 120, noNaN: true }),
    });
    fc.assert(
      fc.property(metres, metres, turns, spots, (eastM, northM, turn, spot) => {
        const move = ({ xM, yM }: Point): Point =>
          point(
            eastM + xM * Math.cos(turn) - yM * Math.sin(turn),
            northM + xM * Math.sin(turn) + yM * Math.cos(turn),
          );
        const moved: Outline = {
          shore: lake.shore.map(move),
          islands: lake.islands.map((ring) => ring.map(move)),
        };
        expect(outlineAreaM2(moved)).toBeCloseTo(9600, 5);
        expect(perimeterM(moved)).toBeCloseTo(480, 6);
        const toShoreM = distanceToShoreM(lake, spot);
        expect(distanceToShoreM(moved, move(spot))).toBeCloseTo(toShoreM, 6);
        fc.pre(toShoreM > 1e-6); // on the very edge either answer is right
        expect(insideOutline(moved, move(spot))).toBe(insideOutline(lake, spot));
      }),
    );
  });
});

describe('what is on the water', () => {
  test.each([
    [10, 10, true],
    [50, 50, false],
    [30, 50, true],
    [-1, 50, false],
    [101, 101, false],
  ])('%d, %d', (xM, yM, expected) => expect(insideOutline(lake, point(xM, yM))).toBe(expected));
});

describe('shores', () => {
  test('the nearest shore may be an island’s', () => {
    expect(nearestShore(lake, point(35, 50))).toEqual({ point: point(40, 50), distanceM: 5 });
    expect(nearestShore(lake, point(104, 103))).toEqual({ point: point(100, 100), distanceM: 5 });
  });

  test('segments meet, miss, touch and overlap', () => {
    const a = [point(0, 0), point(10, 0)] as const;
    expect(segmentCrossing(a, [point(5, -1), point(5, 1)])).toBe(0.5);
    expect(segmentCrossing(a, [point(5, 1), point(5, 2)])).toBeNull();
    expect(segmentCrossing(a, [point(10, 0), point(12, 3)])).toBe(1);
    expect(segmentCrossing(a, [point(4, 0), point(20, 0)])).toBe(0.4);
    expect(segmentCrossing(a, [point(0, 1), point(10, 1)])).toBeNull();
    expect(segmentCrossing(a, [point(11, 0), point(20, 0)])).toBeNull();
  });

  test('a line meets every shore on its way, nearest first', () => {
    expect(shoreCrossings(lake, point(-50, 50), point(150, 50))).toEqual([0.25, 0.45, 0.55, 0.75]);
  });

  test('a line from the bank runs over water until it meets land', () => {
    const run = (start: Point, bearingDeg: number, limitM = 200) =>
      waterRunM(lake, start, { bearingDeg, limitM });
    expect(run(point(20, -2), 0)).toEqual({ entersAtM: 2, leavesAtM: 102 });
    expect(run(point(50, 0), 0)?.leavesAtM).toBeCloseTo(40, 9);
    expect(run(point(20, 0), 0, 30)?.leavesAtM).toBe(30);
    expect(run(point(20, -2), 180)).toBeNull();
    expect(run(point(20, -9), 0)).toBeNull();
  });
});
