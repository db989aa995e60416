import { cellRegions } from '../geometry/cell-regions';
import { regionRings } from '../geometry/cell-rings';
import { normaliseBearing } from '../geometry/bearing';
import { bedRelief, bedSlope, type Relief, type ReliefScale } from './bed-relief';
import type { ChartFeature, FeatureKind } from './chart-answers';
import { bigEnough, FEATURE_LIMITS, found, leastBy, median, type FoundFeature } from './found-feature';
import { featureWords } from './feature-words';
import { isSurveyed, type Grid } from './grid';
import { nodesByRegion, regionShape } from './region-shape';
import { fitShoreDrift } from './shore-drift';
import { findShelves } from './shelves';

/**
 * Bars, gullies, holes and shelves of the charted surface. A crest is where the bed bends most across a line on which it gets
 * deeper on both sides (a trough: rises), so that neither the edge of a slope nor the flank of a bank counts; its region is
 * what stands (lies) beyond half of its greatest relief near by. It must stand out of the bed as it is, and of the bed less
 * the fall from the shore that all of the lake shares (a curved bank alone would look like a gully); the lesser counts.
 * Looked for at two scales, narrow features first; a wide one is told only where no narrow one lies. A deep region that is
 * closed in all round and not drawn out is a hole. Shelves: see `findShelves`. Relief is the difference between the top
 * (foot) and the middle of what lies round it, its σ that of both depths together as if independent, which overstates it.
 * Numbered clockwise from north about the frame's middle, so that a name stays with its feature when sizes change a little.
 * `shoreDistanceM`: of every cell, metres; NaN off the water.
 */
