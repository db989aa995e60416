import { describe, expect, test } from 'vitest';
import { arcCells, arcCoverage, type Landed, type PegArc } from './peg-arc';

const arc = (wishes: Partial<PegArc> = {}): PegArc => ({
  arcFromDeg: 330,
  arcToDeg: 30,
  longestCastM: 60,
  lineAWrapM: 3.6576,
  isWater: () => true,
  ...wishes,
});
const cast = (bearingDeg: number, rangeM: number, lineId = `${bearingDeg} ${rangeM}`): Landed => ({
  bearingDeg,
  rangeM,
  lineId,
});

describe('a peg’s arc', () => {
  test('is split in ten-degree sectors by two-wrap rings out to the longest cast', () => {
    const cells = arcCells(arc(), []);
    expect(cells).toHaveLength(6 * 7); // rings from 7.3 m: the eighth's middle lies past 60 m
    expect(cells[0]).toMatchObject({ fromDeg: 330, toDeg: 340, casts: 0 });
    expect(cells[0]?.fromM).toBeCloseTo(7.3152, 10);
  });

  test('leaves out cells that are not on water', () => {
    const near = arc({ isWater: ({ rangeM }) => rangeM < 20 });
    expect(arcCells(near, [])).toHaveLength(6 * 2);
  });

  test('counts casts in their cells, over north too', () => {
    const cells = arcCells(arc(), [cast(359, 30), cast(2, 30), cast(2, 31), cast(90, 30), cast(0, 3)]);
    const hit = cells.filter(({ casts }) => casts > 0);
    expect(hit.map(({ fromDeg, casts }) => [fromDeg, casts])).toEqual([
      [350, 1],
      [0, 2],
    ]);
  });

  test('one cast a cell covers it all, none covers nothing', () => {
    const all = arcCells(arc(), []).map(({ fromDeg, fromM }) => cast(fromDeg + 5, fromM + 1));
    expect(arcCoverage(arc(), all)).toEqual({ share: 1, repeatsShare: 0 });
    expect(arcCoverage(arc(), [])).toEqual({ share: 0, repeatsShare: 0 });
    expect(arcCoverage(arc({ isWater: () => false }), all).share).toBe(0);
  });

  test('a second throw to a place is a repeat, a reading closer in on the same throw is not', () => {
    const first = cast(10, 40, 'a');
    expect(arcCoverage(arc(), [first, cast(11, 40.5, 'b')]).repeatsShare).toBe(0.5);
    expect(arcCoverage(arc(), [first, cast(10, 38.5, 'a')]).repeatsShare).toBe(0);
    expect(arcCoverage(arc(), [first, cast(14, 40, 'b')]).repeatsShare).toBe(0);
  });
});
