import { normalQuantile } from '../distributions/quantiles';
import { normalTails } from '../distributions/tails';

const poly = (coefficients: readonly number[], x: number) =>
  coefficients.reduceRight((sum, each) => sum * x + each, 0);

const C1 = [0, 0.221157, -0.147981, -2.07119, 4.434685, -2.706056];
const C2 = [0, 0.042981, -0.293762, -1.752461, 5.682633, -3.582633];
const C3 = [0.544, -0.39978, 0.025054, -6.714e-4];
const C4 = [1.3822, -0.77857, 0.062767, -0.0020322];
const C5 = [-1.5861, -0.31082, -0.083751, 0.0038915];
const C6 = [-0.4803, -0.082676, 0.0030302];
const G = [-2.273, 0.459];
const MAX_N = 5000;

/** Weights of the upper half of the ordered sample, largest first. */
function weights(n: number): number[] {
  const half = Math.floor(n / 2);
  if (n === 3) return [Math.SQRT1_2];
  const m = Array.from({ length: half }, (_, i) => -normalQuantile((i + 1 - 0.375) / (n + 0.25)));
  const sum = 2 * m.reduce((total, each) => total + each * each, 0);
  const root = Math.sqrt(sum);
  const r = 1 / Math.sqrt(n);
  const a1 = poly(C1, r) + m[0]! / root;
  if (n <= 5) {
    const scale = Math.sqrt((sum - 2 * m[0]! ** 2) / (1 - 2 * a1 ** 2));
    return m.map((each, i) => (i === 0 ? a1 : each / scale));
  }
  const a2 = poly(C2, r) + m[1]! / root;
  const scale = Math.sqrt(
    (sum - 2 * m[0]! ** 2 - 2 * m[1]! ** 2) / (1 - 2 * a1 ** 2 - 2 * a2 ** 2),
  );
  return m.map((each, i) => (i === 0 ? a1 : i === 1 ? a2 : each / scale));
}

function pOf(w: number, n: number): number {
  if (n === 3) {
    const p = (6 / Math.PI) * (Math.asin(Math.sqrt(w)) - Math.asin(Math.sqrt(0.75)));
    return Math.max(0, p);
  }
  const y = Math.log1p(-w);
  if (n <= 11) {
    const gamma = poly(G, n);
    if (y >= gamma) return 1e-99;
    return normalTails((-Math.log(gamma - y) - poly(C3, n)) / Math.exp(poly(C4, n))).upper;
  }
  const x = Math.log(n);
  return normalTails((y - poly(C5, x)) / Math.exp(poly(C6, x))).upper;
}

/**
 * Shapiro–Wilk test of normality, by Royston's approximation for 3 ≤ n ≤ 5000.
 *
 * @returns W and p, or null for a sample outside that size or without spread.
 * @see Royston (1995), Algorithm AS R94, Applied Statistics 44: 547–551.
 */
export function shapiroWilk(values: readonly number[]): { w: number; p: number } | null {
  const n = values.length;
  if (n < 3 || n > MAX_N) return null;
  const sorted = [...values].sort((a, b) => a - b);
  const mean = sorted.reduce((sum, value) => sum + value, 0) / n;
  const ss = sorted.reduce((sum, value) => sum + (value - mean) ** 2, 0);
  if (!(ss > 0)) return null;
  const b = weights(n).reduce((sum, a, i) => sum + a * (sorted[n - 1 - i]! - sorted[i]!), 0);
  const w = Math.min(1, (b * b) / ss);
  return { w, p: pOf(w, n) };
}
