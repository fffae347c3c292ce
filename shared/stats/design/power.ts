import { noncentralFUpper } from '../distributions/noncentralF';
import { fQuantile } from '../distributions/quantiles';
import { INTERCEPT, type Term } from '../model/term';

/** Beyond it the sum of the mixture gets long and the power is 1 for any usual significance. */
const MAX_LAMBDA = 1e6;

export interface PowerQuestion {
  /** Change of the response from low to high of a factor; for a square, from centre to high. */
  readonly effect: number;
  /** Run-to-run standard deviation, in the same unit. */
  readonly sigma: number;
  /** Chance of a false call. */
  readonly significance: number;
}

/** A straight term runs from −1 to +1, so its coefficient is half the effect; an even one from 0 to 1. */
function coefficientOf({ powers, contrasts }: Term, effect: number): number {
  const isEven = contrasts.length === 0 && powers.every((power) => power % 2 === 0);
  return isEven ? effect : effect / 2;
}

/**
 * The chance that the F test of one term finds an effect of this size.
 *
 * @param relativeStandardError standard error ÷ sigma of the term’s coefficient.
 * @param df degrees of freedom of the residual.
 * @returns null for the intercept and blocks, without residual freedom, and for what cannot be estimated.
 * @see Cohen (1988), Statistical Power Analysis, 2nd ed.; noncentral F with λ = (β/(σ·se))².
 */
export function powerOf(
  term: Term | undefined,
  relativeStandardError: number | null,
  df: number,
  question: PowerQuestion | null,
): number | null {
  if (!question || !term || term.name === INTERCEPT) return null;
  if (relativeStandardError === null || df < 1) return null;
  const { effect, sigma, significance } = question;
  const ratio = coefficientOf(term, effect) / (sigma * relativeStandardError);
  const lambda = Math.min(MAX_LAMBDA, ratio ** 2);
  const critical = fQuantile(1 - significance, 1, df, significance);
  return noncentralFUpper(critical, 1, df, lambda);
}
