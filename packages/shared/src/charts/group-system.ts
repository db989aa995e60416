import { Elimination } from './elimination';
import { priorVarianceM2 } from './kriging-setup';
import type { KrigingSetup } from './kriging-setup';
import { LocalTrend } from './local-trend';
import type { SampleIndex } from './sample-index';
import { covarianceFill } from './variogram';
import type { FillCovariances } from './variogram';

/** Targets kriged together at most. */
export const GROUP_MOST = 16;
const TREND_ROWS = 3; // ones, values, drift

export type Place = { x: number; y: number };

/**
 * Kriging of a few targets close together, each from its own neighbours. The neighbours all of them share are eliminated
 * once, from the rows of every other neighbour and of the targets too; what is left for each target is a small system of
 * its own few. Same answers as solving each alone, but for rounding. All buffers are reused.
 */
export class GroupSystem {
  valueM = 0;
  varianceM2 = 0;
  private size = 0; // targets in the group
  private each = 0; // neighbours of each target
  private known = 0; // samples met in the group
  private shared = 0; // of which every target has
  private jitterM2 = 0;
  private readonly neighbours: Int32Array; // by target, slots
  private readonly ids: Int32Array; // place of each slot's sample in the columns
  private readonly times: Int32Array; // how many targets have a slot
  private readonly rowOf: Int32Array; // of each slot in `common`
  private readonly sharedSlots: Int32Array;
  private readonly otherSlots: Int32Array;
  private readonly own: Int32Array; // slots of one target's own
  private readonly slotOf: Int32Array; // of each place in the columns, −1 outside the group
  private readonly atX: Float64Array; // place of each target
  private readonly atY: Float64Array;
  private readonly coincident: Int32Array; // slot of the sample each target lies on, −1 for none
  private readonly common: Elimination;
  private readonly alone: Elimination;
  private readonly pairs: Float64Array;
  private readonly pivotX: Float64Array;
  private readonly pivotY: Float64Array;
  private readonly trend = new LocalTrend();
  private readonly prior: number;
  private readonly fill: FillCovariances;
  private readonly placeOf: Int32Array; // of each sample, in the order of the columns below
  private readonly xM: Float64Array;
  private readonly yM: Float64Array;
  private readonly sampleValueM: Float64Array;
  private readonly errorVarianceM2: Float64Array;
  private readonly driftM: Float64Array | undefined;

  constructor(
    private readonly setup: KrigingSetup,
    most: number,
    index: SampleIndex,
  ) {
    this.fill = covarianceFill(setup.variogram);
    // The samples side by side as they lie in the plane: what a group needs then comes from few stretches of memory.
    const { members } = index;
    const { valueM, errorVarianceM2 } = setup.samples;
    const { driftM } = setup;
    this.xM = index.memberXM;
    this.yM = index.memberYM;
    this.sampleValueM = Float64Array.from(members, (id) => valueM[id]!);
    this.errorVarianceM2 = Float64Array.from(members, (id) => errorVarianceM2[id]!);
    if (driftM !== undefined) this.driftM = Float64Array.from(members, (id) => driftM[id]!);
    this.placeOf = new Int32Array(members.length);
    for (let m = 0; m < members.length; m++) this.placeOf[members[m]!] = m;
    const all = most * GROUP_MOST;
    this.neighbours = new Int32Array(all);
    this.ids = new Int32Array(all);
    this.times = new Int32Array(all);
    this.rowOf = new Int32Array(all);
    this.sharedSlots = new Int32Array(all);
    this.otherSlots = new Int32Array(all);
    this.own = new Int32Array(most);
    this.slotOf = new Int32Array(setup.samples.xM.length).fill(-1);
    this.atX = new Float64Array(GROUP_MOST);
    this.atY = new Float64Array(GROUP_MOST);
    this.coincident = new Int32Array(GROUP_MOST);
    this.pairs = new Float64Array((all + GROUP_MOST + most) * most);
    this.pivotX = new Float64Array(most);
    this.pivotY = new Float64Array(most);
    this.common = new Elimination(most, all + GROUP_MOST + TREND_ROWS);
    this.alone = new Elimination(most, most + 1 + TREND_ROWS);
    this.prior = priorVarianceM2(setup);
  }

  /** Forgets the last group. */
  begin(): void {
    for (let slot = 0; slot < this.known; slot++) this.slotOf[this.ids[slot]!] = -1;
    this.size = 0;
    this.known = 0;
  }

