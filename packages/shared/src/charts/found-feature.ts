import type { FeatureKind } from './chart-answers';
import type { Grid } from './grid';
import { regionShape, type RegionShape } from './region-shape';

/**
 * What is looked for. Common practice, no published source: an angler's feature is a few metres wide and tells on a float
 * read to a foot.
 */
export const FEATURE_LIMITS = {
  offShoreM: 3, // of a crest or a foot: nearer in, the margin is all there is
  leastReliefM: 0.25,
  leastAreaM2: 12,
  leastLengthM: 4,
  mostShare: 0.2, // of the surveyed water: larger, it is the lake itself
  mostOfAKind: 8,
} as const;

/** A found region before it has a name. */
export type FoundFeature = RegionShape & {
  kind: FeatureKind;
  nodes: readonly number[];
  topXM: number;
  topYM: number;
  depthM: number;
  aroundM: number;
  reliefM: number;
  reliefSigmaM: number;
};

type Measured = { nodes: readonly number[]; top: number; aroundM: number; awaySigmaM: number };

export function found(
  kind: FeatureKind,
  { nodes, top, aroundM, awaySigmaM }: Measured,
  { depth, sigma }: { depth: Grid; sigma: Grid },
): FoundFeature {
  const depthM = depth.values[top]!;
  return {
    kind,
    nodes,
    ...regionShape(nodes, depth),
    topXM: depth.originM.xM + (top % depth.columns) * depth.cellM,
    topYM: depth.originM.yM + Math.floor(top / depth.columns) * depth.cellM,
    depthM,
    aroundM,
    reliefM: Math.abs(aroundM - depthM),
    reliefSigmaM: Math.hypot(sigma.values[top]!, awaySigmaM),
  };
}

export function bigEnough(nodes: readonly number[], grid: Grid): boolean {
  const { leastAreaM2, leastLengthM } = FEATURE_LIMITS;
  return nodes.length * grid.cellM ** 2 >= leastAreaM2 && regionShape(nodes, grid).lengthM >= leastLengthM;
}

export const leastBy = (nodes: readonly number[], of: (node: number) => number): number =>
  nodes.reduce((best, node) => (of(node) < of(best) ? node : best));

export function median(values: readonly number[]): number {
  const sorted = [...values].sort((a, b) => a - b);
  const middle = sorted.length >> 1;
  return sorted.length % 2 === 1 ? sorted[middle]! : (sorted[middle - 1]! + sorted[middle]!) / 2;
}
