import { contours } from 'd3-contour';

export type Px = readonly [x: number, y: number];

/** A grid of values: rows along y, columns along x, and how it lies on the paper. */
export interface Grid {
  readonly columns: number;
  readonly rows: number;
  readonly values: readonly number[];
  /** Left, top, right, bottom of the grid’s corners on the paper, px; row 0 lies at the bottom. */
  readonly box: {
    readonly x0: number;
    readonly x1: number;
    readonly y0: number;
    readonly y1: number;
  };
}

const place = ({ columns, rows, box }: Grid) => {
  // d3 puts values at the middle of cells: subtract one half
  const clampX = (u: number) => Math.max(0, Math.min(columns - 1, u - 0.5));
  const clampY = (v: number) => Math.max(0, Math.min(rows - 1, v - 0.5));
  return ([u, v]: readonly [number, number]): Px => [
    box.x0 + ((box.x1 - box.x0) * clampX(u)) / (columns - 1),
    box.y0 + ((box.y1 - box.y0) * clampY(v)) / (rows - 1),
  ];
};

export const pathOf = (points: readonly Px[]) =>
  points.map(([x, y], i) => `${i === 0 ? 'M' : 'L'}${x.toFixed(1)} ${y.toFixed(1)}`).join('');

const multi = (grid: Grid, level: number) =>
  contours()
    .size([grid.columns, grid.rows])
    .contour([...grid.values], level).coordinates;

/** The area in which the values are at least `level`, as one path. */
export function areaAbove(grid: Grid, level: number): string {
  const to = place(grid);
  return multi(grid, level)
    .flatMap((polygon) =>
      polygon.map((ring) => `${pathOf(ring.map((point) => to(point as [number, number])))}Z`),
    )
    .join('');
}

/** The lines along which the values are `level`; the parts on the grid’s own edge left out. */
export function isolines(grid: Grid, level: number): Px[][] {
  const { columns, rows } = grid;
  const to = place(grid);
  const isEdge = ([u, v]: readonly [number, number]) =>
    u <= 0.51 || u >= columns - 0.51 || v <= 0.51 || v >= rows - 0.51;
  const lines: Px[][] = [];
  for (const polygon of multi(grid, level))
    for (const ring of polygon) {
      const points = ring as [number, number][];
      const first = points.findIndex(isEdge);
      const turned = first > 0 ? [...points.slice(first), ...points.slice(1, first + 1)] : points;
      let current: [number, number][] = [];
      turned.forEach((point, i) => {
        if (!isEdge(point)) {
          current.push(point);
          return;
        }
        if (current.length > 0) lines.push([...current, point].map(to));
        const next = turned[i + 1];
        current = next && !isEdge(next) ? [point] : [];
      });
      if (current.length > 2) lines.push(current.map(to));
    }
  return lines.filter((line) => line.length > 3);
}

/** Cumulative length along a line. */
export function lengths(line: readonly Px[]): number[] {
  const sums = [0];
  for (let i = 1; i < line.length; i++) {
    const [a, b] = [line[i - 1]!, line[i]!];
    sums.push(sums[i - 1]! + Math.hypot(b[0] - a[0], b[1] - a[1]));
  }
  return sums;
}

/** The point at a length along a line. */
export function pointAt(line: readonly Px[], sums: readonly number[], at: number): Px {
  const whole = sums.at(-1) ?? 0;
  const wanted = Math.max(0, Math.min(whole, at));
  let i = 1;
  while (i < sums.length - 1 && sums[i]! < wanted) i++;
  const share = (wanted - sums[i - 1]!) / (sums[i]! - sums[i - 1]! || 1);
  const [a, b] = [line[i - 1]!, line[i]!];
  return [a[0] + share * (b[0] - a[0]), a[1] + share * (b[1] - a[1])];
}

/** A line without the stretch between two lengths: a gap for its label. */
export function withGap(
  line: readonly Px[],
  sums: readonly number[],
  gap: readonly [number, number],
): Px[][] {
  const whole = sums.at(-1) ?? 0;
  const stretch = (from: number, to: number): Px[] => [
    pointAt(line, sums, from),
    ...line.filter((_, i) => sums[i]! > from && sums[i]! < to),
    pointAt(line, sums, to),
  ];
  return [
    ...(gap[0] > 1 ? [stretch(0, gap[0])] : []),
    ...(gap[1] < whole - 1 ? [stretch(gap[1], whole)] : []),
  ];
}

