import { expect, test } from 'vitest';
import { standing } from './outbox-words';

const NOTHING = { waiting: 0, refused: 0, others: 0, locked: 0, noSignal: false, lastSent: '' };
const wordsOf = (facts: Partial<typeof NOTHING>) => standing({ ...NOTHING, ...facts })?.words ?? null;

test.each([
  [{}, null],
  [{ waiting: 3, lastSent: '21:20' }, '3 waiting · last sent 21:20'],
  [{ lastSent: '21:20' }, 'All sent 21:20'],
  [{ waiting: 3, noSignal: true }, 'No signal · 3 waiting'],
  [{ noSignal: true, lastSent: '21:20' }, 'No signal · all sent 21:20'],
  [{ waiting: 2, refused: 1, lastSent: '21:20' }, '1 refused · 2 waiting · last sent 21:20'],
  [{ locked: 2, waiting: 1 }, '3 waiting'],
  [{ others: 3 }, '3 things of another person wait on this phone'],
  [{ others: 1, waiting: 1 }, '1 waiting · 1 thing of another person waits on this phone'],
])('%o is told as %s', (facts, words) => {
  expect(wordsOf(facts)).toBe(words);
});
