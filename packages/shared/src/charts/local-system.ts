import { priorVarianceM2 } from './kriging-setup';
import type { KrigingSetup } from './kriging-setup';
import type { FillCovariances } from './local-covariance';

/**
 * One neighbourhood's system: packed lower Cholesky factor and the solved vectors. All buffers are reused. The factor is kept
 * while the next target has the same neighbours.
 */
export class LocalSystem {
  valueM = 0;
  varianceM2 = 0;
  private order = 0;
  private readonly ids: Int32Array;
  private readonly sorted: Int32Array;
  private readonly factor: Float64Array; // row i at i (i + 1) / 2; the diagonal holds reciprocals
  private readonly solvedOnes: Float64Array;
  private readonly solvedDrift: Float64Array;
  private readonly solvedValues: Float64Array; // L⁻¹ z
  private readonly dual: Float64Array; // K⁻¹ (z − F β), once asked for
  private readonly row: Float64Array;
  private trendKnown = false; // of the factor held
  private constant = 0;
  private slope = 0;
  private inverseOo = 0; // (Fᵀ K⁻¹ F)⁻¹
  private inverseOd = 0;
  private inverseDd = 0;
  private readonly prior: number;
  private readonly driftM: Float64Array | undefined;

  constructor(
    private readonly setup: KrigingSetup,
    most: number,
    private readonly fill: FillCovariances,
  ) {
    this.ids = new Int32Array(most).fill(-1);
    this.sorted = new Int32Array(most);
    this.factor = new Float64Array((most * (most + 1)) / 2);
    this.solvedOnes = new Float64Array(most);
    this.solvedDrift = new Float64Array(most);
    this.solvedValues = new Float64Array(most);
    this.dual = new Float64Array(most);
    this.row = new Float64Array(most);
    this.prior = priorVarianceM2(setup);
    this.driftM = setup.driftM;
  }

  /** Takes the neighbours, ascending, and factorises unless they are those already held. */
  gather(found: Int32Array, count: number): void {
    const { sorted, ids } = this;
    for (let i = 0; i < count; i++) {
      const id = found[i]!;
      let slot = i;
      while (slot > 0 && sorted[slot - 1]! > id) {
        sorted[slot] = sorted[slot - 1]!;
        slot--;
      }
      sorted[slot] = id;
    }
    let same = this.order === count;
    for (let i = 0; same && i < count; i++) same = ids[i] === sorted[i];
    if (same) return;
    ids.set(sorted);
    this.order = count;
    this.fillCovariances(0);
    let jitterM2 = 0;
    while (!this.factorise()) {
      jitterM2 = jitterM2 === 0 ? 1e-10 * this.prior : jitterM2 * 100;
      if (!(jitterM2 <= this.prior))
        throw new RangeError('Samples at one place with no error stated cannot be kriged.');
      this.fillCovariances(jitterM2);
    }
    this.trendKnown = false;
  }

  private fillCovariances(jitterM2: number): void {
    const { factor, ids, order } = this;
    const { xM, yM, errorVarianceM2 } = this.setup.samples;
    let p = 0;
    for (let i = 0; i < order; i++) {
      const x = xM[ids[i]!]!;
      const y = yM[ids[i]!]!;
      for (let j = 0; j <= i; j++, p++) {
        const dx = xM[ids[j]!]! - x;
        const dy = yM[ids[j]!]! - y;
        factor[p] = dx * dx + dy * dy;
      }
    }
    this.fill(factor, p);
    const addedM2 = this.setup.variogram.nuggetM2 + jitterM2;
    for (let i = 0; i < order; i++) {
      const diagonal = (i * (i + 3)) / 2;
      factor[diagonal] = factor[diagonal]! + addedM2 + errorVarianceM2[ids[i]!]!;
    }
  }

