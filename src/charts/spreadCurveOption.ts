import type { EChartsCoreOption } from 'echarts/core';
import { formatNumber } from '@/lib/format';
import { plotOption } from './axes';
import { layer, type Frame } from './frame';
import { area, circle, line, text, type Shape } from './shapes';
import type { ChartTokens } from './tokens';

export interface SpreadCurveInput {
  /** Shares of the region, ascending from 0 to 1. */
  readonly fractions: readonly number[];
  /** Spread of the mean over run-to-run at or below which that share lies; ascending. */
  readonly spreads: readonly number[];
  /** Top of the scale: the same for plans that are compared. */
  readonly highest?: number;
}

const PADDING = { left: 28, right: 26, top: 14, bottom: 22 };
const X = { low: 0, high: 1 };
const WORDS: Readonly<Record<number, string>> = { 0: '0', 0.5: 'half', 1: 'all of it' };

function medianOf({ fractions, spreads }: SpreadCurveInput): number {
  const index = fractions.findIndex((fraction) => fraction >= 0.5);
  return spreads[Math.max(0, index)] ?? 0;
}

function draw(
  input: SpreadCurveInput,
  highest: number,
  tokens: ChartTokens,
  frame: Frame,
): Shape[] {
  const points = input.fractions.map((fraction, k) =>
    frame.at(fraction, Math.min(highest, input.spreads[k] ?? highest)),
  );
  const median = medianOf(input);
  const middle = frame.at(0.5, Math.min(highest, median));
  return [
    area([[...points, frame.at(1, 0), frame.at(0, 0)]], { fill: tokens['map-2'], opacity: 0.5 }),
    line(points, { stroke: tokens.ink, lineWidth: 1.8 }),
    circle(middle, 3, { fill: tokens.surface, stroke: tokens.ink, lineWidth: 1.5 }),
    text([middle[0], middle[1] - 12], formatNumber(median, 2), {
      fill: tokens.ink,
      weight: 500,
      halo: { colour: tokens.surface, width: 3 },
    }),
  ];
}

/** How well a plan predicts over its region: the share of it with at most so much spread of the mean. */
export function spreadCurveOption(input: SpreadCurveInput, tokens: ChartTokens): EChartsCoreOption {
  const highest = input.highest ?? Math.max(1.4, ...input.spreads);
  const y = { low: 0, high: highest };
  const every = highest > 3 ? Math.ceil(highest / 3) : 0.5;
  const ticks = Array.from({ length: Math.floor(highest / every) + 1 }, (_, k) => k * every);
  return plotOption({
    tokens,
    padding: PADDING,
    x: {
      name: '',
      domain: X,
      ticks: [0, 0.5, 1],
      format: (share) => WORDS[share] ?? '',
    },
    y: { name: '', domain: y, ticks: ticks.filter((tick) => tick <= highest * 0.9) },
    layers: [layer({ x: X, y, draw: (frame) => draw(input, highest, tokens, frame) })],
  });
}