  /** Takes a target in; false when it has another number of neighbours than those before it, and so needs a group of its own. */
  add({ x, y }: Place, found: Int32Array, count: number): boolean {
    const { size, ids, times, slotOf, neighbours, placeOf } = this;
    if (size > 0 && (count !== this.each || size === GROUP_MOST)) return false;
    const { xM, yM } = this;
    this.each = count;
    this.atX[size] = x;
    this.atY[size] = y;
    let known = this.known;
    let highest = -1;
    let onSample = -1;
    for (let i = 0, to = size * count; i < count; i++, to++) {
      const at = placeOf[found[i]!]!;
      let slot = slotOf[at]!;
      if (slot < 0) {
        slot = known++;
        slotOf[at] = slot;
        ids[slot] = at;
        times[slot] = 0;
      }
      times[slot] = times[slot]! + 1;
      neighbours[to] = slot;
      if (xM[at] === x && yM[at] === y && found[i]! > highest) {
        highest = found[i]!; // of several at one place, always the same
        onSample = slot;
      }
    }
    this.coincident[size] = this.setup.nuggetIs === 'noise' ? -1 : onSample;
    this.known = known;
    this.size = size + 1;
    return true;
  }

  /** Eliminates what the group shares; false when its system can't be solved. `jitterM2` is added to every diagonal. */
  prepare(jitterM2: number): boolean {
    const { size, each, known, times, rowOf, sharedSlots, otherSlots, common } = this;
    let shared = 0;
    let others = 0;
    for (let slot = 0; slot < known; slot++) {
      if (times[slot] === size) {
        rowOf[slot] = -1;
        sharedSlots[shared++] = slot;
      } else otherSlots[others++] = slot;
    }
    this.shared = shared;
    this.jitterM2 = jitterM2;
    if (each === 0) throw new RangeError('Kriging needs at least one neighbour.');
    if (shared === 0) {
      for (let o = 0; o < others; o++) rowOf[otherSlots[o]!] = 0;
      return true;
    }
    const firstTarget = shared + TREND_ROWS;
    for (let o = 0; o < others; o++) rowOf[otherSlots[o]!] = firstTarget + size + o;
    this.layShared(others);
    return common.run(0, shared, firstTarget + size + others);
  }

  /** Rows of the shared, of what the trend needs, of the targets and of the others: covariances with the shared. */
  private layShared(others: number): void {
    const { size, shared, ids, sharedSlots, pairs, common } = this;
    const { stride, rows } = common;
    const { sampleValueM, errorVarianceM2, driftM } = this;
    const addedM2 = this.setup.variogram.nuggetM2 + this.jitterM2;
    const trendRow = shared * stride;
    this.measureShared(others);
    let p = 0;
    for (let i = 0; i < shared; i++) {
      const id = ids[sharedSlots[i]!]!;
      const row = i * stride;
      for (let k = 0; k <= i; k++) rows[row + k] = pairs[p++]!;
      rows[row + i] = rows[row + i]! + addedM2 + errorVarianceM2[id]!;
      rows[trendRow + i] = 1;
      rows[trendRow + stride + i] = sampleValueM[id]!;
      rows[trendRow + 2 * stride + i] = driftM === undefined ? 0 : driftM[id]!;
    }
    for (let r = 0; r < size + others; r++) {
      const row = (shared + TREND_ROWS + r) * stride;
      for (let k = 0; k < shared; k++) rows[row + k] = pairs[p++]!;
    }
    this.addNuggets();
  }

  /** Covariances with the shared, packed row by row: many at a time are worked out several times faster than few. */
  private measureShared(others: number): void {
    const { size, shared, ids, sharedSlots, otherSlots, atX, atY, pivotX, pivotY, pairs } = this;
    const { xM, yM } = this;
    let p = 0;
    for (let i = 0; i < shared; i++) {
      const id = ids[sharedSlots[i]!]!;
      const x = xM[id]!;
      const y = yM[id]!;
      pivotX[i] = x;
      pivotY[i] = y;
      for (let k = 0; k <= i; k++) {
        const dx = pivotX[k]! - x;
        const dy = pivotY[k]! - y;
        pairs[p++] = dx * dx + dy * dy;
      }
    }
    for (let r = 0; r < size + others; r++) {
      const id = r < size ? -1 : ids[otherSlots[r - size]!]!;
      const x = r < size ? atX[r]! : xM[id]!;
      const y = r < size ? atY[r]! : yM[id]!;
      for (let k = 0; k < shared; k++) {
        const dx = pivotX[k]! - x;
        const dy = pivotY[k]! - y;
        pairs[p++] = dx * dx + dy * dy;
      }
    }
    this.fill(pairs, 0, p);
  }

  /** A target on a sample takes the nugget's share of the bed with it. */
  private addNuggets(): void {
    const { size, shared, sharedSlots, coincident, common } = this;
    for (let r = 0; r < size; r++) {
      const column = coincident[r]! < 0 ? -1 : sharedSlots.subarray(0, shared).indexOf(coincident[r]!);
      if (column < 0) continue;
      const place = (shared + TREND_ROWS + r) * common.stride + column;
      common.rows[place] = common.rows[place]! + this.setup.variogram.nuggetM2;
    }
  }

