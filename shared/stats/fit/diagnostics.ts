import type { LeastSquares } from './leastSquares';

/** A run with a leverage this near 1 is fitted exactly: what it would be without itself is unknown. */
const FITTED_EXACTLY = 1e-9;

export interface RunDiagnostics {
  readonly fitted: number;
  readonly residual: number;
  readonly leverage: number;
  readonly studentizedInternal: number | null;
  readonly studentizedExternal: number | null;
  readonly cooksDistance: number | null;
}

/**
 * Residual, leverage, studentised residuals and Cook's distance of each run.
 *
 * @param weights of the runs; residuals are scaled by √weight before they are studentised.
 * @see Belsley, Kuh & Welsch (1980), Regression Diagnostics; Cook (1977), Technometrics 19: 15–18.
 */
export function diagnosticsOf(fit: LeastSquares, weights: readonly number[]): RunDiagnostics[] {
  const { n, p } = fit;
  const df = n - p;
  const squares = fit.residuals.map((e, i) => weights[i]! * e * e);
  const rss = squares.reduce((sum, square) => sum + square, 0);
  const variance = df > 0 && !fit.isPerfect ? rss / df : 0;
  return fit.residuals.map((residual, i) => {
    const leverage = fit.leverages[i]!;
    const plain = { fitted: fit.fitted[i]!, residual, leverage };
    const free = 1 - leverage;
    if (variance === 0 || free < FITTED_EXACTLY)
      return {
        ...plain,
        studentizedInternal: null,
        studentizedExternal: null,
        cooksDistance: null,
      };
    const e = residual * Math.sqrt(weights[i]!);
    const internal = e / Math.sqrt(variance * free);
    const withoutSelf = df > 1 ? (rss - (e * e) / free) / (df - 1) : 0;
    return {
      ...plain,
      studentizedInternal: internal,
      studentizedExternal: withoutSelf > 0 ? e / Math.sqrt(withoutSelf * free) : null,
      cooksDistance: (internal ** 2 * leverage) / (p * free),
    };
  });
}

/** Σ(eᵢ/(1 − hᵢ))², or null when a run is fitted exactly. */
export function pressOf(fit: LeastSquares, weights: readonly number[]): number | null {
  if (fit.leverages.some((h) => 1 - h < FITTED_EXACTLY)) return null;
  return fit.residuals.reduce(
    (sum, e, i) => sum + weights[i]! * (e / (1 - fit.leverages[i]!)) ** 2,
    0,
  );
}
