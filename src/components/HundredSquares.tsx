interface HundredSquaresProps {
  /** 0…1. */
  readonly probability: number;
  readonly error: number | null;
}

const COLUMNS = 20;
const ROWS = 100 / COLUMNS;
const STEP = 8.5;
const SIDE = 6.5;

/** One square for each imagined repeat of a hundred: filled where all goals hold, misses last. */
export function HundredSquares({ probability, error }: HundredSquaresProps) {
  const hits = Math.round(100 * probability);
  const words = `${hits} of 100 imagined repeats meet every goal${error === null ? '' : `, ±${(100 * error).toFixed(1)}`}`;
  return (
    <svg
      width={COLUMNS * STEP}
      height={ROWS * STEP}
      viewBox={`0 0 ${COLUMNS * STEP} ${ROWS * STEP}`}
      role="img"
      aria-label={words}
    >
      {Array.from({ length: 100 }, (_, i) => {
        const x = (i % COLUMNS) * STEP;
        const y = Math.floor(i / COLUMNS) * STEP;
        return i < hits ? (
          <rect key={i} x={x} y={y} width={SIDE} height={SIDE} fill="var(--ink-2)" />
        ) : (
          <rect
            key={i}
            x={x + 0.6}
            y={y + 0.6}
            width={SIDE - 1.2}
            height={SIDE - 1.2}
            fill="none"
            stroke="var(--ink-2)"
            strokeWidth={1.2}
          />
        );
      })}
    </svg>
  );
}
