import type { EChartsOption } from 'echarts';
import { frame, valueAxis } from './axes';
import type { ChartTokens } from './tokens';

export interface ResidualPoint {
  readonly id: string;
  readonly x: number;
  /** Studentised residual. */
  readonly y: number;
}

const REACH = 3.4;

/** Studentised residuals over anything: rings, dashed lines at ±2. */
export function residualOption(
  {
    points,
    xName,
    isJoined = false,
  }: {
    points: readonly ResidualPoint[];
    xName: string;
    isJoined?: boolean;
  },
  tokens: ChartTokens,
): EChartsOption {
  const reach = Math.max(REACH, ...points.map(({ y }) => Math.abs(y) + 0.4));
  return {
    ...frame(tokens),
    grid: { left: 30, right: 10, top: 10, bottom: 36 },
    tooltip: {
      trigger: 'item',
      backgroundColor: tokens.surface,
      borderColor: tokens.lineStrong,
      textStyle: { color: tokens.ink, fontFamily: tokens.fontFamily },
      formatter: (item) => {
        const at = Array.isArray(item) ? item[0] : item;
        const point = points[at?.dataIndex ?? -1];
        return point ? `run ${point.id}: ${point.y.toFixed(2)}` : '';
      },
    },
    xAxis: { ...valueAxis(tokens, 'x', { name: xName }), scale: true },
    yAxis: valueAxis(tokens, 'y', { name: '', min: -Math.ceil(reach), max: Math.ceil(reach) }),
    series: [
      {
        type: 'scatter',
        data: points.map(({ x, y }) => [x, y]),
        symbolSize: 9,
        itemStyle: { color: tokens.surface, borderColor: tokens.ink, borderWidth: 1.4 },
        markLine: {
          silent: true,
          symbol: ['none', 'none'],
          label: { show: false },
          lineStyle: { color: tokens.ink3, type: [5, 3], width: 1 },
          data: [{ yAxis: -2 }, { yAxis: 2 }],
        },
      },
      ...(isJoined
        ? [
            {
              type: 'line' as const,
              data: points.map(({ x, y }) => [x, y]),
              showSymbol: false,
              silent: true,
              z: 1,
              lineStyle: { color: tokens.lineStrong, width: 1 },
            },
          ]
        : []),
    ],
  };
}
