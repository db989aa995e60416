import type { KrigingSetup } from './kriging-setup';
import { requireDrift } from './kriging-setup';
import { PatchSystem } from './patch-system';
import { OctantSearch } from './octant-search';
import type { SampleIndex } from './sample-index';
import { forEachBucketWithin, indexSamples } from './sample-index';
import type { Targets } from './sample-points';

/** Samples a patch is solved from: as many as this on average, and within these bounds wherever samples lie thin or thick. */
const USUAL_MEMBERS = 96;
const FEWEST_MEMBERS = 48;
const MOST_MEMBERS = 192;
/** A patch is solved from samples this many times its own half side away: half a patch beyond where it is used. */
const REACH = 1.5;

/**
 * Kriged values for more samples than are solved at once, without the small steps that a moving neighbourhood
 * leaves where its members change. The plane is covered by square patches that overlap by half; each is kriged from the
 * samples in and around it, and patches are blended by weights that rise smoothly from 0 at a patch's edge to 1 at its middle
 * and sum to 1 everywhere, so the surface and its slope are continuous wherever kriging's own are. Any part of the targets
 * may be asked for by itself, with the same answers.
 * Source: partition of unity, Babuška & Melenk, Int. J. Numer. Meth. Engng 40, 1997, 727–758; Wendland, Scattered Data
 * Approximation, 2005, section 15.4.
 */
export function krigeBlended(setup: KrigingSetup, targets: Targets): Float64Array {
  const valuesM = new Float64Array(targets.xM.length);
  const system = new PatchSystem(setup, MOST_MEMBERS);
  forEachPatch(setup, targets, ({ x, y, sideM, ids, found }, members) => {
    system.solve(ids, found);
    for (const t of members) {
      const [tx, ty] = [targets.xM[t]!, targets.yM[t]!];
      const weight = rise(1 - Math.abs(tx - x) / sideM) * rise(1 - Math.abs(ty - y) / sideM);
      if (weight > 0) valuesM[t] = valuesM[t]! + weight * system.valueAt(tx, ty, targets.driftM?.[t] ?? 0);
    }
  });
  return valuesM;
}

/**
 * Kriging variance of the same, m²: that of the patch which weighs most at a place, from the samples its value comes from.
 * The others see nearly the same samples, so their errors go together and blending takes off next to nothing.
 */
export function blendedVariance(setup: KrigingSetup, targets: Targets): Float64Array {
  const varianceM2 = new Float64Array(targets.xM.length);
  const system = new PatchSystem(setup, MOST_MEMBERS);
  forEachPatch(setup, targets, ({ x, y, sideM, ids, found }, members) => {
    system.solve(ids, found);
    for (const t of members) {
      const [tx, ty] = [targets.xM[t]!, targets.yM[t]!];
      if (Math.round(tx / sideM) * sideM !== x || Math.round(ty / sideM) * sideM !== y) continue;
      varianceM2[t] = system.varianceAt(tx, ty, targets.driftM?.[t] ?? 0);
    }
  });
  return varianceM2;
}

type Patch = { x: number; y: number; sideM: number; ids: Int32Array; found: number };

/** Finds the samples of every patch in turn, and gives with them the targets in the cells that touch its middle. */
function forEachPatch(
  setup: KrigingSetup,
  targets: Targets,
  use: (patch: Patch, members: Iterable<number>) => void,
): void {
  requireDrift(setup, targets);
  const { xM, yM } = setup.samples;
  const index = indexSamples(xM, yM);
  const sideM = patchSideM(index);
  const binned = binTargets(targets, sideM);
  const members = new Members(index, sideM);
  for (let row = 0; row <= binned.rows; row++) {
    for (let column = 0; column <= binned.columns; column++) {
      const x = (binned.firstColumn + column) * sideM;
      const y = (binned.firstRow + row) * sideM;
      const cells = cellsRound(binned, column, row);
      if (cells.length === 0) continue;
      members.find(x, y);
      use({ x, y, sideM, ids: members.ids, found: members.found }, inCells(binned, cells));
    }
  }
}

function* inCells({ starts, members }: Binned, cells: readonly number[]): Generator<number> {
  for (const cell of cells) for (let m = starts[cell]!; m < starts[cell + 1]!; m++) yield members[m]!;
}

/** 0 at 0, 1 at 1, level at both ends; rise(t) + rise(1 − t) = 1. */
const rise = (t: number): number => (t <= 0 ? 0 : t * t * (3 - 2 * t));

