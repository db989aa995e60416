import type { SampleIndex } from './sample-index';

const ROUNDING = 1e-12; // far above that of a distance

/**
 * The k samples nearest to a place, in no order, ties by sample number: what kriging needs, and several times faster than
 * finding them in order. `NearestSearch` answers the same samples, nearest first.
 */
export class NearestSet {
  readonly ids: Int32Array;
  found = 0;
  /** Sample left out of the search; −1 for none. */
  without = -1;
  /** Samples below this number and nearer than this are left out too; 0, 0 for none. */
  apartBelow = 0;
  apartM2 = 0;
  private x = 0;
  private y = 0;
  private seen = 0;
  private reachM = 0; // of the neighbours last found, where nothing was left out; 0 when not known
  private readonly seenIds: Int32Array;
  private readonly tied: Int32Array;
  private readonly seenM2: Float64Array;
  private readonly work: Float64Array;

  constructor(
    private readonly index: SampleIndex,
    private readonly count: number,
  ) {
    const all = index.xM.length;
    this.ids = new Int32Array(count);
    this.seenIds = new Int32Array(all);
    this.tied = new Int32Array(all);
    this.seenM2 = new Float64Array(all);
    this.work = new Float64Array(all);
  }

  find(x: number, y: number): void {
    const plain = this.without < 0 && this.apartBelow === 0;
    const movedM = Math.hypot(x - this.x, y - this.y);
    this.x = x;
    this.y = y;
    if (plain && movedM < this.reachM) this.findNear(movedM);
    else this.findByRings();
  }

  /** From a place `movedM` from the last: its neighbours reach no farther than that beyond those of the last. */
  private findNear(movedM: number): void {
    const { westM, southM, bucketM, columns, rows, starts, members, memberXM, memberYM } = this.index;
    const { x, y, ids, seenIds, seenM2 } = this;
    // All of the last within its reach less the way moved are neighbours here too.
    const sureM = Math.max(0, this.reachM * (1 - ROUNDING) - movedM * (1 + ROUNDING));
    const sureM2 = sureM * sureM;
    let sure = 0;
    const reachM = (this.reachM + movedM) * (1 + ROUNDING);
    const reachM2 = reachM * reachM;
    this.seen = 0;
    const south = Math.max(0, Math.floor((y - reachM - southM) / bucketM));
    const north = Math.min(rows - 1, Math.floor((y + reachM - southM) / bucketM));
    for (let row = south; row <= north; row++) {
      const below = southM + row * bucketM - y;
      const off = row === 0 || row === rows - 1 ? 0 : Math.max(0, below, -below - bucketM);
      const half = Math.sqrt(Math.max(0, reachM2 - off * off)) * (1 + ROUNDING);
      const west = Math.max(0, Math.floor((x - half - westM) / bucketM));
      const east = Math.min(columns - 1, Math.floor((x + half - westM) / bucketM));
      if (west > east) continue;
      let seen = this.seen;
      for (let m = starts[row * columns + west]!, end = starts[row * columns + east + 1]!; m < end; m++) {
        const dx = memberXM[m]! - x;
        const dy = memberYM[m]! - y;
        const d2 = dx * dx + dy * dy;
        if (d2 > reachM2) continue;
        if (d2 < sureM2) {
          ids[sure++] = members[m]!;
          continue;
        }
        seenIds[seen] = members[m]!;
        seenM2[seen++] = d2;
      }
      this.seen = seen;
    }
    this.keep(sure, this.nthM2(this.count - sure));
  }

  private findByRings(): void {
    const { westM, southM, bucketM, columns, rows } = this.index;
    const { x, y } = this;
    const column = Math.max(0, Math.min(columns - 1, Math.floor((x - westM) / bucketM)));
    const row = Math.max(0, Math.min(rows - 1, Math.floor((y - southM) / bucketM)));
    this.seen = 0;
    let furthestM2 = Infinity; // of the k nearest among those seen
    const last = Math.max(column, columns - 1 - column, row, rows - 1 - row);
    for (let ring = 0; ring <= last; ring++) {
      // Fewer than half as many again seldom hold the nearest all round: not worth a look.
      if (this.seen >= 1.5 * this.count) {
        furthestM2 = this.nthM2(this.count);
        if (furthestM2 < this.clearM2({ column, row, ring })) break;
      }
      this.scanRing({ column, row, ring });
      furthestM2 = Infinity;
    }
    if (furthestM2 === Infinity && this.seen > this.count) furthestM2 = this.nthM2(this.count);
    this.keep(0, furthestM2);
  }

