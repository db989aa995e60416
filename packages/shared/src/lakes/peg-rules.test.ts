import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { isUnderLine } from './overhead-line';
import { arcWidthDeg, facingDeg, inArc, whyNotLet } from './peg-rules';

const line = (kind: 'none' | 'present' | 'unknown', distanceM: number | null) => ({
  kind,
  distanceM,
  heightM: null,
  operator: '',
  signFitted: false,
  fishing: 'restricted' as const,
});

describe('the arc of a peg', () => {
  test.each([
    [300, 60, 120, 0],
    [10, 90, 80, 50],
    [350, 20, 30, 5],
    [180, 90, 270, 315],
  ])('from %d° to %d° is %d° wide and faces %d°', (arcFromDeg, arcToDeg, width, facing) => {
    expect(arcWidthDeg({ arcFromDeg, arcToDeg })).toBe(width);
    expect(facingDeg({ arcFromDeg, arcToDeg })).toBe(facing);
  });

  test('holds its limits and its middle, and nothing beyond', () => {
    const arc = { arcFromDeg: 300, arcToDeg: 60 };
    expect([300, 0, 60, 299.9, 60.1, 180].map((b) => inArc(arc, b))).toEqual([
      true,
      true,
      true,
      false,
      false,
      false,
    ]);
  });

  test('turned by any angle holds the same bearings turned by it', () => {
    const bearing = fc.integer({ min: 0, max: 359 });
    fc.assert(
      fc.property(
        bearing,
        fc.integer({ min: 2, max: 358 }),
        fc.tuple(bearing, bearing),
        (from, width, [b, turn]) => {
          const arc = { arcFromDeg: from, arcToDeg: (from + width) % 360 };
          const turned = { arcFromDeg: (from + turn) % 360, arcToDeg: (from + width + turn) % 360 };
          expect(inArc(turned, (b + turn) % 360)).toBe(inArc(arc, b));
        },
      ),
    );
  });
});

describe('an overhead line', () => {
  test('nearer than 30 m, or not measured, counts as over the peg', () => {
    expect(isUnderLine(line('present', 29.9))).toBe(true);
    expect(isUnderLine(line('present', null))).toBe(true);
    expect(isUnderLine(line('present', 30))).toBe(false);
    expect(isUnderLine(line('none', 3))).toBe(false);
  });

  test('over the peg lets no ticket be written without an assessment on file', () => {
    const near = line('present', 20);
    expect(whyNotLet({ overheadLine: near })).toMatch(/no assessment is on file/);
    expect(whyNotLet({ overheadLine: { ...near, document: 'Assessed 3 March' } })).toBeNull();
    expect(whyNotLet({ overheadLine: line('present', 40) })).toBeNull();
    expect(whyNotLet({ overheadLine: { ...near, fishing: 'no_fishing', document: 'x' } })).toMatch(
      /No fishing/,
    );
  });
});
