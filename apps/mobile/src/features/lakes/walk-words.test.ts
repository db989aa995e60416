import { NEW_WALK, withFix } from '@mereward/shared/lakes/shore-walk';
import { expect, test } from 'vitest';
import { gapWords, leftOutWords, ringWords, surenessWords } from './walk-words';

const METRES = { length: 'm' as const, stickSpacingM: 3.6576 };
const at = (lat: number, atMs: number, accuracyM = 4.9) => ({ lon: -1.1, lat, accuracyM, atMs });
const walk = [at(52, 0), at(52.00005, 4000), at(52.0005, 120_000)].reduce(withFix, NEW_WALK);

test('nothing is told of a walk without faults', () => {
  expect(leftOutWords(NEW_WALK, METRES)).toBeNull();
  expect(gapWords(NEW_WALK, METRES)).toBeNull();
  expect(surenessWords(NEW_WALK, METRES)).toBeNull();
});

test('what was left out is told with its reasons', () => {
  expect(leftOutWords({ left: { poor: 2, jumped: 1, unreadable: 0 } }, METRES)).toBe(
    '3 fixes left out: 2 poorer than 15\u00A0m, 1 too far off to have been walked to.',
  );
  expect(leftOutWords({ left: { poor: 0, jumped: 0, unreadable: 1 } }, METRES)).toBe(
    '1 fix left out: 1 that could not be read.',
  );
});

test('a stretch nobody walked is told with its length', () => {
  expect(gapWords(walk, METRES)).toMatch(/^1 stretch not walked, 50\u00A0m in all/);
});

test('the radius of 19 of 20 is told beside its σ', () => {
  // 4.9 m is what phones reach under an open sky (95 %); 4.9 / 2.4477 = 2.0.
  expect(surenessWords(walk, METRES)).toMatch(
    /within 4\.9\u00A0m in 19 of 20 cases \(σ 2\.0\u00A0m each way\)/,
  );
});

test('a ring that was closed tells what was done to it', () => {
  expect(ringWords({ places: [[0, 0]], loops: 0, overlapM: 0, closingM: 1 }, METRES)).toBe(
    '1 point, none of the walk more than 1\u00A0m from the line between them.',
  );
  const all = ringWords(
    {
      places: [
        [0, 0],
        [1, 1],
      ],
      loops: 2,
      overlapM: 14,
      closingM: 23,
    },
    METRES,
  );
  expect(all).toMatch(/last 23\u00A0m back to the start were not walked/);
  expect(all).toMatch(/14\u00A0m walked twice/);
  expect(all).toMatch(/2 small loops were cut off/);
});
