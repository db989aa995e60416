import type { SampleIndex } from './sample-index';
import { NearestSearch } from './sample-index';

/** So many times the neighbours wanted are looked through: enough to reach across to the next track or the next peg's fan. */
const CANDIDATES = 4;

/**
 * A reusable search for k samples round a place, at most k/8 from each eighth of the compass, nearest first; where an eighth
 * has too few among the 4 k nearest, the nearest left over fill up. Along a boat's track the plain nearest would all lie on one line.
 * Source: Deutsch & Journel, GSLIB, 1998, section II.4 (octant search).
 */
export class OctantSearch {
  readonly ids: Int32Array;
  found = 0;
  private readonly nearest: NearestSearch;
  private readonly taken = new Int32Array(8);
  private readonly over: Int32Array;

  constructor(
    private readonly index: SampleIndex,
    private readonly count: number,
  ) {
    this.ids = new Int32Array(count);
    this.nearest = new NearestSearch(index, Math.min(index.xM.length, CANDIDATES * count));
    this.over = new Int32Array(CANDIDATES * count);
  }

  set without(sample: number) {
    this.nearest.without = sample;
  }

  set apartBelow(count: number) {
    this.nearest.apartBelow = count;
  }

  set apartM2(squaredM2: number) {
    this.nearest.apartM2 = squaredM2;
  }

  find(x: number, y: number): void {
    const { nearest, ids, taken, over, count } = this;
    const { xM, yM } = this.index;
    nearest.find(x, y);
    taken.fill(0);
    const most = Math.max(1, Math.floor(count / 8));
    let found = 0;
    let left = 0;
    for (let n = 0; n < nearest.found && found < count; n++) {
      const id = nearest.ids[n]!;
      const octant = octantOf(xM[id]! - x, yM[id]! - y);
      if (taken[octant]! < most) {
        taken[octant] = taken[octant]! + 1;
        ids[found++] = id;
      } else over[left++] = id;
    }
    for (let n = 0; n < left && found < count; n++) ids[found++] = over[n]!;
    this.found = found;
  }
}

/** 0–7; a place on a border belongs to one side of it. */
function octantOf(dx: number, dy: number): number {
  const half = dy >= 0 ? 0 : 4;
  const quarter = dx >= 0 ? 0 : 2;
  return half + quarter + (Math.abs(dx) >= Math.abs(dy) ? 0 : 1);
}