export interface Obstacle {
  readonly x: number;
  readonly y: number;
  readonly radius: number;
}

export interface PlacedLabel {
  readonly at: Px;
  /** Degrees, so that the text reads left to right. */
  readonly angle: number;
  readonly gap: readonly [number, number];
}

const CHARACTER = 6.6;
const WORST = 60;

/** Where a label lies straightest on its line and off everything else; null when nowhere will do. */
export function placeLabel(
  line: readonly Px[],
  text: string,
  isFree: (point: Px) => boolean,
  obstacles: readonly Obstacle[],
): PlacedLabel | null {
  const sums = lengths(line);
  const whole = sums.at(-1) ?? 0;
  const half = (text.length * CHARACTER) / 2 + 3;
  if (whole < half * 2 + 16) return null;
  let best: { cost: number; at: number; middle: Px; angle: number } | null = null;
  for (let at = half + 4; at < whole - half - 4; at += 5) {
    const [a, middle, b] = [at - half, at, at + half].map((d) => pointAt(line, sums, d)) as [
      Px,
      Px,
      Px,
    ];
    if (![a, middle, b].every(isFree)) continue;
    const chord = Math.hypot(b[0] - a[0], b[1] - a[1]);
    const bulge = Math.hypot((a[0] + b[0]) / 2 - middle[0], (a[1] + b[1]) / 2 - middle[1]);
    const crowd = obstacles.reduce((sum, { x, y, radius }) => {
      const distance = Math.hypot(x - middle[0], y - middle[1]);
      return sum + Math.max(0, radius + half - distance) * 1.4;
    }, 0);
    const cost = 2 * half - chord + 1.5 * bulge + crowd + (3 * Math.abs(at - whole / 2)) / whole;
    const angle = (Math.atan2(b[1] - a[1], b[0] - a[0]) * 180) / Math.PI;
    if (!best || cost < best.cost) best = { cost, at, middle, angle };
  }
  if (!best || best.cost > WORST) return null;
  const { at, middle, angle } = best;
  const upright = angle > 90 ? angle - 180 : angle < -90 ? angle + 180 : angle;
  return { at: middle, angle: upright, gap: [at - half, at + half] };
}

/** Teeth along a line on the side where `isInside` holds. */
export function teeth(
  line: readonly Px[],
  isInside: (point: Px) => boolean,
  { every = 26, size = 5 } = {},
): string {
  const sums = lengths(line);
  const whole = sums.at(-1) ?? 0;
  let out = '';
  for (let at = every / 2; at < whole; at += every) {
    const [a, middle, b] = [at - 4, at, at + 4].map((d) => pointAt(line, sums, d)) as [Px, Px, Px];
    const length = Math.hypot(b[0] - a[0], b[1] - a[1]) || 1;
    let [nx, ny] = [-(b[1] - a[1]) / length, (b[0] - a[0]) / length];
    if (!isInside([middle[0] + 4 * nx, middle[1] + 4 * ny])) [nx, ny] = [-nx, -ny];
    out += `${pathOf([a, [middle[0] + size * nx, middle[1] + size * ny], b])}Z`;
  }
  return out;
}

const STEPS = [1, 2.5, 5];

/** Eight thresholds for nine bands in round steps, so that the values use most of them. */
export function bandLevels(low: number, high: number): { levels: number[]; step: number } {
  const wanted = (high - low) / 8 || 1;
  let step = 1;
  let best = Infinity;
  for (let power = -4; power <= 4; power++)
    for (const each of STEPS) {
      const size = each * 10 ** power;
      const off = Math.abs(Math.log(size / wanted));
      if (off < best) {
        best = off;
        step = size;
      }
    }
  const middle = Math.round((low + high) / 2 / step);
  const levels = Array.from({ length: 8 }, (_, i) =>
    Number(((middle - 3.5 + i + 0.5) * step - step / 2).toPrecision(10)),
  ).map((level) => Number((Math.round(level / step) * step).toPrecision(10)));
  return { levels: [...new Set(levels)], step };
}
