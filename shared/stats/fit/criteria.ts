/**
 * AICc and BIC of a least-squares fit; the variance counts as a parameter. Under a transformation the
 * Jacobian brings the likelihood back to the original scale, so that variants of one response compare.
 *
 * @param rss residual sum of squares on the analysed scale, above 0.
 * @param lnJacobian Σ ln |dz/dy| over the runs.
 * @returns AICc null when n − k − 1 ≤ 0.
 * @see Hurvich & Tsai (1989), Biometrika 76: 297–307; Schwarz (1978), Ann. Statist. 6: 461–464.
 */
export function criteriaOf(
  rss: number,
  n: number,
  parameters: number,
  lnJacobian: number,
): { aicc: number | null; bic: number } {
  const k = parameters + 1;
  const minusTwoLogLikelihood =
    n * Math.log(rss / n) + n * (1 + Math.log(2 * Math.PI)) - 2 * lnJacobian;
  const left = n - k - 1;
  return {
    aicc: left > 0 ? minusTwoLogLikelihood + 2 * k + (2 * k * (k + 1)) / left : null,
    bic: minusTwoLogLikelihood + k * Math.log(n),
  };
}