/** The side with which the patch round a sample taken at random holds the usual number: small where most samples crowd. */
function patchSideM({ xM, yM, bucketM, columns, rows }: SampleIndex): number {
  let sideM = Math.sqrt(
    (columns * rows * bucketM * bucketM * USUAL_MEMBERS) / (xM.length * 4 * REACH * REACH),
  );
  for (let turn = 0; turn < 3; turn++) {
    const windowM = 2 * REACH * sideM;
    const counts = new Map<number, number>();
    for (let i = 0; i < xM.length; i++) {
      const key = Math.floor(xM[i]! / windowM) * 2_000_003 + Math.floor(yM[i]! / windowM);
      counts.set(key, (counts.get(key) ?? 0) + 1);
    }
    let squares = 0;
    for (const count of counts.values()) squares += count * count;
    sideM *= Math.sqrt(USUAL_MEMBERS / (squares / xM.length));
  }
  return sideM;
}

type Binned = {
  firstColumn: number; // of the lattice of patch middles
  firstRow: number;
  columns: number; // of cells between them
  rows: number;
  starts: Int32Array;
  members: Int32Array; // target numbers, cell by cell
};

function binTargets({ xM, yM }: Targets, sideM: number): Binned {
  let [west, east, south, north] = [Infinity, -Infinity, Infinity, -Infinity];
  for (let t = 0; t < xM.length; t++) {
    west = Math.min(west, xM[t]!);
    east = Math.max(east, xM[t]!);
    south = Math.min(south, yM[t]!);
    north = Math.max(north, yM[t]!);
  }
  if (xM.length === 0) [west, east, south, north] = [0, 0, 0, 0];
  const firstColumn = Math.floor(west / sideM);
  const firstRow = Math.floor(south / sideM);
  const columns = Math.floor(east / sideM) - firstColumn + 1;
  const rows = Math.floor(north / sideM) - firstRow + 1;
  const cellOf = (t: number) =>
    (Math.floor(yM[t]! / sideM) - firstRow) * columns + Math.floor(xM[t]! / sideM) - firstColumn;
  const starts = new Int32Array(columns * rows + 1);
  for (let t = 0; t < xM.length; t++) starts[cellOf(t) + 1] = starts[cellOf(t) + 1]! + 1;
  for (let cell = 1; cell < starts.length; cell++) starts[cell] = starts[cell]! + starts[cell - 1]!;
  const next = starts.slice();
  const members = new Int32Array(xM.length);
  for (let t = 0; t < xM.length; t++) {
    const cell = cellOf(t);
    members[next[cell]!] = t;
    next[cell] = next[cell]! + 1;
  }
  return { firstColumn, firstRow, columns, rows, starts, members };
}

/** The cells touching a patch's middle that hold targets. */
function cellsRound({ columns, rows, starts }: Binned, column: number, row: number): number[] {
  const cells: number[] = [];
  for (let r = Math.max(0, row - 1); r <= Math.min(rows - 1, row); r++) {
    for (let c = Math.max(0, column - 1); c <= Math.min(columns - 1, column); c++) {
      const cell = r * columns + c;
      if (starts[cell + 1]! > starts[cell]!) cells.push(cell);
    }
  }
  return cells;
}

/** The samples of one patch: all within its reach, or by octant where those are too few or too many. */
class Members {
  ids: Int32Array;
  found = 0;
  readonly most: number;
  private readonly within: Int32Array;
  private readonly few: OctantSearch;
  private readonly many: OctantSearch;

  constructor(
    private readonly index: SampleIndex,
    private readonly sideM: number,
  ) {
    const count = index.xM.length;
    this.most = Math.min(count, MOST_MEMBERS);
    this.within = new Int32Array(this.most);
    this.ids = this.within;
    this.few = new OctantSearch(index, Math.min(count, FEWEST_MEMBERS));
    this.many = new OctantSearch(index, this.most);
  }

  find(x: number, y: number): void {
    const inside = this.square(x, y);
    if (inside >= FEWEST_MEMBERS && inside <= this.most) {
      this.ids = this.within;
      this.found = inside;
      return;
    }
    const search = inside < FEWEST_MEMBERS ? this.few : this.many;
    search.find(x, y);
    this.ids = search.ids;
    this.found = search.found;
  }

  /** Fills `within` with the samples of the square, and answers how many there are, or one more than it can hold. */
  private square(x: number, y: number): number {
    const { index, within, most } = this;
    const reachM = REACH * this.sideM;
    let found = 0;
    forEachBucketWithin(index, { xM: x, yM: y, reachM }, (from, to) => {
      for (let m = from; m < to && found <= most; m++) {
        const id = index.members[m]!;
        if (Math.abs(index.xM[id]! - x) > reachM || Math.abs(index.yM[id]! - y) > reachM) continue;
        if (found < most) within[found] = id;
        found++;
      }
    });
    return found;
  }
}
