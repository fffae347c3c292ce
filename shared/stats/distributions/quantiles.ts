import type { Tails } from './beta';
import { fTails, normalTails, tTails } from './tails';

const MAX_STEPS = 400;

/**
 * Inverts a continuous distribution on (0, ∞) by bisection on ln x, comparing the smaller tail: as good
 * at 1e-30 as at ½.
 */
function invertPositive(tails: (x: number) => Tails, lower: number, upper: number): number {
  const isBelow = (x: number) => {
    const at = tails(x);
    return lower <= upper ? at.lower < lower : at.upper > upper;
  };
  let low = -1;
  let high = 1;
  while (!isBelow(Math.exp(low)) && low > -700) low *= 2;
  while (isBelow(Math.exp(high)) && high < 700) high *= 2;
  for (let i = 0; i < MAX_STEPS; i++) {
    const mid = (low + high) / 2;
    if (mid === low || mid === high) break;
    if (isBelow(Math.exp(mid))) low = mid;
    else high = mid;
  }
  return Math.exp((low + high) / 2);
}

/** The f below which F lies with probability `p`; give `upper` = 1 − p where p is near 1. */
export function fQuantile(p: number, d1: number, d2: number, upper = 1 - p): number {
  if (p <= 0) return 0;
  if (upper <= 0) return Infinity;
  return invertPositive((x) => fTails(x, d1, d2), p, upper);
}

/** The t below which Student's t lies with probability `p`. */
export function tQuantile(p: number, v: number): number {
  if (p === 0.5) return 0;
  const outer = p < 0.5 ? p : 1 - p;
  const size = invertPositive((x) => tTails(x, v), 1 - outer, outer);
  return p < 0.5 ? -size : size;
}

/** The z below which the standard normal lies with probability `p`. */
export function normalQuantile(p: number): number {
  if (p === 0.5) return 0;
  const outer = p < 0.5 ? p : 1 - p;
  const size = invertPositive(normalTails, 1 - outer, outer);
  return p < 0.5 ? -size : size;
}
