/** Connected regions of cells that hold one value: the number of each cell's region and how many cells each has. */
export type CellRegions = { of: Int32Array; sizes: number[]; values: number[] };

/**
 * Parts cells, row-major, into regions of equal value that touch along a side. Cells of a value below `from` belong to none
 * (−1). Regions are numbered in the order of their first cell.
 */
export function cellRegions(values: ArrayLike<number>, columns: number, from = 0): CellRegions {
  const of = new Int32Array(values.length).fill(-1);
  const sizes: number[] = [];
  const kinds: number[] = [];
  const stack: number[] = [];
  for (let start = 0; start < values.length; start++) {
    const value = values[start]!;
    if (value < from || of[start] !== -1) continue;
    const region = sizes.length;
    let size = 0;
    of[start] = region;
    stack.push(start);
    for (let node = stack.pop(); node !== undefined; node = stack.pop()) {
      size++;
      const column = node % columns;
      const beside = [
        column > 0 ? node - 1 : -1,
        column < columns - 1 ? node + 1 : -1,
        node - columns,
        node + columns,
      ];
      for (const next of beside) {
        if (next < 0 || next >= values.length || of[next] !== -1 || values[next] !== value) continue;
        of[next] = region;
        stack.push(next);
      }
    }
    sizes.push(size);
    kinds.push(value);
  }
  return { of, sizes, values: kinds };
}
