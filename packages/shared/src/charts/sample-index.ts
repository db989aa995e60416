/** Samples sorted into square buckets, for nearest-neighbour searches over a plane in metres. */
export type SampleIndex = {
  xM: Float64Array;
  yM: Float64Array;
  westM: number;
  southM: number;
  bucketM: number;
  columns: number;
  rows: number;
  starts: Int32Array; // length columns × rows + 1
  members: Int32Array; // sample numbers, bucket by bucket, ascending within each
  memberXM: Float64Array; // their places in that order, so that a scan reads straight on
  memberYM: Float64Array;
};

const SAMPLES_A_BUCKET = 3;

export function indexSamples(xM: Float64Array, yM: Float64Array): SampleIndex {
  const { westM, southM, eastM, northM } = box(xM, yM);
  const count = xM.length;
  const area = Math.max(eastM - westM, 1e-9) * Math.max(northM - southM, 1e-9);
  const longest = Math.max(eastM - westM, northM - southM, 1e-9);
  const bucketM = Math.max(Math.sqrt((area * SAMPLES_A_BUCKET) / Math.max(1, count)), longest / 2048);
  const columns = Math.floor((eastM - westM) / bucketM) + 1;
  const rows = Math.floor((northM - southM) / bucketM) + 1;
  const starts = new Int32Array(columns * rows + 1);
  const bucketOf = new Int32Array(count);
  for (let i = 0; i < count; i++) {
    const column = Math.min(columns - 1, Math.floor((xM[i]! - westM) / bucketM));
    const row = Math.min(rows - 1, Math.floor((yM[i]! - southM) / bucketM));
    bucketOf[i] = row * columns + column;
    starts[bucketOf[i]! + 1] = starts[bucketOf[i]! + 1]! + 1;
  }
  for (let b = 1; b < starts.length; b++) starts[b] = starts[b]! + starts[b - 1]!;
  const next = starts.slice();
  const members = new Int32Array(count);
  const memberXM = new Float64Array(count);
  const memberYM = new Float64Array(count);
  for (let i = 0; i < count; i++) {
    const bucket = bucketOf[i]!;
    const m = next[bucket]!;
    members[m] = i;
    memberXM[m] = xM[i]!;
    memberYM[m] = yM[i]!;
    next[bucket] = m + 1;
  }
  return { xM, yM, westM, southM, bucketM, columns, rows, starts, members, memberXM, memberYM };
}

type Within = { xM: number; yM: number; reachM: number };

/** Calls `visit` with stretches of `members` that together hold every sample of the square round a place, and some beyond. */
export function forEachBucketWithin(
  { westM, southM, bucketM, columns, rows, starts }: SampleIndex,
  { xM, yM, reachM }: Within,
  visit: (from: number, to: number) => void,
): void {
  const west = Math.max(0, Math.floor((xM - reachM - westM) / bucketM));
  const east = Math.min(columns - 1, Math.floor((xM + reachM - westM) / bucketM));
  const south = Math.max(0, Math.floor((yM - reachM - southM) / bucketM));
  const north = Math.min(rows - 1, Math.floor((yM + reachM - southM) / bucketM));
  for (let row = south; row <= north && west <= east; row++)
    visit(starts[row * columns + west]!, starts[row * columns + east + 1]!);
}

function box(xM: Float64Array, yM: Float64Array) {
  let westM = Infinity;
  let eastM = -Infinity;
  let southM = Infinity;
  let northM = -Infinity;
  for (let i = 0; i < xM.length; i++) {
    westM = Math.min(westM, xM[i]!);
    eastM = Math.max(eastM, xM[i]!);
    southM = Math.min(southM, yM[i]!);
    northM = Math.max(northM, yM[i]!);
  }
  if (westM > eastM) throw new RangeError('There are no samples to index.');
  return { westM, southM, eastM, northM };
}

