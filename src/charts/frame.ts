import type { CustomSeriesOption } from 'echarts/charts';
import type { Point } from './geometry';
import type { Rect } from './hatch';
import type { Shape } from './shapes';

export interface Domain {
  readonly low: number;
  readonly high: number;
}

/** The plotting rectangle with its scales both ways. */
export interface Frame extends Rect {
  readonly at: (x: number, y: number) => Point;
  readonly from: (pixel: Point) => Point;
}

/** Linear scales; x to the right, y up. */
export function frameOf(rect: Rect, x: Domain, y: Domain): Frame {
  const { left, top, width, height } = rect;
  const [spanX, spanY] = [x.high - x.low || 1, y.high - y.low || 1];
  return {
    ...rect,
    at: (u, v) => [
      left + ((u - x.low) / spanX) * width,
      top + height - ((v - y.low) / spanY) * height,
    ],
    from: ([px, py]) => [
      x.low + ((px - left) / (width || 1)) * spanX,
      y.low + ((top + height - py) / (height || 1)) * spanY,
    ],
  };
}

/** Widens a domain by a share of itself at both ends. */
export function padded({ low, high }: Domain, share: number): Domain {
  const extra = (high - low) * share;
  return { low: low - extra, high: high + extra };
}

interface Layer {
  readonly x: Domain;
  readonly y: Domain;
  readonly z?: number;
  readonly draw: (frame: Frame) => Shape[];
}

/** A custom series of one item that draws a whole layer over the grid's rectangle. */
export function layer({ x, y, z = 2, draw }: Layer): CustomSeriesOption {
  return {
    type: 'custom',
    silent: true,
    clip: false,
    z,
    coordinateSystem: 'cartesian2d',
    data: [[(x.low + x.high) / 2, (y.low + y.high) / 2]],
    renderItem: (params) => {
      const rect = params.coordSys as unknown as Record<'x' | 'y' | 'width' | 'height', number>;
      const { width, height } = rect;
      const frame = frameOf({ left: rect.x, top: rect.y, width, height }, x, y);
      // a new drawing replaces the old one whole: its shapes do not correspond one by one
      return { type: 'group', $mergeChildren: false, children: draw(frame) };
    },
  };
}
