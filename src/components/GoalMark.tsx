import { classes } from '@/lib/classes';

export type GoalSide = 'atLeast' | 'atMost' | 'target' | 'range';
export type GoalState = 'holds' | 'touches' | 'misses' | 'unknown';

/** On a 14 × 14 grid: the line is the limit, the triangle stands on it or hangs from it. */
const SHAPES: Record<GoalSide, { lines: string; whole: string; half: string }> = {
  atLeast: { lines: 'M0 11.5H14', whole: 'M2 10L7 2L12 10Z', half: 'M2 10L7 2V10Z' },
  atMost: { lines: 'M0 2.5H14', whole: 'M2 4L7 12L12 4Z', half: 'M2 4L7 12V4Z' },
  target: { lines: 'M0 7H14', whole: 'M7 2L11.5 7L7 12L2.5 7Z', half: 'M7 2V12L2.5 7Z' },
  range: { lines: 'M1.5 1V13M12.5 1V13', whole: 'M4 4H10V10H4Z', half: 'M4 4H7V10H4Z' },
};

const WORDS: Record<GoalSide, string> = {
  atLeast: 'at least',
  atMost: 'at most',
  target: 'target',
  range: 'between',
};

interface GoalMarkProps {
  readonly side: GoalSide;
  readonly state: GoalState;
  /** Without the word the mark names itself; a table that has no room says the word in its key. */
  readonly withWord?: boolean;
  readonly size?: number;
}

/** Filled: the interval is clear of the limit. Half: the limit lies inside it. Hollow: wrong side. */
export function GoalMark({ side, state, withWord = true, size = 16 }: GoalMarkProps) {
  const { lines, whole, half } = SHAPES[side];
  const word = state === 'unknown' ? 'not known' : state;
  const dash = state === 'unknown' ? '1.5 1.5' : undefined;
  return (
    <span className="inline-flex items-center gap-1.5 whitespace-nowrap">
      <svg
        viewBox="0 0 14 14"
        width={size}
        height={size}
        className="flex-none stroke-ink"
        {...(withWord
          ? { 'aria-hidden': true }
          : { role: 'img', 'aria-label': `${WORDS[side]}, ${word}` })}
      >
        <path
          d={whole}
          strokeWidth={1.3}
          strokeDasharray={dash}
          className={classes(state === 'holds' ? 'fill-ink' : 'fill-surface')}
        />
        {state === 'touches' && <path d={half} className="fill-ink stroke-none" />}
        <path d={lines} strokeWidth={1.6} className="fill-none" />
      </svg>
      {withWord && <span>{word}</span>}
    </span>
  );
}
