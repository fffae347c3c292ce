import { bilinear, cholesky, gramOf, inverseOf, lnDeterminant } from '../linalg/cholesky';

const MAX_STEPS = 600;
const CLOSE_ENOUGH = 1e-3;
/** Weights below this share of an even one are dropped. */
const NEGLIGIBLE = 1e-4;

/** A probability measure on candidate rows, and what it proves. */
export interface ApproximateDesign {
  readonly weights: Float64Array;
  /** |M|^(1/p). */
  readonly dValue: number;
  /** A rigorous upper bound on |M|^(1/p) over all measures on these rows: dValue · max d/p. */
  readonly bound: number;
  readonly inverse: Float64Array;
}

/**
 * The best approximate D-optimal design on candidate rows, by the multiplicative algorithm
 * wᵢ ← wᵢ·dᵢ/p.
 *
 * @param rows model rows of the candidates, p long.
 * @returns null when the candidates do not span the model.
 * @see Kiefer & Wolfowitz (1960); Silvey, Titterington & Torsney (1978), Commun. Statist. A7: 1379–1389.
 */
export function approximateD(rows: readonly Float64Array[], p: number): ApproximateDesign | null {
  const n = rows.length;
  const weights = new Float64Array(n).fill(1 / n);
  for (let step = 0; ; step++) {
    const l = cholesky(gramOf(rows, p, weights), p);
    if (!l) return null;
    const inverse = inverseOf(l, p);
    const d = rows.map((row) => bilinear(inverse, row, row));
    const largest = Math.max(...d);
    const dValue = Math.exp(lnDeterminant(l, p) / p);
    if (largest / p - 1 <= CLOSE_ENOUGH || step >= MAX_STEPS)
      return { weights, dValue, bound: (dValue * largest) / p, inverse };
    let sum = 0;
    for (let i = 0; i < n; i++) {
      weights[i]! *= d[i]! / p;
      if (step > 50 && weights[i]! < NEGLIGIBLE / n) weights[i] = 0;
      sum += weights[i]!;
    }
    for (let i = 0; i < n; i++) weights[i]! /= sum;
  }
}
