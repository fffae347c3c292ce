export type Aim = 'maximise' | 'minimise' | 'target' | 'within';

/** What a response should be. `low` < `high`; a target lies between them. */
export interface Goal {
  readonly aim: Aim;
  readonly low: number;
  readonly high: number;
  readonly target: number;
  readonly weight: number;
  readonly priority: number;
}

/** Whether a value meets the goal. */
export function holds({ aim, low, high }: Goal, y: number): boolean {
  switch (aim) {
    case 'maximise':
      return y >= low;
    case 'minimise':
      return y <= high;
    default:
      return y >= low && y <= high;
  }
}

const clamp01 = (x: number) => Math.min(1, Math.max(0, x));

/**
 * Desirability of one value, 0…1.
 *
 * @see Derringer & Suich (1980), J. Quality Technology 12: 214–219.
 */
export function desirability(goal: Goal, y: number): number {
  const { aim, low, high, target, weight } = goal;
  switch (aim) {
    case 'maximise':
      return clamp01((y - low) / (high - low)) ** weight;
    case 'minimise':
      return clamp01((high - y) / (high - low)) ** weight;
    case 'target': {
      const rising = target > low ? (y - low) / (target - low) : 1;
      const falling = high > target ? (high - y) / (high - target) : 1;
      if (y < low || y > high) return 0;
      return clamp01(y <= target ? rising : falling) ** weight;
    }
    case 'within':
      return holds(goal, y) ? 1 : 0;
  }
}

/** Geometric mean of desirabilities, weighted by priority; 0 as soon as one is. */
export function overallDesirability(goals: readonly Goal[], values: ArrayLike<number>): number {
  let sum = 0;
  let weights = 0;
  for (let g = 0; g < goals.length; g++) {
    const d = desirability(goals[g]!, values[g]!);
    if (d === 0) return 0;
    sum += goals[g]!.priority * Math.log(d);
    weights += goals[g]!.priority;
  }
  return weights === 0 ? 0 : Math.exp(sum / weights);
}

/** How far a value misses its goal, in units of the goal's own width; 0 when it holds. */
export function shortfall(goal: Goal, y: number): number {
  if (holds(goal, y)) return 0;
  const width = goal.high - goal.low;
  if (goal.aim === 'maximise') return (goal.low - y) / width;
  if (goal.aim === 'minimise') return (y - goal.high) / width;
  return Math.max(goal.low - y, y - goal.high) / width;
}

/** A value as something to maximise, for comparing trade-offs. */
export function objective({ aim, low, high, target }: Goal, y: number): number {
  switch (aim) {
    case 'maximise':
      return y;
    case 'minimise':
      return -y;
    case 'target':
      return -Math.abs(y - target);
    case 'within':
      return -Math.max(0, low - y, y - high);
  }
}
