import { isolines, pathOf, type Grid } from '@/charts/contourGeometry';

const SIZE = 121;
const WIDTH = 900;
const HEIGHT = 900;

/** A quiet landscape of contour lines for the sign-in page: a made-up surface, no data. */
const values = Array.from({ length: SIZE * SIZE }, (_, i) => {
  const u = (i % SIZE) / (SIZE - 1);
  const v = Math.floor(i / SIZE) / (SIZE - 1);
  return (
    90 -
    70 * ((u - 0.56) ** 2 + 0.6 * (u - 0.56) * (v - 0.62) + (v - 0.62) ** 2) * 1.4 -
    26 * Math.exp(-((u - 0.2) ** 2 + (v - 0.2) ** 2) * 9) +
    9 * Math.sin(6 * u + 2 * v)
  );
});
const grid: Grid = {
  columns: SIZE,
  rows: SIZE,
  values,
  box: { x0: 0, x1: WIDTH, y0: HEIGHT, y1: 0 },
};
const levels = Array.from({ length: 40 }, (_, i) => 2.5 * i);

export function Terrain() {
  return (
    <svg
      viewBox={`0 0 ${WIDTH} ${HEIGHT}`}
      width="100%"
      height="100%"
      preserveAspectRatio="xMidYMid slice"
      aria-hidden="true"
    >
      {levels.map((level) =>
        isolines(grid, level).map((line, i) => (
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
