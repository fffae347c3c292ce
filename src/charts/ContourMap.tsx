import { useId, useMemo, type KeyboardEvent, type MouseEvent } from 'react';
import { areaAbove, isolines, pathOf, type Px } from './contourGeometry';
import { drawLines } from './mapLines';
import { Axes, EdgeName, LineLabel, rosette, RunRing, Section, SetPoint } from './mapParts';
import {
  gridOf,
  HEIGHT,
  scalesOf,
  WIDTH,
  type GoalLine,
  type MapAxis,
  type MapRun,
} from './mapScales';

export interface ContourMapProps {
  readonly label: string;
  readonly x: MapAxis;
  readonly y: MapAxis;
  readonly predicted: readonly (readonly number[])[];
  readonly feasible: readonly (readonly boolean[])[];
  /** Room left to each limit of the rig: its edge runs where this is 0, with its name along it. */
  readonly limits: readonly {
    readonly values: readonly (readonly number[])[];
    readonly words: string;
  }[];
  /** Standard deviation of the mean over that of one run: above 0.6 the map is veiled. */
  readonly spread: readonly (readonly number[])[];
  readonly runs: readonly MapRun[];
  readonly goals: readonly GoalLine[];
  readonly setPoint: { readonly x: number; readonly y: number };
  readonly section: readonly [readonly [number, number], readonly [number, number]] | null;
  readonly onPick: (at: { x: number; y: number }) => void;
  readonly onMove: (by: { dx: number; dy: number; dz: number; isFar: boolean }) => void;
}

const VEIL = [0.6, 0.75];

const KEYS: Readonly<Record<string, { dx: number; dy: number; dz: number }>> = {
  ArrowLeft: { dx: -1, dy: 0, dz: 0 },
  ArrowRight: { dx: 1, dy: 0, dz: 0 },
  ArrowDown: { dx: 0, dy: -1, dz: 0 },
  ArrowUp: { dx: 0, dy: 1, dz: 0 },
  PageUp: { dx: 0, dy: 0, dz: 1 },
  PageDown: { dx: 0, dy: 0, dz: -1 },
};

/** The smallest room to any limit at each point, every limit in units of its own largest. */
function roomOf(
  limits: ContourMapProps['limits'],
  like: readonly (readonly number[])[],
): number[][] {
  const scaled = limits.map(({ values }) => {
    const largest = Math.max(...values.flat().map(Math.abs), 1e-12);
    return values.map((row) => row.map((value) => value / largest));
  });
  return like.map((row, j) =>
    row.map((_, i) => scaled.reduce((least, each) => Math.min(least, each[j]?.[i] ?? 1), 1)),
  );
}

/**
 * The contour map: bands and labelled isolines in one sequence, toothed goal lines, hatching where nothing
 * can be dialled in, a veil where data are few, runs as rings, the set-point as a spark. Drawn as SVG, so
 * that it prints sharp and takes the keyboard.
 */
