interface IntervalBarProps {
  /** One scale for a response on a page. */
  readonly scale: readonly [number, number];
  readonly predicted: number;
  readonly ci?: readonly [number | null, number | null];
  readonly pi?: readonly [number | null, number | null];
  readonly limits?: readonly { readonly value: number; readonly holdsAbove: boolean }[];
  readonly width?: number;
}

const HEIGHT = 22;

/** Whisker: one new run; block: the mean; tick: the estimate; toothed stroke: a limit. */
export function IntervalBar({
  scale,
  predicted,
  ci,
  pi,
  limits = [],
  width = 150,
}: IntervalBarProps) {
  const [low, high] = scale;
  const x = (value: number) =>
    Math.max(0, Math.min(width, ((value - low) / Math.max(1e-12, high - low)) * width));
  const mid = HEIGHT / 2;
  const [ciLow, ciHigh] = ci ?? [null, null];
  const [piLow, piHigh] = pi ?? [null, null];
  return (
    <svg width={width} height={HEIGHT} viewBox={`0 0 ${width} ${HEIGHT}`} aria-hidden="true">
      <path d={`M0 ${mid}H${width}`} stroke="var(--line)" />
      {limits.map(({ value, holdsAbove }) => (
        <g key={`${value} ${holdsAbove}`}>
          <path d={`M${x(value)} 0V${HEIGHT}`} stroke="var(--ink)" strokeWidth="1.2" />
          {[0.22, 0.5, 0.78].map((share) => (
            <path
              key={share}
              d={`M${x(value)} ${HEIGHT * share - 3}l${holdsAbove ? 4.5 : -4.5} 3l${holdsAbove ? -4.5 : 4.5} 3Z`}
              fill="var(--ink)"
            />
          ))}
        </g>
      ))}
      {piLow !== null && piHigh !== null && (
        <path
          d={`M${x(piLow)} ${mid}H${x(piHigh)}M${x(piLow)} ${mid - 3.5}v7M${x(piHigh)} ${mid - 3.5}v7`}
          stroke="var(--ink-2)"
          strokeWidth="1.2"
        />
      )}
      {ciLow !== null && ciHigh !== null && (
        <rect
          x={x(ciLow)}
          y={mid - 3}
          width={Math.max(1, x(ciHigh) - x(ciLow))}
          height={6}
          fill="var(--ink-2)"
        />
      )}
      <rect
        x={x(predicted) - 1.5}
        y={mid - 6}
        width={3}
        height={12}
        fill="var(--ink)"
        stroke="var(--surface)"
      />
    </svg>
  );
}
