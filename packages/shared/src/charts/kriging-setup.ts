import type { SamplePoints, Targets } from './sample-points';
import type { Variogram } from './variogram';

/**
 * What the nugget stands for. `field`: variation of the bed itself at scales below the casts' spacing; it belongs to what
 * is predicted, so the variance includes it and a target exactly on an error-free sample gets that sample back with
 * variance 0 (the convention of gstat). `noise`: scatter of repeated measurement, filtered out together with each
 * sample's own error variance; the smooth surface underneath is predicted and the variance is that surface's.
 */
export type NuggetMeaning = 'field' | 'noise';

/** A kriging problem. Each sample's error variance stands on the diagonal: the surface predicted is the error-free one. */
export type KrigingSetup = {
  samples: SamplePoints;
  variogram: Variogram;
  nuggetIs: NuggetMeaning;
  /** Value of the external drift at each sample, metres (length of the samples); absent for ordinary kriging. */
  driftM?: Float64Array;
};

/** Predictions and kriging variances, in the order of the targets. */
export type Prediction = { valuesM: Float64Array; varianceM2: Float64Array };

export function requireDrift(setup: KrigingSetup, targets: Targets): void {
  if ((setup.driftM === undefined) !== (targets.driftM === undefined)) {
    throw new RangeError('The drift must be given at the samples and at the targets alike, or at neither.');
  }
}

/** Variance of the predicted quantity before any sample is known, m². */
export const priorVarianceM2 = ({ variogram, nuggetIs }: KrigingSetup): number =>
  variogram.partialSillM2 + (nuggetIs === 'field' ? variogram.nuggetM2 : 0);
