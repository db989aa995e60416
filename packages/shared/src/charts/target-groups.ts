import type { Targets } from './sample-points';

/** Target numbers group by group: the g-th group is members[starts[g]] up to members[starts[g + 1]]. */
export type TargetGroups = { starts: Int32Array; members: Int32Array };

/** Targets that lie in the same square of a side, metres, at most so many together; each group in the order given. */
export function groupTargets({ xM, yM }: Targets, sideM: number, most: number): TargetGroups {
  const count = xM.length;
  const cells = new Map<number, number>();
  const cellOf = new Int32Array(count);
  let [west, south] = [Infinity, Infinity];
  for (let t = 0; t < count; t++) {
    west = Math.min(west, xM[t]!);
    south = Math.min(south, yM[t]!);
  }
  // A quarter of the side off, so that places of a grid do not fall on the border of two squares.
  const [left, below] = [west - sideM / 4, south - sideM / 4];
  for (let t = 0; t < count; t++) {
    const key = Math.floor((yM[t]! - below) / sideM) * 67_108_864 + Math.floor((xM[t]! - left) / sideM);
    let cell = cells.get(key);
    if (cell === undefined) cells.set(key, (cell = cells.size));
    cellOf[t] = cell;
  }
  const cellStarts = new Int32Array(cells.size + 1);
  for (let t = 0; t < count; t++) cellStarts[cellOf[t]! + 1] = cellStarts[cellOf[t]! + 1]! + 1;
  for (let c = 0; c < cells.size; c++) cellStarts[c + 1] = cellStarts[c + 1]! + cellStarts[c]!;
  const next = cellStarts.slice();
  const members = new Int32Array(count);
  for (let t = 0; t < count; t++) {
    const cell = cellOf[t]!;
    members[next[cell]!] = t;
    next[cell] = next[cell]! + 1;
  }
  const starts: number[] = [0];
  for (let c = 0; c < cells.size; c++)
    for (let from = cellStarts[c]!; from < cellStarts[c + 1]!; from += most)
      starts.push(Math.min(from + most, cellStarts[c + 1]!));
  return { starts: Int32Array.from(starts), members };
}
