import { expect, test } from 'vitest';
import { columnWord, mappedTo } from './column-words';

test('one column is given to another of the file, and the others stay', () => {
  expect(mappedTo({ peg: 0, wraps_whole: 2 }, 'wraps_whole', 5)).toEqual({ peg: 0, wraps_whole: 5 });
});

test('a column given to none is left out of the mapping', () => {
  expect(mappedTo({ peg: 0, note: 3 }, 'note', null)).toEqual({ peg: 0 });
});

test('an error’s column is told in our words, and a strange one as it is', () => {
  expect(columnWord('wraps_whole')).toBe('Whole wraps');
  expect(columnWord('')).toBe('');
});
