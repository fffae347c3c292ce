import { classes } from '@/lib/classes';

/** One draw: every goal holds, or a response lies above its limit, below one, or both. */
export type Outcome = 'holds' | 'above' | 'below' | 'both';

const ORDER: readonly Outcome[] = ['holds', 'above', 'below', 'both'];
const COLUMNS = 25;
const PITCH = 16;
const SIDE = 13;

interface HundredSquaresProps {
  /** The draws in any order; at most a hundred are drawn, misses last. */
  readonly outcomes: readonly Outcome[];
  readonly className?: string;
}

/** One square a draw. Filled = all goals hold; hollow with a bar on top = above a limit, below = under one. */
export function HundredSquares({ outcomes, className }: HundredSquaresProps) {
  const drawn = outcomes.slice(0, 100);
  const sorted = [...drawn].sort((one, other) => ORDER.indexOf(one) - ORDER.indexOf(other));
  const held = drawn.filter((outcome) => outcome === 'holds').length;
  const rows = Math.max(1, Math.ceil(sorted.length / COLUMNS));
  return (
    <svg
      viewBox={`0 0 ${COLUMNS * PITCH} ${rows * PITCH}`}
      role="img"
      aria-label={`${held} of ${drawn.length} imagined repeats meet every goal`}
      className={classes('block w-full', className)}
    >
      {sorted.map((outcome, index) => (
        <Square
          key={index}
          outcome={outcome}
          x={(index % COLUMNS) * PITCH}
          y={Math.floor(index / COLUMNS) * PITCH + 0.5}
        />
      ))}
    </svg>
  );
}

function Square({ outcome, x, y }: { outcome: Outcome; x: number; y: number }) {
  if (outcome === 'holds')
    return <rect x={x} y={y} width={SIDE} height={SIDE} className="fill-ink-2" />;
  const bars = [
    outcome !== 'below' && `M${x} ${y + 2}h${SIDE}`,
    outcome !== 'above' && `M${x} ${y + SIDE - 2}h${SIDE}`,
  ].filter(Boolean);
  return (
    <>
      <rect
        x={x + 0.6}
        y={y + 0.6}
        width={SIDE - 1.2}
        height={SIDE - 1.2}
        strokeWidth={1.2}
        className="fill-surface stroke-ink-2"
      />
      <path d={bars.join('')} strokeWidth={4} className="stroke-ink" />
    </>
  );
}
