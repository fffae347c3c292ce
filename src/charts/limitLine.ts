import type { Frame } from './frame';
import { line, path, type Shape } from './shapes';
import { teeth } from './teeth';
import type { ChartTokens } from './tokens';

export interface ChartLimit {
  readonly value: number;
  readonly side: 'atLeast' | 'atMost';
}

/** A limit across the plot with teeth on the side that holds: level for y, upright for x. */
export function limitLine(
  { value, side }: ChartLimit,
  axis: 'x' | 'y',
  frame: Frame,
  tokens: ChartTokens,
): Shape[] {
  const { left, top, width, height } = frame;
  const [px] = frame.at(value, 0);
  const [, py] = frame.at(0, value);
  const isIn = axis === 'y' ? py >= top && py <= top + height : px >= left && px <= left + width;
  if (!isIn) return [];
  const points =
    axis === 'y'
      ? ([
          [left, py],
          [left + width, py],
        ] as const)
      : ([
          [px, top],
          [px, top + height],
        ] as const);
  const isAbove = side === 'atLeast';
  const holds = ([x, y]: readonly [number, number]) =>
    axis === 'y' ? y < py === isAbove : x > px === isAbove;
  return [
    line(points, { stroke: tokens.ink, lineWidth: 1.3 }),
    path(teeth(points, holds, { every: 28 }), { fill: tokens.ink }),
  ];
}
