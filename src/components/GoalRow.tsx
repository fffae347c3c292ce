import type { ReactNode } from 'react';
import { formatQuantity } from '@/lib/format';
import { GoalMark, type GoalSide, type GoalState } from './GoalMark';
import { IntervalBar, type Interval } from './IntervalBar';
import { NumberWithInterval } from './NumberWithInterval';

export interface Goal {
  readonly side: GoalSide;
  /** One limit; two for a range. */
  readonly limits: readonly number[];
}

export interface Prediction {
  readonly value: number | null;
  /** Of the mean and of one new run; null when the value is computed, not fitted. */
  readonly mean: Interval | null;
  readonly single: Interval | null;
}

interface GoalRowProps {
  readonly name: ReactNode;
  readonly unit: string;
  readonly digits: number;
  /** One scale per response on a page. */
  readonly scale: Interval;
  readonly goal: Goal | null;
  readonly prediction: Prediction;
  readonly state: GoalState;
}

/** “at least 80 %”, “70 to 90 %” */
export function goalWords({ side, limits }: Goal, unit: string): string {
  const [first = null, second = null] = limits;
  if (side === 'range') return `${formatQuantity(first, '')} to ${formatQuantity(second, unit)}`;
  const words = { atLeast: 'at least', atMost: 'at most', target: 'target' }[side];
  return `${words} ${formatQuantity(first, unit)}`;
}

function limitsOf({ side, limits }: Goal) {
  if (side !== 'range') return limits.map((value) => ({ value, side }));
  return limits.map((value, index) => ({
    value,
    side: index === 0 ? ('atLeast' as const) : ('atMost' as const),
  }));
}

/** A response at a setting: its goal, the figure with its interval, the bar, and whether the goal holds. */
export function GoalRow(props: GoalRowProps) {
  const { name, unit, digits, scale, goal, prediction, state } = props;
  const { value, mean, single } = prediction;
  return (
    <div className="grid grid-cols-main-action items-center gap-x-3 gap-y-1 border-t border-line py-2 first:border-t-0 sm:grid-cols-goal">
      <div className="min-w-0">
        {name}
        <span className="block text-2 text-ink-3">
          {goal ? goalWords(goal, unit) : 'observed only'}
        </span>
      </div>
      <div className="text-right">
        <NumberWithInterval
          value={value}
          unit={unit}
          digits={digits}
          interval={single}
          instead={value === null ? 'not known' : 'computed'}
          size="table"
        />
      </div>
      <IntervalBar
        scale={scale}
        estimate={value}
        mean={mean}
        single={single}
        limits={goal ? limitsOf(goal) : []}
      />
      {goal && <GoalMark side={goal.side} state={state} />}
    </div>
  );
}
