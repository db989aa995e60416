import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { leaveOneOut } from './cross-validation';
import { krige } from './kriging';
import { predictGlobal, predictValues, solveGlobal } from './kriging-global';
import { krigeNeighbourhood } from './kriging-neighbourhood';
import { predictByTable } from './kriging-table';
import type { KrigingSetup } from './kriging-setup';
import { samplePoints } from './sample-points';
import { VARIOGRAM_MODELS } from './variogram';
import type { Variogram } from './variogram';

const metres = (span: number) => fc.double({ min: -span, max: span, noNaN: true });
const sample = fc.tuple(metres(40), metres(40), metres(3), fc.constantFrom(0.0004, 0.01, 0.04));
const samples = fc.uniqueArray(sample, {
  minLength: 6,
  maxLength: 30,
  // Distinct places, a decimetre apart at least.
  selector: ([x, y]) => `${Math.round(x * 10)} ${Math.round(y * 10)}`,
});
const variogram: fc.Arbitrary<Variogram> = fc.record({
  model: fc.constantFrom(...VARIOGRAM_MODELS),
  nuggetM2: fc.constantFrom(0.01, 0.1),
  partialSillM2: fc.constantFrom(0.5, 2),
  rangeM: fc.constantFrom(5, 20, 60),
});
const targets = { xM: Float64Array.of(0, 7, -30, 55), yM: Float64Array.of(0, -12, 20, 55) };

describe('kriging', () => {
  test('adding a sounding never raises the variance', () => {
    fc.assert(
      fc.property(
        samples,
        variogram,
        fc.constantFrom('field' as const, 'noise' as const),
        (rows, model, nuggetIs) => {
          const before = krige({ samples: samplePoints(rows.slice(1)), variogram: model, nuggetIs }, targets);
          const after = krige({ samples: samplePoints(rows), variogram: model, nuggetIs }, targets);
          after.varianceM2.forEach((variance, t) =>
            expect(variance).toBeLessThan(before.varianceM2[t]! + 1e-7),
          );
        },
      ),
    );
  });

  test('moving and turning the samples and the targets together changes nothing', () => {
    fc.assert(
      fc.property(samples, variogram, metres(3), metres(500), (rows, model, angle, shift) => {
        const turn = (x: number, y: number): [number, number] => [
          x * Math.cos(angle) - y * Math.sin(angle) + shift,
          x * Math.sin(angle) + y * Math.cos(angle) - 2 * shift,
        ];
        const turned = rows.map(([x, y, z, e]) => [...turn(x, y), z, e]);
        const places = [...targets.xM.keys()].map((t) => turn(targets.xM[t]!, targets.yM[t]!));
        const moved = {
          xM: Float64Array.from(places, (p) => p[0]),
          yM: Float64Array.from(places, (p) => p[1]),
        };
        const here = krige({ samples: samplePoints(rows), variogram: model, nuggetIs: 'noise' }, targets);
        const there = krige({ samples: samplePoints(turned), variogram: model, nuggetIs: 'noise' }, moved);
        here.valuesM.forEach((value, t) => expect(Math.abs(there.valuesM[t]! - value)).toBeLessThan(1e-6));
        here.varianceM2.forEach((v, t) => expect(Math.abs(there.varianceM2[t]! - v)).toBeLessThan(1e-6));
      }),
    );
  });

  test('a neighbourhood of every sample is the global solve, with and without drift; the table is near it', () => {
    fc.assert(
      fc.property(samples, variogram, fc.boolean(), (rows, model, withDrift) => {
        const points = samplePoints(rows);
        const drift = withDrift ? { driftM: points.xM.map((x) => Math.abs(x - 3)) } : {};
        const setup: KrigingSetup = { samples: points, variogram: model, nuggetIs: 'noise', ...drift };
        const places = withDrift ? { ...targets, driftM: targets.xM.map((x) => Math.abs(x - 3)) } : targets;
        const all = predictGlobal(solveGlobal(setup), places);
        const near = krigeNeighbourhood(setup, places, { neighbours: rows.length });
        all.valuesM.forEach((value, t) => expect(Math.abs(near.valuesM[t]! - value)).toBeLessThan(1e-6));
        all.varianceM2.forEach((v, t) => expect(Math.abs(near.varianceM2[t]! - v)).toBeLessThan(1e-6));
        const solved = solveGlobal(setup);
        expect([...predictValues(solved, places)]).toEqual([...all.valuesM]);
        predictByTable(solved, places).forEach((v, t) =>
          // a drift carried far beyond its samples can come out in hundreds of metres: so a share of the value
          expect(Math.abs(v - all.valuesM[t]!)).toBeLessThan(2e-4 * Math.max(1, Math.abs(all.valuesM[t]!))),
        );
      }),
    );
  });

  test('a smaller neighbourhood never states less variance than all samples', () => {
    fc.assert(
      fc.property(samples, variogram, (rows, model) => {
        const setup: KrigingSetup = { samples: samplePoints(rows), variogram: model, nuggetIs: 'noise' };
        const all = predictGlobal(solveGlobal(setup), targets);
        const near = krigeNeighbourhood(setup, targets, { neighbours: 5 });
        near.varianceM2.forEach((v, t) => expect(v).toBeGreaterThan(all.varianceM2[t]! - 1e-7));
      }),
    );
  });

  test('leave-one-out in closed form is what leaving each out gives', () => {
    fc.assert(
      fc.property(samples, variogram, fc.boolean(), (rows, model, withDrift) => {
        const points = samplePoints(rows);
        // A drift that differs at every sample: one that only the left-out sample has can't be told without it.
        const drift = withDrift ? { driftM: points.yM.map((y, i) => Math.abs(y) + i) } : {};
        const setup: KrigingSetup = { samples: points, variogram: model, nuggetIs: 'noise', ...drift };
        const closed = leaveOneOut(setup);
        const each = leaveOneOut(setup, rows.length - 1);
        closed.residualM.forEach((r, i) => expect(Math.abs(each.residualM[i]! - r)).toBeLessThan(1e-6));
        closed.varianceM2.forEach((v, i) => expect(Math.abs(each.varianceM2[i]! - v)).toBeLessThan(1e-6));
      }),
    );
  });

  test('the error of a sample keeps it from being honoured exactly, and the more the larger it is', () => {
    const at = { xM: Float64Array.of(0), yM: Float64Array.of(0) };
    const pull = (errorVariance: number) => {
      const rows = [
        [0, 0, 3, errorVariance],
        [10, 0, 1, 0],
        [-10, 0, 1, 0],
        [0, 10, 1, 0],
      ];
      const model: Variogram = { model: 'exponential', nuggetM2: 0, partialSillM2: 1, rangeM: 10 };
      return krige({ samples: samplePoints(rows), variogram: model, nuggetIs: 'noise' }, at).valuesM[0]!;
    };
    expect(pull(0)).toBeCloseTo(3, 9);
    expect(pull(0.1)).toBeLessThan(2.95);
    expect(pull(0.5)).toBeLessThan(pull(0.1));
  });
});
