import { expect, test } from 'vitest';
import { movedTo } from './board-moves';

const SIZE = [24, 14] as const;

test('arrows move by one and stop at the edges', () => {
  expect(movedTo('ArrowDown', [3, 2], SIZE)).toEqual([4, 2]);
  expect(movedTo('ArrowUp', [0, 2], SIZE)).toEqual([0, 2]);
  expect(movedTo('ArrowRight', [3, 13], SIZE)).toEqual([3, 13]);
  expect(movedTo('ArrowLeft', [3, 2], SIZE)).toEqual([3, 1]);
});

test('home and end go along a row, page up and down along a column', () => {
  expect(movedTo('Home', [3, 2], SIZE)).toEqual([3, 0]);
  expect(movedTo('End', [3, 2], SIZE)).toEqual([3, 13]);
  expect(movedTo('PageDown', [3, 2], SIZE)).toEqual([23, 2]);
  expect(movedTo('PageUp', [3, 2], SIZE)).toEqual([0, 2]);
});

test('any other key is left to the browser', () => {
  expect(movedTo('Tab', [3, 2], SIZE)).toBeNull();
});
