import { StatsError } from '../errors';

/** A dense real matrix, row-major: entry (i, j) is `data[i * cols + j]`. Crosses to a worker as it is. */
export interface Matrix {
  readonly rows: number;
  readonly cols: number;
  readonly data: Float64Array;
}

/** A rows × cols matrix of zeros. */
export function zeros(rows: number, cols: number): Matrix {
  return { rows, cols, data: new Float64Array(rows * cols) };
}

/**
 * A matrix from its rows.
 *
 * @throws StatsError `shape` when the rows differ in length.
 */
export function fromRows(rows: readonly (readonly number[])[]): Matrix {
  const cols = rows[0]?.length ?? 0;
  const out = zeros(rows.length, cols);
  rows.forEach((row, i) => {
    if (row.length !== cols)
      throw new StatsError('shape', 'The rows of a matrix differ in length.');
    out.data.set(row, i * cols);
  });
  return out;
}

/** Row i as a view, not a copy. */
export function rowOf(matrix: Matrix, i: number): Float64Array {
  return matrix.data.subarray(i * matrix.cols, (i + 1) * matrix.cols);
}
