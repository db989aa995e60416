import { expect, test } from 'vitest';
import { aimWords, countedWords, ownCountWords } from './spot-figures';

const oak = { code: 'M1', name: 'dead oak', offsetDeg: 0.2 };

test('an aim is told by its mark, with the angle beside it when there is one', () => {
  expect(aimWords({ mark: oak, bearingDeg: 41 })).toBe('over the dead oak');
  expect(aimWords({ mark: { ...oak, offsetDeg: -4.2 }, bearingDeg: 41 })).toBe('4° left of the dead oak');
  expect(aimWords({ mark: { ...oak, offsetDeg: 3 }, bearingDeg: 41 })).toBe('3° right of the dead oak');
  expect(aimWords({ mark: null, bearingDeg: 41.4 })).toBe('on 41° true');
});

test('a count is given on the reader’s own sticks', () => {
  const spot = { lineOutM: 14 * 3.6576 };
  expect(ownCountWords(spot, { length: 'm', stickSpacingM: 3.6576 })).toBe('14 wraps of 12 ft');
  expect(ownCountWords({ lineOutM: 25 }, { length: 'm', stickSpacingM: 3.048 })).toBe(
    '8 + 0.62 m wraps of 10 ft',
  );
  expect(countedWords({ wrapReference: 'lead_to_clip' })).toContain('clip');
});
