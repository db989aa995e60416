import { expect, test } from 'vitest';
import { fromPage, toPage, type View } from './view';
import { clampedScale, grownView, movedView, pannedView, zoomedView } from './view-moves';

const view: View = { widthPx: 400, heightPx: 300, pxPerM: 2, centre: { xM: 10, yM: 20 }, turnDeg: 30 };
const limits = { leastPxPerM: 1, mostPxPerM: 8 };

test('the place under the fingers stays under them', () => {
  const from = { x: 120, y: 80 };
  const to = { x: 300, y: 200 };
  const held = fromPage(view, from.x, from.y);
  const moved = movedView(view, { scale: 1.7, from, to });
  const at = toPage(moved, held.xM, held.yM);
  expect(at.x).toBeCloseTo(300, 6);
  expect(at.y).toBeCloseTo(200, 6);
  expect(moved.pxPerM).toBeCloseTo(3.4, 9);
});

test('panning and panning back is where it began', () => {
  const back = pannedView(pannedView(view, 50, -20), -50, 20);
  expect(back.centre.xM).toBeCloseTo(10, 9);
  expect(back.centre.yM).toBeCloseTo(20, 9);
});

test('zoom stops at its limits', () => {
  expect(zoomedView(view, 100, limits).pxPerM).toBe(8);
  expect(zoomedView(view, 0.01, limits).pxPerM).toBe(1);
  expect(clampedScale(view, 1.5, limits)).toBe(1.5);
});

test('a grown view keeps its middle', () => {
  const grown = grownView(view, 0.25);
  expect(grown.widthPx).toBe(600);
  const before = toPage(view, 12, 19);
  const after = toPage(grown, 12, 19);
  expect(after.x - before.x).toBeCloseTo(100, 9);
  expect(after.y - before.y).toBeCloseTo(75, 9);
});
