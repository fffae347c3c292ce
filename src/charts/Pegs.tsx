import { useId } from 'react';

export interface Peg {
  /** 0…1 across, deep and high. */
  readonly x: number;
  readonly y: number;
  readonly z: number;
  readonly count: number;
  readonly isBroken: boolean;
}

interface PegsProps {
  readonly pegs: readonly Peg[];
  /** The part of the floor that can be dialled in: corners of a polygon, 0…1. */
  readonly floor: readonly (readonly [number, number])[];
  readonly label: string;
}

const WIDTH = 300;
const HEIGHT = 150;
const BASE = 128;

/** Floor coordinates in perspective: across to the right, deep upwards and to the right. */
const at = (x: number, y: number): readonly [number, number] => [
  12 + 216 * x + 56 * y,
  BASE - 66 * y,
];

const path = (points: readonly (readonly [number, number])[]) =>
  points.map(([x, y], i) => `${i === 0 ? 'M' : 'L'}${x.toFixed(1)} ${y.toFixed(1)}`).join('');

/** Settings as pegs on the settable floor: the height is the third factor, ×6 are repeats. */
export function Pegs({ pegs, floor, label }: PegsProps) {
  const id = useId();
  const whole = [at(0, 0), at(1, 0), at(1, 1), at(0, 1)];
  const sorted = [...pegs].sort((a, b) => b.y - a.y);
  return (
    <svg viewBox={`0 0 ${WIDTH} ${HEIGHT}`} width="100%" role="img" aria-label={label}>
      <defs>
        <pattern
          id={id}
          width="6"
          height="6"
          patternUnits="userSpaceOnUse"
          patternTransform="rotate(45)"
        >
          <path d="M0 0V6" stroke="var(--line-strong)" strokeOpacity="0.7" />
        </pattern>
      </defs>
      <path
        d={`${path(whole)}Z`}
        fill={`url(#${id})`}
        stroke="var(--line-strong)"
        strokeWidth="0.8"
      />
      {floor.length > 2 && (
        <path
          d={`${path(floor.map(([x, y]) => at(x, y)))}Z`}
          fill="var(--map-1)"
          stroke="var(--ink-3)"
          strokeWidth="0.8"
        />
      )}
      {sorted.map((peg, i) => {
        const [x, y] = at(peg.x, peg.y);
        const top = y - 8 - 44 * peg.z;
        return (
          <g key={i}>
            <ellipse cx={x} cy={y} rx="3.4" ry="1.4" fill="var(--ink-2)" />
            <path d={`M${x} ${y}V${top}`} stroke="var(--ink-2)" strokeWidth="1.1" />
            {peg.isBroken ? (
              <path
                d={`M${x - 4} ${top - 4}l8 8M${x + 4} ${top - 4}l-8 8`}
                stroke="var(--stop)"
                strokeWidth="2"
              />
            ) : (
              <circle
                cx={x}
                cy={top}
                r="4.4"
                fill="var(--surface)"
                stroke="var(--ink)"
                strokeWidth="1.4"
              />
            )}
            {peg.count > 1 && (
              <text x={x + 7} y={top + 4}>
                ×{peg.count}
              </text>
            )}
          </g>
        );
      })}
    </svg>
  );
}