export function ContourMap(props: ContourMapProps) {
  const { label, x, y, predicted, limits, spread, runs, setPoint, section, onPick, onMove } = props;
  const id = useId();
  const scales = useMemo(() => scalesOf(x, y), [x, y]);
  const { box, inner, px, py } = scales;
  const { lines, goals, levels } = useMemo(() => drawLines(props, scales), [props, scales]);
  const room = gridOf(roomOf(limits, predicted), box);
  const veil = gridOf(spread, box);
  const at = ([u, v]: readonly [number, number]): Px => [px(u), py(v)];
  const onClick = (event: MouseEvent<SVGSVGElement>) => {
    const frame = event.currentTarget.getBoundingClientRect();
    onPick({
      x: scales.ux(((event.clientX - frame.left) * WIDTH) / frame.width),
      y: scales.uy(((event.clientY - frame.top) * HEIGHT) / frame.height),
    });
  };
  const onKeyDown = (event: KeyboardEvent) => {
    const by = KEYS[event.key];
    if (!by) return;
    event.preventDefault();
    onMove({ ...by, isFar: event.shiftKey });
  };
  return (
    <svg
      viewBox={`0 0 ${WIDTH} ${HEIGHT}`}
      width="100%"
      className="block"
      role="application"
      aria-roledescription="contour map"
      aria-label={label}
      tabIndex={0}
      onClick={onClick}
      onKeyDown={onKeyDown}
    >
      <defs>
        <pattern
          id={`${id}h`}
          width="7"
          height="7"
          patternUnits="userSpaceOnUse"
          patternTransform="rotate(45)"
        >
          <path d="M0 0V7" stroke="var(--line-strong)" strokeOpacity={0.75} />
        </pattern>
        <pattern id={`${id}d`} width="6" height="6" patternUnits="userSpaceOnUse">
          <circle cx="1.5" cy="1.5" r="0.8" fill="var(--ink-2)" />
          <circle cx="4.5" cy="4.5" r="0.8" fill="var(--ink-2)" />
        </pattern>
        <clipPath id={`${id}c`}>
          <path d={areaAbove(room, 0)} clipRule="evenodd" />
        </clipPath>
      </defs>
      <rect
        x={inner.x0}
        y={inner.y1}
        width={inner.x1 - inner.x0}
        height={inner.y0 - inner.y1}
        fill="var(--surface)"
      />
      <rect
        x={box.x0}
        y={box.y1}
        width={box.x1 - box.x0}
        height={box.y0 - box.y1}
        fill={`url(#${id}h)`}
      />
      <g clipPath={`url(#${id}c)`}>
        <rect
          x={box.x0}
          y={box.y1}
          width={box.x1 - box.x0}
          height={box.y0 - box.y1}
          fill="var(--map-0)"
        />
        {levels.map((level, i) => (
          <path
            key={level}
            d={areaAbove(gridOf(predicted, box), level)}
            fill={`var(--map-${i + 1})`}
            fillRule="evenodd"
          />
        ))}
        {VEIL.map((level) => (
          <path
            key={level}
            d={areaAbove(veil, level)}
            fill="var(--veil)"
            fillOpacity={0.48}
            fillRule="evenodd"
          />
        ))}
        <path d={areaAbove(veil, 0.6)} fill={`url(#${id}d)`} fillOpacity={0.3} fillRule="evenodd" />
        {lines.map((line) => (
          <path
            key={line.key}
            d={line.path}
            fill="none"
            stroke={line.isDark ? 'var(--isolabel-on-dark)' : 'var(--isoline)'}
            strokeWidth={line.width}
          />
        ))}
        {goals.map((line) => (
          <g key={line.key}>
            <path
              d={line.path}
              fill="none"
              stroke="var(--isolabel-on-dark)"
              strokeWidth={3.6}
              strokeOpacity={0.55}
            />
            <path d={line.path} fill="none" stroke="var(--isolabel)" strokeWidth={line.width} />
            <path d={line.teeth} fill="var(--isolabel)" />
          </g>
        ))}
      </g>
      {isolines(room, 0).map((line, i) => (
        <path key={i} d={pathOf(line)} fill="none" stroke="var(--ink)" strokeWidth={1.4} />
      ))}
      {limits.map(({ values, words }) => (
        <EdgeName key={words} lines={isolines(gridOf(values, box), 0)} words={words} />
      ))}
      {lines.map((line) => (
        <LineLabel key={line.key} line={line} isGoal={false} />
      ))}
      {goals.map((line) => (
        <LineLabel key={line.key} line={line} isGoal />
      ))}
      <Axes x={x} y={y} scales={scales} />
      {section && <Section from={at(section[0])} to={at(section[1])} />}
      {rosette(runs, scales).map(({ run, at: place }) => (
        <RunRing key={run.id} run={run} at={place} />
      ))}
      <SetPoint at={[px(setPoint.x), py(setPoint.y)]} />
    </svg>
  );
}
