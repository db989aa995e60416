import { cellRegions } from '../geometry/cell-regions';
import { regionRings } from '../geometry/cell-rings';
import { Cover, Substrate } from '../surveys/contract';
import { UNKNOWN_CLASS, type ClassGrid, type ClassWeights } from './bottom-map';
import type { StandOutPatch } from './chart-answers';
import type { GridFrame } from './grid';
import { nodesByRegion } from './region-shape';

/** Common practice, no published source. */
export const PATCH_LIMITS = {
  ringM: 6, // width of the ring a patch is held against
  leastAreaM2: 4, // a lead can be put on it again and again
  mostAreaM2: 400, // larger, it is a part of the lake and not a patch
  leastContrast: 0.25,
  leastRingShare: 0.6, // of the ring must be known, else nothing is known to stand out from
  most: 12,
} as const;

/** A patch as a chart keeps it: who reaches it is told when it is asked for. */
export type FoundPatch = Omit<StandOutPatch, 'reach'>;

type Layer = { layer: 'substrate' | 'cover'; map: ClassGrid; weights: ClassWeights | null };

/**
 * Small areas whose bottom differs from what lies round them: regions of one likeliest class held against the ring of 6 m
 * round them. Contrast is how much more probable that class is inside than in the ring, means over the cells of both.
 * Ranked by contrast × confidence, so that neither a faint difference nor a doubtful one comes first. Snags stand out
 * too, but nobody should fish them: they are told of elsewhere.
 */
export function standOutPatches(layers: readonly Layer[]): FoundPatch[] {
  return layers
    .flatMap(patchesOf)
    .sort((a, b) => b.contrast * b.confidence - a.contrast * a.confidence || a.xM - b.xM || a.yM - b.yM)
    .slice(0, PATCH_LIMITS.most)
    .map((patch, i) => ({ ...patch, rank: i + 1 }));
}

function patchesOf({ layer, map, weights }: Layer): FoundPatch[] {
  if (weights === null) return [];
  const names: readonly (Substrate | Cover)[] = layer === 'substrate' ? Substrate.options : Cover.options;
  const kinds = Int16Array.from(map.classes, (kind) => (kind === UNKNOWN_CLASS ? -1 : kind));
  const { of, sizes, values } = cellRegions(kinds, map.columns);
  const cellM2 = map.cellM ** 2;
  return nodesByRegion(of, sizes.length).flatMap((nodes, region) => {
    const areaM2 = nodes.length * cellM2;
    const bottom = names[values[region]!];
    if (areaM2 < PATCH_LIMITS.leastAreaM2 || areaM2 > PATCH_LIMITS.mostAreaM2) return [];
    if (bottom === undefined || bottom === 'snag') return [];
    const held = heldAgainstRing({ nodes, kind: values[region]!, kinds, weights }, map);
    if (held === null || held.contrast < PATCH_LIMITS.leastContrast) return [];
    const around = names[held.aroundKind];
    return around === undefined ? [] : [patchOf(nodes, map, { layer, bottom, around, ...held })];
  });
}

type Region = { nodes: readonly number[]; kind: number; kinds: Int16Array; weights: ClassWeights };
type Held = { contrast: number; confidence: number; aroundKind: number };

function heldAgainstRing({ nodes, kind, kinds, weights }: Region, frame: GridFrame): Held | null {
  const { classes, alpha } = weights;
  const shareAt = (node: number): number => {
    let total = 0;
    for (let c = 0; c < classes; c++) total += alpha[node * classes + c]!;
    return alpha[node * classes + kind]! / total;
  };
  const mean = (of: readonly number[]) => of.reduce((sum, node) => sum + shareAt(node), 0) / of.length;
  const ring = ringRound(nodes, frame);
  const known = ring.filter((node) => kinds[node]! >= 0);
  if (known.length === 0 || known.length < PATCH_LIMITS.leastRingShare * ring.length) return null;
  const counts = new Array<number>(classes).fill(0);
  for (const node of known) counts[kinds[node]!]! += 1;
  counts[kind] = 0; // the same bottom again across the ring is not what it stands out from
  const aroundKind = counts.indexOf(Math.max(...counts));
  const confidence = mean(nodes);
  return { contrast: confidence - mean(known), confidence, aroundKind };
}

