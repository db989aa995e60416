/**
 * Measured places of one surface, a place a row, all arrays of one length. Plane metres; `valueM` is the depth (or any
 * other measured quantity); `errorVarianceM2` the variance of each measurement's own error, 0 for an exact value.
 */
export type SamplePoints = {
  xM: Float64Array;
  yM: Float64Array;
  valueM: Float64Array;
  errorVarianceM2: Float64Array;
};

/** Places to predict at; `driftM` only where the kriging has an external drift. */
export type Targets = { xM: Float64Array; yM: Float64Array; driftM?: Float64Array };

/** Sample points from plain rows of [x, y, value] or [x, y, value, error variance]. */
export function samplePoints(rows: readonly (readonly number[])[]): SamplePoints {
  const column = (c: number) => Float64Array.from(rows, (row) => row[c] ?? 0);
  return { xM: column(0), yM: column(1), valueM: column(2), errorVarianceM2: column(3) };
}
