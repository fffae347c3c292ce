import { contours } from 'd3-contour';
import type { Point, Polyline } from './geometry';

/** Values on a lattice: one row per y value, one column per x value. */
export type Grid = readonly (readonly number[])[];

export function extentOf(grid: Grid): { low: number; high: number } {
  let [low, high] = [Infinity, -Infinity];
  for (const row of grid)
    for (const value of row) {
      if (value < low) low = value;
      if (value > high) high = value;
    }
  return { low, high };
}

/** The smallest of several grids at each node: where all of them are positive, it is. */
export function lowestOf(grids: readonly Grid[]): Grid | null {
  const [first, ...rest] = grids;
  if (!first) return null;
  return first.map((row, j) =>
    row.map((value, i) => rest.reduce((least, grid) => Math.min(least, grid[j]![i]!), value)),
  );
}

/** Position of a value in an ascending list, with its fraction; clamped to the ends. */
function indexOf(values: readonly number[], value: number): number {
  const last = values.length - 1;
  if (value <= values[0]!) return 0;
  if (value >= values[last]!) return last;
  let i = 1;
  while (values[i]! < value) i++;
  return i - 1 + (value - values[i - 1]!) / (values[i]! - values[i - 1]!);
}

function valueAt(values: readonly number[], index: number): number {
  const i = Math.max(0, Math.min(values.length - 2, Math.floor(index)));
  const share = Math.max(0, Math.min(1, index - i));
  return values[i]! + share * (values[i + 1]! - values[i]!);
}

/** Bilinear between nodes. */
export function sample(grid: Grid, axes: Axes, [x, y]: Point): number {
  const [u, v] = [indexOf(axes.x, x), indexOf(axes.y, y)];
  const i = Math.min(axes.x.length - 2, Math.floor(u));
  const j = Math.min(axes.y.length - 2, Math.floor(v));
  const [s, t] = [u - i, v - j];
  const [near, far] = [grid[j]!, grid[j + 1]!];
  return (
    (1 - t) * ((1 - s) * near[i]! + s * near[i + 1]!) + t * ((1 - s) * far[i]! + s * far[i + 1]!)
  );
}

/** Ascending values of the two axes, at least two each, in their own units. */
export interface Axes {
  readonly x: readonly number[];
  readonly y: readonly number[];
}

/** Rings of the area where the grid is at or above the level, in lattice positions. */
function rings(grid: Grid, axes: Axes, level: number): Point[][] {
  const [columns, rows] = [axes.x.length, axes.y.length];
  // d3-contour puts the value of node i at i + 0.5, and closes areas along the rim
  return contours()
    .size([columns, rows])
    .contour(grid.flat(), level)
    .coordinates.flatMap((polygon) =>
      polygon.map((ring) => ring.map(([u, v]): Point => [u! - 0.5, v! - 0.5])),
    );
}

const clamp = (value: number, highest: number) => Math.max(0, Math.min(highest, value));

/** Rings of the area at or above the level, in units of the axes. Holes wind the other way. */
export function areaAbove(grid: Grid, axes: Axes, level: number): Polyline[] {
  const [lastX, lastY] = [axes.x.length - 1, axes.y.length - 1];
  return rings(grid, axes, level).map((ring) =>
    ring.map(([u, v]): Point => [
      valueAt(axes.x, clamp(u, lastX)),
      valueAt(axes.y, clamp(v, lastY)),
    ]),
  );
}

/**
 * The lines on which the grid has the level, in units of the axes: the rings without the stretches that
 * merely follow the rim. A line that closes inside ends where it began.
 */
export function isolines(grid: Grid, axes: Axes, level: number): Polyline[] {
  const [lastX, lastY] = [axes.x.length - 1, axes.y.length - 1];
  const isRim = ([u, v]: Point) => u <= 0.01 || v <= 0.01 || u >= lastX - 0.01 || v >= lastY - 0.01;
  const toUnits = ([u, v]: Point): Point => [
    valueAt(axes.x, clamp(u, lastX)),
    valueAt(axes.y, clamp(v, lastY)),
  ];
  return rings(grid, axes, level)
    .flatMap((ring) => withoutRim(ring, isRim))
    .filter((line) => line.length > 2)
    .map((line) => line.map(toUnits));
}

/** Cuts a closed ring into its stretches off the rim; each keeps the rim point it starts and ends on. */
function withoutRim(ring: readonly Point[], isRim: (point: Point) => boolean): Point[][] {
  const start = ring.findIndex(isRim);
  if (start < 0) return [[...ring]];
  const turned = [...ring.slice(start), ...ring.slice(1, start + 1)];
  const parts: Point[][] = [];
  let current: Point[] = [];
  for (const [i, point] of turned.entries()) {
    if (!isRim(point)) {
      current.push(point);
      continue;
    }
    if (current.length > 1) parts.push([...current, point]);
    const next = turned[i + 1];
    current = next && !isRim(next) ? [point] : [];
  }
  if (current.length > 1) parts.push(current);
  return parts;
}
