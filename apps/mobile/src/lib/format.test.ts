import { expect, test } from 'vitest';
import { area, figure, length, lengthWithin, money, percent, sticks, wraps } from './format';

const plain = (text: string): string => text.replaceAll('\u00A0', ' ');
const m = { length: 'm' } as const;
const ft = { length: 'ft' } as const;

test('a length is said in the reader’s unit, with the unit on the same line', () => {
  expect(length(2.4, m)).toBe('2.4\u00A0m');
  expect(plain(length(2.4, ft))).toBe('7.9 ft');
  expect(plain(lengthWithin(2.4, 0.2, m))).toBe('2.4 ± 0.2 m');
});

test('a negative figure has a true minus, and nothing is never negative', () => {
  expect(figure(-0.24, 2)).toBe('−0.24');
  expect(figure(-0.001, 2)).toBe('0.00');
  expect(figure(12345.6, 1)).toBe('12,345.6');
});

test('areas are hectares or acres, small ones square metres', () => {
  expect(plain(area(64_000, m))).toBe('6.4 ha');
  expect(plain(area(64_000, ft))).toBe('15.8 acres');
  expect(plain(area(640, m))).toBe('640 m²');
});

test('sticks are named as they are sold', () => {
  expect(plain(sticks(3.6576))).toBe('12 ft sticks');
  expect(plain(sticks(3.048))).toBe('10 ft sticks');
  expect(plain(sticks(2))).toBe('2.00 m sticks');
});

test('line is counted in wraps of stated sticks', () => {
  expect(plain(wraps(14 * 3.6576, 3.6576, m))).toMatch(/^14/);
  expect(plain(wraps(25, 3.048, m))).toContain('0.62 m');
});

test('shares and money are said in full', () => {
  expect(plain(percent(0.837))).toBe('84 %');
  expect(money(1250)).toBe('£12.50');
});
