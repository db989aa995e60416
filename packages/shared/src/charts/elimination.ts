/**
 * Rows of one symmetric positive definite system side by side, row r from r · stride. Every row is its covariances with the
 * pivots, in the pivots' order; rows beyond the pivots are right-hand sides, solved along with the factor. All is in place:
 * row r becomes its row of L, or L⁻¹ of its right-hand side. Three spare rows stand behind the last, so that four may be
 * worked at a time.
 * Source: Golub & Van Loan, Matrix Computations, 2013, section 4.2 (Cholesky by columns).
 */
export class Elimination {
  readonly rows: Float64Array;

  constructor(
    readonly stride: number,
    most: number,
  ) {
    this.rows = new Float64Array((most + SPARE) * stride);
  }

  /**
   * Eliminates `pivots` pivots, which the first rows are, from all of the first `count` rows. The columns before `from` were
   * eliminated before; pivot p stands in row p, column from + p, where its reciprocal is left. False when the system is not
   * positive definite.
   */
  run(from: number, pivots: number, count: number): boolean {
    const { rows: a, stride } = this;
    a.fill(0, count * stride, (count + SPARE) * stride);
    let p = 0;
    for (; p + 1 < pivots; p += 2) {
      if (!this.pivotTwo(from, p)) return false;
      const j = from + p;
      const first = p * stride;
      const second = first + stride;
      const scale = a[first + j]!;
      const cross = a[second + j]!;
      const scaleB = a[second + j + 1]!;
      // Four rows by two columns: six numbers read serve eight products.
      for (let r0 = second + stride, end = count * stride; r0 < end; r0 += 4 * stride) {
        const r1 = r0 + stride;
        const r2 = r1 + stride;
        const r3 = r2 + stride;
        let a0 = a[r0 + j]!;
        let a1 = a[r1 + j]!;
        let a2 = a[r2 + j]!;
        let a3 = a[r3 + j]!;
        let b0 = a[r0 + j + 1]!;
        let b1 = a[r1 + j + 1]!;
        let b2 = a[r2 + j + 1]!;
        let b3 = a[r3 + j + 1]!;
        for (let k = 0; k < j; k++) {
          const u = a[first + k]!;
          const v = a[second + k]!;
          const p0 = a[r0 + k]!;
          const p1 = a[r1 + k]!;
          const p2 = a[r2 + k]!;
          const p3 = a[r3 + k]!;
          a0 -= p0 * u;
          b0 -= p0 * v;
          a1 -= p1 * u;
          b1 -= p1 * v;
          a2 -= p2 * u;
          b2 -= p2 * v;
          a3 -= p3 * u;
          b3 -= p3 * v;
        }
        a0 *= scale;
        a1 *= scale;
        a2 *= scale;
        a3 *= scale;
        a[r0 + j] = a0;
        a[r1 + j] = a1;
        a[r2 + j] = a2;
        a[r3 + j] = a3;
        a[r0 + j + 1] = (b0 - a0 * cross) * scaleB;
        a[r1 + j + 1] = (b1 - a1 * cross) * scaleB;
        a[r2 + j + 1] = (b2 - a2 * cross) * scaleB;
        a[r3 + j + 1] = (b3 - a3 * cross) * scaleB;
      }
    }
    return p === pivots || this.lastPivot(from, p, count);
  }

  private pivotTwo(from: number, p: number): boolean {
    const { rows: a, stride } = this;
    const j = from + p;
    const first = p * stride;
    const second = first + stride;
    let pivotA = a[first + j]!;
    let cross = a[second + j]!;
    let pivotB = a[second + j + 1]!;
    for (let k = 0; k < j; k++) {
      const u = a[first + k]!;
      const v = a[second + k]!;
      pivotA -= u * u;
      cross -= u * v;
      pivotB -= v * v;
    }
    if (!(pivotA > 0)) return false;
    const scale = 1 / Math.sqrt(pivotA);
    cross *= scale;
    pivotB -= cross * cross;
    if (!(pivotB > 0)) return false;
    a[first + j] = scale;
    a[second + j] = cross;
    a[second + j + 1] = 1 / Math.sqrt(pivotB);
    return true;
  }

  private lastPivot(from: number, p: number, count: number): boolean {
    const { rows: a, stride } = this;
    const j = from + p;
    const first = p * stride;
    let pivot = a[first + j]!;
    for (let k = 0; k < j; k++) pivot -= a[first + k]! * a[first + k]!;
    if (!(pivot > 0)) return false;
    const scale = 1 / Math.sqrt(pivot);
    a[first + j] = scale;
    for (let r0 = first + stride, end = count * stride; r0 < end; r0 += 2 * stride) {
      const r1 = r0 + stride;
      let a0 = a[r0 + j]!;
      let a1 = a[r1 + j]!;
      for (let k = 0; k < j; k++) {
        const u = a[first + k]!;
        a0 -= a[r0 + k]! * u;
        a1 -= a[r1 + k]! * u;
      }
      a[r0 + j] = a0 * scale;
      a[r1 + j] = a1 * scale;
    }
    return true;
  }
}

const SPARE = 3;
