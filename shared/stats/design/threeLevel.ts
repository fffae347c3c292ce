import { isCategorical, type Factor } from '../coding/factor';
import { StatsError } from '../errors';
import { levelGrid, pointsOf, type CodedDesign } from './codedDesign';

/** Contrasts over the whole numbers modulo 3 that part a 3^k design: the longest, then AB². */
const CONTRASTS: readonly ((levels: readonly number[]) => number)[] = [
  (levels) => levels.reduce((sum, level) => sum + level, 0) % 3,
  (levels) => (levels[0]! + 2 * levels[1]!) % 3,
];

function blockCount(factors: number, blocks: number): number {
  const contrasts = [1, 3, 9].indexOf(blocks);
  if (contrasts >= 0 && contrasts < factors) return contrasts;
  throw new StatsError(
    'not-available',
    `A three-level factorial of ${factors} factors parts into ${factors > 2 ? '3 or 9' : '3'} blocks, not ${blocks}. Or repeat the whole design once in each block.`,
  );
}

/**
 * All combinations of −1, 0, +1, in standard order; a categorical factor takes all its levels.
 *
 * @throws StatsError `not-available` for blocks other than 3 or 9.
 * @see Box, Hunter & Hunter (2005); blocks by components of the longest product, e-Handbook 5.3.3.9.
 */
export function threeLevelDesign(factors: readonly Factor[], blocks: number): CodedDesign {
  const runs = levelGrid(
    factors.map((factor) =>
      isCategorical(factor) ? factor.levels.map((_, level) => level) : [-1, 0, 1],
    ),
  );
  if (blocks > 1 && factors.some(isCategorical))
    throw new StatsError(
      'not-available',
      'A three-level factorial with a categorical factor has one block.',
    );
  const contrasts = CONTRASTS.slice(0, blockCount(factors.length, blocks));
  const block = (run: readonly number[]) => {
    const levels = run.map((level) => level + 1);
    return contrasts.reduce((all, contrast, j) => all + 3 ** j * contrast(levels), 1);
  };
  const isCentre = (run: readonly number[]) =>
    !factors.some(isCategorical) && run.every((level) => level === 0);
  const points = pointsOf(runs, 'factorial', (i) => block(runs[i]!));
  return {
    points: points.map((each) => (isCentre(each.point) ? { ...each, pointType: 'centre' } : each)),
    blocks,
  };
}
