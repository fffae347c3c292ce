import type { CustomSeriesOption } from 'echarts/charts';
import { areaPathOf, pathOf, type Point, type Polyline } from './geometry';
import { ringFill } from './ring';
import { SANS, type ChartTokens } from './tokens';

type RenderItem = NonNullable<CustomSeriesOption['renderItem']>;
type Drawn = NonNullable<ReturnType<RenderItem>>;
type Group = Extract<Drawn, { type: 'group' }>;
/** One element of a custom series, in pixels. */
export type Shape = Group['children'][number];

export interface Stroke {
  readonly stroke?: string;
  readonly lineWidth?: number;
  readonly lineDash?: number[];
  readonly lineCap?: 'round' | 'butt';
  readonly fill?: string;
  readonly opacity?: number;
}

/** Any path data, filled, stroked or both. */
export function path(pathData: string, style: Stroke): Shape {
  return {
    type: 'path',
    silent: true,
    shape: { pathData },
    style: { fill: 'none', lineJoin: 'round', ...style },
  };
}

export const line = (points: Polyline, style: Stroke): Shape => path(pathOf(points), style);

export const area = (rings: readonly Polyline[], style: Stroke): Shape =>
  path(areaPathOf(rings), style);

export interface Lettering {
  readonly fill: string;
  readonly align?: 'left' | 'center' | 'right';
  readonly vertical?: 'top' | 'middle' | 'bottom';
  readonly size?: number;
  readonly weight?: 400 | 500 | 600;
  readonly family?: string;
  /** Clockwise, in radians. */
  readonly angle?: number;
  readonly halo?: { readonly colour: string; readonly width: number };
}

export function text([x, y]: Point, words: string, lettering: Lettering): Shape {
  const { fill, align = 'center', vertical = 'middle', size = 12, weight = 400 } = lettering;
  const { family = SANS, angle = 0, halo } = lettering;
  return {
    type: 'text',
    silent: true,
    x,
    y,
    // zrender turns the other way
    rotation: -angle,
    style: {
      text: words,
      fill,
      align,
      verticalAlign: vertical,
      font: `${weight} ${size}px ${family}`,
      ...(halo ? { stroke: halo.colour, lineWidth: halo.width } : {}),
    },
  };
}

export function circle([cx, cy]: Point, r: number, style: Stroke): Shape {
  return { type: 'circle', silent: true, shape: { cx, cy, r }, style: { fill: 'none', ...style } };
}

/** Several shapes, drawn only inside the rings if some are given. */
export function group(children: Shape[], clip?: readonly Polyline[]): Shape {
  return {
    type: 'group',
    children,
    ...(clip ? { clipPath: { type: 'path', shape: { pathData: areaPathOf(clip) } } } : {}),
  };
}

export interface RingColours {
  readonly stroke: string;
  readonly fill: string;
  readonly ground: string;
}

/** A run: hollow on the model, filled above or below it by its residual in spreads. */
export function ring(
  at: Point,
  radius: number,
  residualShare: number,
  colours: RingColours,
): Shape[] {
  const [x, y] = at;
  const filled = ringFill(at, radius, residualShare);
  return [
    circle(at, radius, { fill: colours.ground }),
    ...(filled ? [path(filled, { fill: colours.fill })] : []),
    path(`M${x - radius} ${y}h${2 * radius}`, { stroke: colours.stroke, lineWidth: 0.8 }),
    circle(at, radius, { stroke: colours.stroke, lineWidth: 1.4 }),
  ];
}

export const plainRing = (tokens: ChartTokens): RingColours => ({
  stroke: tokens.ink,
  fill: tokens.ink,
  ground: tokens.surface,
});
