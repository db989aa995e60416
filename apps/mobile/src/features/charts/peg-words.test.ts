import { expect, test } from 'vitest';
import { capital, pegTitle, sharedLetters } from './peg-words';

test('a map leaves out the letters that all pegs share, and no others', () => {
  expect(sharedLetters(['FO1', 'FO2', 'FO24'])).toBe('FO');
  expect(sharedLetters(['FO1', 'OP2'])).toBe('');
  expect(sharedLetters(['1', '2'])).toBe('');
  expect(sharedLetters(['FO1'])).toBe('');
  expect(sharedLetters(['A', 'A1'])).toBe('');
});

test('a peg is called by its number and its name', () => {
  expect(pegTitle({ number: 'FO7', name: 'The Point' })).toBe('Peg FO7, The Point');
  expect(pegTitle({ number: '3', name: '' })).toBe('Peg 3');
  expect(capital('clay')).toBe('Clay');
});
