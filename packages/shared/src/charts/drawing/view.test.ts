import fc from 'fast-check';
import { expect, test } from 'vitest';
import { bestFit, fitView, fromPage, toPage, type View } from './view';

const view: View = { widthPx: 400, heightPx: 300, pxPerM: 2, centre: { xM: 10, yM: 20 }, turnDeg: 0 };

test('north is up and east is right', () => {
  expect(toPage(view, 10, 20)).toEqual({ x: 200, y: 150 });
  expect(toPage(view, 20, 20)).toEqual({ x: 220, y: 150 });
  expect(toPage(view, 10, 30)).toEqual({ x: 200, y: 130 });
});

test('a quarter turn clockwise puts north to the right', () => {
  const at = toPage({ ...view, turnDeg: 90 }, 10, 30);
  expect(at.x).toBeCloseTo(220, 9);
  expect(at.y).toBeCloseTo(150, 9);
});

test('page to lake and back is the same place, whatever the turn', () => {
  fc.assert(
    fc.property(
      fc.double({ min: -180, max: 180, noNaN: true }),
      fc.integer(),
      fc.integer(),
      (turnDeg, x, y) => {
        const turned = { ...view, turnDeg };
        const { xM, yM } = fromPage(turned, x % 1000, y % 1000);
        const back = toPage(turned, xM, yM);
        expect(back.x).toBeCloseTo(x % 1000, 6);
        expect(back.y).toBeCloseTo(y % 1000, 6);
      },
    ),
  );
});

const wideLake = [[0, 0, 200, 0, 200, 50, 0, 50]];

test('a fitted view keeps everything inside its margin and touches it', () => {
  const fitted = fitView(wideLake, { widthPx: 420, heightPx: 300, marginPx: 10 }, 0);
  expect(fitted.pxPerM).toBeCloseTo(2, 9);
  expect(toPage(fitted, 0, 25)).toEqual({ x: 10, y: 150 });
});

test('a wide lake on a tall page is turned; on a wide page north stays up', () => {
  expect(bestFit(wideLake, { widthPx: 300, heightPx: 600, marginPx: 10 }).turnDeg).toBe(-90);
  expect(bestFit(wideLake, { widthPx: 600, heightPx: 300, marginPx: 10 }).turnDeg).toBe(0);
});

test('nothing to fit is refused in words', () => {
  expect(() => fitView([], { widthPx: 1, heightPx: 1, marginPx: 0 }, 0)).toThrow('nothing to fit');
});
