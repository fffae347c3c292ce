import { useId } from 'react';
import { formatPlain } from '@/lib/format';
import { lengths, pathOf, pointAt, type Px } from './contourGeometry';
import type { DrawnLine } from './mapLines';
import { HEIGHT, ticks, type MapAxis, type MapRun, type Scales } from './mapScales';

export function LineLabel({
  line,
  isGoal,
}: {
  readonly line: DrawnLine;
  readonly isGoal: boolean;
}) {
  if (!line.label) return null;
  const { at, angle, text } = line.label;
  return (
    <text
      transform={`translate(${at[0].toFixed(1)} ${at[1].toFixed(1)}) rotate(${angle.toFixed(1)})`}
      textAnchor="middle"
      dy="4"
      className={isGoal ? 'map-goal' : line.isDark ? 'map-label-dark' : 'map-label'}
    >
      {text}
    </text>
  );
}

interface RingProps {
  readonly run: MapRun;
  readonly at: Px;
}

/** A circle with a datum line; the fill rises for a positive residual and hangs for a negative one. */
export function RunRing({ run, at: [x, y] }: RingProps) {
  const id = useId();
  if (!run.isOnSlice)
    return (
      <circle
        cx={x}
        cy={y}
        r={2.6}
        fill="var(--isolabel-on-dark)"
        fillOpacity={0.55}
        stroke="var(--isolabel)"
        strokeOpacity={0.6}
      />
    );
  const r = 6;
  const level = Math.max(-1, Math.min(1, run.residual ?? 0)) * r;
  return (
    <g>
      <title>run {run.id}</title>
      <clipPath id={id}>
        <circle cx={x} cy={y} r={r} />
      </clipPath>
      <circle cx={x} cy={y} r={r} fill="var(--isolabel-on-dark)" />
      <rect
        clipPath={`url(#${id})`}
        x={x - r}
        y={level > 0 ? y - level : y}
        width={2 * r}
        height={Math.abs(level)}
        fill="var(--isolabel)"
      />
      <path d={`M${x - r} ${y}h${2 * r}`} stroke="var(--isolabel)" strokeWidth={0.8} />
      <circle cx={x} cy={y} r={r} fill="none" stroke="var(--isolabel)" strokeWidth={1.4} />
    </g>
  );
}

/** Replicates stand in a rosette around a small cross. */
export function rosette(runs: readonly MapRun[], { px, py }: Scales): { run: MapRun; at: Px }[] {
  const groups = new Map<string, MapRun[]>();
  for (const run of runs.filter(({ isOnSlice }) => isOnSlice)) {
    const key = `${run.x} ${run.y}`;
    groups.set(key, [...(groups.get(key) ?? []), run]);
  }
  const ghosts = runs
    .filter(({ isOnSlice }) => !isOnSlice)
    .map((run) => ({ run, at: [px(run.x), py(run.y)] as Px }));
  const placed = [...groups.values()].flatMap((group) =>
    group.map((run, i) => {
      const turn = (2 * Math.PI * i) / group.length - Math.PI / 2;
      const radius = group.length > 1 ? 8 + group.length * 1.4 : 0;
      const at: Px = [px(run.x) + radius * Math.cos(turn), py(run.y) + radius * Math.sin(turn)];
      return { run, at };
    }),
  );
  return [...ghosts, ...placed];
}

export function Section({ from, to }: { readonly from: Px; readonly to: Px }) {
  const angle = Math.atan2(to[1] - from[1], to[0] - from[0]);
  const [nx, ny] = [-Math.sin(angle) * 7, Math.cos(angle) * 7];
  return (
    <g>
      <path
        d={pathOf([from, to])}
        stroke="var(--isolabel-on-dark)"
        strokeWidth={4}
        strokeOpacity={0.5}
      />
      <path
        d={pathOf([from, to])}
        stroke="var(--isolabel)"
        strokeWidth={1.5}
        strokeDasharray="12 3 2 3"
      />
      {[
        { at: from, text: 'A', side: -1 },
        { at: to, text: 'A′', side: 1 },
      ].map(({ at: [x, y], text, side }) => (
        <g key={text}>
          <path
            d={`M${x - nx} ${y - ny}L${x + nx} ${y + ny}`}
            stroke="var(--isolabel)"
            strokeWidth={2}
          />
          <text
            x={x + Math.cos(angle) * side * 15}
            y={y + Math.sin(angle) * side * 15 + 5}
            textAnchor="middle"
            className="map-end"
          >
            {text}
          </text>
        </g>
      ))}
    </g>
  );
}

