import { cholesky, inverseOf } from '../linalg/cholesky';
import type { Matrix } from '../linalg/matrix';
import { informationOf } from './designMatrix';
import type { ColumnSplit } from './independentColumns';

/** A column whose spread about its mean is below this, per run, does not vary. */
const CONSTANT = 1e-12;

export interface TermPrecision {
  readonly term: string;
  /** Standard error ÷ run-to-run SD; null when the runs cannot tell the term apart. */
  readonly relativeStandardError: number | null;
  /** How much correlation with other terms inflates the variance; null for the intercept. */
  readonly vif: number | null;
}

/** Sum of squares of a column about its mean. */
function spreadOf({ rows, cols, data }: Matrix, j: number): number {
  let mean = 0;
  for (let i = 0; i < rows; i++) mean += data[i * cols + j]! / rows;
  let sum = 0;
  for (let i = 0; i < rows; i++) sum += (data[i * cols + j]! - mean) ** 2;
  return sum;
}

/**
 * How well each coefficient will be known, blocks included in the model.
 *
 * @param x n × p with block columns last; `names` in the order of its columns.
 * @see Belsley, Kuh & Welsch (1980), Regression Diagnostics (variance inflation).
 */
export function termPrecision(
  x: Matrix,
  names: readonly string[],
  { independent, estimable }: ColumnSplit,
): TermPrecision[] {
  const q = independent.length;
  const reduced: Matrix = {
    rows: x.rows,
    cols: q,
    data: Float64Array.from({ length: x.rows * q }, (_, i) => {
      const row = Math.floor(i / q);
      return x.data[row * x.cols + independent[i % q]!]!;
    }),
  };
  const l = cholesky(informationOf(reduced), q);
  const inverse = l ? inverseOf(l, q) : null;
  return names.map((term, j) => {
    const k = independent.indexOf(j);
    if (!inverse || k < 0 || !estimable[j]) return { term, relativeStandardError: null, vif: null };
    const variance = inverse[k * q + k]!;
    const isConstant = spreadOf(x, j) <= CONSTANT * x.rows;
    return {
      term,
      relativeStandardError: Math.sqrt(variance),
      vif: isConstant ? null : variance * spreadOf(x, j),
    };
  });
}

/** Correlations of the columns that vary, in the order of the terms; null where a column is constant. */
export function correlationsOf(x: Matrix): (number | null)[][] {
  const spreads = Array.from({ length: x.cols }, (_, j) => spreadOf(x, j));
  const means = spreads.map((_, j) => {
    let sum = 0;
    for (let i = 0; i < x.rows; i++) sum += x.data[i * x.cols + j]!;
    return sum / x.rows;
  });
  return spreads.map((a, j) =>
    spreads.map((b, k) => {
      if (a <= 1e-12 || b <= 1e-12) return null;
      if (j === k) return 1;
      let sum = 0;
      for (let i = 0; i < x.rows; i++)
        sum += (x.data[i * x.cols + j]! - means[j]!) * (x.data[i * x.cols + k]! - means[k]!);
      const value = sum / Math.sqrt(a * b);
      return Math.abs(value) < 1e-12 ? 0 : Math.max(-1, Math.min(1, value));
    }),
  );
}
