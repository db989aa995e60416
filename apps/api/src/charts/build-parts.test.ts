import { partsOf, doPartsHere } from '@mereward/shared/charts/surface-parts';
import type { KrigingSetup } from '@mereward/shared/charts/kriging-setup';
import { expect, test } from 'vitest';
import { doPartsByTwo } from './build-parts';

const COUNT = 2100; // samples: enough for a second thread

function setupOf(errorVarianceM2: number, place: (i: number) => [number, number]): KrigingSetup {
  const places = Array.from({ length: COUNT }, (_, i) => place(i));
  const xM = Float64Array.from(places, ([x]) => x);
  return {
    samples: {
      xM,
      yM: Float64Array.from(places, ([, y]) => y),
      valueM: xM.map((x) => 2 + Math.sin(x / 7)),
      errorVarianceM2: new Float64Array(COUNT).fill(errorVarianceM2),
    },
    variogram: { model: 'matern32', nuggetM2: 0, partialSillM2: 1, rangeM: 9 },
    nuggetIs: 'noise',
  };
}

const targets = {
  xM: Float64Array.from({ length: 34_000 }, (_, i) => (i % 170) / 2.5),
  yM: Float64Array.from({ length: 34_000 }, (_, i) => Math.floor(i / 170) / 5),
};

test.each(['variance', 'depth'] as const)(
  'two threads make the same %s as one, to the last bit',
  (wanted) => {
    const scattered = setupOf(0.01, (i) => [(i * 37.77) % 68, (i * 0.618_034 * 40) % 40]);
    const parts = partsOf(wanted, scattered, targets);
    expect(parts).toHaveLength(3);
    const told: number[] = [];
    const byTwo = doPartsByTwo(parts, (share) => told.push(share));
    expect(byTwo.buffer).toBeInstanceOf(SharedArrayBuffer);
    expect(Buffer.from(byTwo.buffer).equals(Buffer.from(doPartsHere(parts, () => undefined).buffer))).toBe(
      true,
    );
    expect(told.at(-1)).toBe(1);
    expect([...told].sort((a, b) => a - b)).toEqual(told);
  },
);

test('what can’t be kriged is refused in the same words by two threads as by one', () => {
  const broken = setupOf(Number.NaN, (i) => [i % 60, Math.floor(i / 60)]);
  const parts = partsOf('depth', broken, targets);
  expect(() => doPartsByTwo(parts, () => undefined)).toThrow('Samples at one place with no error stated');
});
