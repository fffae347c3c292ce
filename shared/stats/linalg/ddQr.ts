import {
  DD_ONE,
  DD_ZERO,
  dd,
  ddAdd,
  ddDivide,
  ddMultiply,
  ddNegate,
  ddSqrt,
  ddSubtract,
  toNumber,
  type Dd,
} from './dd';
import { ddGet, ddSet, ddZeros, type DdMatrix } from './ddMatrix';

/**
 * A column counts as a combination of those before it when less than this share of its length is left
 * beside them. Columns are coded, so they are of like size; double-double keeps the remainder itself to
 * about 1e-30.
 */
export const RANK_TOLERANCE = 1e-10;

export interface DdQr {
  /** Upper triangle R, p × p. */
  readonly r: DdMatrix;
  /** Qᵀy in full, n long: the first p are the effects in column order, the rest is residual. */
  readonly effects: readonly Dd[];
  /** The first column that depends on those before it, or −1; then R is good up to that column only. */
  readonly dependent: number;
}

function columnNorm(a: DdMatrix, j: number, from: number): Dd {
  let sum = DD_ZERO;
  for (let i = from; i < a.rows; i++) {
    const x = ddGet(a, i, j);
    sum = ddAdd(sum, ddMultiply(x, x));
  }
  return ddSqrt(sum);
}

/** Applies I − v vᵀ/β to column j of `a`, rows from `k` on. */
function reflect(a: DdMatrix, v: readonly Dd[], beta: Dd, at: { k: number; j: number }): void {
  const { k, j } = at;
  let dot = DD_ZERO;
  for (let i = k; i < a.rows; i++) dot = ddAdd(dot, ddMultiply(v[i - k]!, ddGet(a, i, j)));
  const scale = ddDivide(dot, beta);
  for (let i = k; i < a.rows; i++)
    ddSet(a, i, j, ddSubtract(ddGet(a, i, j), ddMultiply(scale, v[i - k]!)));
}

/** Makes column k zero below the diagonal and carries the columns to its right along. */
function eliminate(a: DdMatrix, k: number, norm: Dd): void {
  const first = ddGet(a, k, k);
  const alpha = first[0] > 0 ? ddNegate(norm) : norm;
  const v: Dd[] = [];
  for (let i = k; i < a.rows; i++) v.push(ddGet(a, i, k));
  v[0] = ddSubtract(first, alpha);
  // vᵀv/2 = norm² − first·alpha
  const beta = ddSubtract(ddMultiply(norm, norm), ddMultiply(first, alpha));
  for (let j = k + 1; j < a.cols; j++) reflect(a, v, beta, { k, j });
  ddSet(a, k, k, alpha);
  for (let i = k + 1; i < a.rows; i++) ddSet(a, i, k, DD_ZERO);
}

/** X with y as one more column. */
function beside(x: DdMatrix, y: readonly Dd[]): DdMatrix {
  const a = ddZeros(x.rows, x.cols + 1);
  for (let i = 0; i < x.rows; i++) {
    for (let j = 0; j < x.cols; j++) ddSet(a, i, j, ddGet(x, i, j));
    ddSet(a, i, x.cols, y[i]!);
  }
  return a;
}

/**
 * Householder QR of an n × p matrix beside a right-hand side, in double-double, without pivoting: the
 * order of the columns is the order of the sequential sums of squares.
 *
 * @param x n × p, n ≥ p. @param y n long.
 * @see Golub & Van Loan (2013), Matrix Computations, 4th ed., §5.2.
 */
export function ddQr(x: DdMatrix, y: readonly Dd[]): DdQr {
  const { rows: n, cols: p } = x;
  const a = beside(x, y);
  let dependent = -1;
  for (let k = 0; k < p; k++) {
    const whole = toNumber(columnNorm(x, k, 0));
    const norm = columnNorm(a, k, k);
    if (toNumber(norm) <= RANK_TOLERANCE * whole) {
      dependent = k;
      break;
    }
    eliminate(a, k, norm);
  }
  const r = ddZeros(p, p);
  for (let i = 0; i < p; i++) for (let j = i; j < p; j++) ddSet(r, i, j, ddGet(a, i, j));
  const effects = Array.from({ length: n }, (_, i) => ddGet(a, i, p));
  return { r, effects, dependent };
}

/** Solves R b = z for the leading `size` columns. */
export function backSubstitute(r: DdMatrix, z: readonly Dd[], size = r.cols): Dd[] {
  const b: Dd[] = Array.from({ length: size }, () => DD_ZERO);
  for (let i = size - 1; i >= 0; i--) {
    let sum = z[i]!;
    for (let j = i + 1; j < size; j++) sum = ddSubtract(sum, ddMultiply(ddGet(r, i, j), b[j]!));
    b[i] = ddDivide(sum, ddGet(r, i, i));
  }
  return b;
}

/** Solves Rᵀ q = x: the row of Q₁ that belongs to the row x of the model matrix. */
export function forwardSubstitute(r: DdMatrix, x: readonly Dd[]): Dd[] {
  const q: Dd[] = [];
  for (let i = 0; i < r.cols; i++) {
    let sum = x[i]!;
    for (let j = 0; j < i; j++) sum = ddSubtract(sum, ddMultiply(ddGet(r, j, i), q[j]!));
    q.push(ddDivide(sum, ddGet(r, i, i)));
  }
  return q;
}

/** (XᵀX)⁻¹ = R⁻¹R⁻ᵀ, p × p. */
export function inverseGram(r: DdMatrix): DdMatrix {
  const p = r.cols;
  const inverse = ddZeros(p, p);
  for (let j = 0; j < p; j++) {
    const unit: Dd[] = Array.from({ length: p }, (_, i) => (i === j ? DD_ONE : dd(0)));
    backSubstitute(r, unit).forEach((value, i) => ddSet(inverse, i, j, value));
  }
  const gram = ddZeros(p, p);
  for (let i = 0; i < p; i++)
    for (let j = i; j < p; j++) {
      let sum = DD_ZERO;
      for (let k = j; k < p; k++)
        sum = ddAdd(sum, ddMultiply(ddGet(inverse, i, k), ddGet(inverse, j, k)));
      ddSet(gram, i, j, sum);
      ddSet(gram, j, i, sum);
    }
  return gram;
}
