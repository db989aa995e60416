import { expect, test } from 'vitest';
import { positionText, readPosition } from './position-text';

test('a place is read back as it was written', () => {
  expect(positionText([-1.1417, 52.3661])).toBe('52.3661000, -1.1417000');
  expect(readPosition(positionText([-1.1417, 52.3661]))).toEqual([-1.1417, 52.3661]);
});

test('compass letters, degree signs and a true minus are understood', () => {
  expect(readPosition('52.3661° N, 1.1417° W')).toEqual([-1.1417, 52.3661]);
  expect(readPosition('33.5S 151.2E')).toEqual([151.2, -33.5]);
  expect(readPosition('52.3661, \u22121.1417')).toEqual([-1.1417, 52.3661]);
});

test('what is no place on Earth is refused', () => {
  for (const text of ['', '52.3661', 'SP 58 75', '95, 12', '52.3, 190', '52.3,-1.1,7'])
    expect(readPosition(text)).toBeNull();
});
