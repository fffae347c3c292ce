import { pathOf } from '@/charts/geometry';
import { isolines, type Axes } from '@/charts/grid';

const SIZE = 121;
const SIDE = 900;

const evenly = Array.from({ length: SIZE }, (_, i) => (SIDE * i) / (SIZE - 1));
const axes: Axes = { x: evenly, y: evenly };

/** A quiet landscape of contour lines for the sign-in page: a made-up surface, no data. */
const height = (u: number, v: number) =>
  90 -
  70 * ((u - 0.56) ** 2 + 0.6 * (u - 0.56) * (v - 0.62) + (v - 0.62) ** 2) * 1.4 -
  26 * Math.exp(-((u - 0.2) ** 2 + (v - 0.2) ** 2) * 9) +
  9 * Math.sin(6 * u + 2 * v);
const heights = evenly.map((y) => evenly.map((x) => height(x / SIDE, 1 - y / SIDE)));
const levels = Array.from({ length: 40 }, (_, i) => 2.5 * i);

export function Terrain() {
  return (
    <svg
      viewBox={`0 0 ${SIDE} ${SIDE}`}
      width="100%"
      height="100%"
      preserveAspectRatio="xMidYMid slice"
      aria-hidden="true"
    >
      {levels.map((level) =>
        isolines(heights, axes, level).map((line, i) => (
          <path
            key={`${level} ${i}`}
            d={pathOf(line)}
            fill="none"
            stroke={level % 10 === 0 ? 'var(--map-6)' : 'var(--map-4)'}
            strokeWidth={level % 10 === 0 ? 1.3 : 0.7}
            strokeOpacity={0.8}
          />
        )),
      )}
      <g transform="translate(520 350)">
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
