import { expect, test } from 'vitest';
import { lettersFault } from './letters';

test.each([
  ['letters of any script', 'Čapí rybník, בריכה, 鲤鱼池'],
  ['a pictograph joined of several', '🎣 👨\u200D👩\u200D👧'],
  ['a reading mark that Hebrew needs', 'בריכה\u200F 7'],
  ['lines and tabs', 'first\r\nsecond\tthird'],
])('%s can be kept', (_name, words) => {
  expect(lettersFault(words)).toBeNull();
});

test.each([
  ['nought', 'Peg\u0000 7', /no letter/],
  ['a bell', 'Peg\u0007', /no letter/],
  ['a sign of the second set', 'Peg\u0085', /no letter/],
  ['the first half of a letter', 'Peg \uD83C', /broken in two/],
  ['the second half of a letter', '\uDFA3 Peg', /broken in two/],
  ['an order to read the other way', 'Peg \u202E7', /nobody can see/],
  ['a space without width', 'Jo\u200Ban', /nobody can see/],
])('%s is told', (_name, words, told) => {
  expect(lettersFault(words)).toMatch(told);
});
