import { cellRegions } from '../geometry/cell-regions';
import { bigEnough, FEATURE_LIMITS, median, type FoundFeature } from './found-feature';
import { isSurveyed, type Grid } from './grid';
import { nodesByRegion, regionShape } from './region-shape';

/** Common practice, no published source. Slopes in metres a metre. */
export const SHELF_LIMITS = {
  nearShoreM: 20,
  gentle: 0.1,
  steep: 0.2,
  edgeWithinM: 12, // how far out from a place of the shelf its edge is looked for
  leastDropM: 0.4, // down the edge
  startsWithinM: 6, // of the shore, at its nearest
} as const;

type Ground = { depth: Grid; sigma: Grid; slope: Float64Array; shoreDistanceM: Float64Array };

/**
 * Shelves: gentle ground within 20 m of the shore, from which, going straight away from the shore, a steep edge falls by
 * 0.4 m or more within 12 m. Depth is the middle of its cells; what lies round it is the foot of the edge.
 */
export function findShelves(ground: Ground): FoundFeature[] {
  const { depth, sigma, slope, shoreDistanceM } = ground;
  const feet = new Int32Array(depth.values.length).fill(-1);
  const marks = new Int8Array(depth.values.length).fill(-1);
  for (let node = 0; node < marks.length; node++) {
    if (!(shoreDistanceM[node]! <= SHELF_LIMITS.nearShoreM && slope[node]! <= SHELF_LIMITS.gentle)) continue;
    const foot = footOutward(ground, node);
    if (foot < 0) continue;
    feet[node] = foot;
    marks[node] = 0;
  }
  const { of, sizes } = cellRegions(marks, depth.columns);
  return nodesByRegion(of, sizes.length)
    .filter((nodes) => bigEnough(nodes, depth))
    .filter((nodes) => nodes.some((node) => shoreDistanceM[node]! <= SHELF_LIMITS.startsWithinM))
    .map((nodes): FoundFeature => {
      const depthM = median(nodes.map((node) => depth.values[node]!));
      const aroundM = median(nodes.map((node) => depth.values[feet[node]!]!));
      const shape = regionShape(nodes, depth);
      const sigmaM = (at: (node: number) => number) => median(nodes.map((node) => sigma.values[at(node)]!));
      return {
        kind: 'shelf',
        nodes,
        ...shape,
        topXM: shape.xM,
        topYM: shape.yM,
        depthM,
        aroundM,
        reliefM: aroundM - depthM,
        reliefSigmaM: Math.hypot(
          sigmaM((node) => node),
          sigmaM((node) => feet[node]!),
        ),
      };
    })
    .sort((a, b) => b.areaM2 - a.areaM2 || a.xM - b.xM)
    .slice(0, FEATURE_LIMITS.mostOfAKind);
}

/** The deepest cell on the way out from the shore over a steep edge; −1 when there is no edge within reach. */
function footOutward({ depth, slope, shoreDistanceM }: Ground, node: number): number {
  const { columns, rows, cellM, values } = depth;
  const outX = (shoreDistanceM[node + 1] ?? Number.NaN) - (shoreDistanceM[node - 1] ?? Number.NaN);
  const outY =
    (shoreDistanceM[node + columns] ?? Number.NaN) - (shoreDistanceM[node - columns] ?? Number.NaN);
  const length = Math.hypot(outX, outY);
  if (!(length > 0)) return -1;
  const column = node % columns;
  const row = Math.floor(node / columns);
  let steepest = 0;
  let foot = node;
  for (let s = 1; s * cellM <= SHELF_LIMITS.edgeWithinM; s++) {
    const c = Math.round(column + (s * outX) / length);
    const r = Math.round(row + (s * outY) / length);
    const next = r * columns + c;
    if (c < 0 || r < 0 || c >= columns || r >= rows || !isSurveyed(values[next]!)) break;
    steepest = Math.max(steepest, slope[next]!);
    if (values[next]! > values[foot]!) foot = next;
  }
  const drops = values[foot]! - values[node]! >= SHELF_LIMITS.leastDropM;
  return drops && steepest >= SHELF_LIMITS.steep ? foot : -1;
}
