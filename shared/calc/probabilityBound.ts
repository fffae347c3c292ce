import { holds, type Goal } from '../stats/choice/desirability';
import { tUpperBound } from '../stats/choice/tTable';
import { leverageOfRow, rowAt, type Predictor } from '../stats/fit/predict';

/** A goal with the limits on its model's analysed scale; without predictor it is exact. */
export interface BoundedGoal {
  readonly goal: Goal;
  readonly predictor: Predictor | null;
  /** Place among the models. */
  readonly index: number;
  readonly low: number;
  readonly high: number;
}

/** Monte-Carlo scatter may lift a probability a little above its bound. */
const ROOM = 0.02;

/**
 * An upper bound on the chance that all goals hold at a point: no joint probability exceeds the smallest
 * of its parts, each a t predictive.
 *
 * @returns a function of the goals' values, the models' means and the coded point; 0…1 + a little room.
 */
export function upperBounds(
  goals: readonly BoundedGoal[],
): (values: ArrayLike<number>, means: ArrayLike<number>, coded: readonly number[]) => number {
  const tables = goals.map(({ predictor }) =>
    predictor && predictor.residualSd !== null && predictor.df > 0
      ? tUpperBound(predictor.df)
      : null,
  );
  return (values, means, coded) => {
    let smallest = 1;
    for (let g = 0; g < goals.length; g++) {
      const { goal, predictor, index, low, high } = goals[g]!;
      const below = tables[g] ?? null;
      if (!predictor || !below) {
        if (!predictor && !holds(goal, values[g]!)) return 0;
        continue;
      }
      const leverage = leverageOfRow(predictor, rowAt(predictor, coded));
      const sd = (predictor.residualSd ?? 0) * Math.sqrt(1 + Math.max(0, leverage));
      if (sd === 0) continue;
      const mean = means[index]!;
      // P(low ≤ z ≤ high) ≤ min(P(z ≤ high), P(z ≥ low))
      smallest = Math.min(smallest, below((high - mean) / sd), below((mean - low) / sd));
    }
    return smallest + ROOM;
  };
}
