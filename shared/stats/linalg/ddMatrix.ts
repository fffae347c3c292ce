import type { Matrix } from './matrix';
import { zeros } from './matrix';
import type { Dd } from './dd';

/** A dense matrix of double-doubles, row-major, high and low parts side by side. */
export interface DdMatrix {
  readonly rows: number;
  readonly cols: number;
  readonly hi: Float64Array;
  readonly lo: Float64Array;
}

export function ddZeros(rows: number, cols: number): DdMatrix {
  const size = rows * cols;
  return { rows, cols, hi: new Float64Array(size), lo: new Float64Array(size) };
}

export function ddGet({ hi, lo, cols }: DdMatrix, i: number, j: number): Dd {
  const at = i * cols + j;
  return [hi[at]!, lo[at]!];
}

export function ddSet({ hi, lo, cols }: DdMatrix, i: number, j: number, value: Dd): void {
  const at = i * cols + j;
  hi[at] = value[0];
  lo[at] = value[1];
}

/** Rounded to doubles. */
export function ddRounded(matrix: DdMatrix): Matrix {
  const out = zeros(matrix.rows, matrix.cols);
  for (let i = 0; i < out.data.length; i++) out.data[i] = matrix.hi[i]! + matrix.lo[i]!;
  return out;
}