  /** Two rows at a time, so that each row above is read once for both. */
  private factorise(): boolean {
    const { factor, order } = this;
    let i = 0;
    for (; i + 1 < order; i += 2) {
      const first = (i * (i + 1)) / 2;
      const second = first + i + 1;
      let j = 0;
      let rowJ = 0;
      // Two columns at a time as well: every factor read serves two products. i is even, so none is left over.
      for (; j < i; j += 2) {
        const rowK = rowJ + j + 1;
        let a0 = factor[first + j]!;
        let b0 = factor[second + j]!;
        let a1 = factor[first + j + 1]!;
        let b1 = factor[second + j + 1]!;
        for (let k = 0; k < j; k++) {
          const p = factor[first + k]!;
          const q = factor[second + k]!;
          const u = factor[rowJ + k]!;
          const v = factor[rowK + k]!;
          a0 -= p * u;
          b0 -= q * u;
          a1 -= p * v;
          b1 -= q * v;
        }
        const scale = factor[rowJ + j]!;
        a0 *= scale;
        b0 *= scale;
        const cross = factor[rowK + j]!;
        const scaleK = factor[rowK + j + 1]!;
        factor[first + j] = a0;
        factor[second + j] = b0;
        factor[first + j + 1] = (a1 - a0 * cross) * scaleK;
        factor[second + j + 1] = (b1 - b0 * cross) * scaleK;
        rowJ = rowK + j + 2;
      }
      let pivotA = factor[first + i]!;
      let cross = factor[second + i]!;
      let pivotB = factor[second + i + 1]!;
      for (let k = 0; k < i; k++) {
        const a = factor[first + k]!;
        const b = factor[second + k]!;
        pivotA -= a * a;
        cross -= a * b;
        pivotB -= b * b;
      }
      if (!(pivotA > 0)) return false;
      const scale = 1 / Math.sqrt(pivotA);
      cross *= scale;
      pivotB -= cross * cross;
      if (!(pivotB > 0)) return false;
      factor[first + i] = scale;
      factor[second + i] = cross;
      factor[second + i + 1] = 1 / Math.sqrt(pivotB);
    }
    return i === order || this.factoriseLast(i);
  }

  private factoriseLast(i: number): boolean {
    const { factor } = this;
    const row = (i * (i + 1)) / 2;
    let pivot = factor[row + i]!;
    for (let j = 0, rowJ = 0; j < i; rowJ += ++j) {
      let sum = factor[row + j]!;
      for (let k = 0; k < j; k++) sum -= factor[row + k]! * factor[rowJ + k]!;
      sum *= factor[rowJ + j]!;
      factor[row + j] = sum;
      pivot -= sum * sum;
    }
    if (!(pivot > 0)) return false;
    factor[row + i] = 1 / Math.sqrt(pivot);
    return true;
  }

  /** Solves L x = x in one pass over L for the covariances of a target, the ones and the samples' values. */
  private forwardThree(x: Float64Array, y: Float64Array, z: Float64Array): void {
    const { factor, order } = this;
    for (let i = 0, row = 0; i < order; row += ++i) {
      let a = x[i]!;
      let b = y[i]!;
      let c = z[i]!;
      for (let k = 0; k < i; k++) {
        const l = factor[row + k]!;
        a -= l * x[k]!;
        b -= l * y[k]!;
        c -= l * z[k]!;
      }
      const scale = factor[row + i]!;
      x[i] = a * scale;
      y[i] = b * scale;
      z[i] = c * scale;
    }
  }

  private forwardOne(x: Float64Array): void {
    const { factor, order } = this;
    for (let i = 0, row = 0; i < order; row += ++i) {
      let sum = x[i]!;
      for (let k = 0; k < i; k++) sum -= factor[row + k]! * x[k]!;
      x[i] = sum * factor[row + i]!;
    }
  }

  /** Solves for `row`, and with it for what the trend needs when the factor is new. */
  private forward(): void {
    const { ids, order, row, solvedOnes, solvedValues, solvedDrift, driftM } = this;
    if (this.trendKnown) {
      this.forwardOne(row);
      return;
    }
    const { valueM } = this.setup.samples;
    for (let i = 0; i < order; i++) {
      solvedOnes[i] = 1;
      solvedValues[i] = valueM[ids[i]!]!;
    }
    this.forwardThree(row, solvedOnes, solvedValues);
    if (driftM !== undefined) {
      for (let i = 0; i < order; i++) solvedDrift[i] = driftM[ids[i]!]!;
      this.forwardOne(solvedDrift);
    }
    this.fitTrend();
    this.trendKnown = true;
  }

