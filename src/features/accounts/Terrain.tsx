import { pathOf, withGap } from '@/charts/geometry';
import { isolines, type Axes } from '@/charts/grid';
import { placeLabel } from '@/charts/labels';

const NODES = 121;
const WIDTH = 830;
const HEIGHT = 900;
const TOP_TO_EDGE = 34;

const evenly = (length: number) =>
  Array.from({ length: NODES }, (_, i) => (length * i) / (NODES - 1));
const axes: Axes = { x: evenly(WIDTH), y: evenly(HEIGHT) };

/** A quadratic with its top inside and a long slope to one corner: a made-up surface, no data. */
function surface(x: number, y: number): number {
  const [u, v] = [(x - 470) / WIDTH, (y - 190) / HEIGHT];
  return 88 - 95 * u * u - 62 * u * v - 52 * v * v - 6 * u;
}

const heights = axes.y.map((y) => axes.x.map((x) => surface(x, y)));
const levels = Array.from({ length: 26 }, (_, i) => 20 + 2.5 * i);

const isFree = ([x, y]: readonly [number, number]) =>
  x > TOP_TO_EDGE && y > TOP_TO_EDGE && x < WIDTH - TOP_TO_EDGE && y < HEIGHT - 3 * TOP_TO_EDGE;

const lines = levels.flatMap((level) =>
  isolines(heights, axes, level).map((line) => {
    const isIndex = level % 10 === 0;
    const words = `${level}\u202F%`;
    const label = isIndex ? placeLabel(line, { text: words, isFree, obstacles: [] }) : null;
    return {
      isIndex,
      words,
      label,
      parts: label ? withGap(line, label.from, label.to) : [line],
    };
  }),
);

const degrees = (radians: number) => (180 * radians) / Math.PI;

/** The contour lines of the sign-in page. */
export function Terrain() {
  return (
    <svg
      viewBox={`0 0 ${WIDTH} ${HEIGHT}`}
      width="100%"
      height="100%"
      preserveAspectRatio="xMidYMid slice"
      aria-hidden="true"
    >
      {lines.map(({ parts, isIndex, words, label }, i) => (
        <g key={i}>
          <path
            d={parts.map(pathOf).join('')}
            fill="none"
            stroke={isIndex ? 'var(--map-6)' : 'var(--map-4)'}
            strokeWidth={isIndex ? 1.3 : 0.8}
            strokeOpacity={0.85}
          />
          {label && (
            <text
              transform={`translate(${label.at.join(' ')}) rotate(${degrees(label.angle)})`}
              textAnchor="middle"
              dominantBaseline="central"
              className="text-1 fill-isolabel"
            >
              {words}
            </text>
          )}
        </g>
      ))}
      <g transform="translate(470 190)">
        <path d="M0 -24V-11M0 11V24M-24 0H-11M11 0H24" stroke="var(--spark)" strokeWidth={2.2} />
        <path
          d="M0 -8l8 8l-8 8l-8 -8Z"
          fill="var(--spark)"
          stroke="var(--sunk)"
          strokeWidth={1.6}
        />
      </g>
    </svg>
  );
}
