/** Dense symmetric positive-definite matrices, row-major Float64Array of n × n, for inner loops. */

/** Below this share of its diagonal a pivot counts as 0. */
const PIVOT = 1e-12;

/**
 * The lower triangle L with LLᵀ = A.
 *
 * @returns null when A is not positive definite to working accuracy.
 */
export function cholesky(a: Float64Array, n: number): Float64Array | null {
  const l = new Float64Array(n * n);
  for (let j = 0; j < n; j++) {
    let d = a[j * n + j]!;
    for (let k = 0; k < j; k++) d -= l[j * n + k]! ** 2;
    if (!(d > PIVOT * Math.abs(a[j * n + j]!)) || !(d > 0)) return null;
    const root = Math.sqrt(d);
    l[j * n + j] = root;
    for (let i = j + 1; i < n; i++) {
      let sum = a[i * n + j]!;
      for (let k = 0; k < j; k++) sum -= l[i * n + k]! * l[j * n + k]!;
      l[i * n + j] = sum / root;
    }
  }
  return l;
}

/** ln |A| from its Cholesky factor. */
export function lnDeterminant(l: Float64Array, n: number): number {
  let sum = 0;
  for (let i = 0; i < n; i++) sum += Math.log(l[i * n + i]!);
  return 2 * sum;
}

/** A⁻¹ from its Cholesky factor. */
export function inverseOf(l: Float64Array, n: number): Float64Array {
  const inverse = new Float64Array(n * n);
  for (let c = 0; c < n; c++) {
    for (let i = 0; i < n; i++) {
      let sum = i === c ? 1 : 0;
      for (let k = 0; k < i; k++) sum -= l[i * n + k]! * inverse[k * n + c]!;
      inverse[i * n + c] = sum / l[i * n + i]!;
    }
    for (let i = n - 1; i >= 0; i--) {
      let sum = inverse[i * n + c]!;
      for (let k = i + 1; k < n; k++) sum -= l[k * n + i]! * inverse[k * n + c]!;
      inverse[i * n + c] = sum / l[i * n + i]!;
    }
  }
  return inverse;
}

/** Σ rowᵢ rowᵢᵀ, weighted. */
export function gramOf(
  rows: readonly Float64Array[],
  n: number,
  weights?: ArrayLike<number>,
): Float64Array {
  const gram = new Float64Array(n * n);
  rows.forEach((row, r) => {
    const w = weights ? weights[r]! : 1;
    if (w === 0) return;
    for (let i = 0; i < n; i++) {
      const wi = w * row[i]!;
      if (wi === 0) continue;
      for (let j = i; j < n; j++) gram[i * n + j]! += wi * row[j]!;
    }
  });
  for (let i = 0; i < n; i++) for (let j = 0; j < i; j++) gram[i * n + j] = gram[j * n + i]!;
  return gram;
}

/** xᵀ A y. */
export function bilinear(a: Float64Array, x: Float64Array, y: Float64Array): number {
  const n = x.length;
  let sum = 0;
  for (let i = 0; i < n; i++) {
    const xi = x[i]!;
    if (xi === 0) continue;
    let inner = 0;
    for (let j = 0; j < n; j++) inner += a[i * n + j]! * y[j]!;
    sum += xi * inner;
  }
  return sum;
}
