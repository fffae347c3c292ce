/** A pivot below this share of its column’s own size means: not positive definite in doubles. */
const PIVOT_TOLERANCE = 1e-11;

/**
 * The lower Cholesky factor L of a symmetric positive definite matrix, A = LL′.
 *
 * @param a p × p, row-major; only its lower half is read.
 * @returns p × p, row-major, zeros above the diagonal; null when A is not positive definite within
 *   rounding (relative to each diagonal entry).
 * @see Golub & Van Loan (2013), Matrix Computations, 4th ed., §4.2.
 */
export function cholesky(a: Float64Array, p: number): Float64Array | null {
  const l = new Float64Array(p * p);
  for (let i = 0; i < p; i++) {
    for (let j = 0; j <= i; j++) {
      let sum = a[i * p + j]!;
      for (let k = 0; k < j; k++) sum -= l[i * p + k]! * l[j * p + k]!;
      if (i !== j) l[i * p + j] = sum / l[j * p + j]!;
      else if (sum > PIVOT_TOLERANCE * a[i * p + i]!) l[i * p + i] = Math.sqrt(sum);
      else return null;
    }
  }
  return l;
}

/** ln|A| from its Cholesky factor. */
export function logDeterminant(l: Float64Array, p: number): number {
  let sum = 0;
  for (let i = 0; i < p; i++) sum += Math.log(l[i * p + i]!);
  return 2 * sum;
}

/** A⁻¹ from the Cholesky factor of A; p × p, row-major, symmetric. */
export function inverseFrom(l: Float64Array, p: number): Float64Array {
  // L⁻¹ by columns, then A⁻¹ = L⁻′L⁻¹
  const inv = new Float64Array(p * p);
  for (let j = 0; j < p; j++) {
    inv[j * p + j] = 1 / l[j * p + j]!;
    for (let i = j + 1; i < p; i++) {
      let sum = 0;
      for (let k = j; k < i; k++) sum -= l[i * p + k]! * inv[k * p + j]!;
      inv[i * p + j] = sum / l[i * p + i]!;
    }
  }
  const out = new Float64Array(p * p);
  for (let i = 0; i < p; i++) {
    for (let j = 0; j <= i; j++) {
      let sum = 0;
      for (let k = i; k < p; k++) sum += inv[k * p + i]! * inv[k * p + j]!;
      out[i * p + j] = sum;
      out[j * p + i] = sum;
    }
  }
  return out;
}

/** f′A f for a symmetric p × p matrix. */
export function quadraticForm(a: Float64Array, f: ArrayLike<number>, p: number): number {
  let total = 0;
  for (let i = 0; i < p; i++) {
    let row = 0;
    for (let j = 0; j < i; j++) row += a[i * p + j]! * f[j]!;
    total += f[i]! * (2 * row + a[i * p + i]! * f[i]!);
  }
  return total;
}
