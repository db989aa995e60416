import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { bottomMap, UNKNOWN_CLASS, type BottomEvidence } from './bottom-map';
import { castKernel } from './cast-kernel';

const frame = { columns: 9, rows: 9, cellM: 2, originM: { xM: 0, yM: 0 } };
const nodes = { frame, nodes: Int32Array.from({ length: 81 }, (_, i) => i) };
const metres = (min: number, max: number) => fc.double({ min, max, noNaN: true });
const CLASSES = 3;

const shares = fc
  .array(metres(0.01, 1), { minLength: CLASSES, maxLength: CLASSES })
  .map((raw) => raw.map((share) => share / raw.reduce((sum, each) => sum + each, 0)));
const spread = fc
  .tuple(metres(0.1, 3), metres(0.1, 3), metres(-0.9, 0.9))
  .map(([a, b, r]) => ({ xx: a * a, xy: r * a * b, yy: b * b }));
const cast: fc.Arbitrary<BottomEvidence> = fc.record(
  {
    xM: metres(0, 16),
    yM: metres(0, 16),
    shares,
    spread,
    track: fc.record({ xM: metres(-3, 3), yM: metres(-3, 3) }),
    worthCasts: metres(0.1, 10),
  },
  { requiredKeys: ['xM', 'yM', 'shares'] },
);

describe('the bottom map, whatever was felt', () => {
  test('is a probability of at most one, and at least the least that is told', () => {
    fc.assert(
      fc.property(fc.array(cast, { maxLength: 8 }), metres(1, 8), (casts, bandwidthM) => {
        const map = bottomMap(casts, nodes, bandwidthM);
        for (const node of nodes.nodes) {
          const confidence = map.confidence[node]!;
          if (map.classes[node] === UNKNOWN_CLASS) expect(confidence).toBe(0);
          else {
            expect(confidence).toBeGreaterThanOrEqual(0.4);
            expect(confidence).toBeLessThan(1);
          }
        }
      }),
      { numRuns: 60 },
    );
  });

  test('more evidence for the class that is told never makes it less likely', () => {
    fc.assert(
      fc.property(
        fc.array(cast, { minLength: 1, maxLength: 6 }),
        cast,
        metres(1, 8),
        (casts, more, bandwidthM) => {
          const before = bottomMap(casts, nodes, bandwidthM);
          for (let kind = 0; kind < CLASSES; kind++) {
            const certain = {
              ...more,
              shares: Array.from({ length: CLASSES }, (_, c) => (c === kind ? 1 : 0)),
            };
            const after = bottomMap([...casts, certain], nodes, bandwidthM);
            for (const node of nodes.nodes) {
              if (before.classes[node] !== kind) continue;
              expect(after.classes[node]).toBe(kind);
              expect(after.confidence[node]!).toBeGreaterThanOrEqual(before.confidence[node]! - 1e-9);
            }
          }
        },
      ),
      { numRuns: 40 },
    );
  });
});

describe('one cast', () => {
  test('weighs at most one anywhere, less where it is placed badly, and no more for a long drag', () => {
    fc.assert(
      fc.property(spread, metres(1, 8), metres(-20, 20), metres(-20, 20), (doubt, bandwidthM, dx, dy) => {
        const at = { xM: 0, yM: 0 };
        const sure = castKernel(at, { bandwidthM, reach: 3 });
        const blurred = castKernel({ ...at, spread: doubt }, { bandwidthM, reach: 3 });
        const drawn = castKernel({ ...at, track: { xM: 4, yM: -2 } }, { bandwidthM, reach: 3 });
        expect(blurred.weightAt(0, 0)).toBeLessThan(sure.weightAt(0, 0));
        for (const kernel of [sure, blurred, drawn]) {
          const weight = kernel.weightAt(dx, dy);
          expect(weight).toBeGreaterThanOrEqual(0);
          expect(weight).toBeLessThanOrEqual(1 + 1e-6);
        }
      }),
    );
  });

  test('a drag weighs the same from either end of it, and most along it', () => {
    const drawn = castKernel({ xM: 0, yM: 0, track: { xM: 6, yM: 0 } }, { bandwidthM: 2, reach: 3 });
    expect(drawn.weightAt(0, 0)).toBeCloseTo(drawn.weightAt(6, 0), 6);
    expect(drawn.weightAt(3, 0)).toBeGreaterThan(drawn.weightAt(0, 0));
    expect(drawn.weightAt(3, 0)).toBeGreaterThan(drawn.weightAt(3, 2));
  });
});
