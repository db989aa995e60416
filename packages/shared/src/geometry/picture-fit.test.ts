import { describe, expect, test } from 'vitest';
import { metresPerPixel, onPlane, pictureFit, type ControlPoint, type FitKind } from './picture-fit';

const point = (xPx: number, yPx: number, xM: number, yM: number): ControlPoint => ({
  xPx,
  yPx,
  at: { xM, yM },
});
/** North up, 0.1 m a pixel, the top left corner at (−100, 80). */
const northUp = [
  point(0, 0, -100, 80),
  point(2000, 0, 100, 80),
  point(0, 1600, -100, -80),
  point(2000, 1600, 100, -80),
];

describe('a fit', () => {
  test('of two points is exact, and nothing checks it', () => {
    const fit = pictureFit(northUp.slice(0, 2), 'similarity');
    expect(fit?.rmsM).toBeCloseTo(0, 9);
    expect(fit?.sigmaM).toBeNull();
    const middle = onPlane(fit!.transform, { xPx: 1000, yPx: 800 });
    expect(middle.xM).toBeCloseTo(0, 9);
    expect(middle.yM).toBeCloseTo(0, 9);
    expect(metresPerPixel(fit!.transform)).toBeCloseTo(0.1, 12);
  });

  test('shows where one of the points is wrong: its residual is the largest', () => {
    const wrong = northUp.map((each, i) => (i === 2 ? point(0, 1600, -100, -60) : each));
    const fit = pictureFit(wrong, 'similarity');
    expect(fit?.residualsM.indexOf(Math.max(...(fit?.residualsM ?? [])))).toBe(2);
    expect(fit?.rmsM).toBeGreaterThan(5);
  });

  test('of an affinity takes up a stretch that a similarity can’t', () => {
    const stretched = northUp.map(({ xPx, yPx, at }) => point(xPx, yPx, at.xM * 1.2, at.yM));
    expect(pictureFit(stretched, 'similarity')?.rmsM).toBeGreaterThan(5);
    expect(pictureFit(stretched, 'affine')?.rmsM).toBeCloseTo(0, 9);
  });

  test.each<[string, FitKind, ControlPoint[]]>([
    ['one point', 'similarity', northUp.slice(0, 1)],
    ['three points for an affinity', 'affine', northUp.slice(0, 3)],
    ['two points at one pixel', 'similarity', [point(5, 5, 0, 0), point(5, 5, 10, 0)]],
    ['two pixels for one place', 'similarity', [point(5, 5, 3, 3), point(500, 5, 3, 3)]],
    [
      'an affinity along a line',
      'affine',
      [0, 1, 2, 3].map((i) => point(i * 500, i * 400 + (i % 2), i * 50, -i * 40)),
    ],
    ['a mirrored affinity', 'affine', northUp.map(({ xPx, yPx, at }) => point(xPx, yPx, -at.xM, at.yM))],
  ])('is refused for %s', (_, kind, points) => {
    expect(pictureFit(points, kind)).toBeNull();
  });
});
