/**
 * Dense symmetric positive definite systems in row-major Float64Array. The order of a matrix is padded up to a multiple
 * of four with rows of the identity, so that the inner products run four rows by two columns at a time without tails.
 */

export const paddedOrder = (order: number): number => (order + 3) & ~3;

/** A zeroed matrix of the padded order whose padding rows are those of the identity. */
export function paddedMatrix(order: number): Float64Array {
  const size = paddedOrder(order);
  const matrix = new Float64Array(size * size);
  for (let i = order; i < size; i++) matrix[i * size + i] = 1;
  return matrix;
}

const block = new Float64Array(8);

type DotRows = { a: Float64Array; b: Float64Array; size: number; fromRowB: boolean };

/**
 * Returns a function that fills block[2r + c] with Σ a[rowA + r][k] b[rowB + c][k], r 0–3, c 0–1, over k below `to` and
 * from 0, or from rowB where b's rows are zero before their own index.
 */
function dotBlocks({ a, b, size, fromRowB }: DotRows): (rowA: number, rowB: number, to: number) => void {
  return (rowA, rowB, to) => {
    const from = fromRowB ? rowB : 0;
    let s00 = 0;
    let s01 = 0;
    let s10 = 0;
    let s11 = 0;
    let s20 = 0;
    let s21 = 0;
    let s30 = 0;
    let s31 = 0;
    let pa = rowA * size + from;
    let pb = rowB * size + from;
    const end = pa + (to - from);
    for (; pa < end; pa++, pb++) {
      const b0 = b[pb]!;
      const b1 = b[pb + size]!;
      const a0 = a[pa]!;
      const a1 = a[pa + size]!;
      const a2 = a[pa + 2 * size]!;
      const a3 = a[pa + 3 * size]!;
      s00 += a0 * b0;
      s01 += a0 * b1;
      s10 += a1 * b0;
      s11 += a1 * b1;
      s20 += a2 * b0;
      s21 += a2 * b1;
      s30 += a3 * b0;
      s31 += a3 * b1;
    }
    block[0] = s00;
    block[1] = s01;
    block[2] = s10;
    block[3] = s11;
    block[4] = s20;
    block[5] = s21;
    block[6] = s30;
    block[7] = s31;
  };
}

/** Cholesky factor in place: the lower triangle becomes L with L Lᵀ = a. False when a is not positive definite. */
export function factorise(a: Float64Array, size: number): boolean {
  const dots = dotBlocks({ a, b: a, size, fromRowB: false });
  for (let i0 = 0; i0 < size; i0 += 4) {
    for (let j0 = 0; j0 < i0; j0 += 2) {
      dots(i0, j0, j0);
      const row0 = j0 * size + j0;
      const d0 = a[row0]!;
      const off = a[row0 + size]!;
      const d1 = a[row0 + size + 1]!;
      for (let r = 0; r < 4; r++) {
        const p = (i0 + r) * size + j0;
        const first = (a[p]! - block[2 * r]!) / d0;
        a[p] = first;
        a[p + 1] = (a[p + 1]! - block[2 * r + 1]! - first * off) / d1;
      }
    }
    for (let i = i0; i < i0 + 4; i++) {
      for (let j = i0; j <= i; j++) {
        let sum = a[i * size + j]!;
        for (let k = 0, pi = i * size, pj = j * size; k < j; k++, pi++, pj++) sum -= a[pi]! * a[pj]!;
        if (i !== j) a[i * size + j] = sum / a[j * size + j]!;
        else if (sum > 0 && Number.isFinite(sum)) a[i * size + i] = Math.sqrt(sum);
        else return false;
      }
    }
  }
  return true;
}

/** Rows of the result are the columns of L⁻¹: result[i][k] = (L⁻¹)[k][i], zero for k < i. */
export function invertFactor(l: Float64Array, size: number): Float64Array {
  const inverse = new Float64Array(size * size);
  const dots = dotBlocks({ a: l, b: inverse, size, fromRowB: true });
  const finish = inverseFinisher(l, inverse, size);
  for (let i0 = 0; i0 < size; i0 += 2) {
    for (let k0 = i0 & ~3; k0 < size; k0 += 4) {
      if (k0 > i0) dots(k0, i0, k0);
      else block.fill(0);
      finish(i0, k0);
    }
  }
  return inverse;
}

/** Finishes the four by two block whose inner products stand in `block`. */
function inverseFinisher(
  l: Float64Array,
  inverse: Float64Array,
  size: number,
): (i0: number, k0: number) => void {
  return (i0, k0) => {
    for (let c = 0; c < 2; c++) {
      const i = i0 + c;
      for (let r = 0; r < 4; r++) {
        const k = k0 + r;
        if (k < i) continue;
        let sum = block[2 * r + c]!;
        for (let q = 0; q < r; q++) sum += l[k * size + k0 + q]! * inverse[i * size + k0 + q]!;
        inverse[i * size + k] = ((k === i ? 1 : 0) - sum) / l[k * size + k]!;
      }
    }
  };
}

/** Solves L x = x in place; x: length size. */
export function forwardSolve(l: Float64Array, size: number, x: Float64Array): void {
  for (let i = 0; i < size; i++) {
    const row = i * size;
    let s0 = 0;
    let s1 = 0;
    let k = 0;
    for (; k + 1 < i; k += 2) {
      s0 += l[row + k]! * x[k]!;
      s1 += l[row + k + 1]! * x[k + 1]!;
    }
    if (k < i) s0 += l[row + k]! * x[k]!;
    x[i] = (x[i]! - s0 - s1) / l[row + i]!;
  }
}

/** Solves Lᵀ x = x in place; x: length size. */
export function backSolve(l: Float64Array, size: number, x: Float64Array): void {
  for (let i = size - 1; i >= 0; i--) {
    const row = i * size;
    const value = x[i]! / l[row + i]!;
    x[i] = value;
    for (let k = 0; k < i; k++) x[k] = x[k]! - value * l[row + k]!;
  }
}

export function dot(a: Float64Array, b: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < a.length; i++) sum += a[i]! * b[i]!;
  return sum;
}
