import type { Point } from './point';

/** Where a grid of square cells lies on the lake's plane; cells row-major from the south-west. */
export type GridFrame = {
  columns: number;
  rows: number;
  cellM: number;
  originM: Point; // centre of the south-west cell
};

export const MAX_CELLS_A_SIDE = 400;
const CELL_STEPS_M = [0.5, 0.6, 0.75, 1, 1.25, 1.5, 2, 2.5, 3, 4, 5] as const;

/** Smallest cell of 0.5–5 m with which the points' bounding box fits 400 × 400 cells with two cells to spare all round. */
export function chooseCellM(points: readonly Point[]): number {
  const { widthM, heightM } = boundsOf(points);
  const longestM = Math.max(widthM, heightM);
  const cellM = CELL_STEPS_M.find((step) => longestM <= step * (MAX_CELLS_A_SIDE - 6));
  if (cellM === undefined) {
    throw new RangeError(
      `A water ${Math.round(longestM)} m across does not fit one chart of ${MAX_CELLS_A_SIDE} cells of 5 m; draw it as two.`,
    );
  }
  return cellM;
}

/** Frame over the points' bounding box with two spare cells all round, its corner on a whole multiple of the cell. */
export function frameOver(points: readonly Point[], cellM: number): GridFrame {
  const { westM, southM, widthM, heightM } = boundsOf(points);
  const originM = {
    xM: (Math.floor(westM / cellM) - 2) * cellM,
    yM: (Math.floor(southM / cellM) - 2) * cellM,
  };
  const columns = Math.ceil((westM + widthM - originM.xM) / cellM) + 3;
  const rows = Math.ceil((southM + heightM - originM.yM) / cellM) + 3;
  return { columns, rows, cellM, originM };
}

export const columnXM = (frame: GridFrame, column: number): number => frame.originM.xM + column * frame.cellM;
export const rowYM = (frame: GridFrame, row: number): number => frame.originM.yM + row * frame.cellM;

function boundsOf(points: readonly Point[]) {
  let westM = Infinity;
  let southM = Infinity;
  let eastM = -Infinity;
  let northM = -Infinity;
  for (const { xM, yM } of points) {
    if (!Number.isFinite(xM) || !Number.isFinite(yM))
      throw new RangeError('A point of the water is not a finite place.');
    westM = Math.min(westM, xM);
    eastM = Math.max(eastM, xM);
    southM = Math.min(southM, yM);
    northM = Math.max(northM, yM);
  }
  if (westM > eastM) throw new RangeError('There are no points to lay a grid over.');
  return { westM, southM, widthM: eastM - westM, heightM: northM - southM };
}
