import { useId } from 'react';
import { formatMass } from '@/lib/format';

interface LedgerBarProps {
  readonly usedG: number;
  readonly lostG: number;
  readonly reservedG: number;
  readonly leftG: number;
}

/** The sample budget: used solid, lost cross-hatched, reserved hatched, left blank; keys below. */
export function LedgerBar({ usedG, lostG, reservedG, leftG }: LedgerBarProps) {
  const id = useId();
  const total = Math.max(1e-9, usedG + lostG + reservedG + leftG);
  const parts = [
    { key: 'used', name: 'Used', massG: usedG, fill: 'var(--ink-2)' },
    { key: 'lost', name: 'Lost or sent back', massG: lostG, fill: `url(#${id}-lost)` },
    { key: 'reserved', name: 'Reserved for runs', massG: reservedG, fill: `url(#${id}-reserved)` },
    { key: 'left', name: 'Left', massG: leftG, fill: 'var(--surface)' },
  ];
  let from = 0;
  const bars = parts.map((part) => {
    const start = from;
    from += (part.massG / total) * 400;
    return { ...part, x: start, width: from - start };
  });
  return (
    <div className="grid gap-3">
      <svg
        viewBox="0 0 400 18"
        width="100%"
        height="18"
        preserveAspectRatio="none"
        aria-hidden="true"
      >
        <defs>
          <pattern id={`${id}-lost`} width="5" height="5" patternUnits="userSpaceOnUse">
            <path d="M0 0L5 5M5 0L0 5" stroke="var(--ink-2)" />
          </pattern>
          <pattern id={`${id}-reserved`} width="4" height="4" patternUnits="userSpaceOnUse">
            <path d="M1 0V4" stroke="var(--ink-2)" />
          </pattern>
        </defs>
        {bars.map(({ key, x, width, fill }) => (
          <rect key={key} x={x} y={0.5} width={width} height={17} fill={fill} />
        ))}
        <rect x={0.5} y={0.5} width={399} height={17} fill="none" stroke="var(--ink)" />
      </svg>
      <dl className="grid gap-1 text-2">
        {bars.map(({ key, name, massG, fill }) => (
          <div key={key} className="flex items-center gap-2">
            <svg width="16" height="12" aria-hidden="true">
              <rect x={0.5} y={0.5} width={15} height={11} fill={fill} stroke="var(--ink)" />
            </svg>
            <dt className="flex-1">{name}</dt>
            <dd>{formatMass(massG)}</dd>
          </div>
        ))}
      </dl>
    </div>
  );
}
