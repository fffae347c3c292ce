import { useId } from 'react';
import { formatPlain, withUnit } from '@/lib/format';

interface StepperProps {
  readonly label: string;
  readonly unit: string;
  readonly value: number;
  /** All settable values, ascending; those in `allowed` keep the limits with the other set-points. */
  readonly values: readonly number[];
  readonly allowed: ReadonlySet<number>;
  readonly onChange: (value: number) => void;
}

const WIDTH = 260;
const INSET = 8;

/** Minus, figure, plus, and below it the dial: steps as ticks, a heavy line where the limits allow. */
export function Stepper({ label, unit, value, values, allowed, onChange }: StepperProps) {
  const id = useId();
  const at = values.indexOf(value);
  const [first = 0, last = 1] = [values[0], values.at(-1)];
  const x = (each: number) =>
    INSET + ((WIDTH - 2 * INSET) * (each - first)) / Math.max(1e-9, last - first);
  const every = Math.ceil(values.length / 26);
  const labelled = new Set([first, values[Math.floor((values.length - 1) / 2)], last]);
  const open = values.filter((each) => allowed.has(each));
  const move = (by: number) => {
    const next = values[at + by];
    if (next !== undefined) onChange(next);
  };
  return (
    <div className="grid gap-1" role="group" aria-labelledby={id}>
      <div className="flex items-center gap-2">
        <span id={id} className="text-2 text-ink-2 flex-1">
          {label}
        </span>
        <button
          type="button"
          className="btn"
          aria-label={`${label} one step down`}
          disabled={at <= 0}
          onClick={() => move(-1)}
        >
          −
        </button>
        <output className="mono text-5 text-right min-w-16" aria-live="polite">
          {withUnit(formatPlain(value), unit)}
        </output>
        <button
          type="button"
          className="btn"
          aria-label={`${label} one step up`}
          disabled={at >= values.length - 1}
          onClick={() => move(1)}
        >
          +
        </button>
      </div>
      <svg viewBox={`0 0 ${WIDTH} 36`} width="100%" aria-hidden="true">
        <path d={`M${INSET} 12H${WIDTH - INSET}`} className="axis" />
        {values.map((each, i) =>
          i % every === 0 || labelled.has(each) ? (
            <path
              key={each}
              d={`M${x(each).toFixed(1)} 12v${labelled.has(each) ? 7 : 4}`}
              className="axis"
            />
          ) : null,
        )}
        {[...labelled].map((each) =>
          each === undefined ? null : (
            <text
              key={each}
              x={x(each)}
              y={32}
              className="ax"
              textAnchor={each === first ? 'start' : each === last ? 'end' : 'middle'}
            >
              {formatPlain(each)}
            </text>
          ),
        )}
        {open.length > 0 && (
          <path
            d={`M${x(open[0] ?? 0).toFixed(1)} 12H${x(open.at(-1) ?? 0).toFixed(1)}`}
            stroke="var(--ink)"
            strokeWidth={3}
          />
        )}
        <path
          d={`M${x(value).toFixed(1)} 4l5.5 6l-5.5 6l-5.5 -6Z`}
          fill="var(--accent)"
          stroke="var(--surface)"
          strokeWidth={1.2}
        />
      </svg>
    </div>
  );
}
