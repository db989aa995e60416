import { indexSamples, NearestSearch } from './sample-index';
import type { SamplePoints, Targets } from './sample-points';

/** Value of the nearest sample at each target, metres; the lower sample number wins a tie. */
export function nearestValues(samples: SamplePoints, targets: Targets): Float64Array {
  const search = new NearestSearch(indexSamples(samples.xM, samples.yM), 1);
  return targets.xM.map((x, t) => {
    search.find(x, targets.yM[t]!);
    return samples.valueM[search.ids[0]!]!;
  });
}

/** Distance from each target to its nearest sample, metres. */
export function nearestDistancesM(samples: SamplePoints, targets: Targets): Float64Array {
  const search = new NearestSearch(indexSamples(samples.xM, samples.yM), 1);
  return targets.xM.map((x, t) => {
    search.find(x, targets.yM[t]!);
    return Math.sqrt(search.squaredM2[0]!);
  });
}

/** Mean distance from a sample to its nearest other, metres; two samples at least. */
export function meanNearestM({ xM, yM }: SamplePoints): number {
  const search = new NearestSearch(indexSamples(xM, yM), 1);
  let sum = 0;
  for (let i = 0; i < xM.length; i++) {
    search.without = i;
    search.find(xM[i]!, yM[i]!);
    sum += Math.sqrt(search.squaredM2[0]!);
  }
  return sum / xM.length;
}
