import fc from 'fast-check';
import { expect, test } from 'vitest';
import { krigeNeighbourhood } from './kriging-neighbourhood';
import type { KrigingSetup, Prediction } from './kriging-setup';
import { samplePoints } from './sample-points';
import type { Targets } from './sample-points';
import { VARIOGRAM_MODELS } from './variogram';

function targetsOf(places: readonly (readonly [number, number])[], drift: boolean): Targets {
  const targets = {
    xM: Float64Array.from(places, ([x]) => x),
    yM: Float64Array.from(places, ([, y]) => y),
  };
  return drift ? { ...targets, driftM: Float64Array.from(places, ([x]) => x / 10) } : targets;
}

/** Each target by itself, so that nothing can be shared. */
function oneByOne(
  setup: KrigingSetup,
  places: readonly (readonly [number, number])[],
  krige: (targets: Targets) => Prediction,
): Prediction {
  const each = places.map((place) => krige(targetsOf([place], setup.driftM !== undefined)));
  return {
    valuesM: Float64Array.from(each, ({ valuesM }) => valuesM[0]!),
    varianceM2: Float64Array.from(each, ({ varianceM2 }) => varianceM2[0]!),
  };
}

const place = fc.tuple(fc.integer({ min: 0, max: 60 }), fc.integer({ min: 0, max: 60 }));

test('targets kriged together get what each gets alone', () => {
  fc.assert(
    fc.property(
      fc.record({
        samples: fc.uniqueArray(place, { minLength: 3, maxLength: 60, selector: ([x, y]) => `${x},${y}` }),
        model: fc.constantFrom(...VARIOGRAM_MODELS),
        nuggetIs: fc.constantFrom('field' as const, 'noise' as const),
        drift: fc.boolean(),
        by: fc.constantFrom('nearest' as const, 'octant' as const),
        neighbours: fc.integer({ min: 1, max: 24 }),
        corner: place,
      }),
      ({ samples, model, nuggetIs, drift, by, neighbours, corner: [left, below] }) => {
        const points = samplePoints(samples.map(([x, y]) => [x, y, Math.sin(x / 9) + y / 30, 0.01]));
        const setup: KrigingSetup = {
          samples: points,
          variogram: { model, nuggetM2: 0.02, partialSillM2: 1, rangeM: 12 },
          nuggetIs,
          ...(drift ? { driftM: points.xM.map((x) => x / 10) } : {}),
        };
        // Whole metres fall on samples, half metres do not.
        const places = Array.from(
          { length: 40 },
          (_, i) => [left + (i % 8) / 2, below + Math.floor(i / 8) / 2] as const,
        );
        const krige = (targets: Targets) => krigeNeighbourhood(setup, targets, { neighbours, by });
        const together = krige(targetsOf(places, drift));
        const alone = oneByOne(setup, places, krige);
        places.forEach((_, t) => {
          // Rounding of two orders of elimination; the systems' conditions stay under 10⁴.
          expect(together.valuesM[t]).toBeCloseTo(alone.valuesM[t]!, 9);
          expect(together.varianceM2[t]).toBeCloseTo(alone.varianceM2[t]!, 9);
        });
      },
    ),
  );
});

test('one place told twice with no error spoils its own neighbourhood alone', () => {
  const rows = Array.from({ length: 100 }, (_, i) => [i % 10, Math.floor(i / 10), Math.sin(i)]);
  const setup = (more: number[][]): KrigingSetup => ({
    samples: samplePoints([...rows, ...more]),
    variogram: { model: 'exponential', nuggetM2: 0, partialSillM2: 1, rangeM: 3 },
    nuggetIs: 'field',
  });
  const targets = targetsOf(
    Array.from({ length: 81 }, (_, i) => [(i % 9) + 0.4, Math.floor(i / 9) + 0.4] as const),
    false,
  );
  const plain = krigeNeighbourhood(setup([]), targets, { neighbours: 6 });
  const twice = krigeNeighbourhood(setup([[0, 0, Math.sin(0)]]), targets, { neighbours: 6 });
  expect(twice.valuesM.every(Number.isFinite)).toBe(true);
  expect(twice.valuesM[80]).toBeCloseTo(plain.valuesM[80]!, 12);
});
