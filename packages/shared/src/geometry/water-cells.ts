import { rowYM, type GridFrame } from './cell-frame';
import type { Point } from './point';
import { ringsOf, type Outline } from './polygon';

/** 1 for every node on the water (inside the shore, on no island), 0 elsewhere; even-odd, one sweep a row. */
export function waterNodes(outline: Outline, frame: GridFrame): Uint8Array {
  const water = new Uint8Array(frame.columns * frame.rows);
  const rings = ringsOf(outline);
  for (let row = 0; row < frame.rows; row++) {
    const crossings = crossingsAt(rings, rowYM(frame, row));
    for (let i = 0; i + 1 < crossings.length; i += 2) {
      const first = Math.max(0, Math.ceil((crossings[i]! - frame.originM.xM) / frame.cellM));
      const last = Math.min(
        frame.columns - 1,
        Math.floor((crossings[i + 1]! - frame.originM.xM) / frame.cellM),
      );
      if (first <= last) water.fill(1, row * frame.columns + first, row * frame.columns + last + 1);
    }
  }
  return water;
}

function crossingsAt(rings: readonly Point[][], yM: number): number[] {
  const crossings: number[] = [];
  for (const ring of rings) {
    let b = ring[ring.length - 1]!;
    for (const a of ring) {
      if (a.yM > yM !== b.yM > yM) crossings.push(a.xM + ((yM - a.yM) / (b.yM - a.yM)) * (b.xM - a.xM));
      b = a;
    }
  }
  return crossings.sort((x, y) => x - y);
}
