import type { Grid } from './grid';
import { isSurveyed } from './grid';
import { cutCells, LineJoiner } from './marching-squares';
import type { LevelField, SidePoint } from './marching-squares';

/** One level's lines: each a flat x, y, x, y … in plane metres. A closed line repeats its first point at its end. */
export type Isobath = { levelM: number; lines: Float64Array[] };

/** Levels that are whole multiples of the step, above nought and no deeper than the deepest surveyed cell. */
export function isobathLevels(grid: Grid, stepM: number): number[] {
  if (!(stepM > 0)) throw new RangeError('The step between isobaths must be more than nothing.');
  let deepestM = -Infinity;
  for (const value of grid.values) if (value > deepestM) deepestM = value;
  const levels: number[] = [];
  for (let k = 1; k * stepM <= deepestM; k++) levels.push(k * stepM);
  return levels;
}

/**
 * Isobaths by marching squares between cell centres, linear along the cells' sides; the deeper water lies on the left of
 * every line. A cell with an unsurveyed corner carries no line, so lines end where the survey ends. A node equal to a
 * level counts as deeper; at a saddle the middle is deeper when the mean of the corners is. Levels must rise.
 * Source of the method: Lorensen & Cline 1987 in two dimensions.
 */
export function isobaths(grid: Grid, levelsM: readonly number[]): Isobath[] {
  const levels = rising(levelsM);
  const { columns, rows, values } = grid;
  const reached = new Int16Array(values.length);
  for (let i = 0; i < values.length; i++)
    reached[i] = isSurveyed(values[i]!) ? levelsReached(levels, values[i]!) : -1;
  const field: LevelField = {
    reached,
    columns,
    rows,
    levelCount: levels.length,
    middleDeep: middleDeepIn(grid, levels),
  };
  return joinLevels(grid, field, (k) => sidePointOf(grid, levels[k]!)).map((lines, k) => ({
    levelM: levelsM[k]!,
    lines,
  }));
}

/**
 * Closed rings round the water that is surveyed and at or deeper than each level; the first entry, with level −Infinity,
 * is all that was surveyed. Painted in order, each over the last with an even-odd or non-zero fill, they make banded
 * tints. Towards unsurveyed water a ring stands half a cell beyond the last surveyed centre; the drawing clips the
 * whole stack to the outline.
 */
export function deeperRegions(grid: Grid, levelsM: readonly number[]): Isobath[] {
  const levels = rising([-Infinity, ...levelsM]);
  const wide = withMargin(grid);
  const { columns, rows, values } = wide;
  const reached = new Int16Array(values.length);
  for (let i = 0; i < values.length; i++)
    reached[i] = isSurveyed(values[i]!) ? levelsReached(levels, values[i]!) : 0;
  const field: LevelField = {
    reached,
    columns,
    rows,
    levelCount: levels.length,
    middleDeep: middleDeepIn(wide, levels),
  };
  return joinLevels(wide, field, (k) => sidePointOf(wide, levels[k]!)).map((lines, k) => ({
    levelM: levels[k]!,
    lines,
  }));
}

function joinLevels(grid: Grid, field: LevelField, pointOf: (k: number) => SidePoint): Float64Array[][] {
  const segments = cutCells(field);
  const joiner = new LineJoiner(2 * grid.values.length);
  const lines: Float64Array[][] = [];
  for (let k = 0; k < field.levelCount; k++) {
    lines.push(
      joiner.join(segments.sides.subarray(2 * segments.starts[k]!, 2 * segments.starts[k + 1]!), pointOf(k)),
    );
  }
  return lines;
}

function rising(levelsM: readonly number[]): Float64Array {
  for (let k = 1; k < levelsM.length; k++) {
    if (!(levelsM[k]! > levelsM[k - 1]!)) throw new RangeError('The levels of isobaths must rise.');
  }
  return Float64Array.from(levelsM);
}

/** How many of the rising levels are at or below the value. */
function levelsReached(levels: Float64Array, value: number): number {
  let low = 0;
  let high = levels.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (levels[middle]! <= value) low = middle + 1;
    else high = middle;
  }
  return low;
}

/** A corner without a survey never joins two corners across a saddle. */
function middleDeepIn({ values, columns }: Grid, levels: Float64Array): LevelField['middleDeep'] {
  return (node, k) =>
    (values[node]! + values[node + 1]! + values[node + columns]! + values[node + columns + 1]!) / 4 >
    levels[k]!;
}

function sidePointOf({ values, columns, rows, cellM, originM }: Grid, level: number): SidePoint {
  const nodes = columns * rows;
  return (side, point) => {
    const east = side < nodes;
    const node = east ? side : side - nodes;
    const row = Math.floor(node / columns);
    const column = node - row * columns;
    const from = values[node]!;
    const to = values[east ? node + 1 : node + columns]!;
    const crossed = (level - from) / (to - from);
    const share = Number.isNaN(crossed) ? 0.5 : crossed; // beside unsurveyed water
    point[0] = originM.xM + (east ? column + share : column) * cellM;
    point[1] = originM.yM + (east ? row : row + share) * cellM;
  };
}

/** The grid with one unsurveyed node more on every side. */
function withMargin({ values, columns, rows, cellM, originM }: Grid): Grid {
  const wide = new Float64Array((columns + 2) * (rows + 2)).fill(Number.NaN);
  for (let row = 0; row < rows; row++) {
    wide.set(values.subarray(row * columns, (row + 1) * columns), (row + 1) * (columns + 2) + 1);
  }
  return {
    values: wide,
    columns: columns + 2,
    rows: rows + 2,
    cellM,
    originM: { xM: originM.xM - cellM, yM: originM.yM - cellM },
  };
}
