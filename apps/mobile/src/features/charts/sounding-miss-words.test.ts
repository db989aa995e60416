import { expect, test } from 'vitest';
import { castPlaceWords, castTitle, outByWords } from './sounding-miss-words';

const METRES = { length: 'm' } as const;

test('a cast is called by its number and its peg', () => {
  expect(castTitle({ castNumber: 12, pegNumber: '7' })).toBe('Cast 12, peg 7');
  expect(castTitle({ castNumber: 3, pegNumber: null })).toBe('Cast 3, a peg that is gone');
});

test('its place is told from its peg', () => {
  expect(castPlaceWords({ rangeM: 42.13, bearingDeg: 359.7 }, METRES)).toBe('42.1\u00A0m of line on 0° true');
});

test('a cast that read more than its neighbours foretell is deeper', () => {
  expect(outByWords({ errorM: -0.84 }, METRES)).toBe('0.84\u00A0m deeper');
  expect(outByWords({ errorM: 0.3 }, METRES)).toBe('0.30\u00A0m shallower');
});
