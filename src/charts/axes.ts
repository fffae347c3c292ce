import type { EChartsOption } from 'echarts';
import type { ChartTokens } from './tokens';

/** What all charts have in common: no animation, quiet axes, horizontal grid lines only. */
export function frame(tokens: ChartTokens): EChartsOption {
  return {
    animation: false,
    textStyle: { fontFamily: tokens.fontFamily, fontSize: 12, color: tokens.ink2 },
    grid: { left: 46, right: 16, top: 14, bottom: 42 },
  };
}

interface AxisOptions {
  readonly name: string;
  readonly min?: number;
  readonly max?: number;
  readonly isLog?: boolean;
  readonly hasGrid?: boolean;
  readonly format?: (value: number) => string;
}

/** A value axis: ticks outward, name at the far end, unit after a comma. */
export function valueAxis(tokens: ChartTokens, side: 'x' | 'y', options: AxisOptions) {
  const { name, min, max, isLog = false, hasGrid = side === 'y', format } = options;
  return {
    type: isLog ? ('log' as const) : ('value' as const),
    name,
    nameLocation: 'end' as const,
    nameGap: side === 'x' ? 0 : 8,
    nameTextStyle:
      side === 'x'
        ? {
            align: 'right' as const,
            verticalAlign: 'top' as const,
            padding: [26, 0, 0, 0],
            color: tokens.ink2,
          }
        : { align: 'left' as const, padding: [0, 0, 0, -34], color: tokens.ink2 },
    ...(min === undefined ? {} : { min }),
    ...(max === undefined ? {} : { max }),
    axisLine: { show: side === 'x', onZero: false, lineStyle: { color: tokens.lineStrong } },
    axisTick: { show: side === 'x', length: 5, lineStyle: { color: tokens.lineStrong } },
    axisLabel: {
      color: tokens.ink3,
      fontSize: 12,
      hideOverlap: true,
      ...(format ? { formatter: format } : {}),
    },
    splitLine: { show: hasGrid, lineStyle: { color: tokens.line } },
    splitNumber: 5,
  };
}

/** A limit: a solid line with its words; the side that holds is named. */
export function limitLine(tokens: ChartTokens, at: { x?: number; y?: number }, words: string) {
  return {
    ...(at.x === undefined ? { yAxis: at.y } : { xAxis: at.x }),
    lineStyle: { color: tokens.ink, width: 1.3, type: 'solid' as const },
    label: {
      formatter: words,
      position: 'insideEndTop' as const,
      color: tokens.ink,
      fontFamily: tokens.fontFamily,
      fontSize: 12,
    },
  };
}

export const noSymbol = { symbol: ['none', 'none'] as [string, string], silent: true };
