import type { EChartsCoreOption } from 'echarts/core';
import { formatNumber } from '@/lib/format';
import type { Domain } from './frame';
import { SANS, type ChartTokens } from './tokens';

/** Width and height of the whole chart in pixels. */
export interface ChartSize {
  readonly width: number;
  readonly height: number;
}

/** Below this width every second label goes and marks stay silent. */
export const NARROW_BELOW = 520;

export const isNarrow = ({ width }: ChartSize): boolean => width < NARROW_BELOW;

export interface Padding {
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
}

export interface AxisInput {
  /** “Gap, mm” */
  readonly name: string;
  readonly domain: Domain;
  readonly ticks: readonly number[];
  readonly format?: (value: number) => string;
}

interface PlotInput {
  readonly tokens: ChartTokens;
  readonly padding: Padding;
  readonly x: AxisInput;
  readonly y: AxisInput;
  /** No line where values do not start at the axis. */
  readonly hasGridlines?: boolean;
}

const common = (tokens: ChartTokens, { domain, ticks, format = formatNumber }: AxisInput) => ({
  type: 'value' as const,
  min: domain.low,
  max: domain.high,
  axisLine: { show: false, onZero: false, lineStyle: { color: tokens['line-strong'], width: 1 } },
  axisLabel: {
    customValues: [...ticks],
    color: tokens['ink-3'],
    fontFamily: SANS,
    fontSize: 12,
    hideOverlap: true,
    formatter: (value: number) => format(value),
  },
  splitLine: { show: false },
});

/**
 * Grid and axes in the look: ticks outward, names at the far ends, horizontal gridlines only. The name
 * of the vertical axis stands level above it: nobody turns the head to read it.
 */
export function plotOption({ tokens, padding, x, y, hasGridlines = true }: PlotInput) {
  const tick = (ticks: readonly number[]) => ({
    show: true,
    length: 5,
    customValues: [...ticks],
    lineStyle: { color: tokens['line-strong'], width: 1 },
  });
  return {
    animation: false,
    textStyle: { fontFamily: SANS },
    grid: { ...padding, containLabel: false, outerBoundsMode: 'none' },
    xAxis: {
      ...common(tokens, x),
      axisLine: { show: true, onZero: false, lineStyle: { color: tokens['line-strong'] } },
      axisTick: tick(x.ticks),
      name: x.name,
      nameLocation: 'end',
      nameGap: 0,
      nameTextStyle: {
        align: 'right',
        verticalAlign: 'top',
        padding: [24, 0, 0, 0],
        color: tokens['ink-2'],
        fontSize: 12,
      },
    },
    yAxis: {
      ...common(tokens, y),
      axisTick: hasGridlines ? { show: false } : tick(y.ticks),
      splitLine: hasGridlines
        ? { show: true, lineStyle: { color: tokens.line, width: 1 } }
        : { show: false },
      name: y.name,
      nameLocation: 'end',
      nameGap: 8,
      nameTextStyle: {
        align: 'left',
        padding: [0, 0, 0, -padding.left],
        color: tokens['ink-2'],
        fontSize: 12,
      },
    },
  } satisfies EChartsCoreOption;
}
