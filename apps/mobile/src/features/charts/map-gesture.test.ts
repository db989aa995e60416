import { fromPage, toPage, type View } from '@mereward/shared/charts/drawing/view';
import { movedView } from '@mereward/shared/charts/drawing/view-moves';
import { expect, test } from 'vitest';
import { cssTransform, moveTo, movementOf, newGesture, putDown, startAgain } from './map-gesture';

const view: View = { widthPx: 400, heightPx: 300, pxPerM: 2, centre: { xM: 0, yM: 0 }, turnDeg: 0 };
const limits = { leastPxPerM: 0.5, mostPxPerM: 40 };

test('a finger that barely slips is a tap and moves nothing', () => {
  const gesture = newGesture();
  putDown(gesture, 1, { x: 100, y: 100 });
  moveTo(gesture, 1, { x: 104, y: 103 });
  expect(movementOf(gesture, view, limits)).toBeNull();
  expect(gesture.moved).toBe(false);
});

test('one finger carries the map with it', () => {
  const gesture = newGesture();
  putDown(gesture, 1, { x: 100, y: 100 });
  moveTo(gesture, 1, { x: 160, y: 80 });
  const movement = movementOf(gesture, view, limits);
  expect(movement && cssTransform(movement)).toBe('translate(60px, -20px) scale(1)');
  const held = fromPage(view, 100, 100);
  const at = toPage(movedView(view, movement!), held.xM, held.yM);
  expect(at.x).toBeCloseTo(160, 6);
  expect(at.y).toBeCloseTo(80, 6);
});

test('two fingers apart scale about their middle, and no farther than the limits', () => {
  const gesture = newGesture();
  putDown(gesture, 1, { x: 100, y: 100 });
  putDown(gesture, 2, { x: 200, y: 100 });
  moveTo(gesture, 1, { x: 50, y: 100 });
  moveTo(gesture, 2, { x: 250, y: 100 });
  expect(movementOf(gesture, view, limits)).toEqual({
    scale: 2,
    from: { x: 150, y: 100 },
    to: { x: 150, y: 100 },
  });
  expect(movementOf(gesture, view, { ...limits, mostPxPerM: 3 })?.scale).toBe(1.5);
});

test('a finger that comes late does not make the map jump', () => {
  const gesture = newGesture();
  putDown(gesture, 1, { x: 100, y: 100 });
  moveTo(gesture, 1, { x: 150, y: 100 });
  startAgain(gesture);
  putDown(gesture, 2, { x: 250, y: 100 });
  expect(movementOf(gesture, view, limits)).toEqual({
    scale: 1,
    from: { x: 200, y: 100 },
    to: { x: 200, y: 100 },
  });
});
