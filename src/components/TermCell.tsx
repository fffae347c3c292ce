import type { KeyboardEvent } from 'react';
import { classes } from '@/lib/classes';
import { formatSigned } from '@/lib/format';

export interface Term {
  readonly key: string;
  /** “Voltage × gap” */
  readonly name: string;
  /** −1 for straight terms, else the index of the later set-point. */
  readonly row: number;
  readonly column: number;
  readonly state: 'in' | 'out' | 'notEstimable';
  /** In coded units; the shape drawn follows its sign. */
  readonly estimate: number | null;
  /** |t| as a share of the largest on the board. */
  readonly weight: number;
  /** Why it cannot be estimated or must stay in. */
  readonly reason?: string;
}

/** The term's own shape: a slope, a bow, or two slopes that cross. */
function TermShape({ term: { row, column, state, estimate } }: { term: Term }) {
  const rise = state === 'in' ? Math.sign(estimate ?? 0) : 0;
  const [from, to] = [10 + 6 * rise, 10 - 6 * rise];
  const shapes =
    row === -1
      ? [`M0 ${from}L38 ${to}`]
      : row === column
        ? [`M0 ${10 - 6 * rise}Q19 ${10 + 12 * rise} 38 ${10 - 6 * rise}`]
        : [`M0 ${from}L38 ${to}`, `M0 ${to}L38 ${from}`];
  return (
    <svg
      viewBox="0 0 38 20"
      aria-hidden="true"
      className={classes('h-5 w-9 flex-none fill-none', state !== 'in' && 'hidden sm:block')}
    >
      <path d="M0 10H38" className="stroke-line" />
      {shapes.map((shape, index) => (
        <path
          key={index}
          d={shape}
          strokeWidth={index === 0 ? 1.6 : 1.2}
          strokeDasharray={index === 0 && state === 'in' ? undefined : '2.5 2'}
          className={state === 'in' ? 'stroke-ink' : 'stroke-ink-3'}
        />
      ))}
    </svg>
  );
}

const STATES: Record<Term['state'], string> = {
  in: 'border-ink bg-surface',
  out: 'border-dashed border-line-strong bg-sunk text-ink-3',
  notEstimable: 'border-line-strong bg-surface bg-hatch-infeasible text-ink-3',
};

interface TermCellProps {
  readonly term: Term;
  readonly onToggled: () => void;
  readonly onKeyDown: (event: KeyboardEvent) => void;
}

/** One term: press to take it in or out. Its bar is |t|; what cannot be estimated says why. */
export function TermCell({ term, onToggled, onKeyDown }: TermCellProps) {
  const { key, name, state, estimate, weight, reason } = term;
  const isFixed = state === 'notEstimable';
  const words = { in: formatSigned(estimate, 1), out: 'left out', notEstimable: 'not estimable' };
  return (
    <button
      type="button"
      data-term={key}
      aria-pressed={state === 'in'}
      aria-disabled={isFixed || undefined}
      title={reason}
      onClick={isFixed ? undefined : onToggled}
      onKeyDown={onKeyDown}
      className={classes(
        'relative grid min-h-14 min-w-0 content-center gap-1 rounded border px-2 pt-1 pb-2 text-left',
        STATES[state],
      )}
    >
      <span className={classes('truncate text-label', isFixed && 'justify-self-start bg-surface')}>
        {name}
      </span>{' '}
      <span className="flex items-center justify-between gap-1">
        <TermShape term={term} />
        <span
          className={classes(
            state === 'in' ? 'font-mark whitespace-nowrap' : 'text-1',
            isFixed && 'bg-surface',
          )}
        >
          {words[state]}
        </span>
      </span>
      {reason && <span className="sr-only">. {reason}</span>}
      <span
        className="absolute bottom-0 left-0 h-1 bg-ink-2"
        style={{ width: `${Math.round(100 * Math.max(0, Math.min(1, weight)))}%` }}
      />
    </button>
  );
}
