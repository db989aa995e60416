import { expect, test } from 'vitest';
import { typedNumber, typedNumberOrNothing } from './typed-schemas';

const depth = typedNumber({ min: 0, max: 60, unit: 'm', what: 'The depth' });

test('a typed number is read with a point or a comma', () => {
  expect(depth.parse(' 2,5 ')).toBe(2.5);
  expect(depth.parse('60')).toBe(60);
});

test('what is no number, or out of bounds, is refused in words', () => {
  for (const text of ['', 'deep', '60.1', '−1', '1e1'])
    expect(depth.safeParse(text).error?.issues[0]?.message).toBe('The depth is a number from 0 to 60 m');
});

test('nothing typed is nothing known where that is allowed', () => {
  const maybe = typedNumberOrNothing({ min: 0, max: 60, what: 'The depth' });
  expect(maybe.parse(' ')).toBeNull();
  expect(maybe.parse('3')).toBe(3);
  expect(maybe.safeParse('x').success).toBe(false);
});
