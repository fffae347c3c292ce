import { chooseBands, type Bands } from '../bands';
import { padded, type Domain, type Frame } from '../frame';
import type { Point, Polyline } from '../geometry';
import { areaAbove, extentOf, isolines, lowestOf, sample, type Axes, type Grid } from '../grid';
import { RIM_SHARE, type MapInput } from './mapInput';

/** The lattice with what follows from it, before anything is in pixels. */
export interface Field {
  readonly axes: Axes;
  readonly x: Domain;
  readonly y: Domain;
  readonly bands: Bands;
  /** Positive where every limit lets the setting be had. */
  readonly margin: Grid | null;
}

const ends = (values: readonly number[]): Domain => ({ low: values[0]!, high: values.at(-1)! });

/** Bands are chosen on the settings that can be had: what lies behind a limit takes no colour. */
export function fieldOf({ x, y, z, limits }: MapInput): Field {
  const margin = lowestOf(limits.map((limit) => limit.margin));
  const had = margin
    ? z.map((row, j) => row.filter((_, i) => margin[j]![i]! >= 0)).filter((row) => row.length > 0)
    : z;
  return {
    axes: { x: x.values, y: y.values },
    x: ends(x.values),
    y: ends(y.values),
    bands: chooseBands(extentOf(had.length > 0 ? had : z)),
    margin,
  };
}

export const mapDomains = (field: Pick<Field, 'x' | 'y'>) => ({
  x: padded(field.x, RIM_SHARE),
  y: padded(field.y, RIM_SHARE),
});

const toPixels = (lines: readonly Polyline[], frame: Frame): Polyline[] =>
  lines.map((points) => points.map(([u, v]) => frame.at(u, v)));

/** In pixels: the lines of a level, and the area above it. */
export const linesOf = (grid: Grid, level: number, { axes }: Field, frame: Frame): Polyline[] =>
  toPixels(isolines(grid, axes, level), frame);

export const areaOf = (grid: Grid, level: number, { axes }: Field, frame: Frame): Polyline[] =>
  toPixels(areaAbove(grid, axes, level), frame);

/** The ranges as a ring in pixels. */
export function rangesRing({ x, y }: Field, frame: Frame): Polyline {
  return [
    frame.at(x.low, y.low),
    frame.at(x.high, y.low),
    frame.at(x.high, y.high),
    frame.at(x.low, y.high),
  ];
}

/** What can be had, as rings in pixels: the ranges when no limit cuts into them. */
export function settableRings(field: Field, frame: Frame): Polyline[] {
  return field.margin ? areaOf(field.margin, 0, field, frame) : [rangesRing(field, frame)];
}

/** The value of a grid under a pixel. */
export const valueUnder =
  (grid: Grid, { axes }: Field, frame: Frame) =>
  (pixel: Point) =>
    sample(grid, axes, frame.from(pixel));

/** Whether a pixel and its surroundings can be had. */
export function isSettable(field: Field, frame: Frame, clearance: number) {
  const marginAt = field.margin ? valueUnder(field.margin, field, frame) : () => 1;
  const isIn = (pixel: Point) => {
    const [u, v] = frame.from(pixel);
    const inRanges = u >= field.x.low && u <= field.x.high && v >= field.y.low && v <= field.y.high;
    return inRanges && marginAt(pixel) >= 0;
  };
  return ([px, py]: Point) =>
    [
      [px - clearance, py],
      [px + clearance, py],
      [px, py - clearance],
      [px, py + clearance],
    ].every((pixel) => isIn(pixel as unknown as Point));
}
