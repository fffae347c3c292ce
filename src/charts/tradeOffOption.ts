import type { EChartsCoreOption } from 'echarts/core';
import { plotOption, type ChartSize } from './axes';
import { layer, type Frame } from './frame';
import type { Point } from './geometry';
import { limitLine, type ChartLimit } from './limitLine';
import { circle, line, path, text, type Shape } from './shapes';
import { stepAside } from './stepAside';
import type { ChartTokens } from './tokens';
import { valueDomain } from './valueDomain';

export interface TradeOffAxis {
  /** “Specific energy, kWh/t” */
  readonly name: string;
  readonly limits: readonly ChartLimit[];
}

export interface TradeOffInput {
  readonly x: TradeOffAxis;
  readonly y: TradeOffAxis;
  /** Settable combinations; those that hold the other goals are filled. */
  readonly points: readonly { readonly x: number; readonly y: number; readonly holds: boolean }[];
  /** Nothing better on both at once, ascending in x. */
  readonly front: readonly { readonly x: number; readonly y: number }[];
  readonly candidates: readonly {
    readonly letter: string;
    readonly x: number;
    readonly y: number;
    /** The one that the page's action is about. */
    readonly isReferred: boolean;
  }[];
}

const PADDING = { left: 44, right: 14, top: 30, bottom: 44 };
const CELL = 5;

/** Dots on a fine raster of pixels, so that ten thousand combinations are a few hundred dots. */
function dots({ points }: TradeOffInput, tokens: ChartTokens, frame: Frame): Shape[] {
  const cells = new Map<string, { at: Point; count: number; held: number }>();
  for (const { x, y, holds } of points) {
    const [px, py] = frame.at(x, y);
    const at: Point = [Math.round(px / CELL) * CELL, Math.round(py / CELL) * CELL];
    const key = `${at[0]} ${at[1]}`;
    const cell = cells.get(key) ?? { at, count: 0, held: 0 };
    cells.set(key, { at, count: cell.count + 1, held: cell.held + Number(holds) });
  }
  return [...cells.values()].map(({ at, count, held }) => {
    const radius = Math.min(2.4, 0.7 + 0.28 * Math.sqrt(count));
    return 2 * held > count
      ? circle(at, radius, { fill: tokens['map-6'], opacity: 0.65 })
      : circle(at, radius, { stroke: tokens['map-5'], lineWidth: 0.8, opacity: 0.65 });
  });
}

/** Level to the next point, then up to it: between two settings there is nothing better. */
function staircase({ front }: TradeOffInput, frame: Frame): Point[] {
  return front.flatMap(({ x, y }, k): Point[] => {
    const before = front[k - 1];
    return before ? [frame.at(x, before.y), frame.at(x, y)] : [frame.at(x, y)];
  });
}

function squares({ candidates }: TradeOffInput, tokens: ChartTokens, frame: Frame): Shape[] {
  const points = candidates.map(({ x, y }) => frame.at(x, y));
  return stepAside(points).flatMap(({ at: [x, y], hasMoved }, k) => {
    const { letter, isReferred } = candidates[k]!;
    const leader = hasMoved
      ? [
          line([points[k]!, [x, y]], { stroke: tokens.ink, lineWidth: 1 }),
          circle(points[k]!, 2.5, { fill: tokens.ink }),
        ]
      : [];
    return [
      ...leader,
      path(`M${x - 9} ${y - 9}h18v18h-18Z`, {
        fill: isReferred ? tokens.accent : tokens.surface,
        stroke: isReferred ? tokens.surface : tokens.ink,
        lineWidth: 1.4,
      }),
      text([x, y], letter, {
        fill: isReferred ? tokens['on-accent'] : tokens.ink,
        weight: 600,
        size: 13,
      }),
    ];
  });
}

/** What more of one costs of the other: every settable combination, the best of them, and the candidates. */
export function tradeOffOption(
  input: TradeOffInput,
  tokens: ChartTokens,
  size: ChartSize,
): EChartsCoreOption {
  const all = [...input.points, ...input.front, ...input.candidates];
  const limitsOf = (axis: TradeOffAxis) => axis.limits.map(({ value }) => value);
  const x = valueDomain(
    [...all.map((point) => point.x), ...limitsOf(input.x)],
    size.width < 360 ? 3 : 5,
  );
  const y = valueDomain([...all.map((point) => point.y), ...limitsOf(input.y)], 5);
  return plotOption({
    tokens,
    padding: PADDING,
    x: { name: input.x.name, domain: x, ticks: x.ticks },
    y: { name: input.y.name, domain: y, ticks: y.ticks },
    layers: [
      layer({
        x,
        y,
        draw: (frame) => [
          ...dots(input, tokens, frame),
          line(staircase(input, frame), { stroke: tokens.ink, lineWidth: 1.8 }),
          ...input.y.limits.flatMap((limit) => limitLine(limit, 'y', frame, tokens)),
          ...input.x.limits.flatMap((limit) => limitLine(limit, 'x', frame, tokens)),
          ...squares(input, tokens, frame),
        ],
      }),
    ],
  });
}
