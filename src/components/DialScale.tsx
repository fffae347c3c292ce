import { formatNumber } from '@/lib/format';

export interface DialRange {
  readonly min: number;
  readonly max: number;
  readonly step: number;
  /** What the envelope still allows with the other set-points as they are. */
  readonly allowedLow?: number;
  readonly allowedHigh?: number;
}

const BASE = 12;
const MOST_TICKS = 24;

const MULTIPLES = [1, 2, 3, 4, 5, 10, 15, 20, 25, 30, 50, 100, 200, 500, 1000, 2000, 5000, 10_000];

/** A round number of steps between two ticks: few enough gaps, and the last tick on the end if it can be. */
function tickStep({ min, max, step }: DialRange, mostGaps: number): number {
  const steps = (max - min) / step;
  const fitting = MULTIPLES.filter((multiple) => steps / multiple <= mostGaps);
  const even = fitting.find((multiple) => Math.abs(steps % multiple) < 1e-6);
  return step * (even ?? fitting[0] ?? steps);
}

function ticks(range: DialRange, mostGaps: number): number[] {
  const each = tickStep(range, mostGaps);
  const count = Math.floor((range.max - range.min) / each + 1e-9);
  return Array.from({ length: count + 1 }, (_, index) => range.min + index * each);
}

/** Settable steps as ticks, a heavy line for what may still be set, an accent diamond for now. */
export function DialScale({ range, value }: { range: DialRange; value: number }) {
  const { min, max, allowedLow = min, allowedHigh = max } = range;
  const x = (at: number) =>
    `${(2 + 96 * Math.max(0, Math.min(1, (at - min) / (max - min || 1)))).toFixed(2)}%`;
  const labels = ticks(range, 3);
  return (
    <svg width="100%" height={34} aria-hidden="true" className="block">
      {ticks(range, MOST_TICKS).map((at) => (
        <line
          key={at}
          x1={x(at)}
          x2={x(at)}
          y1={BASE}
          y2={BASE + 4}
          className="stroke-line-strong"
        />
      ))}
      {labels.map((at) => (
        <g key={at}>
          <line x1={x(at)} x2={x(at)} y1={BASE} y2={BASE + 7} className="stroke-line-strong" />
          <text x={x(at)} y={31} textAnchor="middle">
            {formatNumber(at)}
          </text>
        </g>
      ))}
      <line x1={x(min)} x2={x(max)} y1={BASE} y2={BASE} className="stroke-line-strong" />
      <line
        x1={x(allowedLow)}
        x2={x(allowedHigh)}
        y1={BASE}
        y2={BASE}
        strokeWidth={3}
        className="stroke-ink"
      />
      <svg x={x(value)} overflow="visible">
        <path
          d="M0 4L5.5 10L0 16L-5.5 10Z"
          strokeWidth={1.2}
          className="fill-accent stroke-surface"
        />
      </svg>
    </svg>
  );
}
