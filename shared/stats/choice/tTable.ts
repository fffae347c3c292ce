import { tTails } from '../distributions/tails';

const REACH = 12;
const STEPS = 2400;

/**
 * Student's t distribution function from a table, a little above the truth everywhere: for upper bounds on
 * probabilities in inner loops.
 */
export function tUpperBound(df: number): (t: number) => number {
  const table = Float64Array.from(
    { length: STEPS + 1 },
    (_, i) => tTails(-REACH + (2 * REACH * i) / STEPS, df).lower,
  );
  return (t) => {
    if (t >= REACH) return 1;
    if (t <= -REACH) return table[0]!;
    // the next step up: the function rises, so this is never too small
    return table[Math.min(STEPS, Math.ceil(((t + REACH) * STEPS) / (2 * REACH)))]!;
  };
}
