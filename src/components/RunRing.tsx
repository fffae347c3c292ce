import { useId } from 'react';

interface RunRingProps {
  /** Residual in spreads: above the model rises, below hangs; full at two. */
  readonly residualShare: number;
  readonly size?: number;
  /** Names the ring; without it the words beside it do. */
  readonly label?: string;
}

/** A run as the map draws it, for keys and tables. */
export function RunRing({ residualShare, size = 16, label }: RunRingProps) {
  const clip = useId();
  const centre = size / 2;
  const radius = centre - 2;
  const level = (Math.min(2, Math.abs(residualShare)) / 2) * radius;
  return (
    <svg
      viewBox={`0 0 ${size} ${size}`}
      width={size}
      height={size}
      className="inline-block flex-none align-middle"
      {...(label ? { role: 'img', 'aria-label': label } : { 'aria-hidden': true })}
    >
      <clipPath id={clip}>
        <circle cx={centre} cy={centre} r={radius} />
      </clipPath>
      <circle cx={centre} cy={centre} r={radius} className="fill-surface" />
      <rect
        x={centre - radius}
        y={residualShare > 0 ? centre - level : centre}
        width={2 * radius}
        height={level}
        clipPath={`url(#${clip})`}
        className="fill-ink"
      />
      <path
        d={`M${centre - radius} ${centre}h${2 * radius}`}
        strokeWidth={0.8}
        className="stroke-ink"
      />
      <circle
        cx={centre}
        cy={centre}
        r={radius}
        strokeWidth={1.4}
        className="fill-none stroke-ink"
      />
    </svg>
  );
}
