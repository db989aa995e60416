import { forEachBucketWithin, indexSamples } from './sample-index';

/** Soundings that were foretold, and the square of each miss over its stated variance; 1 on average when σ is honest. */
export type Misses = { xM: Float64Array; yM: Float64Array; squaredSigmas: Float64Array };

const PRIOR_SOUNDINGS = 4; // of the lake's own average, so that one miss alone does not swing a place
const REACH = 3; // kernel widths beyond which a sounding's weight, under 1.2 %, is left out

/**
 * By how much the variance of each place should be widened or narrowed for the soundings round about having been missed by
 * more or less than their σ said: a Gaussian-weighted mean of the squared misses, shrunk towards the lake's own mean. One variogram serves a
 * whole lake, but a barred middle is rougher than a plain margin. Lengths in metres; answer without unit, in target order.
 */
export function localSpread(
  misses: Misses,
  places: { xM: Float64Array; yM: Float64Array },
  widthM: number,
): Float64Array {
  const index = indexSamples(misses.xM, misses.yM);
  const reachM = REACH * widthM;
  const mean = misses.squaredSigmas.reduce((sum, s) => sum + s, 0) / misses.squaredSigmas.length;
  const perWidth2 = 1 / (2 * widthM * widthM);
  return places.xM.map((x, t) => {
    const y = places.yM[t]!;
    let weights = PRIOR_SOUNDINGS;
    let sum = PRIOR_SOUNDINGS * mean;
    forEachBucketWithin(index, { xM: x, yM: y, reachM }, (from, to) => {
      for (let m = from; m < to; m++) {
        const id = index.members[m]!;
        const dx = misses.xM[id]! - x;
        const dy = misses.yM[id]! - y;
        const d2 = dx * dx + dy * dy;
        if (d2 > reachM * reachM) continue;
        const weight = Math.exp(-d2 * perWidth2);
        weights += weight;
        sum += weight * misses.squaredSigmas[id]!;
      }
    });
    return sum / weights;
  });
}
