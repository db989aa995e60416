import { requireDrift } from './kriging-setup';
import type { KrigingSetup, Prediction } from './kriging-setup';
import { LocalSystem } from './local-system';
import { OctantSearch } from './octant-search';
import type { Targets } from './sample-points';
import { indexSamples, NearestSearch } from './sample-index';

export type NeighbourhoodOptions = {
  neighbours: number;
  /** `octant` takes an eighth of them from each eighth of the compass, so that one track or one peg's fan is not all. */
  by?: 'nearest' | 'octant';
  /** Leave sample t out when predicting target t; the targets are then the samples themselves, or those of `samplesOf`. */
  leaveOneOut?: boolean;
  samplesOf?: Int32Array; // sample number of each target, where the targets are some of the samples
  /** With it, those of the first `count` samples nearer to target t than withinM[t] metres are left out as well. */
  leaveNearOut?: { withinM: Float64Array; count: number };
};

/**
 * Kriging from k samples round each target, the nearest or by octant. Because it uses a subset of the samples, its variance is never below
 * that of the global solve with the same variogram. The factor of a neighbourhood is kept while the next target has the
 * same neighbours, which is the common case along a row of a fine grid.
 */
export function krigeNeighbourhood(
  setup: KrigingSetup,
  targets: Targets,
  options: NeighbourhoodOptions,
): Prediction {
  requireDrift(setup, targets);
  const count = targets.xM.length;
  const valuesM = new Float64Array(count);
  const varianceM2 = new Float64Array(count);
  const most = Math.min(options.neighbours, setup.samples.xM.length - (options.leaveOneOut === true ? 1 : 0));
  if (most < 1) throw new RangeError('Kriging needs at least one neighbour.');
  const index = indexSamples(setup.samples.xM, setup.samples.yM);
  const search = options.by === 'octant' ? new OctantSearch(index, most) : new NearestSearch(index, most);
  const { leaveNearOut } = options;
  if (leaveNearOut !== undefined) search.apartBelow = leaveNearOut.count;
  const local = new LocalSystem(setup, most);
  for (let t = 0; t < count; t++) {
    if (options.leaveOneOut === true) search.without = options.samplesOf?.[t] ?? t;
    if (leaveNearOut !== undefined) search.apartM2 = leaveNearOut.withinM[t]! ** 2;
    search.find(targets.xM[t]!, targets.yM[t]!);
    local.gather(search.ids, search.found);
    local.predict(targets.xM[t]!, targets.yM[t]!, targets.driftM?.[t] ?? 0);
    valuesM[t] = local.valueM;
    varianceM2[t] = local.varianceM2;
  }
  return { valuesM, varianceM2 };
}
