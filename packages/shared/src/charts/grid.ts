import type { GridFrame } from '../geometry/cell-frame';

export type { GridFrame } from '../geometry/cell-frame';
export { chooseCellM, columnXM, frameOver, MAX_CELLS_A_SIDE, rowYM } from '../geometry/cell-frame';

/** values: row-major from the south-west, length rows × columns, at cell centres; NaN means unsurveyed. */
export type Grid = GridFrame & { values: Float64Array };

/** The one test of whether a grid's value was surveyed. */
export const isSurveyed = (value: number): boolean => !Number.isNaN(value);

export function emptyGrid(frame: GridFrame): Grid {
  const { columns, rows, cellM, originM } = frame;
  return { values: new Float64Array(columns * rows).fill(Number.NaN), columns, rows, cellM, originM };
}
