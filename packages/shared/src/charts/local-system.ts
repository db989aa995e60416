import { priorVarianceM2 } from './kriging-setup';
import type { KrigingSetup } from './kriging-setup';
import { covariancesInPlace } from './variogram';

/**
 * One neighbourhood's system: packed lower Cholesky factor and the solved vectors. All buffers are reused. The factor is kept
 * while the next target has the same neighbours.
 */
export class LocalSystem {
  valueM = 0;
  varianceM2 = 0;
  private order = 0;
  private dualOrder = 0; // neighbours whose dual weights `residual` holds
  private readonly ids: Int32Array;
  private readonly sorted: Int32Array;
  private readonly factor: Float64Array; // row i at i (i + 1) / 2; the diagonal holds reciprocals
  private readonly solvedOnes: Float64Array;
  private readonly solvedDrift: Float64Array;
  private readonly residual: Float64Array; // L⁻¹ (z − F β)
  private readonly row: Float64Array;
  private trendInverse = [0, 0, 0];
  private coefficients = [0, 0];
  private readonly prior: number;
  private readonly driftM: Float64Array | undefined;

  constructor(
    private readonly setup: KrigingSetup,
    most: number,
  ) {
    this.ids = new Int32Array(most).fill(-1);
    this.sorted = new Int32Array(most);
    this.factor = new Float64Array((most * (most + 1)) / 2);
    this.solvedOnes = new Float64Array(most);
    this.solvedDrift = new Float64Array(most);
    this.residual = new Float64Array(most);
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
    this.fillCovariances();
    let jitterM2 = 0;
    while (!this.factorise()) {
      jitterM2 = jitterM2 === 0 ? 1e-10 * this.prior : jitterM2 * 100;
      if (!(jitterM2 <= this.prior))
        throw new RangeError('Samples at one place with no error stated cannot be kriged.');
      this.fillCovariances();
      for (let i = 0; i < count; i++)
        this.factor[(i * (i + 3)) / 2] = this.factor[(i * (i + 3)) / 2]! + jitterM2;
    }
    this.solveTrend();
  }

  private fillCovariances(): void {
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
    covariancesInPlace(factor, p, this.setup.variogram);
    const { nuggetM2 } = this.setup.variogram;
    for (let i = 0; i < order; i++) {
      const diagonal = (i * (i + 3)) / 2;
      factor[diagonal] = factor[diagonal]! + nuggetM2 + errorVarianceM2[ids[i]!]!;
    }
  }

