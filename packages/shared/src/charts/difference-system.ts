import type { Roughness } from './bed-roughness';
import type { NearestSearch } from './sample-index';
import type { SamplePoints } from './sample-points';
import { correlation } from './variogram';

/** One of two charts: its soundings, how much deeper they read at the other's datum, and on which side of the change they lie. */
export type SoundedSide = { samples: SamplePoints; search: NearestSearch; shiftM: number; sign: 1 | -1 };

export const NEIGHBOURS = 12; // of each chart
const LEAST_ERROR_M2 = 1e-6; // a millimetre squared keeps soundings at one place apart

type Ranges = { bedRangeM: number; changeRangeM: number; changeSigmaM: number };
type Foretold = { value: number; varianceM2: number };

/** Soundings round one place, two dozen at most, and what they say of the bed or of its change there: solved anew each time. */
export class DifferenceSystem {
  private count = 0;
  private sillM2 = 0;
  private nuggetM2 = 0;
  private readonly xM = new Float64Array(2 * NEIGHBOURS);
  private readonly yM = new Float64Array(2 * NEIGHBOURS);
  private readonly valueM = new Float64Array(2 * NEIGHBOURS);
  private readonly errorM2 = new Float64Array(2 * NEIGHBOURS);
  private readonly sign = new Float64Array(2 * NEIGHBOURS);
  private readonly factor = new Float64Array((2 * NEIGHBOURS) ** 2);
  private readonly toPlace = new Float64Array(2 * NEIGHBOURS);
  private readonly ones = new Float64Array(2 * NEIGHBOURS);
  private readonly values = new Float64Array(2 * NEIGHBOURS);

  constructor(private readonly ranges: Ranges) {}

  /** Lets go of all soundings. */
  begin({ sillM2, nuggetM2 }: Roughness): void {
    this.count = 0;
    this.sillM2 = sillM2;
    this.nuggetM2 = nuggetM2;
  }

  addNearest(
    { samples, search, shiftM, sign }: SoundedSide,
    at: { x: number; y: number; without: number },
  ): void {
    search.without = at.without;
    search.find(at.x, at.y);
    for (let n = 0; n < search.found; n++) {
      const id = search.ids[n]!;
      const slot = this.count++;
      this.xM[slot] = samples.xM[id]!;
      this.yM[slot] = samples.yM[id]!;
      this.valueM[slot] = samples.valueM[id]! + shiftM;
      this.errorM2[slot] = samples.errorVarianceM2[id]!;
      this.sign[slot] = sign;
    }
  }

  /** The change at a place, metres. */
  difference(x: number, y: number): Foretold {
    this.factorise(true);
    for (let i = 0; i < this.count; i++)
      this.toPlace[i] = (this.sign[i]! * this.changeM2(this.awayM(i, x, y))) / 2;
    return this.solve(this.ranges.changeSigmaM ** 2, 0);
  }

  /** The bed at a place, metres, of soundings of one chart alone. */
  bed(x: number, y: number): Foretold {
    this.factorise(false);
    for (let i = 0; i < this.count; i++) this.toPlace[i] = this.bedM2(this.awayM(i, x, y));
    return this.solve(this.sillM2, 1);
  }

  /** Math.hypot guards against overflow, which metres don't need, at several times the cost. */
  private awayM(i: number, x: number, y: number): number {
    const [dx, dy] = [this.xM[i]! - x, this.yM[i]! - y];
    return Math.sqrt(dx * dx + dy * dy);
  }

  private bedM2(hM: number): number {
    return this.sillM2 * correlation('matern32', this.ranges.bedRangeM, hM);
  }

  private changeM2(hM: number): number {
    return this.ranges.changeSigmaM ** 2 * correlation('matern32', this.ranges.changeRangeM, hM);
  }

  private factorise(withChange: boolean): void {
    const { count, factor, xM, yM, sign } = this;
    for (let i = 0; i < count; i++) {
      for (let j = 0; j <= i; j++) {
        const hM = this.awayM(j, xM[i]!, yM[i]!);
        let sum = this.bedM2(hM);
        if (withChange) sum += (sign[i]! * sign[j]! * this.changeM2(hM)) / 4;
        if (i === j) sum += this.nuggetM2 + this.errorM2[i]! + LEAST_ERROR_M2;
        for (let m = 0; m < j; m++) sum -= factor[i * count + m]! * factor[j * count + m]!;
        factor[i * count + j] =
          i === j ? Math.sqrt(Math.max(sum, LEAST_ERROR_M2)) : sum / factor[j * count + j]!;
      }
    }
  }

  /** Kriging with a mean nobody knows, that counts `mean` times in what is asked. */
  private solve(priorM2: number, mean: 0 | 1): Foretold {
    const { count, factor, toPlace, ones, values } = this;
    let [known, onesOnes, onesTo, valuesTo, valuesOnes] = [0, 0, 0, 0, 0];
    for (let i = 0; i < count; i++) {
      let [k, o, z] = [toPlace[i]!, 1, this.valueM[i]!];
      for (let j = 0; j < i; j++) {
        const l = factor[i * count + j]!;
        k -= l * toPlace[j]!;
        o -= l * ones[j]!;
        z -= l * values[j]!;
      }
      const pivot = factor[i * count + i]!;
      [k, o, z] = [k / pivot, o / pivot, z / pivot];
      toPlace[i] = k;
      ones[i] = o;
      values[i] = z;
      known += k * k;
      onesOnes += o * o;
      onesTo += k * o;
      valuesTo += k * z;
      valuesOnes += o * z;
    }
    const short = mean - onesTo;
    return {
      value: valuesTo + (short * valuesOnes) / onesOnes,
      varianceM2: Math.max(0, priorM2 - known + (short * short) / onesOnes),
    };
  }
}
