import { cellRegions } from '../geometry/cell-regions';
import { regionRings } from '../geometry/cell-rings';
import { normaliseBearing } from '../geometry/bearing';
import { bedRelief, bedSlope, type Relief } from './bed-relief';
import type { ChartFeature, FeatureKind } from './chart-answers';
import { bigEnough, FEATURE_LIMITS, found, leastBy, median, type FoundFeature } from './found-feature';
import { featureWords } from './feature-words';
import { isSurveyed, type Grid } from './grid';
import { nodesByRegion, regionShape } from './region-shape';
import { findShelves } from './shelves';

/**
 * Bars, gullies, holes and shelves of the charted surface. A place belongs to a bar when the bed gets deeper on both sides of
 * it within 20 m, to a gully when it rises on both sides; the region is what stands (lies) beyond half of its greatest relief.
 * A deep region that is closed in all round and not drawn out is a hole. Shelves: see `findShelves`. Relief is the
 * difference between the top (foot) and the middle of what lies round, its σ that of both depths together as if
 * independent, which overstates it. Numbered clockwise from north about the frame's middle, so that a name stays with its
 * feature when sizes change a little. `shoreDistanceM`: of every cell, metres; NaN off the water.
 */
export function bedFeatures(depth: Grid, sigma: Grid, shoreDistanceM: Float64Array): ChartFeature[] {
  const relief = bedRelief(depth, sigma, FEATURE_LIMITS.reachM);
  const found = [
    ...standing(depth, sigma, relief),
    ...lying(depth, sigma, relief),
    ...findShelves({ depth, sigma, slope: bedSlope(depth), shoreDistanceM }),
  ];
  const rings = ringsOf(found, depth);
  const named = nameEach(found, depth).map(({ feature, name, key }): ChartFeature => {
    const certain = feature.reliefM > 1.96 * feature.reliefSigmaM;
    const shown = rounded(feature, certain);
    return {
      key,
      name,
      words: featureWords(name, shown),
      ...shown,
      rings: rings[found.indexOf(feature)] ?? [],
    };
  });
  return named.sort(
    (a, b) => Number(b.certain) - Number(a.certain) || b.areaM2 - a.areaM2 || (a.key < b.key ? -1 : 1),
  );
}

function standing(depth: Grid, sigma: Grid, relief: Relief): FoundFeature[] {
  return regionsOf(relief.upM, depth).map((nodes) => {
    const top = leastBy(nodes, (node) => depth.values[node]!);
    const aroundM = median(nodes.map((node) => depth.values[node]! + relief.upM[node]!));
    const footSigmaM = median(nodes.map((node) => relief.footSigmaM[node]!));
    return found('bar', { nodes, top, aroundM, awaySigmaM: footSigmaM }, { depth, sigma });
  });
}

function lying(depth: Grid, sigma: Grid, relief: Relief): FoundFeature[] {
  return regionsOf(relief.downM, depth).map((nodes) => {
    const foot = leastBy(nodes, (node) => -depth.values[node]!);
    const aroundM = median(nodes.map((node) => depth.values[node]! - relief.downM[node]!));
    const rimSigmaM = median(nodes.map((node) => relief.rimSigmaM[node]!));
    const { lengthM, widthM } = regionShape(nodes, depth);
    const closed = relief.roundM[foot]! >= relief.downM[foot]! / 2;
    const kind = closed && lengthM < 2.5 * widthM ? 'hole' : 'gully';
    return found(kind, { nodes, top: foot, aroundM, awaySigmaM: rimSigmaM }, { depth, sigma });
  });
}

/** Regions beyond half their own greatest relief, the most telling first and at most so many. */
function regionsOf(reliefM: Float64Array, grid: Grid): number[][] {
  const { leastReliefM, mostShare, mostOfAKind } = FEATURE_LIMITS;
  const wide = cellRegions(
    reliefM.map((v) => (v >= leastReliefM ? 0 : -1)),
    grid.columns,
  );
  const half = new Int32Array(reliefM.length).fill(-1);
  nodesByRegion(wide.of, wide.sizes.length).forEach((nodes) => {
    const greatest = nodes.reduce((most, node) => Math.max(most, reliefM[node]!), 0);
    for (const node of nodes) if (reliefM[node]! >= Math.max(leastReliefM, greatest / 2)) half[node] = 0;
  });
  const narrow = cellRegions(half, grid.columns);
  const surveyed = grid.values.reduce((sum, v) => sum + (isSurveyed(v) ? 1 : 0), 0);
  const volume = (nodes: readonly number[]) => nodes.reduce((sum, node) => sum + reliefM[node]!, 0);
  return nodesByRegion(narrow.of, narrow.sizes.length)
    .filter((nodes) => bigEnough(nodes, grid) && nodes.length <= mostShare * surveyed)
    .sort((a, b) => volume(b) - volume(a) || a[0]! - b[0]!)
    .slice(0, mostOfAKind);
}

/** Features of different kinds may lie over one another (a shelf's edge and a bar), so each is drawn by itself. */
function ringsOf(features: readonly FoundFeature[], grid: Grid): number[][][] {
  return features.map(({ nodes }) => {
    const marks = new Int8Array(grid.values.length).fill(-1);
    for (const node of nodes) marks[node] = 0;
    return regionRings(marks, grid, 1)[0] ?? [];
  });
}

const NAMES: Readonly<Record<FeatureKind, string>> = {
  bar: 'Bar',
  shelf: 'Shelf',
  gully: 'Gully',
  hole: 'Hole',
};

function nameEach(features: readonly FoundFeature[], { originM, columns, rows, cellM }: Grid) {
  const middle = { xM: originM.xM + (columns * cellM) / 2, yM: originM.yM + (rows * cellM) / 2 };
  const turn = ({ xM, yM }: FoundFeature) =>
    normaliseBearing((Math.atan2(xM - middle.xM, yM - middle.yM) * 180) / Math.PI);
  const round = [...features].sort((a, b) => turn(a) - turn(b) || a.xM - b.xM || a.yM - b.yM);
  const counts: Record<FeatureKind, number> = { bar: 0, shelf: 0, gully: 0, hole: 0 };
  return round.map((feature) => {
    const number = (counts[feature.kind] += 1);
    return { feature, name: `${NAMES[feature.kind]} ${number}`, key: `${feature.kind}-${number}` };
  });
}

type Shown = Omit<ChartFeature, 'key' | 'name' | 'words' | 'rings'>;

function rounded(feature: FoundFeature, certain: boolean): Shown {
  const to = (value: number, places: number) => Math.round(value * 10 ** places) / 10 ** places;
  return {
    kind: feature.kind,
    xM: to(feature.kind === 'shelf' ? feature.xM : feature.topXM, 1),
    yM: to(feature.kind === 'shelf' ? feature.yM : feature.topYM, 1),
    lengthM: to(feature.lengthM, 1),
    widthM: to(feature.widthM, 1),
    areaM2: to(feature.areaM2, 0),
    axisDeg: feature.axisDeg === null ? null : to(feature.axisDeg, 0) % 180,
    depthM: to(feature.depthM, 2),
    aroundM: to(feature.aroundM, 2),
    reliefM: to(feature.reliefM, 2),
    reliefSigmaM: to(feature.reliefSigmaM, 2),
    certain,
  };
}
