import type { EChartsCoreOption } from 'echarts/core';
import { plotOption } from './axes';
import { layer, type Frame } from './frame';
import { path, text, type Shape } from './shapes';
import { roundTicks } from './ticks';
import { MONO, type ChartTokens } from './tokens';

export interface InfluencePoint {
  readonly id: string | number;
  readonly order: number;
  /** Cook's distance. */
  readonly cook: number;
  readonly leverage: number;
}

const PADDING = { left: 28, right: 14, top: 14, bottom: 40 };
/** Above this share of the scale a bar carries its run's number. */
const NAMED_FROM = 0.35;

function draw(points: readonly InfluencePoint[], tokens: ChartTokens, frame: Frame): Shape[] {
  return points.flatMap(({ id, order, cook, leverage }) => {
    const [x, foot] = frame.at(order, 0);
    const [, top] = frame.at(order, cook);
    const [, tick] = frame.at(order, leverage);
    return [
      path(`M${x} ${foot}V${top}`, { stroke: tokens.ink, lineWidth: 3 }),
      path(`M${x - 4} ${tick}h8`, { stroke: tokens['series-2'], lineWidth: 2 }),
      ...(cook > NAMED_FROM
        ? [
            text([x + 6, top + 5], String(id), {
              fill: tokens.ink,
              size: 11,
              family: MONO,
              align: 'left',
            }),
          ]
        : []),
    ];
  });
}

/** How hard each run pulls on the fit: bars for Cook's distance, ticks for leverage. */
export function influenceOption(
  points: readonly InfluencePoint[],
  tokens: ChartTokens,
): EChartsCoreOption {
  const orders = points.map(({ order }) => order);
  const x = { low: Math.min(1, ...orders) - 0.7, high: Math.max(2, ...orders) + 0.7 };
  const y = { low: 0, high: Math.max(1, ...points.map(({ cook }) => cook)) };
  return plotOption({
    tokens,
    padding: PADDING,
    x: { name: 'run order', domain: x, ticks: roundTicks(Math.max(1, x.low), x.high, 5) },
    y: { name: '', domain: y, ticks: roundTicks(0, y.high, 2) },
    layers: [layer({ x, y, draw: (frame) => draw(points, tokens, frame) })],
  });
}