  /** Squared distance from the place to the nearest bucket not yet scanned when rings below `ring` are done. */
  private clearM2(at: { column: number; row: number; ring: number }): number {
    const { westM, southM, bucketM, columns, rows } = this.index;
    const { x, y } = this;
    const { column, row, ring } = at;
    let clear = Infinity;
    if (column - ring >= 0) clear = Math.min(clear, x - (westM + (column - ring + 1) * bucketM));
    if (column + ring < columns) clear = Math.min(clear, westM + (column + ring) * bucketM - x);
    if (row - ring >= 0) clear = Math.min(clear, y - (southM + (row - ring + 1) * bucketM));
    if (row + ring < rows) clear = Math.min(clear, southM + (row + ring) * bucketM - y);
    return clear <= 0 ? 0 : clear * clear;
  }

  private scanRing(at: { column: number; row: number; ring: number }): void {
    const { columns, rows } = this.index;
    const { column, row, ring } = at;
    const west = Math.max(0, column - ring);
    const east = Math.min(columns - 1, column + ring);
    for (let r = Math.max(0, row - ring), north = Math.min(rows - 1, row + ring); r <= north; r++) {
      if (r === row - ring || r === row + ring) this.scan(r * columns + west, r * columns + east);
      else {
        if (column - ring >= 0) this.scan(r * columns + west, r * columns + west);
        if (column + ring < columns) this.scan(r * columns + east, r * columns + east);
      }
    }
  }

  /** Takes in every sample of the buckets of one row of them. */
  private scan(firstBucket: number, lastBucket: number): void {
    const { memberXM, memberYM, starts, members } = this.index;
    const { x, y, seenIds, seenM2, without, apartM2, apartBelow } = this;
    let seen = this.seen;
    for (let m = starts[firstBucket]!, end = starts[lastBucket + 1]!; m < end; m++) {
      const id = members[m]!;
      const dx = memberXM[m]! - x;
      const dy = memberYM[m]! - y;
      const d2 = dx * dx + dy * dy;
      if (id === without || (d2 < apartM2 && id < apartBelow)) continue;
      seenIds[seen] = id;
      seenM2[seen++] = d2;
    }
    this.seen = seen;
  }

  /** The k-th least squared distance among those seen. Source: Hoare, Communications of the ACM 4, 1961, 321 (Find). */
  private nthM2(count: number): number {
    const { work, seenM2, seen } = this;
    for (let i = 0; i < seen; i++) work[i] = seenM2[i]!;
    const nth = count - 1;
    let low = 0;
    let high = seen - 1;
    while (low < high) {
      const pivot = work[(low + high) >> 1]!;
      let i = low;
      let j = high;
      while (i <= j) {
        while (work[i]! < pivot) i++;
        while (work[j]! > pivot) j--;
        if (i <= j) {
          const swapped = work[i]!;
          work[i++] = work[j]!;
          work[j--] = swapped;
        }
      }
      if (nth <= j) high = j;
      else if (nth >= i) low = i;
      else break;
    }
    return work[nth]!;
  }

  /** Keeps all nearer than the furthest, then those exactly as far by sample number. */
  private keep(sure: number, furthestM2: number): void {
    this.reachM =
      this.without < 0 && this.apartBelow === 0 && furthestM2 < Infinity ? Math.sqrt(furthestM2) : 0;
    const { ids, seenIds, seenM2, seen, count, tied } = this;
    let found = sure;
    let ties = 0;
    for (let i = 0; i < seen; i++) {
      const d2 = seenM2[i]!;
      if (d2 < furthestM2) ids[found++] = seenIds[i]!;
      else if (d2 === furthestM2) tied[ties++] = seenIds[i]!;
    }
    if (ties > 1) tied.subarray(0, ties).sort();
    for (let i = 0; i < ties && found < count; i++) ids[found++] = tied[i]!;
    this.found = found;
  }
}
