import { blendedVariance, krigeBlended } from './kriging-blend';
import { krigeNeighbourhood } from './kriging-neighbourhood';
import type { KrigingSetup } from './kriging-setup';
import type { Targets } from './sample-points';

/** A stretch of the places of a chart: their kriging variance, m², or their depths by blended patches, metres. */
export type SurfacePart = { wanted: 'variance' | 'depth'; setup: KrigingSetup; targets: Targets };

/** The drawn depth uses all samples at once while memory (8 n² bytes) and time (n³/3) stay small, above that blended patches. */
export const AT_ONCE_LIMIT = 2000;
/** Neighbours used for σ beside a solution from all. More change it by under 1 %; fewer than all never understate it. */
const SIGMA_NEIGHBOURS = 16;

/** One part's answers, in the order of its targets. Parts need nothing of each other, so threads may share them out. */
export function surfacePart({ wanted, setup, targets }: SurfacePart): Float64Array {
  if (wanted === 'depth') return krigeBlended(setup, targets);
  if (setup.samples.xM.length > AT_ONCE_LIMIT) return blendedVariance(setup, targets);
  return krigeNeighbourhood(setup, targets, { neighbours: SIGMA_NEIGHBOURS, by: 'octant' }).varianceM2;
}

/** Does all parts of one kind, in whatever order, and answers them joined; `report` hears the share done. */
export type DoParts = (parts: readonly SurfacePart[], report: (share: number) => void) => Float64Array;

/** One after another, where it is called. */
export const doPartsHere: DoParts = (parts, report) => {
  const { joined, starts } = roomFor(parts, (length) => new Float64Array(length));
  parts.forEach((part, p) => {
    joined.set(surfacePart(part), starts[p]!);
    report((p + 1) / parts.length);
  });
  return joined;
};

/** Room for the answers of all parts, and where each part's begin. */
export function roomFor(
  parts: readonly SurfacePart[],
  make: (length: number) => Float64Array,
): { joined: Float64Array; starts: number[] } {
  const starts: number[] = [];
  let length = 0;
  for (const { targets } of parts) {
    starts.push(length);
    length += targets.xM.length;
  }
  return { joined: make(length), starts };
}

const PART = 16_384; // of places: often enough for a word on how far it is

/** The parts of a chart's places. They are the same however many threads there are, so the answers are too, to the last bit. */
export function partsOf(wanted: SurfacePart['wanted'], setup: KrigingSetup, targets: Targets): SurfacePart[] {
  const parts: SurfacePart[] = [];
  for (let from = 0; from < targets.xM.length; from += PART) {
    const part = (column: Float64Array) => column.slice(from, from + PART);
    const places = { xM: part(targets.xM), yM: part(targets.yM) };
    parts.push({
      wanted,
      setup,
      targets: targets.driftM === undefined ? places : { ...places, driftM: part(targets.driftM) },
    });
  }
  return parts;
}
