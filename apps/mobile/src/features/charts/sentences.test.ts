import { expect, test } from 'vitest';
import { sentences, waterUnlessWarned } from './sentences';

test('each part ends with one full stop and is said once', () => {
  expect(sentences(['Mostly clay too', 'No steps.', '', 'No steps.'])).toBe('Mostly clay too. No steps.');
});

test('whose water it is is not said beside a warning that says it', () => {
  const words = 'In peg 8’s water.';
  expect(waterUnlessWarned(words, ['In peg 8’s water. Ask the fishery.'])).toEqual([]);
  expect(waterUnlessWarned(words, ['Farther than this peg casts.'])).toEqual([words]);
});
