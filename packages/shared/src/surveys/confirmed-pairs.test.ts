import { describe, expect, test } from 'vitest';
import type { BottomEnding } from './bottom-ending';
import { confirmedPairs, pairReachM, type ConfirmedPlace, type FeltCast } from './confirmed-pairs';

const feels = { drop: 'dull', drag: 'smooth_skim', cameBack: null, smell: null } as const;
const place = (wishes: Partial<ConfirmedPlace> = {}): ConfirmedPlace => ({
  id: 'p',
  castId: null,
  xM: 0,
  yM: 0,
  sigmaM: 0.5,
  substrate: 'clay',
  cover: 'clear',
  method: 'grab',
  day: '2027-04-03',
  ...wishes,
});
const cast = (wishes: Partial<FeltCast> = {}): FeltCast => ({
  id: 'c',
  xM: 1,
  yM: 0,
  sigmaM: 0.5,
  day: '2027-04-03',
  feels,
  ...wishes,
});
const counts = (
  places: ConfirmedPlace[],
  casts: FeltCast[],
  endings: BottomEnding[] = [],
): [number, number] => {
  const pairs = confirmedPairs(places, casts, endings);
  return [pairs.substrate.length, pairs.cover.length];
};

describe('casts over confirmed bottoms', () => {
  test('are those within two metres, or within one σ of both places when that is more', () => {
    expect(counts([place()], [cast({ xM: 2 }), cast({ id: 'd', xM: 2.1 })])).toEqual([1, 1]);
    expect(counts([place({ sigmaM: 3 })], [cast({ xM: 4.9, sigmaM: 4 })])).toEqual([1, 1]);
    expect(pairReachM(20, 20)).toBe(6);
  });

  test('go to the nearest place, and count once each', () => {
    const near = place({ id: 'q', xM: 0.8, substrate: 'gravel' });
    const { substrate } = confirmedPairs([place(), near], [cast()], []);
    expect(substrate).toEqual([{ bottom: 'gravel', feels }]);
  });

  test('take the very cast wherever it is reduced to since', () => {
    expect(counts([place({ castId: 'c' })], [cast({ xM: 50 })])).toEqual([1, 1]);
  });

  test('teach of what lies there for two months, of the bottom for two years', () => {
    expect(counts([place()], [cast({ day: '2027-06-02' })])).toEqual([1, 1]);
    expect(counts([place()], [cast({ day: '2027-06-03' })])).toEqual([1, 0]);
    expect(counts([place()], [cast({ day: '2029-04-03' })])).toEqual([0, 0]);
  });

  test('don’t count across an event, either way round', () => {
    const cut: BottomEnding = {
      id: 'e',
      kind: 'weed_cut',
      area: null,
      happenedOn: '2027-04-10',
      ends: ['cover'],
    };
    expect(counts([place()], [cast({ day: '2027-04-20' })], [cut])).toEqual([1, 0]);
    expect(counts([place({ day: '2027-04-20' })], [cast()], [cut])).toEqual([1, 0]);
    expect(counts([place()], [cast({ day: '2027-04-09' })], [cut])).toEqual([1, 1]);
  });

  test('say nothing of what was not seen', () => {
    expect(counts([place({ cover: null })], [cast()])).toEqual([1, 0]);
  });
});
