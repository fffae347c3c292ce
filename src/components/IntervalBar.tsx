import type { GoalSide } from './GoalMark';

export interface Limit {
  readonly value: number;
  readonly side: GoalSide;
}

export interface Interval {
  readonly low: number;
  readonly high: number;
}

interface IntervalBarProps {
  /** One scale per response on a page. */
  readonly scale: Interval;
  readonly estimate: number | null;
  /** Of the mean: the block. */
  readonly mean?: Interval | null;
  /** Of one new run: the whisker. */
  readonly single?: Interval | null;
  readonly limits?: readonly Limit[];
  /** A stroke across, at no effect for instance. */
  readonly zero?: number;
}

const HEIGHT = 22;
const MIDDLE = HEIGHT / 2;

/** Which way the teeth of a limit point: to the side that holds. */
const toothSide = (side: GoalSide): readonly number[] => {
  if (side === 'atLeast') return [1];
  return side === 'atMost' ? [-1] : [];
};

/** Whisker = one new run, block = mean, tick = estimate, toothed stroke = limit. As wide as its cell. */
export function IntervalBar({
  scale,
  estimate,
  mean,
  single,
  limits = [],
  zero,
}: IntervalBarProps) {
  const share = (value: number) =>
    Math.max(0, Math.min(1, (value - scale.low) / (scale.high - scale.low || 1))) * 100;
  const x = (value: number) => `${share(value).toFixed(2)}%`;
  return (
    <svg width="100%" height={HEIGHT} aria-hidden="true" className="block min-w-16">
      <line x1="0" x2="100%" y1={MIDDLE} y2={MIDDLE} className="stroke-line" />
      {zero !== undefined && (
        <line x1={x(zero)} x2={x(zero)} y1={1} y2={HEIGHT - 1} className="stroke-line-strong" />
      )}
      {limits.map(({ value, side }) => (
        <svg key={`${side} ${value}`} x={x(value)} overflow="visible">
          <path d={`M0 0V${HEIGHT}`} strokeWidth={1.2} className="stroke-ink" />
          {toothSide(side).map((way) => (
            <path
              key={way}
              d={[0.22, 0.5, 0.78]
                .map((at) => HEIGHT * at)
                .map((y) => `M0 ${y - 3}L${4.5 * way} ${y}L0 ${y + 3}Z`)
                .join('')}
              className="fill-ink"
            />
          ))}
        </svg>
      ))}
      {single && (
        <g strokeWidth={1.2} className="stroke-ink-2">
          <line x1={x(single.low)} x2={x(single.high)} y1={MIDDLE} y2={MIDDLE} />
          {[single.low, single.high].map((end) => (
            <line key={end} x1={x(end)} x2={x(end)} y1={MIDDLE - 3.5} y2={MIDDLE + 3.5} />
          ))}
        </g>
      )}
      {mean && (
        <rect
          x={x(mean.low)}
          y={MIDDLE - 3}
          width={`${Math.max(0.4, share(mean.high) - share(mean.low)).toFixed(2)}%`}
          height={6}
          className="fill-ink-2"
        />
      )}
      {estimate !== null && (
        <svg x={x(estimate)} overflow="visible">
          <rect x={-1.5} y={MIDDLE - 6} width={3} height={12} className="fill-ink stroke-surface" />
        </svg>
      )}
    </svg>
  );
}
