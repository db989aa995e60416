import { expect, test } from 'vitest';
import { csvOf } from './csv';

test('cells are quoted where they must be, and numbers stay numbers', () => {
  expect(
    csvOf(
      ['Peg', 'Note'],
      [
        [7, 'by "the Point", left'],
        [8, 'two\nlines'],
        [9, null],
      ],
    ),
  ).toBe('\uFEFFPeg,Note\r\n7,"by ""the Point"", left"\r\n8,"two\nlines"\r\n9,\r\n');
});

test('words that a spreadsheet would run are kept words; a negative number is no such word', () => {
  expect(csvOf(['a'], [['=1+1'], ['@x'], ['-2'], [-2], [Number.NaN]])).toBe(
    "\uFEFFa\r\n'=1+1\r\n'@x\r\n'-2\r\n-2\r\n\r\n",
  );
});
