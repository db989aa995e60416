import fc from 'fast-check';
import { expect, test } from 'vitest';
import { NearestSet } from './nearest-set';
import { indexSamples, NearestSearch } from './sample-index';

const coordinates = (count: { minLength: number; maxLength: number }) =>
  fc.array(fc.tuple(fc.integer({ min: 0, max: 40 }), fc.double({ min: 0, max: 40, noNaN: true })), count);

test('whatever way is walked, the set holds the nearest, ties by number', () => {
  fc.assert(
    fc.property(
      coordinates({ minLength: 1, maxLength: 120 }),
      coordinates({ minLength: 1, maxLength: 30 }),
      fc.integer({ min: 1, max: 30 }),
      (samples, way, wanted) => {
        const index = indexSamples(
          Float64Array.from(samples, ([x]) => x),
          Float64Array.from(samples, ([x, y]) => (x % 3 === 0 ? Math.round(y) : y)),
        );
        const count = Math.min(wanted, samples.length);
        const set = new NearestSet(index, count);
        const search = new NearestSearch(index, count);
        let [atX, atY] = [20, 20];
        for (const [x, y] of way) {
          // Small steps and long ones, some beyond the samples.
          const far = x % 4 === 0 ? 1.5 : 0.05;
          atX += far * (x - 20);
          atY += far * (Math.round(y) - 20);
          set.find(atX, atY);
          search.find(atX, atY);
          expect([...set.ids.subarray(0, set.found)].sort()).toEqual(
            [...search.ids.subarray(0, search.found)].sort(),
          );
        }
      },
    ),
  );
});

test('what is left out of one search is in again for the next', () => {
  const index = indexSamples(Float64Array.of(0, 1, 2, 3), Float64Array.of(0, 0, 0, 0));
  const set = new NearestSet(index, 2);
  set.without = 0;
  set.find(0, 0);
  expect([...set.ids].sort()).toEqual([1, 2]);
  set.without = -1;
  set.find(0.1, 0);
  expect([...set.ids].sort()).toEqual([0, 1]);
});
