import type { CustomSeriesOption } from 'echarts/charts';
import type { EChartsCoreOption } from 'echarts/core';
import { formatPlain } from '@/lib/format';
import { layer, type Domain } from './frame';
import { path } from './shapes';
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
  /** Level lines at the ticks of y; without them y has tick marks, as on the map. */
  readonly hasGridlines?: boolean;
  /** What is drawn, from the ground up; see `layer`. */
  readonly layers: readonly CustomSeriesOption[];
}

const common = (tokens: ChartTokens, { domain, ticks, format = formatPlain }: AxisInput) => ({
  type: 'value' as const,
  min: domain.low,
  max: domain.high,
  axisLine: { show: false, onZero: false, lineStyle: { color: tokens['line-strong'], width: 1 } },
  axisLabel: {
    customValues: [...ticks],
    color: tokens['ink-3'],
    fontFamily: SANS,
    fontSize: 12,
    lineHeight: 16,
    hideOverlap: true,
    formatter: (value: number) => format(value),
  },
  splitLine: { show: false },
});

/**
 * Grid and axes in the look: ticks outward, names at the far ends, horizontal gridlines only. The name
 * of the vertical axis stands level above it: nobody turns the head to read it.
 */
export function plotOption(input: PlotInput): EChartsCoreOption {
  const { tokens, padding, x, y, hasGridlines = true, layers } = input;
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
        padding: [28, 0, 0, 0],
        color: tokens['ink-2'],
        fontSize: 12,
      },
    },
    yAxis: {
      ...common(tokens, y),
      axisTick: hasGridlines ? { show: false } : tick(y.ticks),
      name: y.name,
      nameLocation: 'end',
      nameGap: 12,
      nameTextStyle: {
        align: 'left',
        padding: [0, 0, 0, -padding.left],
        color: tokens['ink-2'],
        fontSize: 12,
      },
    },
    series: [...(hasGridlines ? [gridlines(input)] : []), ...layers],
  };
}

/** Level hairlines; the axis' own could not be told at which values to stand. */
function gridlines({ tokens, x, y }: PlotInput): CustomSeriesOption {
  return layer({
    x: x.domain,
    y: y.domain,
    z: 0,
    draw: (frame) =>
      y.ticks.map((tick) => {
        const height = Math.round(frame.at(0, tick)[1]) + 0.5;
        return path(`M${frame.left} ${height}h${frame.width}`, {
          stroke: tokens.line,
          lineWidth: 1,
        });
      }),
  });
}
