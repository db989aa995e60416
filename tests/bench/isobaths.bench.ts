import { contours } from 'd3-contour';
import { isobaths } from '@mereward/shared/charts/isobaths';
import type { Comparison } from './measure';

const SIDE = 500;
const LEVELS = Array.from({ length: 20 }, (_, k) => -3.9 + 0.4 * k);

/** 500 × 500 cells of a waved bed cut at twenty levels; the same lines are asked of both. */
export function isobathComparison(): Comparison {
  const values = Float64Array.from({ length: SIDE * SIDE }, (_, i) => {
    const x = (i % SIDE) / 40;
    const y = Math.floor(i / SIDE) / 40;
    return (
      3 * Math.sin(x) * Math.cos(0.8 * y) + Math.sin(3 * x + y) + 0.3 * Math.sin(9 * x) * Math.sin(8 * y)
    );
  });
  const grid = { values, columns: SIDE, rows: SIDE, cellM: 1, originM: { xM: 0, yM: 0 } };
  const plain = [...values];
  const peerLength = innerLength(plain);
  return {
    name: 'isobaths, 500 × 500, 20 levels',
    goal: '≥ 5×',
    ours: () => {
      const lines = isobaths(grid, LEVELS).flatMap((level) => level.lines);
      return `length ${((100 * lines.reduce((sum, line) => sum + lengthOf(line), 0)) / peerLength - 100).toFixed(3)} % off`;
    },
    peer: {
      name: 'd3-contour',
      run: async () => {
        const started = performance.now();
        contours().size([SIDE, SIDE]).thresholds(LEVELS)(plain);
        return performance.now() - started;
      },
    },
  };
}

function lengthOf(line: Float64Array): number {
  let length = 0;
  for (let i = 2; i < line.length; i += 2)
    length += Math.hypot(line[i]! - line[i - 2]!, line[i + 1]! - line[i - 1]!);
  return length;
}

/** Length of the peer's rings less the pieces it adds round the grid's edge, half a cell outside the nodes. */
function innerLength(values: number[]): number {
  let length = 0;
  const outside = (p: readonly number[]) =>
    p[0]! < 0.5 || p[1]! < 0.5 || p[0]! > SIDE - 0.5 || p[1]! > SIDE - 0.5;
  for (const level of contours().size([SIDE, SIDE]).thresholds(LEVELS)(values)) {
    for (const ring of level.coordinates.flat()) {
      for (let i = 1; i < ring.length; i++) {
        const [a, b] = [ring[i - 1]!, ring[i]!];
        if (!outside(a) && !outside(b)) length += Math.hypot(b[0]! - a[0]!, b[1]! - a[1]!);
      }
    }
  }
  return length;
}