  /** Generalised least squares of the samples on 1 and the drift. */
  private fitTrend(): void {
    const { solvedOnes, solvedDrift, solvedValues } = this;
    const oo = this.dotOf(solvedOnes, solvedOnes);
    const oz = this.dotOf(solvedOnes, solvedValues);
    this.constant = oz / oo;
    this.slope = 0;
    this.inverseOo = 1 / oo;
    this.inverseOd = 0;
    this.inverseDd = 0;
    if (this.driftM === undefined) return;
    const od = this.dotOf(solvedOnes, solvedDrift);
    const dd = this.dotOf(solvedDrift, solvedDrift);
    const dz = this.dotOf(solvedDrift, solvedValues);
    const determinant = oo * dd - od * od;
    // A drift that is level over this neighbourhood says nothing here: it falls back to ordinary kriging.
    if (!(determinant > 1e-9 * oo * dd)) return;
    this.inverseOo = dd / determinant;
    this.inverseOd = -od / determinant;
    this.inverseDd = oo / determinant;
    this.constant = (dd * oz - od * dz) / determinant;
    this.slope = (oo * dz - od * oz) / determinant;
  }

  private dotOf(a: Float64Array, b: Float64Array): number {
    let sum = 0;
    for (let i = 0; i < this.order; i++) sum += a[i]! * b[i]!;
    return sum;
  }

  /**
   * Solves for the dual weights, after which `valueAt` reads the surface of these neighbours anywhere by one pass over them,
   * until the next `gather`.
   */
  toDual(): void {
    const { dual, factor, order, row, solvedOnes, solvedDrift, solvedValues } = this;
    row.fill(0);
    this.forward();
    for (let i = 0; i < order; i++)
      dual[i] = solvedValues[i]! - this.constant * solvedOnes[i]! - this.slope * solvedDrift[i]!;
    for (let i = order - 1; i >= 0; i--) {
      const start = (i * (i + 1)) / 2;
      const value = dual[i]! * factor[start + i]!;
      dual[i] = value;
      for (let k = 0; k < i; k++) dual[k] = dual[k]! - value * factor[start + k]!;
    }
  }

  valueAt(x: number, y: number, drift: number): number {
    const { ids, order, row, dual } = this;
    const { xM, yM } = this.setup.samples;
    for (let i = 0; i < order; i++) {
      const dx = xM[ids[i]!]! - x;
      const dy = yM[ids[i]!]! - y;
      row[i] = dx * dx + dy * dy;
    }
    this.fill(row, order);
    let value = this.constant + this.slope * drift;
    for (let i = 0; i < order; i++) value += row[i]! * dual[i]!;
    return value;
  }

  predict(x: number, y: number, drift: number): void {
    const { ids, order, row, solvedOnes, solvedDrift, solvedValues } = this;
    const { xM, yM } = this.setup.samples;
    let coincident = -1;
    for (let i = 0; i < order; i++) {
      const dx = xM[ids[i]!]! - x;
      const dy = yM[ids[i]!]! - y;
      const h2 = dx * dx + dy * dy;
      row[i] = h2;
      if (h2 === 0) coincident = i;
    }
    this.fill(row, order);
    if (coincident >= 0 && this.setup.nuggetIs === 'field') {
      row[coincident] = row[coincident]! + this.setup.variogram.nuggetM2;
    }
    this.forward();
    let known = 0;
    let ones = 0;
    let drifts = 0;
    let values = 0;
    for (let i = 0; i < order; i++) {
      const u = row[i]!;
      known += u * u;
      ones += u * solvedOnes[i]!;
      drifts += u * solvedDrift[i]!;
      values += u * solvedValues[i]!;
    }
    const shortOne = 1 - ones;
    const shortDrift = drift - drifts;
    this.valueM = values + this.constant * shortOne + this.slope * shortDrift;
    this.varianceM2 = Math.max(
      0,
      this.prior -
        known +
        this.inverseOo * shortOne * shortOne +
        2 * this.inverseOd * shortOne * shortDrift +
        this.inverseDd * shortDrift * shortDrift,
    );
  }
}
