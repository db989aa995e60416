import type { Outline } from '../geometry/polygon';
import { ringsOf } from '../geometry/polygon';
export { waterNodes } from '../geometry/water-cells';
import { columnXM, rowYM } from './grid';
import type { GridFrame } from './grid';

/** 1 for every node off the water with a water node among its eight neighbours: the rim that lines run out over. */
export function rimNodes(water: Uint8Array, { columns, rows }: GridFrame): Uint8Array {
  const rim = new Uint8Array(water.length);
  for (let row = 1; row < rows - 1; row++) {
    for (let i = row * columns + 1, last = i + columns - 2; i < last; i++) {
      if (water[i] === 1) continue;
      const wet =
        water[i - 1]! |
        water[i + 1]! |
        water[i - columns - 1]! |
        water[i - columns]! |
        water[i - columns + 1]! |
        water[i + columns - 1]! |
        water[i + columns]! |
        water[i + columns + 1]!;
      rim[i] = wet;
    }
  }
  return rim;
}

/** Distance from each place to the nearest shoreline, islands' too, metres. Brute force over typed arrays of sides. */
export function shoreDistancesM(
  outline: Outline,
  places: { xM: Float64Array; yM: Float64Array },
): Float64Array {
  const sides = sideArrays(outline);
  const { ax, ay, dx, dy, perLength2 } = sides;
  return places.xM.map((x, t) => {
    const y = places.yM[t]!;
    let least = Infinity;
    for (let s = 0; s < ax.length; s++) {
      const px = x - ax[s]!;
      const py = y - ay[s]!;
      let share = (px * dx[s]! + py * dy[s]!) * perLength2[s]!;
      share = share < 0 ? 0 : share > 1 ? 1 : share;
      const qx = px - share * dx[s]!;
      const qy = py - share * dy[s]!;
      const d2 = qx * qx + qy * qy;
      if (d2 < least) least = d2;
    }
    return Math.sqrt(least);
  });
}

function sideArrays(outline: Outline) {
  const rings = ringsOf(outline);
  const count = rings.reduce((sum, ring) => sum + ring.length, 0);
  const ax = new Float64Array(count);
  const ay = new Float64Array(count);
  const dx = new Float64Array(count);
  const dy = new Float64Array(count);
  const perLength2 = new Float64Array(count);
  let s = 0;
  for (const ring of rings) {
    for (let i = 0; i < ring.length; i++, s++) {
      const a = ring[i]!;
      const b = ring[(i + 1) % ring.length]!;
      ax[s] = a.xM;
      ay[s] = a.yM;
      dx[s] = b.xM - a.xM;
      dy[s] = b.yM - a.yM;
      const length2 = dx[s]! * dx[s]! + dy[s]! * dy[s]!;
      perLength2[s] = length2 > 0 ? 1 / length2 : 0;
    }
  }
  return { ax, ay, dx, dy, perLength2 };
}

/** Places of the marked nodes, in row order, with their node numbers. */
export function placesOf(
  marked: Uint8Array,
  frame: GridFrame,
): { nodes: Int32Array; xM: Float64Array; yM: Float64Array } {
  let count = 0;
  for (const mark of marked) count += mark;
  const nodes = new Int32Array(count);
  const xM = new Float64Array(count);
  const yM = new Float64Array(count);
  let t = 0;
  for (let i = 0; i < marked.length; i++) {
    if (marked[i] !== 1) continue;
    nodes[t] = i;
    const row = Math.floor(i / frame.columns);
    xM[t] = columnXM(frame, i - row * frame.columns);
    yM[t] = rowYM(frame, row);
    t++;
  }
  return { nodes, xM, yM };
}
