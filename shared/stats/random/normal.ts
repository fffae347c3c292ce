import type { Random } from './generator';

/**
 * One standard normal deviate (mean 0, SD 1).
 *
 * @see Marsaglia & Bray (1964), A convenient method for generating normal variables, SIAM Rev. 6:
 *   260–264 (polar method; the second deviate of a pair is not kept, so that no state is needed).
 */
export function normal(random: Random): number {
  for (;;) {
    const x = 2 * random.uniform() - 1;
    const y = 2 * random.uniform() - 1;
    const r = x * x + y * y;
    if (r > 0 && r < 1) return x * Math.sqrt((-2 * Math.log(r)) / r);
  }
}
