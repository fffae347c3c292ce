import type { Tails } from './beta';
import { deviance, stirlingError } from './gammaFunction';

const MAX_STEPS = 20_000;
const TINY = 1e-300;

/** x^a e^−x / Γ(a). */
function density(x: number, a: number): number {
  return Math.sqrt(a / (2 * Math.PI)) * Math.exp(-stirlingError(a) - deviance(a, x));
}

function series(x: number, a: number): number {
  let sum = 1 / a;
  let term = sum;
  for (let k = 1; k < MAX_STEPS; k++) {
    term *= x / (a + k);
    sum += term;
    if (term < sum * 1e-17) break;
  }
  return sum;
}

function fraction(x: number, a: number): number {
  let b = x + 1 - a;
  let c = 1 / TINY;
  let d = 1 / b;
  let h = d;
  for (let k = 1; k < MAX_STEPS; k++) {
    const an = -k * (k - a);
    b += 2;
    d = an * d + b;
    if (Math.abs(d) < TINY) d = TINY;
    c = b + an / c;
    if (Math.abs(c) < TINY) c = TINY;
    d = 1 / d;
    const step = d * c;
    h *= step;
    if (Math.abs(step - 1) < 1e-16) break;
  }
  return h;
}

/**
 * The regularised incomplete gamma functions P(a, x) and Q(a, x).
 *
 * @param a > 0. @param x ≥ 0. @see DLMF 8.7.1 (series), 8.9.2 (continued fraction).
 */
export function gammaTails(a: number, x: number): Tails {
  if (x <= 0) return { lower: 0, upper: 1 };
  if (x === Infinity) return { lower: 1, upper: 0 };
  const front = density(x, a);
  if (x < a + 1) {
    const lower = front * series(x, a);
    return { lower, upper: 1 - lower };
  }
  const upper = front * fraction(x, a);
  return { lower: 1 - upper, upper };
}
