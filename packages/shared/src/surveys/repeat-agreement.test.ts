import { expect, test } from 'vitest';
import { repeatAgreement, type ReadCast } from './repeat-agreement';

const cast = (wishes: Partial<ReadCast>): ReadCast => ({
  lineId: 'a',
  xM: 0,
  yM: 0,
  depthM: 2,
  sigmaM: 0.1,
  bottom: 'gravel',
  ...wishes,
});

test('casts of different throws within two metres are held against one another', () => {
  const agreement = repeatAgreement([
    cast({}),
    cast({ lineId: 'b', xM: 1.2, yM: 1.2, depthM: 2.2 }), // 1.7 m away
    cast({ lineId: 'c', xM: 1.2, yM: -1.8, depthM: 4 }), // 2.2 m from the first, 3 m from the second
    cast({ lineId: 'a', xM: 0.5, depthM: 3 }), // the same throw as the first, 1.4 m from the second
  ]);
  expect(agreement.pairs).toBe(3); // first–second, second–fourth, third–fourth (1.9 m)
  expect(agreement.meanDifferenceM).toBeCloseTo((0.2 + 0.8 + 1) / 3, 12);
  expect(agreement.withinShare).toBeCloseTo(1 / 3, 12); // 0.2 ≤ 1.96 · 0.141
});

test('bottoms agree among the pairs that both called one', () => {
  const agreement = repeatAgreement([
    cast({}),
    cast({ lineId: 'b', bottom: 'clay' }),
    cast({ lineId: 'c', bottom: 'unknown' }),
    cast({ lineId: 'd' }),
  ]);
  expect(agreement).toMatchObject({ pairs: 6, bottomPairs: 3 });
  expect(agreement.bottomShare).toBeCloseTo(1 / 3, 12);
});

test('without repeats there is nothing to say', () => {
  expect(repeatAgreement([cast({})])).toEqual({
    pairs: 0,
    meanDifferenceM: null,
    withinShare: null,
    bottomPairs: 0,
    bottomShare: null,
  });
});
