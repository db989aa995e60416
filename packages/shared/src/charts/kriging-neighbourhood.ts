import { requireDrift } from './kriging-setup';
import type { KrigingSetup, Prediction } from './kriging-setup';
import { localCovariances } from './local-covariance';
import { LocalSystem } from './local-system';
import { NearestSet } from './nearest-set';
import { OctantSearch } from './octant-search';
import { indexSamples } from './sample-index';
import type { SampleIndex } from './sample-index';
import type { SamplePoints, Targets } from './sample-points';

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
  const search = searchOf(setup.samples, options);
  return krigeEach(setup, targets, {
    most: search.most,
    index: search.index,
    of: (t) => {
      search.find(targets, t);
      return search;
    },
  });
}

/** The neighbours of each target, a row of `most` a target of which the first found[t] hold sample numbers, ascending. */
export type NeighbourRows = { most: number; ids: Int32Array; found: Int32Array };

/** The neighbours alone: to krige the same targets again with another variogram without searching again. */
export function neighbourRows(
  samples: SamplePoints,
  targets: Targets,
  options: NeighbourhoodOptions,
): NeighbourRows {
  const search = searchOf(samples, options);
  const count = targets.xM.length;
  const rows = { most: search.most, ids: new Int32Array(count * search.most), found: new Int32Array(count) };
  for (let t = 0; t < count; t++) {
    search.find(targets, t);
    rows.ids.set(search.ids.subarray(0, search.found).slice().sort(), t * search.most);
    rows.found[t] = search.found;
  }
  return rows;
}

/** Kriging of each target from its row of neighbours. */
export function krigeRows(setup: KrigingSetup, targets: Targets, rows: NeighbourRows): Prediction {
  const { most, ids, found } = rows;
  return krigeEach(setup, targets, {
    most,
    index: indexSamples(setup.samples.xM, setup.samples.yM),
    of: (t) => ({ ids: ids.subarray(t * most, t * most + found[t]!), found: found[t]! }),
  });
}

type Found = { readonly ids: Int32Array; readonly found: number };

function krigeEach(
  setup: KrigingSetup,
  targets: Targets,
  neighbours: { most: number; index: SampleIndex; of: (t: number) => Found },
): Prediction {
  requireDrift(setup, targets);
  const count = targets.xM.length;
  const valuesM = new Float64Array(count);
  const varianceM2 = new Float64Array(count);
  const local = new LocalSystem(setup, neighbours.most, localCovariances(setup.variogram, neighbours.index));
  for (let t = 0; t < count; t++) {
    const { ids, found } = neighbours.of(t);
    local.gather(ids, found);
    local.predict(targets.xM[t]!, targets.yM[t]!, targets.driftM?.[t] ?? 0);
    valuesM[t] = local.valueM;
    varianceM2[t] = local.varianceM2;
  }
  return { valuesM, varianceM2 };
}

function searchOf({ xM, yM }: SamplePoints, options: NeighbourhoodOptions) {
  const { leaveOneOut, leaveNearOut, samplesOf } = options;
  const most = Math.min(options.neighbours, xM.length - (leaveOneOut === true ? 1 : 0));
  if (most < 1) throw new RangeError('Kriging needs at least one neighbour.');
  const index = indexSamples(xM, yM);
  const search = options.by === 'octant' ? new OctantSearch(index, most) : new NearestSet(index, most);
  if (leaveNearOut !== undefined) search.apartBelow = leaveNearOut.count;
  return {
    most,
    index,
    ids: search.ids,
    found: 0,
    find(targets: Targets, t: number): void {
      if (leaveOneOut === true) search.without = samplesOf?.[t] ?? t;
      if (leaveNearOut !== undefined) search.apartM2 = leaveNearOut.withinM[t]! ** 2;
      search.find(targets.xM[t]!, targets.yM[t]!);
      this.found = search.found;
    },
  };
}
