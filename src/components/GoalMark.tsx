export type GoalState = 'holds' | 'touches' | 'misses';
export type GoalAim = 'maximise' | 'minimise' | 'target' | 'within';

/** Filled: the interval is clear of the limit; half: the limit lies inside it; hollow: the wrong side. */
export function goalState(
  aim: GoalAim,
  limits: { low: number; high: number },
  at: { predicted: number; piLow: number | null; piHigh: number | null },
): GoalState {
  const { predicted } = at;
  const [low, high] = [at.piLow ?? predicted, at.piHigh ?? predicted];
  const floor = aim === 'minimise' ? -Infinity : limits.low;
  const ceiling = aim === 'maximise' ? Infinity : limits.high;
  if (low >= floor && high <= ceiling) return 'holds';
  if (high < floor || low > ceiling) return 'misses';
  return 'touches';
}

const SHAPES: Record<GoalAim, { whole: string; half: string; line: string }> = {
  maximise: { whole: 'M2 10L7 2L12 10Z', half: 'M2 10L7 2V10Z', line: 'M0 11.5H14' },
  minimise: { whole: 'M2 4L7 12L12 4Z', half: 'M2 4L7 12V4Z', line: 'M0 2.5H14' },
  target: { whole: 'M7 2L12 7L7 12L2 7Z', half: 'M7 2L2 7L7 12Z', line: 'M0 7H14' },
  within: { whole: 'M2 5H12V9H2Z', half: 'M2 5H7V9H2Z', line: 'M0 2.5H14M0 11.5H14' },
};

interface GoalMarkProps {
  readonly aim: GoalAim;
  readonly state: GoalState;
  /** Left out where the word already stands beside it. */
  readonly isWordless?: boolean;
}

/** The limit is the line, the shape points to the wished side; always with its word. */
export function GoalMark({ aim, state, isWordless = false }: GoalMarkProps) {
  const { whole, half, line } = SHAPES[aim];
  return (
    <span className="inline-flex items-center gap-1 whitespace-nowrap">
      <svg width="16" height="16" viewBox="0 0 14 14" aria-hidden="true">
        <path
          d={whole}
          fill={state === 'holds' ? 'var(--ink)' : 'var(--surface)'}
          stroke="var(--ink)"
          strokeWidth="1.3"
        />
        {state === 'touches' && <path d={half} fill="var(--ink)" />}
        <path d={line} stroke="var(--ink)" strokeWidth="1.6" />
      </svg>
      <span className={isWordless ? 'sr-only' : ''}>{state}</span>
    </span>
  );
}
