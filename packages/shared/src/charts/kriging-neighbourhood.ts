import { priorVarianceM2, requireDrift } from './kriging-setup';
import type { KrigingSetup, Prediction } from './kriging-setup';
import { GROUP_MOST, GroupSystem } from './group-system';
import { NearestSet } from './nearest-set';
import { OctantSearch } from './octant-search';
import { indexSamples } from './sample-index';
import type { SampleIndex } from './sample-index';
import type { SamplePoints, Targets } from './sample-points';
import { groupTargets } from './target-groups';

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
 * that of the global solve with the same variogram. Targets close together are kriged in company, for
 * most of their neighbours are the same.
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
type Neighbours = { most: number; index: SampleIndex; of: (t: number) => Found };

/** Targets within this share of a neighbourhood's reach have most of their neighbours in common. */
const TOGETHER = 0.51;

function krigeEach(setup: KrigingSetup, targets: Targets, neighbours: Neighbours): Prediction {
  requireDrift(setup, targets);
  const count = targets.xM.length;
  const made = { valuesM: new Float64Array(count), varianceM2: new Float64Array(count) };
  const { most, index } = neighbours;
  const system = new GroupSystem(setup, most, index);
  const { starts, members } = groupTargets(targets, TOGETHER * reachM(index, most), GROUP_MOST);
  const work = { setup, targets, neighbours, system, made };
  for (let g = 0; g + 1 < starts.length; g++) {
    const group = members.subarray(starts[g]!, starts[g + 1]!);
    if (!krigeGroup(work, group, 0)) for (const t of group) krigeAlone(work, t);
  }
  return made;
}

/** How far the neighbours of a place lie at most, on average, metres. */
function reachM({ xM, columns, rows, bucketM }: SampleIndex, most: number): number {
  return Math.sqrt((columns * rows * bucketM ** 2 * most) / (Math.PI * xM.length));
}

type Work = {
  setup: KrigingSetup;
  targets: Targets;
  neighbours: Neighbours;
  system: GroupSystem;
  made: Prediction;
};

function krigeGroup(work: Work, group: Int32Array, jitterM2: number): boolean {
  const { targets, neighbours, system, made } = work;
  system.begin();
  for (let i = 0; i < group.length; i++) {
    const t = group[i]!;
    const { ids, found } = neighbours.of(t);
    if (!system.add({ x: targets.xM[t]!, y: targets.yM[t]! }, ids, found)) return false;
  }
  if (!system.prepare(jitterM2)) return false;
  for (let i = 0; i < group.length; i++) {
    const t = group[i]!;
    if (!system.predict(i, targets.driftM?.[t] ?? 0)) return false;
    made.valuesM[t] = system.valueM;
    made.varianceM2[t] = system.varianceM2;
  }
  return true;
}

/** A target that could not be kriged in company: by itself, with the least jitter that makes its system solvable. */
function krigeAlone(work: Work, t: number): void {
  const priorM2 = priorVarianceM2(work.setup);
  const group = Int32Array.of(t);
  if (krigeGroup(work, group, 0)) return;
  for (let jitterM2 = 1e-10 * priorM2; jitterM2 <= priorM2; jitterM2 *= 100)
    if (krigeGroup(work, group, jitterM2)) return;
  throw new RangeError('Samples at one place with no error stated cannot be kriged.');
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
