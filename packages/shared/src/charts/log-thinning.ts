import type { Point } from '../geometry/plane';
import type { Grade } from '../surveys/contract';
import { logGrade } from '../surveys/log-grade';

/** A sounding of a log at datum, in the lake's plane. `noiseM` is its own error, one σ; it averages out, `sharedM` does not. */
export type LogSounding = Point & { depthM: number; noiseM: number; sharedM: number };

/** What goes into a chart for all the soundings of one cell. */
export type ThinnedSounding = Point & { depthM: number; sigmaM: number; grade: Grade; count: number };

/** So many soundings of logs go into one chart at most: kriging takes them by neighbourhoods, and more teach it nothing. */
export const MOST_LOG_SOUNDINGS = 20_000;
const LEAST_CELL_M = 1;
const WIDER = 1.25;

/** σ of the places of one log, and whether the board was read near enough to it. */
export type LogSure = { positionM: number; levelKnown: boolean };

/**
 * The side of the cells that soundings are merged in, metres: half a cell of the chart, a metre at least, and wider by
 * quarters until no more than `most` cells hold any.
 */
export function thinningCellM(logs: readonly (readonly Point[])[], chartCellM: number, most: number): number {
  let cellM = Math.max(LEAST_CELL_M, chartCellM / 2);
  while (countCells(logs, cellM) > most) cellM *= WIDER;
  return cellM;
}

function countCells(logs: readonly (readonly Point[])[], cellM: number): number {
  return logs.reduce((sum, points) => sum + new Set(points.map((point) => cellOf(point, cellM))).size, 0);
}

/** The south-west corner of the cell a place lies in, metres on the plane. */
export const cellCorner = ({ xM, yM }: Point, cellM: number): Point => ({
  xM: Math.floor(xM / cellM) * cellM,
  yM: Math.floor(yM / cellM) * cellM,
});

/** A number for each cell of the plane: exact for lakes of up to a hundred thousand cells a side. */
const SIDE = 1 << 20;
const cellOf = ({ xM, yM }: Point, cellM: number): number =>
  (Math.floor(yM / cellM) + SIDE / 2) * SIDE + Math.floor(xM / cellM) + SIDE / 2;

/**
 * The soundings of one log, those in one cell merged by inverse variance at their weighted mean place. What the
 * soundings of a cell scatter beyond their own error widens its σ (Birge ratio), and the error all of them share is added
 * whole. In the order of the first sounding of each cell.
 * Source of the ratio: Birge, Physical Review 40, 1932, 207–227.
 */
export function thinLog(
  soundings: readonly LogSounding[],
  cellM: number,
  { positionM, levelKnown }: LogSure,
): ThinnedSounding[] {
  const cells = new Map<number, LogSounding[]>();
  for (const sounding of soundings) {
    const key = cellOf(sounding, cellM);
    const cell = cells.get(key);
    if (cell) cell.push(sounding);
    else cells.set(key, [sounding]);
  }
  return [...cells.values()].map((cell) => {
    const merged = mergeCell(cell);
    return { ...merged, grade: logGrade({ positionM, depthM: merged.sigmaM, levelKnown }) };
  });
}

function mergeCell(cell: readonly LogSounding[]): Omit<ThinnedSounding, 'grade'> {
  const weights = cell.map(({ noiseM }) => 1 / (noiseM * noiseM));
  const weight = weights.reduce((sum, each) => sum + each, 0);
  const mean = (of: (sounding: LogSounding) => number): number =>
    cell.reduce((sum, sounding, i) => sum + of(sounding) * (weights[i] ?? 0), 0) / weight;
  const depthM = mean((sounding) => sounding.depthM);
  const chi2 = cell.reduce(
    (sum, sounding, i) => sum + (sounding.depthM - depthM) ** 2 * (weights[i] ?? 0),
    0,
  );
  const birge = cell.length > 1 ? Math.max(1, chi2 / (cell.length - 1)) : 1;
  const sharedM = Math.max(...cell.map((sounding) => sounding.sharedM));
  return {
    xM: mean(({ xM }) => xM),
    yM: mean(({ yM }) => yM),
    depthM,
    sigmaM: Math.sqrt(birge / weight + sharedM * sharedM),
    count: cell.length,
  };
}

/** Of points that would hide one another, those to show: the one nearest the middle of each cell, `most` at most. */
export function shownOf<P extends Point>(points: readonly P[], most: number): P[] {
  if (points.length <= most) return [...points];
  let cellM = LEAST_CELL_M;
  while (countCells([points], cellM) > most) cellM *= WIDER;
  const best = new Map<number, { point: P; offM: number }>();
  for (const point of points) {
    const key = cellOf(point, cellM);
    const offM = Math.hypot(
      point.xM - (Math.floor(point.xM / cellM) + 0.5) * cellM,
      point.yM - (Math.floor(point.yM / cellM) + 0.5) * cellM,
    );
    const known = best.get(key);
    if (!known || offM < known.offM) best.set(key, { point, offM });
  }
  return [...best.values()].map(({ point }) => point);
}
