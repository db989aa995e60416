import type { Point } from '../geometry/plane';
import { Cover, Substrate } from '../surveys/contract';
import { UNKNOWN_CLASS } from './bottom-map';
import type { ClassGrid } from './bottom-map';
import { isSurveyed } from './grid';
import type { Grid, GridFrame } from './grid';

/** The layers a place is read from; all on one frame, as `buildChart` makes them and `chart-encoding` gives them back. */
export type ChartLayers = { depth: Grid; sigma: Grid; substrate: ClassGrid; cover: ClassGrid };

/** What the chart says of one place. Depth at datum in metres; null: not surveyed, or not known. */
export type ChartReading = {
  depthM: number | null;
  sigmaM: number | null;
  substrate: { bottom: Substrate; confidence: number } | null;
  cover: { bottom: Cover; confidence: number } | null;
  /** The one word for the place: what covers the bottom, else what it is. */
  bottom: Substrate | Cover | null;
};

export function readChart(chart: ChartLayers, place: Point): ChartReading {
  const depthM = gridAt(chart.depth, place);
  const sigmaM = depthM === null ? null : gridAt(chart.sigma, place);
  const substrate = classAt(chart.substrate, place, Substrate.options);
  const cover = classAt(chart.cover, place, Cover.options);
  const bottom =
    cover !== null && cover.bottom !== 'clear' ? cover.bottom : (substrate?.bottom ?? cover?.bottom ?? null);
  return { depthM, sigmaM, substrate, cover, bottom };
}

/**
 * Bilinear value of a grid at a place, metres; null where the nearest cell is not surveyed. Beside unsurveyed cells the
 * surveyed corners share the weight.
 */
export function gridAt(grid: Grid, place: Point): number | null {
  const { columns, rows, cellM, originM, values } = grid;
  const nearest = nearestNode(grid, place);
  if (nearest === null || !isSurveyed(values[nearest]!)) return null;
  const x = Math.min(columns - 1, Math.max(0, (place.xM - originM.xM) / cellM));
  const y = Math.min(rows - 1, Math.max(0, (place.yM - originM.yM) / cellM));
  const column = Math.min(columns - 2, Math.floor(x));
  const row = Math.min(rows - 2, Math.floor(y));
  const [u, v] = [x - column, y - row];
  const south = row * columns + column;
  let sum = 0;
  let weight = 0;
  const add = (node: number, share: number) => {
    if (share > 0 && isSurveyed(values[node]!)) {
      sum += share * values[node]!;
      weight += share;
    }
  };
  add(south, (1 - u) * (1 - v));
  add(south + 1, u * (1 - v));
  add(south + columns, (1 - u) * v);
  add(south + columns + 1, u * v);
  return weight > 0 ? sum / weight : values[nearest]!;
}

function classAt<T extends string>(
  grid: ClassGrid,
  place: Point,
  names: readonly T[],
): { bottom: T; confidence: number } | null {
  const node = nearestNode(grid, place);
  if (node === null || grid.classes[node] === UNKNOWN_CLASS) return null;
  const bottom = names[grid.classes[node]!];
  return bottom === undefined ? null : { bottom, confidence: grid.confidence[node]! };
}

/** The cell the place lies in, or null off the grid. */
function nearestNode({ columns, rows, cellM, originM }: GridFrame, place: Point): number | null {
  const column = Math.round((place.xM - originM.xM) / cellM);
  const row = Math.round((place.yM - originM.yM) / cellM);
  if (!(column >= 0 && column < columns && row >= 0 && row < rows)) return null;
  return row * columns + column;
}
