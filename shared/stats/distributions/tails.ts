import { betaTails, type Tails } from './beta';
import { gammaTails } from './gammaTails';

/** Both tails of F with d1 and d2 degrees of freedom at f. */
export function fTails(f: number, d1: number, d2: number): Tails {
  if (!(f > 0)) return { lower: 0, upper: 1 };
  if (f === Infinity) return { lower: 1, upper: 0 };
  const scale = d2 + d1 * f;
  const { lower, upper } = betaTails(d2 / scale, (d1 * f) / scale, d2 / 2, d1 / 2);
  return { lower: upper, upper: lower };
}

/** P(F > f). */
export const fUpper = (f: number, d1: number, d2: number) => fTails(f, d1, d2).upper;

/** Both tails of Student's t with v degrees of freedom. */
export function tTails(t: number, v: number): Tails {
  const outer = fUpper(t * t, 1, v) / 2;
  return t > 0 ? { lower: 1 - outer, upper: outer } : { lower: outer, upper: 1 - outer };
}

/** P(|T| > |t|). */
export const tTwoSided = (t: number, v: number) => fUpper(t * t, 1, v);

/** Both tails of χ² with v degrees of freedom. */
export const chiSquareTails = (x: number, v: number) => gammaTails(v / 2, x / 2);

/** Both tails of the standard normal distribution. */
export function normalTails(z: number): Tails {
  const outer = gammaTails(0.5, (z * z) / 2).upper / 2;
  return z > 0 ? { lower: 1 - outer, upper: outer } : { lower: outer, upper: 1 - outer };
}
