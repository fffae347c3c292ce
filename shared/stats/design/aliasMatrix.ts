import { isCategorical, type Factor } from '../coding/factor';
import { inverseOf, cholesky } from '../linalg/cholesky';
import type { Matrix } from '../linalg/matrix';
import { modelMatrix, type Point } from '../model/modelMatrix';
import { order, termsOf, type Term } from '../model/term';

/** More rows than a person reads; larger tables are left out. */
const MAX_TERMS = 120;

export interface AliasMatrix {
  /** Terms of the model: the rows. */
  readonly terms: string[];
  /** Terms left out of the model: the columns. */
  readonly aliased: string[];
  /** By how much each left-out coefficient shifts each estimate. */
  readonly matrix: number[][];
}

/** Third-order terms of numeric factors: what a quadratic model leaves out first. */
function cubicNames(factors: readonly Factor[]): string[] {
  const keys = factors.filter((factor) => !isCategorical(factor)).map(({ key }) => key);
  const names: string[] = [];
  keys.forEach((a, i) => {
    names.push(`${a}^3`);
    keys.forEach((b, j) => {
      if (j !== i) names.push(`${a}^2:${b}`);
      if (j > i) keys.slice(j + 1).forEach((c) => names.push(`${a}:${b}:${c}`));
    });
  });
  return names;
}

/** The terms of next higher order that the model leaves out. */
function leftOut(factors: readonly Factor[], terms: readonly Term[]): Term[] {
  const inModel = new Set(terms.map(({ name }) => name));
  const missing = (all: readonly Term[]) => all.filter(({ name }) => !inModel.has(name));
  const second = missing(termsOf(factors, 'quadratic', false)).filter((term) => order(term) > 1);
  return second.length > 0 ? second : missing(termsOf(factors, cubicNames(factors), false));
}

function crossProduct(x: Matrix, z: Matrix): Float64Array {
  const out = new Float64Array(x.cols * z.cols);
  for (let i = 0; i < x.rows; i++)
    for (let a = 0; a < x.cols; a++)
      for (let b = 0; b < z.cols; b++)
        out[a * z.cols + b]! += x.data[i * x.cols + a]! * z.data[i * z.cols + b]!;
  return out;
}

/**
 * How terms left out of the model would shift its estimates: A = (X′X)⁻¹X′Z.
 *
 * @returns null when the runs do not separate the model’s own terms, or the table would be too large.
 * @see Box & Draper (2007), Response Surfaces, Mixtures, and Ridge Analyses, 2nd ed., §3.10.
 */
export function aliasMatrix(
  factors: readonly Factor[],
  terms: readonly Term[],
  points: readonly Point[],
): AliasMatrix | null {
  const aliased = leftOut(factors, terms);
  if (aliased.length === 0 || terms.length > MAX_TERMS || aliased.length > MAX_TERMS) return null;
  const x = modelMatrix(factors, terms, points);
  const z = modelMatrix(factors, aliased, points);
  const p = x.cols;
  const l = cholesky(crossProduct(x, x), p);
  if (!l) return null;
  const inverse = inverseOf(l, p);
  const xz = crossProduct(x, z);
  const matrix = Array.from({ length: p }, (_, a) =>
    Array.from({ length: z.cols }, (_each, j) => {
      let sum = 0;
      for (let b = 0; b < p; b++) sum += inverse[a * p + b]! * xz[b * z.cols + j]!;
      return Math.abs(sum) < 1e-12 ? 0 : sum;
    }),
  );
  return { terms: terms.map(({ name }) => name), aliased: aliased.map(({ name }) => name), matrix };
}
