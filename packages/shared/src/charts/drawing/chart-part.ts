import { unknownBottom } from '../bottom-map';
import { decodeClasses, decodeDepth, decodeSigma, fromBase64 } from '../chart-encoding';
import type { ChartLayers } from '../chart-reading';
import type { ChartView } from '../contract';
import { emptyGrid } from '../grid';
import { bottomAreas, type BottomArea } from './bottom-areas';
import type { DrawnSounding } from './cast-marks';
import type { Line } from './mark';

/** The grids of a chart as they travel; a layer that isn't this reader's is null. */
export type ChartPart = Pick<ChartView, 'frame' | 'depth' | 'sigma' | 'substrate' | 'cover'>;

/** The chart's grids out of their bytes; a layer this reader may not see is empty. Null without any grid. */
export function layersOf({ frame, depth, sigma, substrate, cover }: ChartPart): ChartLayers | null {
  if (!frame) return null;
  return {
    depth: depth ? decodeDepth(fromBase64(depth), frame) : emptyGrid(frame),
    sigma: sigma ? decodeSigma(fromBase64(sigma), frame) : emptyGrid(frame),
    substrate: substrate ? decodeClasses(fromBase64(substrate), frame) : unknownBottom(frame),
    cover: cover ? decodeClasses(fromBase64(cover), frame) : unknownBottom(frame),
  };
}

/** Every cast this reader sees as a point: the soundings, and casts that read no depth. */
export const pointsOf = ({
  soundings,
  bottomPoints,
}: Pick<ChartView, 'soundings' | 'bottomPoints'>): DrawnSounding[] => [
  ...(soundings ?? []),
  ...(bottomPoints ?? []).map((point) => ({ ...point, depthM: null })),
];

/**
 * Rings of the water that changed since it was surveyed: the areas of what happened, or all of it when it happened to the
 * whole lake, when the water stood very low or in flood, or when the chart is old.
 */
export function changedWater(
  { age, changes = [] }: Pick<ChartView, 'age' | 'changes'>,
  water: readonly Line[],
): readonly Line[] {
  const everywhere = age === 'old' || (age === 'changed' && changes.length === 0);
  if (everywhere || changes.some(({ rings }) => rings === null)) return water;
  return changes.flatMap(({ rings }) => rings ?? []);
}

/** Bottom areas of the layers that are there. */
export function bottomOf(part: ChartPart, layers: ChartLayers | null): BottomArea[] {
  if (!layers) return [];
  return bottomAreas(part.substrate ? layers.substrate : null, part.cover ? layers.cover : null);
}
