import { deviance, stirlingError } from './gammaFunction';

const MAX_STEPS = 20_000;
const TINY = 1e-300;

/** Both tails of a distribution at one point; each keeps its own relative accuracy. */
export interface Tails {
  readonly lower: number;
  readonly upper: number;
}

/** x^a y^b / B(a, b), by saddle points: accurate also for large a and b. */
function density(x: number, y: number, a: number, b: number): number {
  const n = a + b;
  const exponent =
    stirlingError(n) -
    stirlingError(a) -
    stirlingError(b) -
    deviance(a, n * x) -
    deviance(b, n * y);
  return Math.sqrt((a * b) / (2 * Math.PI * n)) * Math.exp(exponent);
}

/** The continued fraction of I_x(a, b), by Lentz's method. */
function fraction(x: number, a: number, b: number): number {
  let c = 1;
  let d = 1 - ((a + b) * x) / (a + 1);
  if (Math.abs(d) < TINY) d = TINY;
  d = 1 / d;
  let h = d;
  for (let m = 1; m < MAX_STEPS; m++) {
    const even = (m * (b - m) * x) / ((a + 2 * m - 1) * (a + 2 * m));
    d = 1 + even * d;
    c = 1 + even / c;
    if (Math.abs(d) < TINY) d = TINY;
    if (Math.abs(c) < TINY) c = TINY;
    d = 1 / d;
    h *= d * c;
    const odd = (-(a + m) * (a + b + m) * x) / ((a + 2 * m) * (a + 2 * m + 1));
    d = 1 + odd * d;
    c = 1 + odd / c;
    if (Math.abs(d) < TINY) d = TINY;
    if (Math.abs(c) < TINY) c = TINY;
    d = 1 / d;
    const step = d * c;
    h *= step;
    if (Math.abs(step - 1) < 1e-16) break;
  }
  return h;
}

/**
 * The regularised incomplete beta function: lower = I_x(a, b), upper = I_y(b, a).
 *
 * @param x, y with x + y = 1, both given so that neither is a rounded difference. @param a, b > 0.
 * @see DLMF 8.17.22 (continued fraction); Loader (2000) for the factor before it.
 */
export function betaTails(x: number, y: number, a: number, b: number): Tails {
  if (x <= 0) return { lower: 0, upper: 1 };
  if (y <= 0) return { lower: 1, upper: 0 };
  const front = density(x, y, a, b);
  if (x < (a + 1) / (a + b + 2)) {
    const lower = (front * fraction(x, a, b)) / a;
    return { lower, upper: 1 - lower };
  }
  const upper = (front * fraction(y, b, a)) / b;
  return { lower: 1 - upper, upper };
}