/** Cells off the region with some cell of it within the ring's width; those off the water count as not known. */
function ringRound(nodes: readonly number[], { columns, rows, cellM }: GridFrame): number[] {
  const inside = new Set(nodes);
  const edge = nodes.filter((node) =>
    [node - 1, node + 1, node - columns, node + columns].some((next) => !inside.has(next)),
  );
  const reach = Math.floor(PATCH_LIMITS.ringM / cellM);
  const ring = new Set<number>();
  for (const node of edge) {
    const column = node % columns;
    const row = Math.floor(node / columns);
    for (let r = Math.max(0, row - reach); r <= Math.min(rows - 1, row + reach); r++) {
      const wide = Math.floor(Math.sqrt(reach * reach - (r - row) ** 2));
      for (let c = Math.max(0, column - wide); c <= Math.min(columns - 1, column + wide); c++) {
        const next = r * columns + c;
        if (!inside.has(next)) ring.add(next);
      }
    }
  }
  return [...ring];
}

function patchOf(
  nodes: readonly number[],
  frame: GridFrame,
  told: Held & Pick<FoundPatch, 'layer' | 'bottom' | 'around'>,
): FoundPatch {
  const { layer, bottom, around, contrast, confidence } = told;
  const { columns, rows, cellM, originM } = frame;
  const middle = (of: (node: number) => number) =>
    nodes.reduce((sum, node) => sum + of(node), 0) / nodes.length;
  const [column, row] = [middle((node) => node % columns), middle((node) => Math.floor(node / columns))];
  // The cell of the patch nearest to its middle: a bent patch's own middle may lie off it.
  const at = nodes.reduce((best, node) => (away(node) < away(best) ? node : best));
  function away(node: number): number {
    return ((node % columns) - column) ** 2 + (Math.floor(node / columns) - row) ** 2;
  }
  const marks = new Int8Array(columns * rows).fill(-1);
  for (const node of nodes) marks[node] = 0;
  const areaM2 = nodes.length * cellM ** 2;
  const acrossM = Math.round(10 * Math.sqrt((4 * areaM2) / Math.PI)) / 10;
  const hundredths = (share: number) => Math.round(share * 100) / 100;
  return {
    rank: 0,
    layer,
    bottom,
    around,
    words: `${BOTTOM_NAMES[bottom]} in ${BOTTOM_NAMES[around].toLowerCase()}, about ${acrossM.toFixed(0)} m across; ${Math.round(confidence * 100)} % sure of it`,
    xM: Math.round((originM.xM + (at % columns) * cellM) * 10) / 10,
    yM: Math.round((originM.yM + Math.floor(at / columns) * cellM) * 10) / 10,
    areaM2: Math.round(areaM2),
    acrossM,
    contrast: hundredths(contrast),
    confidence: hundredths(confidence),
    rings: regionRings(marks, frame, 1)[0] ?? [],
  };
}

export const BOTTOM_NAMES: Readonly<Record<Substrate | Cover, string>> = {
  silt: 'Silt',
  clay: 'Clay',
  sand: 'Sand',
  gravel: 'Gravel',
  stones: 'Stones',
  clear: 'Clear bottom',
  low_weed: 'Low weed',
  tall_weed: 'Tall weed',
  leaf_litter: 'Leaf litter',
  snag: 'Snag',
};

/** Stands beside every list of patches. */
export const PATCH_CAUTION =
  'Where the bottom changes, fish have often been feeding. That is common practice, no published source, and never promised: ' +
  'feel it with a lead before you trust it.';
