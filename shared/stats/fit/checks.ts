import { chiSquareTails, tTwoSided } from '../distributions/tails';
import { shapiroWilk } from './shapiroWilk';

export interface Check {
  readonly statistic: number | null;
  readonly p: number | null;
  readonly message: string;
}

const NOTHING: Check = {
  statistic: null,
  p: null,
  message: 'Too few runs or no scatter left: this cannot be checked.',
};
const LIMIT = 0.05;

const figure = (p: number) => (p < 0.001 ? 'p < 0.001' : `p = ${p.toFixed(3)}`);

/** Residuals against a normal distribution: Shapiro–Wilk on raw residuals. */
export function normalityCheck(residuals: readonly number[]): Check {
  const test = shapiroWilk(residuals);
  if (!test) return NOTHING;
  const { w: statistic, p } = test;
  return {
    statistic,
    p,
    message:
      p < LIMIT
        ? `The residuals do not look normal (${figure(p)}): look at the largest ones and at a transformation.`
        : `Nothing speaks against normal residuals (${figure(p)}).`,
  };
}

function correlation(x: readonly number[], y: readonly number[]): number | null {
  const n = x.length;
  const meanX = x.reduce((sum, each) => sum + each, 0) / n;
  const meanY = y.reduce((sum, each) => sum + each, 0) / n;
  let sxx = 0;
  let sxy = 0;
  let syy = 0;
  x.forEach((each, i) => {
    sxx += (each - meanX) ** 2;
    sxy += (each - meanX) * (y[i]! - meanY);
    syy += (y[i]! - meanY) ** 2;
  });
  return sxx > 0 && syy > 0 ? sxy / Math.sqrt(sxx * syy) : null;
}

/**
 * Constant spread: Breusch–Pagan in Koenker's studentised form, squared residuals against fitted values,
 * n·R² against χ² with one degree of freedom.
 *
 * @see Breusch & Pagan (1979), Econometrica 47: 1287–1294; Koenker (1981), J. Econometrics 17: 107–112.
 */
export function constantSpreadCheck(
  residuals: readonly number[],
  fitted: readonly number[],
): Check {
  const r = correlation(
    fitted,
    residuals.map((e) => e * e),
  );
  if (r === null || residuals.length < 4) return NOTHING;
  const statistic = residuals.length * r * r;
  const p = chiSquareTails(statistic, 1).upper;
  return {
    statistic,
    p,
    message:
      p < LIMIT
        ? `The spread ${r > 0 ? 'grows' : 'shrinks'} with the fitted value (${figure(p)}): a transformation may even it out.`
        : `The spread looks constant (${figure(p)}).`,
  };
}

/** A trend of the residuals with run order: correlation tested by t. Shows drift of rig, water or operator. */
export function runOrderCheck(residuals: readonly number[]): Check {
  const n = residuals.length;
  const r = correlation(
    residuals.map((_, i) => i),
    residuals,
  );
  if (r === null || n < 4 || Math.abs(r) >= 1) return NOTHING;
  const statistic = r * Math.sqrt((n - 2) / (1 - r * r));
  const p = tTwoSided(statistic, n - 2);
  return {
    statistic,
    p,
    message:
      p < LIMIT
        ? `The residuals ${r > 0 ? 'rise' : 'fall'} with run order (${figure(p)}): something drifted.`
        : `No trend with run order (${figure(p)}).`,
  };
}