  /** Prediction and variance of the i-th target of the group; false when its system can't be solved. */
  predict(i: number, drift: number): boolean {
    const { shared, each, own, neighbours, rowOf } = this;
    let owned = 0;
    for (let n = i * each, end = n + each; n < end; n++) {
      const slot = neighbours[n]!;
      if (rowOf[slot]! >= 0) own[owned++] = slot;
    }
    this.layOwn(i, owned);
    if (!this.alone.run(shared, owned, owned + 1 + TREND_ROWS)) return false;
    this.readOff(owned, drift);
    return true;
  }

  /** Rows of the i-th target alone: its own neighbours, itself, ones, values, drift; what was eliminated comes along. */
  private layOwn(i: number, owned: number): void {
    const { shared, own, ids, rowOf, alone, coincident, pairs } = this;
    const { stride, rows } = alone;
    const { sampleValueM, errorVarianceM2, driftM } = this;
    const { variogram } = this.setup;
    const addedM2 = variogram.nuggetM2 + this.jitterM2;
    const targetRow = owned * stride;
    this.measureOwn(i, owned);
    let p = 0;
    for (let r = 0; r < owned; r++) {
      const slot = own[r]!;
      const id = ids[slot]!;
      this.takeAlong(rowOf[slot]!, r * stride);
      const first = r * stride + shared;
      for (let k = 0; k <= r; k++) rows[first + k] = pairs[p++]!;
      rows[first + r] = rows[first + r]! + addedM2 + errorVarianceM2[id]!;
      let place = targetRow + shared + r;
      rows[place] = pairs[p++]! + (slot === coincident[i] ? variogram.nuggetM2 : 0);
      rows[(place += stride)] = 1;
      rows[(place += stride)] = sampleValueM[id]!;
      rows[place + stride] = driftM === undefined ? 0 : driftM[id]!;
    }
    this.takeAlong(shared + TREND_ROWS + i, targetRow);
    for (let r = 0; r < TREND_ROWS; r++) this.takeAlong(shared + r, targetRow + (r + 1) * stride);
  }

  /** Covariances of each own neighbour with those before it, itself and the target, packed. */
  private measureOwn(i: number, owned: number): void {
    const { own, ids, atX, atY, pivotX, pivotY, pairs } = this;
    const { xM, yM } = this;
    const targetX = atX[i]!;
    const targetY = atY[i]!;
    let p = 0;
    for (let r = 0; r < owned; r++) {
      const id = ids[own[r]!]!;
      const x = xM[id]!;
      const y = yM[id]!;
      pivotX[r] = x;
      pivotY[r] = y;
      for (let k = 0; k <= r; k++) {
        const dx = pivotX[k]! - x;
        const dy = pivotY[k]! - y;
        pairs[p++] = dx * dx + dy * dy;
      }
      const dx = targetX - x;
      const dy = targetY - y;
      pairs[p++] = dx * dx + dy * dy;
    }
    this.fill(pairs, 0, p);
  }

  private takeAlong(commonRow: number, to: number): void {
    const { shared, common, alone } = this;
    const from = commonRow * common.stride;
    for (let k = 0; k < shared; k++) alone.rows[to + k] = common.rows[from + k]!;
  }

  private readOff(owned: number, drift: number): void {
    const { each, trend } = this;
    const { rows, stride } = this.alone;
    const target = owned * stride;
    const ones = target + stride;
    const values = ones + stride;
    const drifts = values + stride;
    let known = 0;
    let one = 0;
    let value = 0;
    let drifted = 0;
    let oo = 0;
    let oz = 0;
    let od = 0;
    let dd = 0;
    let dz = 0;
    for (let k = 0; k < each; k++) {
      const u = rows[target + k]!;
      const o = rows[ones + k]!;
      const z = rows[values + k]!;
      known += u * u;
      one += u * o;
      value += u * z;
      oo += o * o;
      oz += o * z;
    }
    if (this.driftM !== undefined) {
      for (let k = 0; k < each; k++) {
        const d = rows[drifts + k]!;
        drifted += rows[target + k]! * d;
        od += rows[ones + k]! * d;
        dd += d * d;
        dz += rows[values + k]! * d;
      }
    }
    trend.fit({ oo, oz, od, dd, dz });
    const shortOne = 1 - one;
    const shortDrift = drift - drifted;
    this.valueM = value + trend.constant * shortOne + trend.slope * shortDrift;
    this.varianceM2 = Math.max(0, this.prior - known + trend.varianceM2(shortOne, shortDrift));
  }
}