  /** Two rows at a time, so that each row above is read once for both. */
  private factorise(): boolean {
    const { factor, order } = this;
    let i = 0;
    for (; i + 1 < order; i += 2) {
      const first = (i * (i + 1)) / 2;
      const second = first + i + 1;
      for (let j = 0, rowJ = 0; j < i; rowJ += ++j) {
        let a = factor[first + j]!;
        let b = factor[second + j]!;
        for (let k = 0; k < j; k++) {
          const above = factor[rowJ + k]!;
          a -= factor[first + k]! * above;
          b -= factor[second + k]! * above;
        }
        const scale = factor[rowJ + j]!;
        factor[first + j] = a * scale;
        factor[second + j] = b * scale;
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

  /** Solves L x = x for two vectors in one pass over L. */
  private forwardPair(x: Float64Array, y: Float64Array): void {
    const { factor, order } = this;
    for (let i = 0, row = 0; i < order; row += ++i) {
      let a = x[i]!;
      let b = y[i]!;
      for (let k = 0; k < i; k++) {
        const l = factor[row + k]!;
        a -= l * x[k]!;
        b -= l * y[k]!;
      }
      const scale = factor[row + i]!;
      x[i] = a * scale;
      y[i] = b * scale;
    }
  }

  private solveTrend(): void {
    const { ids, order, solvedOnes, solvedDrift, residual } = this;
    for (let i = 0; i < order; i++) {
      solvedOnes[i] = 1;
      solvedDrift[i] = this.driftM === undefined ? 0 : this.driftM[ids[i]!]!;
      residual[i] = this.setup.samples.valueM[ids[i]!]!;
    }
    this.forwardPair(solvedOnes, residual);
    if (this.driftM !== undefined) this.forwardPair(solvedDrift, this.row); // the row is free to be overwritten
    const oo = this.dotOf(solvedOnes, solvedOnes);
    const od = this.dotOf(solvedOnes, solvedDrift);
    const dd = this.dotOf(solvedDrift, solvedDrift);
    const oz = this.dotOf(solvedOnes, residual);
    const dz = this.dotOf(solvedDrift, residual);
    const determinant = oo * dd - od * od;
    // A drift that is level over this neighbourhood says nothing here: it falls back to ordinary kriging.
    if (this.driftM === undefined || !(determinant > 1e-9 * oo * dd)) {
      this.trendInverse = [1 / oo, 0, 0];
      this.coefficients = [oz / oo, 0];
    } else {
      this.trendInverse = [dd / determinant, -od / determinant, oo / determinant];
      this.coefficients = [(dd * oz - od * dz) / determinant, (oo * dz - od * oz) / determinant];
    }
    const [constant, slope] = [this.coefficients[0]!, this.coefficients[1]!];
    for (let i = 0; i < order; i++) {
      residual[i] = residual[i]! - constant * solvedOnes[i]! - slope * solvedDrift[i]!;
    }
  }

  private dotOf(a: Float64Array, b: Float64Array): number {
    let sum = 0;
    for (let i = 0; i < this.order; i++) sum += a[i]! * b[i]!;
    return sum;
  }

  /**
   * Turns the solved residual into dual weights, after which `valueAt` reads the surface of these neighbours anywhere by one
   * pass over them and `predict` may not be used until the next `gather`.
   */
  toDual(): void {
    const { residual, factor, order } = this;
    for (let i = order - 1; i >= 0; i--) {
      const row = (i * (i + 1)) / 2;
      const value = residual[i]! * factor[row + i]!;
      residual[i] = value;
      for (let k = 0; k < i; k++) residual[k] = residual[k]! - value * factor[row + k]!;
    }
    this.order = 0;
    this.dualOrder = order;
  }

  valueAt(x: number, y: number, drift: number): number {
    const { ids, dualOrder, row, residual } = this;
    const { xM, yM } = this.setup.samples;
    for (let i = 0; i < dualOrder; i++) {
      const dx = xM[ids[i]!]! - x;
      const dy = yM[ids[i]!]! - y;
      row[i] = dx * dx + dy * dy;
    }
    covariancesInPlace(row, dualOrder, this.setup.variogram);
    let value = this.coefficients[0]! + this.coefficients[1]! * drift;
    for (let i = 0; i < dualOrder; i++) value += row[i]! * residual[i]!;
    return value;
  }

  predict(x: number, y: number, drift: number): void {
    const { ids, order, row, factor, solvedOnes, solvedDrift, residual } = this;
    const { xM, yM } = this.setup.samples;
    let coincident = -1;
    for (let i = 0; i < order; i++) {
      const dx = xM[ids[i]!]! - x;
      const dy = yM[ids[i]!]! - y;
      const h2 = dx * dx + dy * dy;
      row[i] = h2;
      if (h2 === 0) coincident = i;
    }
    covariancesInPlace(row, order, this.setup.variogram);
    if (coincident >= 0 && this.setup.nuggetIs === 'field') {
      row[coincident] = row[coincident]! + this.setup.variogram.nuggetM2;
    }
    let known = 0;
    let ones = 0;
    let drifts = 0;
    let value = 0;
    for (let i = 0, start = 0; i < order; start += ++i) {
      let sum = row[i]!;
      for (let k = 0; k < i; k++) sum -= factor[start + k]! * row[k]!;
      const u = sum * factor[start + i]!;
      row[i] = u;
      known += u * u;
      ones += u * solvedOnes[i]!;
      drifts += u * solvedDrift[i]!;
      value += u * residual[i]!;
    }
    const shortOne = 1 - ones;
    const shortDrift = drift - drifts;
    const [a, b, c] = [this.trendInverse[0]!, this.trendInverse[1]!, this.trendInverse[2]!];
    this.valueM = value + this.coefficients[0]! + this.coefficients[1]! * drift;
    this.varianceM2 = Math.max(
      0,
      this.prior -
        known +
        a * shortOne * shortOne +
        2 * b * shortOne * shortDrift +
        c * shortDrift * shortDrift,
    );
  }
}
