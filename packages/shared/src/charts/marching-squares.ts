/**
 * The field to be cut into lines: for every node, row-major from the south-west, how many of the rising levels it
 * reaches (0 … levelCount), or −1 where cells must carry no line.
 */
export type LevelField = {
  reached: Int16Array;
  columns: number;
  rows: number;
  levelCount: number;
  /** At a saddle of level k in the cell north-east of the node: is the middle deeper than the level? */
  middleDeep: (node: number, k: number) => boolean;
};

/**
 * Segments of all levels, those of level k at [starts[k], starts[k + 1]), two numbers each: the cell side where it begins
 * and that where it ends, the deeper water on the left. Side numbers: a node's own number for the side running east from
 * it; rows × columns more for the side running north.
 */
export type Segments = { starts: Int32Array; sides: Int32Array };

// Sides of a cell: 0 south, 1 east, 2 north, 3 west. Begin, end pairs by corner mask (1 south-west, 2 south-east,
// 4 north-east, 8 north-west deeper); 5 and 10 are the saddles with a shallow middle, 16 and 17 the same with a deep one.
const PAIRS: readonly (readonly number[])[] = [
  [],
  [0, 3],
  [1, 0],
  [1, 3],
  [2, 1],
  [0, 3, 2, 1],
  [2, 0],
  [2, 3],
  [3, 2],
  [0, 2],
  [1, 0, 3, 2],
  [1, 2],
  [3, 1],
  [0, 1],
  [3, 0],
  [],
  [0, 1, 2, 3],
  [3, 0, 1, 2],
];
const CASES = Int8Array.from(PAIRS.flatMap((pairs) => [0, 1, 2, 3].map((i) => pairs[i] ?? -1)));

/** Cuts every cell at the levels between its least and greatest corner, and only at those. */
export function cutCells(field: LevelField): Segments {
  const { reached, columns, rows, middleDeep } = field;
  const starts = countSegments(field);
  const next = starts.slice();
  const sides = new Int32Array(2 * starts[field.levelCount]!);
  const offsets = [0, columns * rows + 1, columns, columns * rows];
  for (let row = 0; row < rows - 1; row++) {
    for (let node = row * columns, last = node + columns - 1; node < last; node++) {
      const sw = reached[node]!;
      const se = reached[node + 1]!;
      const nw = reached[node + columns]!;
      const ne = reached[node + columns + 1]!;
      if (sw === se && sw === nw && sw === ne) continue;
      const low = Math.min(sw, se, nw, ne);
      if (low < 0) continue;
      const high = Math.max(sw, se, nw, ne);
      for (let k = low; k < high; k++) {
        let mask = (sw > k ? 1 : 0) | (se > k ? 2 : 0) | (ne > k ? 4 : 0) | (nw > k ? 8 : 0);
        if ((mask === 5 || mask === 10) && middleDeep(node, k)) mask = mask === 5 ? 16 : 17;
        for (let c = 4 * mask, end = c + 4; c < end; c += 2) {
          const begin = CASES[c]!;
          if (begin < 0) break;
          const p = next[k]!;
          next[k] = p + 1;
          sides[2 * p] = node + offsets[begin]!;
          sides[2 * p + 1] = node + offsets[CASES[c + 1]!]!;
        }
      }
    }
  }
  return { starts, sides };
}

/** Prefix sums of the number of segments of each level; a saddle has two. */
function countSegments({ reached, columns, rows, levelCount }: LevelField): Int32Array {
  const change = new Int32Array(levelCount + 1); // how the count changes from level k − 1 to k
  for (let row = 0; row < rows - 1; row++) {
    for (let node = row * columns, last = node + columns - 1; node < last; node++) {
      const sw = reached[node]!;
      const se = reached[node + 1]!;
      const nw = reached[node + columns]!;
      const ne = reached[node + columns + 1]!;
      if (sw === se && sw === nw && sw === ne) continue;
      const low = Math.min(sw, se, nw, ne);
      if (low < 0) continue;
      const high = Math.max(sw, se, nw, ne);
      change[low] = change[low]! + 1;
      change[high] = change[high]! - 1;
      const from = Math.max(Math.min(sw, ne), Math.min(se, nw));
      const apart = Math.min(Math.max(sw, ne), Math.max(se, nw));
      // Both of one diagonal above both of the other: a second segment at every level between.
      if (Math.min(sw, ne) > Math.max(se, nw) || Math.min(se, nw) > Math.max(sw, ne)) {
        change[apart] = change[apart]! + 1;
        change[from] = change[from]! - 1;
      }
    }
  }
  const starts = new Int32Array(levelCount + 1);
  let count = 0;
  for (let k = 0; k < levelCount; k++) {
    count += change[k]!;
    starts[k + 1] = starts[k]! + count;
  }
  return starts;
}

/** Writes the point of a cell side into point[0], point[1]. */
export type SidePoint = (side: number, point: Float64Array) => void;

/** Joins segments into lines, open ones first, then closed ones; reusable over levels. */
export class LineJoiner {
  private readonly next: Int32Array; // the side a line goes to from each side, −1 for none
  private readonly entered: Uint8Array; // 1 where a segment ends
  private points = new Float64Array(1024);
  private readonly point = new Float64Array(2);

  constructor(sideCount: number) {
    this.next = new Int32Array(sideCount).fill(-1);
    this.entered = new Uint8Array(sideCount);
  }

  /** sides: begin, end pairs of one level. Each line is x, y, x, y …; a closed one repeats its first point at its end. */
  join(sides: Int32Array, sidePoint: SidePoint): Float64Array[] {
    const { next, entered } = this;
    for (let s = 0; s < sides.length; s += 2) {
      next[sides[s]!] = sides[s + 1]!;
      entered[sides[s + 1]!] = 1;
    }
    const lines: Float64Array[] = [];
    for (const closed of [false, true]) {
      for (let s = 0; s < sides.length; s += 2) {
        const begin = sides[s]!;
        if (next[begin]! < 0 || (!closed && entered[begin] === 1)) continue;
        const line = this.follow(begin, sidePoint);
        if (line !== null) lines.push(line);
      }
    }
    return lines;
  }

  private follow(begin: number, sidePoint: SidePoint): Float64Array | null {
    const { next, entered, point } = this;
    let length = 0;
    let side = begin;
    for (;;) {
      sidePoint(side, point);
      const x = point[0]!;
      const y = point[1]!;
      // Levels equal to a node's value put two sides' points on that node: one is enough.
      if (length === 0 || this.points[length - 2] !== x || this.points[length - 1] !== y) {
        if (length + 2 > this.points.length) this.grow();
        this.points[length] = x;
        this.points[length + 1] = y;
        length += 2;
      }
      entered[side] = 0;
      const onward = next[side]!;
      if (onward < 0) break;
      next[side] = -1;
      side = onward;
    }
    return length >= 4 ? this.points.slice(0, length) : null;
  }

  private grow(): void {
    const larger = new Float64Array(2 * this.points.length);
    larger.set(this.points);
    this.points = larger;
  }
}
