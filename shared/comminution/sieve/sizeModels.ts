/** Passing share as a fraction of 1 at a size in mm. */
export interface PassingPoint {
  readonly sizeMm: number;
  readonly passing: number;
}

export interface SizeModel {
  /** Rosin–Rammler: size that 63.2 % passes. Gaudin–Schuhmann: size that everything passes. */
  readonly sizeMm: number;
  readonly slope: number;
  /** On the straight-line form; null when all points lie on one height. */
  readonly rSquared: number | null;
}

/** A line through fewer says nothing about the form. */
const MIN_POINTS = 3;

interface Line {
  readonly slope: number;
  readonly intercept: number;
  readonly rSquared: number | null;
}

function lineThrough(x: readonly number[], y: readonly number[]): Line | null {
  const n = x.length;
  if (n < MIN_POINTS) return null;
  const xMean = x.reduce((a, b) => a + b, 0) / n;
  const yMean = y.reduce((a, b) => a + b, 0) / n;
  let sxx = 0;
  let sxy = 0;
  let syy = 0;
  for (let i = 0; i < n; i++) {
    const dx = x[i]! - xMean;
    const dy = y[i]! - yMean;
    sxx += dx * dx;
    sxy += dx * dy;
    syy += dy * dy;
  }
  if (sxx === 0) return null;
  const slope = sxy / sxx;
  const rSquared = syy === 0 ? null : (sxy * sxy) / (sxx * syy);
  return { slope, intercept: yMean - slope * xMean, rSquared };
}

function modelOf(
  points: readonly PassingPoint[],
  height: (passing: number) => number,
): SizeModel | null {
  const used = points.filter(({ passing }) => passing > 0 && passing < 1);
  const line = lineThrough(
    used.map(({ sizeMm }) => Math.log(sizeMm)),
    used.map(({ passing }) => height(passing)),
  );
  if (!line || line.slope <= 0) return null;
  const sizeMm = Math.exp(-line.intercept / line.slope);
  return Number.isFinite(sizeMm) && sizeMm > 0
    ? { sizeMm, slope: line.slope, rSquared: line.rSquared }
    : null;
}

/**
 * Rosin–Rammler: retained share R = exp(−(x/x′)ⁿ), by least squares on ln(−ln R) against ln x. For
 * drawing and checks, not as a response. Points at 0 or 100 % carry no place on that axis: left out.
 *
 * @returns x′ in mm and n; null with fewer than three points between 0 and 100 %.
 * @see Rosin & Rammler (1933), J. Inst. Fuel 7: 29–36; ISO 9276-3:2008.
 */
export function rosinRammler(points: readonly PassingPoint[]): SizeModel | null {
  return modelOf(points, (passing) => Math.log(-Math.log1p(-passing)));
}

/**
 * Gaudin–Schuhmann: passing share y = (x/k)ᵐ, by least squares on ln y against ln x.
 *
 * @returns k in mm and m; null with fewer than three points between 0 and 100 %.
 * @see Schuhmann (1940), AIME Technical Publication 1189; ISO 9276-3:2008.
 */
export function gaudinSchuhmann(points: readonly PassingPoint[]): SizeModel | null {
  return modelOf(points, Math.log);
}
