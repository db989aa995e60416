import type { SampleIndex } from './sample-index';
import { covariancesInPlace } from './variogram';
import type { Variogram } from './variogram';

/** Turns squared distances (m²) in the first `count` places of a buffer into covariances without nugget, in place. */
export type FillCovariances = (buffer: Float64Array, count: number) => void;

const ENTRIES = 16_384;
const REACH_SPACINGS = 12;
const REACH_RANGES = 2;
const WORTH_A_TABLE = 2000; // samples

/**
 * Covariances between near neighbours. Where there are thousands of samples the exponential, which is rough and so forgives
 * it, is read from a table by distance and joined by straight lines: faster than its exponential function, within 2e-9 of the
 * sill. Smooth models are always worked out, as their systems would amplify even that.
 */
export function localCovariances(variogram: Variogram, index: SampleIndex): FillCovariances {
  const exact: FillCovariances = (buffer, count) => covariancesInPlace(buffer, count, variogram);
  if (variogram.model !== 'exponential' || index.xM.length < WORTH_A_TABLE) return exact;
  const spacingM = Math.sqrt((index.columns * index.rows * index.bucketM ** 2) / index.xM.length);
  const perM = ENTRIES / Math.min(REACH_SPACINGS * spacingM, REACH_RANGES * variogram.rangeM);
  const table = Float64Array.from({ length: ENTRIES + 2 }, (_, entry) => (entry / perM) ** 2);
  covariancesInPlace(table, table.length, variogram);
  const { partialSillM2: sill, rangeM } = variogram;
  return (buffer, count) => {
    for (let i = 0; i < count; i++) {
      const at = Math.sqrt(buffer[i]!) * perM;
      if (at < ENTRIES) {
        const entry = at | 0;
        const low = table[entry]!;
        buffer[i] = low + (at - entry) * (table[entry + 1]! - low);
      } else buffer[i] = sill * Math.exp(-at / (perM * rangeM));
    }
  };
}
