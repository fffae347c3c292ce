import { betaTails } from './beta';
import { lnGamma } from './gammaFunction';

const NEGLIGIBLE = 1e-18;

/**
 * P(F′ > f) for the noncentral F: a Poisson mixture of incomplete beta functions, summed both ways from
 * the largest weight.
 *
 * @param lambda noncentrality, ≥ 0.
 * @see Johnson, Kotz & Balakrishnan (1995), Continuous Univariate Distributions 2, ch. 30.
 */
export function noncentralFUpper(f: number, d1: number, d2: number, lambda: number): number {
  const half = lambda / 2;
  const scale = d2 + d1 * f;
  const [x, y] = [(d1 * f) / scale, d2 / scale];
  const weight = (j: number) =>
    half === 0 ? (j === 0 ? 1 : 0) : Math.exp(-half + j * Math.log(half) - lnGamma(j + 1));
  const part = (j: number) => weight(j) * betaTails(x, y, d1 / 2 + j, d2 / 2).upper;
  const middle = Math.floor(half);
  let sum = 0;
  for (let j = middle; j >= 0 && weight(j) > NEGLIGIBLE; j--) sum += part(j);
  for (let j = middle + 1; weight(j) > NEGLIGIBLE; j++) sum += part(j);
  return Math.min(1, sum);
}
