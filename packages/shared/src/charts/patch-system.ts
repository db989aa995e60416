import { Elimination } from './elimination';
import { priorVarianceM2 } from './kriging-setup';
import type { KrigingSetup } from './kriging-setup';
import { LocalTrend } from './local-trend';
import { covarianceFill } from './variogram';
import type { FillCovariances } from './variogram';

const TREND_ROWS = 3; // ones, values, drift

/** One patch's samples solved at once, after which its surface is read anywhere by one pass over them. Buffers are reused. */
export class PatchSystem {
  private order = 0;
  private readonly ids: Int32Array;
  private readonly system: Elimination;
  private readonly dual: Float64Array; // K⁻¹ (z − F β)
  private readonly sampleX: Float64Array;
  private readonly sampleY: Float64Array;
  private readonly row: Float64Array;
  private readonly trend = new LocalTrend();
  private readonly fill: FillCovariances;

  constructor(
    private readonly setup: KrigingSetup,
    most: number,
  ) {
    this.ids = new Int32Array(most);
    this.system = new Elimination(most, most + TREND_ROWS);
    this.dual = new Float64Array(most);
    this.sampleX = new Float64Array(most);
    this.sampleY = new Float64Array(most);
    this.row = new Float64Array(most);
    this.fill = covarianceFill(setup.variogram);
  }

  /** Takes the samples, in ascending order whatever order they come in, and solves them with the least jitter that lets it. */
  solve(found: Int32Array, count: number): void {
    this.order = count;
    this.ids.set(found.subarray(0, count));
    this.ids.subarray(0, count).sort();
    const prior = priorVarianceM2(this.setup);
    let jitterM2 = 0;
    this.lay(0);
    while (!this.system.run(0, count, count + TREND_ROWS)) {
      jitterM2 = jitterM2 === 0 ? 1e-10 * prior : jitterM2 * 100;
      if (!(jitterM2 <= prior))
        throw new RangeError('Samples at one place with no error stated cannot be kriged.');
      this.lay(jitterM2);
    }
    this.fitTrend();
    this.toDual();
  }

  private lay(jitterM2: number): void {
    const { ids, order, system, sampleX, sampleY } = this;
    const { rows, stride } = system;
    const { xM, yM, valueM, errorVarianceM2 } = this.setup.samples;
    const { driftM, variogram } = this.setup;
    const trendRow = order * stride;
    for (let i = 0; i < order; i++) {
      const id = ids[i]!;
      const x = xM[id]!;
      const y = yM[id]!;
      const row = i * stride;
      sampleX[i] = x;
      sampleY[i] = y;
      for (let k = 0; k <= i; k++) {
        const dx = sampleX[k]! - x;
        const dy = sampleY[k]! - y;
        rows[row + k] = dx * dx + dy * dy;
      }
      this.fill(rows, row, row + i + 1);
      rows[row + i] = rows[row + i]! + variogram.nuggetM2 + jitterM2 + errorVarianceM2[id]!;
      rows[trendRow + i] = 1;
      rows[trendRow + stride + i] = valueM[id]!;
      rows[trendRow + 2 * stride + i] = driftM === undefined ? 0 : driftM[id]!;
    }
  }

  private fitTrend(): void {
    const { rows, stride } = this.system;
    const ones = this.order * stride;
    const dot = (a: number, b: number) => {
      let sum = 0;
      for (let k = 0; k < this.order; k++) sum += rows[a + k]! * rows[b + k]!;
      return sum;
    };
    const values = ones + stride;
    const drift = values + stride;
    this.trend.fit({
      oo: dot(ones, ones),
      oz: dot(ones, values),
      od: dot(ones, drift),
      dd: dot(drift, drift),
      dz: dot(drift, values),
    });
  }

  /** Back from L⁻¹ (z − F β) to K⁻¹ (z − F β). */
  private toDual(): void {
    const { dual, order, system, trend } = this;
    const { rows, stride } = system;
    const ones = order * stride;
    for (let i = 0; i < order; i++)
      dual[i] =
        rows[ones + stride + i]! -
        trend.constant * rows[ones + i]! -
        trend.slope * rows[ones + 2 * stride + i]!;
    for (let i = order - 1; i >= 0; i--) {
      const row = i * stride;
      const value = dual[i]! * rows[row + i]!;
      dual[i] = value;
      for (let k = 0; k < i; k++) dual[k] = dual[k]! - value * rows[row + k]!;
    }
  }

  /** The surface of the samples last solved, metres. */
  valueAt(x: number, y: number, drift: number): number {
    const { order, row, dual, sampleX, sampleY, trend } = this;
    for (let i = 0; i < order; i++) {
      const dx = sampleX[i]! - x;
      const dy = sampleY[i]! - y;
      row[i] = dx * dx + dy * dy;
    }
    this.fill(row, 0, order);
    let value = trend.constant + trend.slope * drift;
    for (let i = 0; i < order; i++) value += row[i]! * dual[i]!;
    return value;
  }

  /** Kriging variance of the surface of the samples last solved, m²: n²/2 operations. */
  varianceAt(x: number, y: number, drift: number): number {
    const { order, row, sampleX, sampleY, system, trend } = this;
    const { rows, stride } = system;
    for (let i = 0; i < order; i++) {
      const dx = sampleX[i]! - x;
      const dy = sampleY[i]! - y;
      row[i] = dx * dx + dy * dy;
    }
    this.fill(row, 0, order);
    const ones = order * stride;
    let [known, toOnes, toDrift] = [0, 0, 0];
    for (let i = 0; i < order; i++) {
      const at = i * stride;
      let u = row[i]!;
      for (let k = 0; k < i; k++) u -= rows[at + k]! * row[k]!;
      u *= rows[at + i]!; // the diagonal holds reciprocals
      row[i] = u;
      known += u * u;
      toOnes += u * rows[ones + i]!;
      toDrift += u * rows[ones + 2 * stride + i]!;
    }
    return Math.max(0, priorVarianceM2(this.setup) - known + trend.varianceM2(1 - toOnes, drift - toDrift));
  }
}
