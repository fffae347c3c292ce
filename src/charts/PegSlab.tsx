import { pathOf, type Point } from './geometry';
import { pegsOf, slabScale, type Peg, type SlabInput } from './slab';

export type { Peg, SlabInput } from './slab';

const WIDTH = 300;
const HEIGHT = 170;

interface PegSlabProps extends SlabInput {
  readonly label: string;
  /** “gap across, voltage deep, pulses high” */
  readonly axes: string;
}

/** The settable floor at an angle; a peg per setting, its height the third set-point; crosses cannot be dialled. */
export function PegSlab({ label, axes, ...slab }: PegSlabProps) {
  const at = slabScale(slab, { width: WIDTH, height: HEIGHT });
  const { x, y } = slab;
  const floor = [
    at(x.low, y.low),
    at(x.high, y.low),
    at(x.high, y.high),
    at(x.low, y.high),
  ] as const;
  const settable = slab.settable.map(([u, v]) => at(u, v));
  return (
    <figure>
      <svg
        viewBox={`0 0 ${WIDTH} ${HEIGHT}`}
        role="img"
        aria-label={label}
        className="block w-full"
      >
        <Hatched ring={floor} />
        <path
          d={`${pathOf(settable)}Z`}
          className="fill-map-1 stroke-line-strong"
          vectorEffect="non-scaling-stroke"
        />
        <Thickness front={[floor[0], floor[1], floor[2]]} />
        {pegsOf(slab.pegs).map((peg) => (
          <PegShape key={`${peg.x} ${peg.y}`} peg={peg} foot={at(peg.x, peg.y)} at={at} />
        ))}
      </svg>
      <figcaption className="text-1 text-ink-3">{axes}</figcaption>
    </figure>
  );
}

/** Hatch lines across the slab, parallel to its near edge's diagonal, clipped by the slab itself. */
function Hatched({ ring }: { ring: readonly [Point, Point, Point, Point] }) {
  const [a, b, c, d] = ring;
  const lines: string[] = [];
  const count = 34;
  const mix = (p: Point, q: Point, t: number): Point => [
    p[0] + t * (q[0] - p[0]),
    p[1] + t * (q[1] - p[1]),
  ];
  for (let k = 1; k < count; k++) {
    const t = k / count;
    const from = 2 * t <= 1 ? mix(a, b, 2 * t) : mix(b, c, 2 * t - 1);
    const to = 2 * t <= 1 ? mix(a, d, 2 * t) : mix(d, c, 2 * t - 1);
    lines.push(pathOf([from, to]));
  }
  return (
    <>
      <path d={`${pathOf(ring)}Z`} className="fill-surface stroke-line" />
      <path
        d={lines.join('')}
        strokeOpacity={0.7}
        strokeWidth={0.8}
        className="stroke-line-strong"
      />
    </>
  );
}

function Thickness({ front }: { front: readonly [Point, Point, Point] }) {
  const [a, b, c] = front;
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

interface PegShapeProps {
  readonly peg: Peg;
  readonly foot: Point;
  readonly at: (x: number, y: number, height: number) => Point;
}

function PegShape({ peg, foot, at }: PegShapeProps) {
  const heads = peg.heads.map((head) => ({ ...head, at: at(peg.x, peg.y, head.z) }));
  const highest = Math.min(...heads.map((head) => head.at[1]));
  return (
    <g>
      <ellipse cx={foot[0]} cy={foot[1]} rx={3.4} ry={1.7} className="fill-ink-3" />
      <path d={`M${foot[0]} ${foot[1]}V${highest}`} strokeWidth={1.3} className="stroke-ink-2" />
      {heads.map(({ z, count, at: [x, y] }) =>
        peg.isSettable ? (
          <g key={z}>
            <circle cx={x} cy={y} r={4.6} strokeWidth={1.6} className="fill-surface stroke-ink" />
            {count > 1 && (
              <text x={x + 8} y={y + 4} className="fill-ink font-mono text-label font-mark">
                ×{count}
              </text>
            )}
          </g>
        ) : (
          <path
            key={z}
            d={`M${x - 4} ${y - 4}l8 8m0 -8l-8 8`}
            strokeWidth={2}
            className="stroke-stop"
          />
        ),
      )}
    </g>
  );
}
