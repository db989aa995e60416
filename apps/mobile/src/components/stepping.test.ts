import { expect, test } from 'vitest';
import { stepped, typedNumber } from './stepping';

test('a step stays within its bounds and gathers no floating dust', () => {
  expect(stepped(0.1, 1, { min: 0, max: 1, step: 0.2 })).toBe(0.3);
  expect(stepped(1, 1, { min: 0, max: 1 })).toBe(1);
  expect(stepped(0, -1, { min: 0, max: 1 })).toBe(0);
  expect(stepped(null, -1, { min: 3, max: 9 })).toBe(3);
});

test('a number is read as people type one, and anything else is nothing', () => {
  expect(typedNumber(' 2,5 ')).toBe(2.5);
  expect(typedNumber('−3')).toBe(-3);
  expect(typedNumber('.5')).toBe(0.5);
  expect(typedNumber('14.')).toBe(14);
  for (const odd of ['', 'x', '1e5', '1,000.5', '0x10', 'Infinity', '--1'])
    expect(typedNumber(odd)).toBeNull();
});