/** A reusable search: after `find`, `ids` and `squaredM2` hold `found` neighbours, nearest first, ties by sample number. */
export class NearestSearch {
  readonly ids: Int32Array;
  readonly squaredM2: Float64Array;
  found = 0;
  /** Sample left out of the search; −1 for none. */
  without = -1;
  /** Samples below this number and nearer than this are left out too; 0, 0 for none. */
  apartBelow = 0;
  apartM2 = 0;

  constructor(
    private readonly index: SampleIndex,
    private readonly count: number,
  ) {
    this.ids = new Int32Array(count);
    this.squaredM2 = new Float64Array(count);
  }

  find(x: number, y: number): void {
    const { westM, southM, bucketM, columns, rows } = this.index;
    const column = Math.max(0, Math.min(columns - 1, Math.floor((x - westM) / bucketM)));
    const row = Math.max(0, Math.min(rows - 1, Math.floor((y - southM) / bucketM)));
    this.found = 0;
    const last = Math.max(column, columns - 1 - column, row, rows - 1 - row);
    for (let ring = 0; ring <= last; ring++) {
      if (this.found === this.count && this.squaredM2[this.count - 1]! < this.clearM2(x, y, ring)) return;
      this.scanRing(x, y, { column, row, ring });
    }
  }

  /** Squared distance from the place to the nearest bucket not yet scanned when rings below `ring` are done. */
  private clearM2(x: number, y: number, ring: number): number {
    const { westM, southM, bucketM, columns, rows } = this.index;
    const column = Math.max(0, Math.min(columns - 1, Math.floor((x - westM) / bucketM)));
    const row = Math.max(0, Math.min(rows - 1, Math.floor((y - southM) / bucketM)));
    let clear = Infinity;
    if (column - ring >= 0) clear = Math.min(clear, x - (westM + (column - ring + 1) * bucketM));
    if (column + ring < columns) clear = Math.min(clear, westM + (column + ring) * bucketM - x);
    if (row - ring >= 0) clear = Math.min(clear, y - (southM + (row - ring + 1) * bucketM));
    if (row + ring < rows) clear = Math.min(clear, southM + (row + ring) * bucketM - y);
    return clear <= 0 ? 0 : clear * clear;
  }

  private scanRing(x: number, y: number, at: { column: number; row: number; ring: number }): void {
    const { columns, rows } = this.index;
    const { column, row, ring } = at;
    const west = Math.max(0, column - ring);
    const east = Math.min(columns - 1, column + ring);
    const south = Math.max(0, row - ring);
    const north = Math.min(rows - 1, row + ring);
    for (let r = south; r <= north; r++) {
      const edge = r === row - ring || r === row + ring;
      if (edge) {
        for (let c = west; c <= east; c++) this.scanBucket(x, y, r * columns + c);
      } else {
        if (column - ring >= 0) this.scanBucket(x, y, r * columns + column - ring);
        if (column + ring < columns) this.scanBucket(x, y, r * columns + column + ring);
      }
    }
  }

  private scanBucket(x: number, y: number, bucket: number): void {
    const { memberXM, memberYM, starts, members } = this.index;
    const { ids, squaredM2, count, apartM2, apartBelow } = this;
    for (let m = starts[bucket]!, end = starts[bucket + 1]!; m < end; m++) {
      const id = members[m]!;
      if (id === this.without) continue;
      const dx = memberXM[m]! - x;
      const dy = memberYM[m]! - y;
      const d2 = dx * dx + dy * dy;
      if (d2 < apartM2 && id < apartBelow) continue;
      let slot = this.found;
      if (slot === count) {
        const worst = squaredM2[count - 1]!;
        if (d2 > worst || (d2 === worst && id > ids[count - 1]!)) continue;
        slot = count - 1;
      } else this.found = slot + 1;
      while (slot > 0 && (squaredM2[slot - 1]! > d2 || (squaredM2[slot - 1] === d2 && ids[slot - 1]! > id))) {
        squaredM2[slot] = squaredM2[slot - 1]!;
        ids[slot] = ids[slot - 1]!;
        slot--;
      }
      squaredM2[slot] = d2;
      ids[slot] = id;
    }
  }
}
