import { describe, expect, test } from 'vitest';
import { depthOrder, type OrderedCast } from './depth-order';

const outline = {
  shore: [
    { xM: 0, yM: 0 },
    { xM: 100, yM: 0 },
    { xM: 100, yM: 100 },
    { xM: 0, yM: 100 },
  ],
  islands: [],
};
/** Readings due north from a peg in the middle of the south bank: how far out, and how deep. */
const line = (
  readings: readonly (readonly [rangeM: number, depthM: number])[],
  bearingDeg = 0,
): OrderedCast[] =>
  readings.map(([rangeM, depthM], i) => ({
    id: `${bearingDeg}-${i}`,
    label: `cast ${i + 1}`,
    xM: 50,
    yM: rangeM,
    depthM,
    depthSigmaM: 0.1,
    line: { pegId: 'p', bearingDeg, rangeM },
  }));
const words = (casts: OrderedCast[]) => depthOrder(outline, casts).map((finding) => finding.words);

describe('readings along a line', () => {
  test('of a shelf, a bar and a gully are plausible', () => {
    expect(
      words(
        line([
          [4, 0.9],
          [10, 2.2],
          [18, 1.4],
          [26, 3.8],
          [40, 3.1],
        ]),
      ),
    ).toEqual([]);
  });

  test('deeper at the bank than a bed can stand are named', () => {
    expect(words(line([[3, 4.2]]))).toEqual(['cast 1, 4.2 m deep only 3.0 m from the bank']);
  });

  test('that drop faster than a bed can stand are named, both of them', () => {
    const found = depthOrder(
      outline,
      line([
        [6, 1],
        [9, 5],
      ]),
    );
    expect(found).toEqual([{ id: '0-0 0-1', words: 'cast 1 and cast 2, 4.0 m deeper in 3.0 m' }]);
  });

  test('written down from the far end are told once', () => {
    expect(
      words(
        line([
          [5, 3.9],
          [15, 2.6],
          [30, 1.2],
        ]),
      ),
    ).toEqual(['cast 1 to cast 3, deepest at the bank and shallower all the way out']);
    expect(
      words(
        line([
          [20, 3.9],
          [30, 2.6],
          [45, 1.2],
        ]),
      ),
    ).toEqual([]); // the near water was not read
  });

  test('either side of north are one line', () => {
    const [near] = line([[6, 1]], 359);
    const [far] = line([[9, 5]], 1);
    expect(depthOrder(outline, [near!, far!]).map(({ id }) => id)).toEqual(['359-0 1-0']);
  });

  test('within their own error are left alone', () => {
    const doubtful = line([
      [6, 1],
      [9, 4.5],
    ]).map((cast) => ({ ...cast, depthSigmaM: 0.5 }));
    expect(words(doubtful)).toEqual([]);
  });

  test('without a depth say nothing', () => {
    expect(words([{ ...line([[3, 4]])[0]!, depthM: null }])).toEqual([]);
  });
});
