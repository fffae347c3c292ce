import { useId } from 'react';
import { pathOf, type Point } from './geometry';
import { onSlab, SLAB_HEIGHT, SLAB_WIDTH, stacksOf, type Peg, type Stack } from './slab';

export type { Peg } from './slab';

interface PegsProps {
  readonly pegs: readonly Peg[];
  /** The part of the floor that can be dialled in: corners of a polygon, 0…1. */
  readonly floor: readonly (readonly [number, number])[];
  /** The ranges asked for, where settings lie beyond them. */
  readonly ranges?: readonly (readonly [number, number])[] | null;
  readonly label: string;
}

/** Settings as pegs on the settable floor: the height is the third set-point, ×6 are repeats. */
export function Pegs({ pegs, floor, ranges = null, label }: PegsProps) {
  const id = useId();
  const slab = [onSlab(0, 0), onSlab(1, 0), onSlab(1, 1), onSlab(0, 1)] as const;
  return (
    <svg viewBox={`0 0 ${SLAB_WIDTH} ${SLAB_HEIGHT}`} width="100%" role="img" aria-label={label}>
      <pattern
        id={id}
        width={6}
        height={6}
        patternUnits="userSpaceOnUse"
        patternTransform="rotate(45)"
      >
        <path d="M0 0V6" strokeOpacity={0.7} className="stroke-line-strong" />
      </pattern>
      <path d={`${pathOf(slab)}Z`} fill={`url(#${id})`} className="stroke-line" />
      {floor.length > 2 && (
        <path
          d={`${pathOf(floor.map(([x, y]) => onSlab(x, y)))}Z`}
          className="fill-map-1 stroke-line-strong"
        />
      )}
      {ranges && (
        <path
          d={`${pathOf(ranges.map(([x, y]) => onSlab(x, y)))}Z`}
          strokeDasharray="4 3"
          className="fill-none stroke-ink-3"
        />
      )}
      <Thickness corners={[slab[0], slab[1], slab[2]]} />
      {stacksOf(pegs).map((stack) => (
        <Stick key={`${stack.x} ${stack.y}`} stack={stack} />
      ))}
      {/* last, so that no nearer peg hides a count */}
      {pegs.map((peg) => (
        <Count key={`${peg.x} ${peg.y} ${peg.z}`} peg={peg} />
      ))}
    </svg>
  );
}

/** The slab's two near sides. */
function Thickness({ corners: [a, b, c] }: { readonly corners: readonly [Point, Point, Point] }) {
  return (
    <>
      <path
        d={`M${a[0]} ${a[1]}v4L${b[0]} ${b[1] + 4}v-4Z`}
        fillOpacity={0.5}
        className="fill-map-3"
      />
      <path
        d={`M${b[0]} ${b[1] + 4}v-4L${c[0]} ${c[1]}v4Z`}
        fillOpacity={0.6}
        className="fill-map-4"
      />
    </>
  );
}

function Stick({ stack: { x, y, heads } }: { readonly stack: Stack }) {
  const [footX, footY] = onSlab(x, y);
  const top = Math.min(...heads.map(({ z }) => onSlab(x, y, z)[1]));
  return (
    <g>
      <ellipse cx={footX} cy={footY} rx={3.4} ry={1.7} className="fill-ink-3" />
      <path d={`M${footX} ${footY}V${top}`} strokeWidth={1.3} className="stroke-ink-2" />
      {heads.map((head) => (
        <Head key={head.z} head={head} />
      ))}
    </g>
  );
}

function Head({ head: { x, y, z, isBroken } }: { readonly head: Peg }) {
  const [cx, cy] = onSlab(x, y, z);
  return isBroken ? (
    <path d={`M${cx - 4} ${cy - 4}l8 8m0 -8l-8 8`} strokeWidth={2} className="stroke-stop" />
  ) : (
    <circle cx={cx} cy={cy} r={4.6} strokeWidth={1.6} className="fill-surface stroke-ink" />
  );
}

function Count({ peg: { x, y, z, count } }: { readonly peg: Peg }) {
  const [cx, cy] = onSlab(x, y, z);
  return count < 2 ? null : (
    <text
      x={cx - 8}
      y={cy + 4}
      textAnchor="end"
      paintOrder="stroke"
      strokeWidth={3}
      className="mono stroke-surface"
    >
      ×{count}
    </text>
  );
}
