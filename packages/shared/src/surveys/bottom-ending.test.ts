import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { endedBy, eventWords, type BottomEnding } from './bottom-ending';
import { EventEnds } from './bottom-event-contract';

const box = (xM: number, yM: number, sizeM: number) => ({
  shore: [
    { xM, yM },
    { xM: xM + sizeM, yM },
    { xM: xM + sizeM, yM: yM + sizeM },
    { xM, yM: yM + sizeM },
  ],
  islands: [],
});
const cut: BottomEnding = {
  id: 'a',
  kind: 'weed_cut',
  area: box(0, 0, 10),
  happenedOn: '2027-06-01',
  ends: ['cover'],
};
const inside = { xM: 5, yM: 5, day: '2027-05-01' };

describe('an event', () => {
  test('ends what it ends, of the days before it, inside its area', () => {
    expect(endedBy([cut], 'cover', inside)).toBe(cut);
    expect(endedBy([cut], 'substrate', inside)).toBeNull();
    expect(endedBy([cut], 'cover', { ...inside, xM: 11 })).toBeNull();
    expect(endedBy([cut], 'cover', { ...inside, day: '2027-06-01' })).toBeNull();
    expect(endedBy([cut], 'cover', { ...inside, day: '2027-07-01' })).toBeNull();
  });

  test('of the whole lake has no edge, and the latest that applies is named', () => {
    const flood: BottomEnding = { ...cut, id: 'b', kind: 'flood', area: null, happenedOn: '2027-08-01' };
    expect(endedBy([cut, flood], 'cover', { ...inside, xM: 1000 })).toBe(flood);
    expect(endedBy([flood, cut], 'cover', inside)).toBe(flood);
    expect(eventWords(flood)).toBe('The water was in flood on 1 Aug 2027');
    expect(eventWords(cut)).toBe('Weed was cut in part of the lake on 1 Jun 2027');
  });

  test('only ever takes evidence away, in its area and from before its day', () => {
    const day = fc.integer({ min: 1, max: 28 }).map((n) => `2027-06-${String(n).padStart(2, '0')}`);
    const metres = fc.double({ min: -50, max: 50, noNaN: true });
    const ending = fc.record({
      id: fc.uuid(),
      kind: fc.constant('other' as const),
      area: fc.option(fc.tuple(metres, metres, fc.double({ min: 1, max: 40, noNaN: true }))),
      happenedOn: day,
      ends: fc.subarray([...EventEnds.options], { minLength: 1 }),
    });
    fc.assert(
      fc.property(
        fc.array(ending, { maxLength: 4 }),
        ending,
        fc.record({ xM: metres, yM: metres, day }),
        fc.constantFrom(...EventEnds.options),
        (before, added, seen, what) => {
          const drawn = [...before, added].map((each) => ({
            ...each,
            area: each.area && box(...each.area),
          }));
          const last = drawn.at(-1);
          const without = endedBy(drawn.slice(0, -1), what, seen) !== null;
          const with_ = endedBy(drawn, what, seen) !== null;
          if (without) expect(with_).toBe(true); // another event never brings evidence back
          if (with_ && !without) {
            expect(last?.ends).toContain(what);
            expect(seen.day < added.happenedOn).toBe(true);
            const [xM, yM, sizeM] = added.area ?? [-1e6, -1e6, 2e6];
            expect(seen.xM >= xM && seen.xM <= xM + sizeM).toBe(true);
            expect(seen.yM >= yM && seen.yM <= yM + sizeM).toBe(true);
          }
        },
      ),
    );
  });
});