export function Axes({
  x,
  y,
  scales,
}: {
  readonly x: MapAxis;
  readonly y: MapAxis;
  readonly scales: Scales;
}) {
  const { px, py, inner, sx, sy } = scales;
  const unit = (axis: MapAxis) => (axis.unit === '' ? '' : `, ${axis.unit}`);
  return (
    <g>
      {ticks(sx.low, sx.high).map((value) => (
        <g key={value}>
          <path className="axis" d={`M${px(value).toFixed(1)} ${inner.y0}v5`} />
          <text className="ax" x={px(value)} y={inner.y0 + 18} textAnchor="middle">
            {formatPlain(value)}
          </text>
        </g>
      ))}
      {ticks(sy.low, sy.high).map((value) => (
        <g key={value}>
          <path className="axis" d={`M${inner.x0 - 5} ${py(value).toFixed(1)}h5`} />
          <text className="ax" x={inner.x0 - 9} y={py(value) + 4} textAnchor="end">
            {formatPlain(value)}
          </text>
        </g>
      ))}
      <rect
        x={inner.x0}
        y={inner.y1}
        width={inner.x1 - inner.x0}
        height={inner.y0 - inner.y1}
        fill="none"
        stroke="var(--line-strong)"
      />
      <text x={inner.x1} y={HEIGHT - 6} textAnchor="end">{`${x.name}${unit(x)}`}</text>
      <text transform={`translate(12 ${inner.y1}) rotate(-90)`} textAnchor="end">
        {`${y.name}${unit(y)}`}
      </text>
    </g>
  );
}

export function SetPoint({ at: [x, y] }: { readonly at: Px }) {
  const sights = `M${x - 24} ${y}H${x - 11}M${x + 11} ${y}H${x + 24}M${x} ${y - 24}V${y - 11}M${x} ${y + 11}V${y + 24}`;
  return (
    <g>
      <path d={sights} stroke="var(--isolabel-on-dark)" strokeWidth={4.5} />
      <path d={sights} stroke="var(--spark)" strokeWidth={2.2} />
      <path
        d={`M${x} ${y - 8}l8 8l-8 8l-8 -8Z`}
        fill="var(--spark)"
        stroke="var(--isolabel-on-dark)"
        strokeWidth={1.6}
      />
    </g>
  );
}

interface EdgeNameProps {
  readonly lines: readonly (readonly Px[])[];
  readonly words: string;
}

const LEAST_LENGTH = 110;

/** The name of a limit along its edge. */
export function EdgeName({ lines, words }: EdgeNameProps) {
  const line = [...lines].sort((a, b) => b.length - a.length)[0];
  if (!line) return null;
  const sums = lengths(line);
  const whole = sums.at(-1) ?? 0;
  if (whole < LEAST_LENGTH) return null;
  const [a, middle, b] = [0.45, 0.5, 0.55].map((share) => pointAt(line, sums, share * whole)) as [
    Px,
    Px,
    Px,
  ];
  const angle = (Math.atan2(b[1] - a[1], b[0] - a[0]) * 180) / Math.PI;
  const upright = angle > 90 ? angle - 180 : angle < -90 ? angle + 180 : angle;
  return (
    <text
      transform={`translate(${middle[0].toFixed(1)} ${middle[1].toFixed(1)}) rotate(${upright.toFixed(1)})`}
      textAnchor="middle"
      dy={words.startsWith('misfires') ? 18 : -9}
      className="map-edge"
    >
      {words}
    </text>
  );
}
