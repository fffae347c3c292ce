import { StatsError } from '../stats/errors';

const MAX_FACTORS = 12;
export const MAX_RUNS = 2000;

/** @throws StatsError `too-many-factors` above twelve. */
export function checkFactorCount(factors: readonly unknown[]): void {
  if (factors.length > MAX_FACTORS)
    throw new StatsError(
      'too-many-factors',
      `At most ${MAX_FACTORS} factors are planned for at once; there are ${factors.length}. Hold some fixed.`,
    );
}
