import fc from 'fast-check';
import { expect, test } from 'vitest';
import { fadedCover, monthsSince } from './bottom-fading';
import { USUAL_FADE_MONTHS } from './usual-feel';

const seen = { clear: 0.2, low_weed: 0.3, tall_weed: 0.1, leaf_litter: 0.3, snag: 0.1 };

test('weed and litter halve every half-life; clear water and snags stand', () => {
  const faded = fadedCover(seen, { low_weed: 4, tall_weed: 2, leaf_litter: 8 }, 8);
  expect(faded).toEqual({ clear: 0.2, low_weed: 0.075, tall_weed: 0.1 / 16, leaf_litter: 0.15, snag: 0.1 });
});

test('what fades goes to no other class', () => {
  fc.assert(
    fc.property(fc.double({ min: 0, max: 240, noNaN: true }), (months) => {
      const faded = fadedCover(seen, USUAL_FADE_MONTHS, months);
      expect(faded.clear).toBe(seen.clear);
      expect(faded.snag).toBe(seen.snag);
      for (const name of ['low_weed', 'tall_weed', 'leaf_litter'] as const)
        expect(faded[name]).toBeLessThanOrEqual(seen[name]);
    }),
  );
});

test('months are counted from day to day, and a day to come has not faded', () => {
  expect(monthsSince('2027-01-01', '2028-01-01')).toBeCloseTo(12, 1);
  expect(monthsSince('2027-01-01', '2027-01-16')).toBeCloseTo(0.5, 1);
  expect(monthsSince('2027-05-01', '2027-01-01')).toBe(0);
});
