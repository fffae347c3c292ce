import type { CurvePoint } from './curve';

/** A two-parameter size law on its linearised form, for drawing and checks, not as a response. */
export interface SizeLaw {
  /** Rosin–Rammler: size that 63.2 % passes; Gaudin–Schuhmann: size that all passes. In mm. */
  readonly sizeMm: number;
  readonly slope: number;
  readonly rSquared: number;
}

/** Straight line through points by least squares; null with fewer than two distinct x. */
function straightLine(points: readonly (readonly [number, number])[]) {
  const n = points.length;
  if (n < 2) return null;
  const meanX = points.reduce((sum, [x]) => sum + x, 0) / n;
  const meanY = points.reduce((sum, [, y]) => sum + y, 0) / n;
  let sxx = 0;
  let sxy = 0;
  let syy = 0;
  for (const [x, y] of points) {
    sxx += (x - meanX) ** 2;
    sxy += (x - meanX) * (y - meanY);
    syy += (y - meanY) ** 2;
  }
  if (sxx === 0 || syy === 0) return null;
  const slope = sxy / sxx;
  return { slope, intercept: meanY - slope * meanX, rSquared: (slope * sxy) / syy };
}

/** Points at 0 and 100 % have no place on a logarithmic axis. */
const inside = (curve: readonly CurvePoint[]) =>
  curve.filter(({ passingPercent }) => passingPercent > 0 && passingPercent < 100);

function lawOf(curve: readonly CurvePoint[], transform: (share: number) => number): SizeLaw | null {
  const line = straightLine(
    inside(curve).map(({ sizeMm, passingPercent }) => [
      Math.log(sizeMm),
      transform(passingPercent / 100),
    ]),
  );
  if (!line || line.slope === 0) return null;
  const sizeMm = Math.exp(-line.intercept / line.slope);
  if (!Number.isFinite(sizeMm)) return null;
  return { sizeMm, slope: line.slope, rSquared: line.rSquared };
}

/**
 * Rosin–Rammler, retained R = exp(−(x/x′)ⁿ), by ln(−ln R) on ln x.
 *
 * @see Rosin & Rammler (1933), J. Inst. Fuel 7: 29–36; ISO 9276-3.
 */
export function rosinRammler(curve: readonly CurvePoint[]): SizeLaw | null {
  return lawOf(curve, (passing) => Math.log(-Math.log1p(-passing)));
}

/**
 * Gaudin–Schuhmann, passing y = (x/k)^m, by ln y on ln x.
 *
 * @see Schuhmann (1940), AIME TP 1189; ISO 9276-3.
 */
export function gaudinSchuhmann(curve: readonly CurvePoint[]): SizeLaw | null {
  return lawOf(curve, Math.log);
}
