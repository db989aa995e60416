import { expect, test } from 'vitest';
import { castToQuote } from './spot-cast';

const place = { xM: 10, yM: 20 };
const cast = (id: string, grade: 'A' | 'B' | 'C' | 'D', eastM: number) => ({
  id,
  grade,
  xM: place.xM + eastM,
  yM: place.yM,
});

test('of two throws at one place the surer is quoted, whichever came first', () => {
  expect(castToQuote([cast('a', 'C', 0), cast('b', 'A', 0)], place, 1.5)?.id).toBe('b');
  expect(castToQuote([cast('b', 'A', 0), cast('a', 'C', 0)], place, 1.5)?.id).toBe('b');
});

test('of equals the nearest is quoted', () => {
  expect(castToQuote([cast('a', 'B', 1.2), cast('b', 'B', -0.3)], place, 1.5)?.id).toBe('b');
});

test('nothing beyond the usable radius is quoted, and a D never', () => {
  expect(castToQuote([cast('a', 'A', 1.6), cast('b', 'D', 0)], place, 1.5)).toBeNull();
});
