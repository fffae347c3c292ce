import type { Matrix } from '../linalg/matrix';

/** A column counts as a combination of others when what is left of it is below this share of it. */
const TOLERANCE = 1e-8;

/** The columns of a model matrix sorted into independent ones and combinations of those. */
export interface ColumnSplit {
  /** Places of a largest set of independent columns, the earlier ones first. */
  readonly independent: readonly number[];
  /** Columns that can be told apart from all others: their coefficients can be estimated. */
  readonly estimable: readonly boolean[];
  /** For each dependent column: its place, and its share of each independent one (in their order). */
  readonly dependent: readonly { readonly place: number; readonly shares: readonly number[] }[];
}

const columnOf = ({ rows, cols, data }: Matrix, j: number) =>
  Float64Array.from({ length: rows }, (_, i) => data[i * cols + j]!);

const dot = (a: Float64Array, b: Float64Array) =>
  a.reduce((sum, value, i) => sum + value * b[i]!, 0);

/** Takes the parts along the orthonormal columns out, twice, against rounding. */
function orthogonalise(column: Float64Array, basis: readonly Float64Array[]): number[] {
  const along = new Array<number>(basis.length).fill(0);
  for (let pass = 0; pass < 2; pass++) {
    basis.forEach((q, k) => {
      const part = dot(q, column);
      along[k]! += part;
      for (let i = 0; i < column.length; i++) column[i]! -= part * q[i]!;
    });
  }
  return along;
}

/** Solves Rc = r for an upper triangular R given by columns. */
function backSolve(r: readonly (readonly number[])[], right: readonly number[]): number[] {
  const c = [...right];
  for (let k = c.length - 1; k >= 0; k--) {
    c[k]! /= r[k]![k]!;
    for (let i = 0; i < k; i++) c[i]! -= r[k]![i]! * c[k]!;
  }
  return c;
}

/**
 * Sorts the columns of a model matrix: which are independent, which are combinations of those, and whose
 * coefficients can be estimated at all. By Gram–Schmidt, twice, in the order of the columns.
 *
 * @param x n × p.
 * @see Searle (1971), Linear Models, §5.4 (estimable: outside the null space of X).
 */
export function splitColumns(x: Matrix): ColumnSplit {
  const independent: number[] = [];
  const basis: Float64Array[] = [];
  const r: number[][] = [];
  const dependent: { place: number; shares: number[] }[] = [];
  for (let j = 0; j < x.cols; j++) {
    const column = columnOf(x, j);
    const size = Math.sqrt(dot(column, column));
    const along = orthogonalise(column, basis);
    const rest = Math.sqrt(dot(column, column));
    if (rest <= TOLERANCE * size || size === 0) {
      dependent.push({ place: j, shares: backSolve(r, along) });
      continue;
    }
    basis.push(column.map((value) => value / rest));
    r.push([...along, rest]);
    independent.push(j);
  }
  const estimable = new Array<boolean>(x.cols).fill(true);
  for (const { place, shares } of dependent) {
    estimable[place] = false;
    shares.forEach((share, k) => {
      if (Math.abs(share) > TOLERANCE) estimable[independent[k]!] = false;
    });
  }
  return { independent, estimable, dependent };
}

/** Leverages: the diagonal of the projection onto the columns of x. */
export function leveragesOf(x: Matrix, independent: readonly number[]): number[] {
  const basis: Float64Array[] = [];
  for (const j of independent) {
    const column = columnOf(x, j);
    orthogonalise(column, basis);
    const size = Math.sqrt(dot(column, column));
    basis.push(column.map((value) => value / size));
  }
  return Array.from({ length: x.rows }, (_, i) => basis.reduce((sum, q) => sum + q[i]! * q[i]!, 0));
}