export function bedFeatures(depth: Grid, sigma: Grid, shoreDistanceM: Float64Array): ChartFeature[] {
  const found = [
    ...atBothScales({ depth, sigma, shoreDistanceM }),
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

type Ground = { depth: Grid; sigma: Grid; shoreDistanceM: Float64Array };

/** Narrow bars and gullies, then those as wide as a peg's water. */
const SCALES = [
  { reachM: 20, bendM: 4, leastM: FEATURE_LIMITS.leastReliefM },
  { reachM: 36, bendM: 10, leastM: 1.8 * FEATURE_LIMITS.leastReliefM }, // as steep over the longer way
] as const;

function atBothScales(ground: Ground): FoundFeature[] {
  const { depth, sigma } = ground;
  const bare = withoutMargin(ground);
  const taken = new Uint8Array(depth.values.length);
  return SCALES.flatMap((scale) => {
    const relief = lesserOf(bedRelief(depth, sigma, scale), bedRelief(bare, sigma, scale));
    const features = [...standing(ground, relief, scale), ...lying(ground, relief, scale)];
    const fresh = features.filter(
      ({ nodes }) => nodes.filter((node) => taken[node] === 1).length <= MOST_SHARED * nodes.length,
    );
    for (const { nodes } of fresh) for (const node of nodes) taken[node] = 1;
    return fresh;
  });
}

/** The bed less the fall from the shore that all of the lake shares: else every bay's margin would be a gully. */
function withoutMargin({ depth, shoreDistanceM }: Ground): Grid {
  const nodes = [...depth.values.keys()].filter((node) =>
    isSurveyed(depth.values[node]! + shoreDistanceM[node]!),
  );
  const valueM = Float64Array.from(nodes, (node) => depth.values[node]!);
  const none = new Float64Array(nodes.length);
  const distanceM = Float64Array.from(nodes, (node) => shoreDistanceM[node]!);
  const fit = fitShoreDrift({ xM: none, yM: none, valueM, errorVarianceM2: none }, distanceM);
  const bare = { ...depth, values: new Float64Array(depth.values.length).fill(Number.NaN) };
  nodes.forEach((node, i) => (bare.values[node] = (fit?.residual.valueM ?? valueM)[i]!));
  return bare;
}

/** What stands out of the bed and of the bed without its margin, by the lesser of both. */
function lesserOf(whole: Relief, bare: Relief): Relief {
  const lesser = (a: Float64Array, b: Float64Array) => a.map((v, node) => Math.min(v, b[node]!));
  return {
    ...whole,
    upM: lesser(whole.upM, bare.upM),
    downM: lesser(whole.downM, bare.downM),
    roundM: lesser(whole.roundM, bare.roundM),
  };
}

/** A wide feature of which more than this share was told as narrow ones is those narrow ones. */
const MOST_SHARED = 0.2;

function standing(ground: Ground, relief: Relief, scale: ReliefScale): FoundFeature[] {
  const { depth, sigma } = ground;
  return regionsOf(ground, { reliefM: relief.upM, seeds: relief.crest, ...scale }).map((nodes) => {
    const top = leastBy(nodes, (node) => depth.values[node]!);
    const aroundM = median(nodes.map((node) => depth.values[node]! + relief.upM[node]!));
    const footSigmaM = median(nodes.map((node) => relief.footSigmaM[node]!));
    return found('bar', { nodes, top, aroundM, awaySigmaM: footSigmaM }, { depth, sigma });
  });
}

function lying(ground: Ground, relief: Relief, scale: ReliefScale): FoundFeature[] {
  const { depth, sigma } = ground;
  return regionsOf(ground, { reliefM: relief.downM, seeds: relief.trough, ...scale }).map((nodes) => {
    const foot = leastBy(nodes, (node) => -depth.values[node]!);
    const aroundM = median(nodes.map((node) => depth.values[node]! - relief.downM[node]!));
    const rimSigmaM = median(nodes.map((node) => relief.rimSigmaM[node]!));
    const { lengthM, widthM } = regionShape(nodes, depth);
    const closed = relief.roundM[foot]! >= relief.downM[foot]! / 2;
    const kind = closed && lengthM < 2.5 * widthM ? 'hole' : 'gully';
    return found(kind, { nodes, top: foot, aroundM, awaySigmaM: rimSigmaM }, { depth, sigma });
  });
}

type Standing = ReliefScale & { reliefM: Float64Array; seeds: Uint8Array };

/** Regions round crests beyond half their own greatest relief, the most telling first and at most so many. */
function regionsOf(
  { depth: grid, shoreDistanceM }: Ground,
  { reliefM, seeds, bendM, leastM }: Standing,
): number[][] {
  const { mostShare, mostOfAKind, offShoreM } = FEATURE_LIMITS;
  const sown = seeds.map((seed, node) => (seed === 1 && shoreDistanceM[node]! >= offShoreM ? 1 : 0));
  const near = spread(sown, grid, 2 * bendM);
  const wide = cellRegions(
    reliefM.map((v, node) => (v >= leastM && near[node] === 1 ? 0 : -1)),
    grid.columns,
  );
  const half = new Int32Array(reliefM.length).fill(-1);
  for (const nodes of nodesByRegion(wide.of, wide.sizes.length)) {
    const greatest = nodes.reduce(
      (most, node) => (sown[node] === 1 ? Math.max(most, reliefM[node]!) : most),
      0,
    );
    for (const node of nodes) if (reliefM[node]! >= Math.max(leastM, greatest / 2)) half[node] = 0;
  }
  const narrow = cellRegions(half, grid.columns);
  const surveyed = grid.values.reduce((sum, v) => sum + (isSurveyed(v) ? 1 : 0), 0);
  const volume = (nodes: readonly number[]) => nodes.reduce((sum, node) => sum + reliefM[node]!, 0);
  return nodesByRegion(narrow.of, narrow.sizes.length)
    .filter((nodes) => bigEnough(nodes, grid) && nodes.length <= mostShare * surveyed)
    .filter((nodes) => nodes.some((node) => sown[node] === 1))
    .sort((a, b) => volume(b) - volume(a) || a[0]! - b[0]!)
    .slice(0, mostOfAKind);
}

/** 1 within a distance of a marked cell. */
function spread(marks: Uint8Array, { columns, rows, cellM }: Grid, overM: number): Uint8Array {
  const reach = Math.round(overM / cellM);
  const near = new Uint8Array(marks.length);
  marks.forEach((mark, node) => {
    if (mark !== 1) return;
    const column = node % columns;
    const row = Math.floor(node / columns);
    for (let r = Math.max(0, row - reach); r <= Math.min(rows - 1, row + reach); r++) {
      const half = Math.floor(Math.sqrt(reach * reach - (r - row) ** 2));
      near.fill(
        1,
        r * columns + Math.max(0, column - half),
        r * columns + Math.min(columns - 1, column + half) + 1,
      );
    }
  });
  return near;
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
