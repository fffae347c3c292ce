import { cholesky, inverseOf, lnDeterminant, bilinear } from '../linalg/cholesky';

/** D: largest |X′X|. I: smallest mean prediction variance over the region. */
export type Criterion = 'D' | 'I';

/** Added to the diagonal of X′X, so that a start that does not yet separate all terms can be improved. */
const RIDGE = 1e-7;
/** Determinant ratios below this would make X′X singular. */
const MIN_RATIO = 1e-9;

/** Inverse information of the current rows, and what the criterion needs of it. */
export interface ExchangeState {
  readonly p: number;
  readonly criterion: Criterion;
  /** p × p mean of ff′ over the region; read for I only. */
  readonly moments: Float64Array;
  /** (X′X)⁻¹. */
  inverse: Float64Array;
  /** (X′X)⁻¹ · moments · (X′X)⁻¹; for I only. */
  product: Float64Array;
  /** What is made large: ln|X′X|, or −trace(moments · (X′X)⁻¹). */
  value: number;
}

function multiply(a: Float64Array, b: Float64Array, p: number): Float64Array {
  const out = new Float64Array(p * p);
  for (let i = 0; i < p; i++)
    for (let k = 0; k < p; k++) {
      const left = a[i * p + k]!;
      if (left === 0) continue;
      for (let j = 0; j < p; j++) out[i * p + j]! += left * b[k * p + j]!;
    }
  return out;
}

function traceOf(a: Float64Array, b: Float64Array): number {
  // both symmetric
  return a.reduce((sum, value, i) => sum + value * b[i]!, 0);
}

/** The state of rows; null when X′X cannot be inverted even with the ridge. */
export function stateOfRows(
  rows: readonly Float64Array[],
  criterion: Criterion,
  moments: Float64Array,
): ExchangeState | null {
  const p = rows[0]!.length;
  const m = new Float64Array(p * p);
  for (const row of rows)
    for (let a = 0; a < p; a++) for (let b = 0; b <= a; b++) m[a * p + b]! += row[a]! * row[b]!;
  for (let a = 0; a < p; a++) m[a * p + a]! += RIDGE;
  const l = cholesky(m, p);
  if (!l) return null;
  const inverse = inverseOf(l, p);
  const isD = criterion === 'D';
  return {
    p,
    criterion,
    moments,
    inverse,
    product: isD ? inverse : multiply(multiply(inverse, moments, p), inverse, p),
    value: isD ? lnDeterminant(l, p) : -traceOf(inverse, moments),
  };
}

/** What one row has in common with all exchanges against it: computed once a row. */
export interface OldRow {
  readonly row: Float64Array;
  readonly variance: number;
  readonly product: number;
}

export function oldRowOf(state: ExchangeState, row: Float64Array): OldRow {
  return {
    row,
    variance: bilinear(state.inverse, row, row),
    product: state.criterion === 'I' ? bilinear(state.product, row, row) : 0,
  };
}

/**
 * By how much the criterion grows when one row takes another’s place: a rank-two update in closed form.
 *
 * @see Meyer & Nachtsheim (1995), The coordinate-exchange algorithm, Technometrics 37: 60–69.
 */
export function gainOf(state: ExchangeState, old: OldRow, row: Float64Array): number {
  const { inverse, product } = state;
  const dNew = bilinear(inverse, row, row);
  const dBoth = bilinear(inverse, row, old.row);
  const ratio = (1 + dNew) * (1 - old.variance) + dBoth * dBoth;
  if (ratio < MIN_RATIO) return -Infinity;
  if (state.criterion === 'D') return Math.log(ratio);
  // trace of K⁻¹S with K = [[1 + dNew, dBoth], [dBoth, dOld − 1]], |K| = −ratio
  const bNew = bilinear(product, row, row);
  const bBoth = bilinear(product, row, old.row);
  const sum = (old.variance - 1) * bNew - 2 * dBoth * bBoth + (1 + dNew) * old.product;
  return -sum / ratio;
}
