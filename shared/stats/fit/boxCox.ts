import { chiSquareTails } from '../distributions/tails';
import { leastSquares } from './leastSquares';
import type { CodedColumns } from './codedColumns';
import { lnJacobian, transformed, type Transform } from './transform';
import { toNumber } from '../linalg/dd';

const RANGE = 3;
const GRID = 61;

export interface BoxCoxProfile {
  readonly lambda: number;
  /** 95 % likelihood interval, cut at ±3. */
  readonly low: number;
  readonly high: number;
}

const power = (lambda: number): Transform => ({
  kind: 'boxcox',
  lower: 0,
  upper: 1,
  movedBy: 0,
  lambda,
});

/** Twice the fall of the log-likelihood that bounds a 95 % interval: χ²(1) at 5 %. */
function dropOf95(): number {
  let low = 0;
  let high = 20;
  for (let i = 0; i < 60; i++) {
    const mid = (low + high) / 2;
    if (chiSquareTails(mid, 1).upper > 0.05) low = mid;
    else high = mid;
  }
  return low / 2;
}

/**
 * The most likely Box–Cox power for a model, with its 95 % likelihood interval.
 *
 * @param y values above 0.
 * @see Box & Cox (1964), J. R. Statist. Soc. B 26: 211–252.
 */
export function boxCoxProfile(columns: CodedColumns, y: readonly number[]): BoxCoxProfile {
  const logLikelihood = (lambda: number): number => {
    const transform = power(lambda);
    const fit = leastSquares(
      columns,
      y.map((value) => transformed(transform, value)),
    );
    const jacobian = y.reduce((sum, value) => sum + lnJacobian(transform, value), 0);
    const rss = Math.max(toNumber(fit.residualSs), Number.MIN_VALUE);
    return (-y.length / 2) * Math.log(rss / y.length) + jacobian;
  };
  const grid = Array.from({ length: GRID }, (_, i) => -RANGE + (2 * RANGE * i) / (GRID - 1));
  const values = grid.map(logLikelihood);
  const best = values.indexOf(Math.max(...values));
  let [low, high] = [grid[Math.max(0, best - 1)]!, grid[Math.min(GRID - 1, best + 1)]!];
  const ratio = (Math.sqrt(5) - 1) / 2;
  for (let i = 0; i < 40; i++) {
    const a = high - ratio * (high - low);
    const b = low + ratio * (high - low);
    if (logLikelihood(a) > logLikelihood(b)) high = b;
    else low = a;
  }
  const lambda = (low + high) / 2;
  const limit = logLikelihood(lambda) - dropOf95();
  const edge = (end: number) => {
    if (logLikelihood(end) >= limit) return end;
    let inside = lambda;
    let outside = end;
    for (let i = 0; i < 40; i++) {
      const mid = (inside + outside) / 2;
      if (logLikelihood(mid) >= limit) inside = mid;
      else outside = mid;
    }
    return inside;
  };
  return { lambda, low: edge(-RANGE), high: edge(RANGE) };
}
