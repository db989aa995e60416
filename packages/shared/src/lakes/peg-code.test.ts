import { expect, test } from 'vitest';
import { PEG_CODE_LETTERS, readPegCode } from './peg-code';

test('a code is read in any letters, with spaces or dashes', () => {
  expect(readPegCode(' k7m-3xd ')).toBe('K7M3XD');
  expect(readPegCode('K7M3XD')).toBe('K7M3XD');
});

test.each(['', 'K7M3X', 'K7M3XDD', 'K7M3XO', 'K7M31D', '../../', 'K7M3XÐ'])('%s is no code', (typed) => {
  expect(readPegCode(typed)).toBeNull();
});

test('no two letters of a code look alike', () => {
  for (const pair of ['0O', '1I', '1L', '2Z', '5S', '8B', 'UV'])
    expect([...pair].filter((letter) => PEG_CODE_LETTERS.includes(letter)).length).toBeLessThan(2);
  expect(new Set(PEG_CODE_LETTERS).size).toBe(PEG_CODE_LETTERS.length);
});
