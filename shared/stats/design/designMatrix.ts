import type { Factor } from '../coding/factor';
import type { Matrix } from '../linalg/matrix';
import { modelMatrix, type Point } from '../model/modelMatrix';
import type { Term } from '../model/term';
import { leveragesOf, splitColumns } from './independentColumns';

/** X′X of an n × p matrix, row-major. */
export function informationOf({ rows, cols, data }: Matrix): Float64Array {
  const out = new Float64Array(cols * cols);
  for (let i = 0; i < rows; i++)
    for (let a = 0; a < cols; a++) {
      const value = data[i * cols + a]!;
      if (value === 0) continue;
      for (let b = 0; b < cols; b++) out[a * cols + b]! += value * data[i * cols + b]!;
    }
  return out;
}

/** Columns of blocks, sum to zero: one less than blocks. */
export function blockColumns(blocks: readonly number[]): { names: string[]; rows: number[][] } {
  const labels = [...new Set(blocks)].sort((a, b) => a - b);
  const last = labels.at(-1);
  const own = labels.slice(0, -1);
  return {
    names: own.map((label) => `block[${label}]`),
    rows: blocks.map((block) =>
      own.map((label) => (block === last ? -1 : block === label ? 1 : 0)),
    ),
  };
}

/** The columns of one matrix, then those of rows. */
function withColumns(x: Matrix, rows: readonly (readonly number[])[]): Matrix {
  const extra = rows[0]?.length ?? 0;
  const cols = x.cols + extra;
  const data = new Float64Array(x.rows * cols);
  for (let i = 0; i < x.rows; i++) {
    data.set(x.data.subarray(i * x.cols, (i + 1) * x.cols), i * cols);
    data.set(rows[i] ?? [], i * cols + x.cols);
  }
  return { rows: x.rows, cols, data };
}

/** The model matrix of runs with their block columns, and how its columns split. */
export function modelOf(
  factors: readonly Factor[],
  terms: readonly Term[],
  points: readonly Point[],
  blocks: readonly number[],
) {
  const model = modelMatrix(factors, terms, points);
  const { names, rows } = blockColumns(blocks);
  const full = withColumns(model, rows);
  const split = splitColumns(full);
  return {
    model,
    full,
    names: [...terms.map(({ name }) => name), ...names],
    split,
    leverages: leveragesOf(full, split.independent),
  };
}
