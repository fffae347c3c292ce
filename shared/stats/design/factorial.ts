import { isCategorical, type Factor } from '../coding/factor';
import { StatsError } from '../errors';
import { combinations, type DesignPoint } from './designPoint';
import { bestGenerators } from './words';

const MAX_RUNS = 4096;

/** Splits a two-level factorial into 2^b blocks, confounding interactions of as high an order as can be. */
export function inBlocks(points: readonly DesignPoint[], k: number, blocks: number): DesignPoint[] {
  if (blocks === 1) return [...points];
  const b = Math.log2(blocks);
  if (!Number.isInteger(b) || b >= k)
    throw new StatsError(
      'not-available',
      `A two-level factorial in ${k} factors splits into 2, 4, … up to ${2 ** (k - 1)} blocks, not into ${blocks}.`,
    );
  // a block variable is an added factor that equals an interaction
  const words = bestGenerators(k + b, b);
  return points.map((point) => {
    const block = words.reduce((sum, word, i) => {
      const sign = point.coded.reduce(
        (product, x, place) => ((word & (1 << place)) !== 0 ? product * x : product),
        1,
      );
      return sum + (sign > 0 ? 2 ** i : 0);
    }, 1);
    return { ...point, block };
  });
}

/**
 * The full factorial: two levels (or three) of each numeric factor, all levels of each categorical one, in
 * standard order.
 *
 * @throws StatsError `not-available` beyond 4,096 runs, or for blocks that do not fit.
 * @see Box, Hunter & Hunter (2005), Statistics for Experimenters, 2nd ed.; NIST e-Handbook 5.3.3.3.
 */
export function factorial(
  factors: readonly Factor[],
  levels: 2 | 3,
  blocks: number,
): DesignPoint[] {
  const own = factors.map((factor) => {
    if (isCategorical(factor)) return factor.levels.map((_, i) => i);
    return levels === 2 ? [-1, 1] : [-1, 0, 1];
  });
  const size = own.reduce((product, each) => product * each.length, 1);
  if (size > MAX_RUNS)
    throw new StatsError(
      'not-available',
      `This factorial has ${size} runs; take a fraction or an optimal design.`,
    );
  const points = combinations(own).map((coded): DesignPoint => ({
    coded,
    type: coded.every((x, i) => isCategorical(factors[i]!) || x !== 0) ? 'factorial' : 'edge',
    block: 1,
  }));
  if (blocks === 1) return points;
  if (levels === 3 || factors.some(isCategorical))
    throw new StatsError(
      'not-available',
      'Blocks are offered for two-level factorials of numeric factors; an optimal design takes any number of blocks.',
    );
  return inBlocks(points, factors.length, blocks);
}
