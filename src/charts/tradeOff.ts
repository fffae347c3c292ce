import type { EChartsOption } from 'echarts';
import { frame, limitLine, valueAxis } from './axes';
import type { ChartTokens } from './tokens';

interface TradeOffInput {
  readonly x: { readonly name: string; readonly limit: number | null };
  readonly y: { readonly name: string; readonly limit: number | null };
  /** Non-dominated settings; filled where the other goals hold. */
  readonly points: readonly { readonly x: number; readonly y: number; readonly holds: boolean }[];
  readonly candidates: readonly {
    readonly letter: string;
    readonly x: number;
    readonly y: number;
  }[];
}

/** What one goal costs in another: settings that no other beats, limits as lines, candidates lettered. */
export function tradeOffOption(
  { x, y, points, candidates }: TradeOffInput,
  tokens: ChartTokens,
): EChartsOption {
  return {
    ...frame(tokens),
    xAxis: { ...valueAxis(tokens, 'x', { name: x.name }), scale: true },
    yAxis: { ...valueAxis(tokens, 'y', { name: y.name }), scale: true },
    series: [
      {
        type: 'scatter',
        data: points.map((point) => ({
          value: [point.x, point.y],
          itemStyle: point.holds
            ? { color: tokens.map[6] ?? tokens.ink2 }
            : {
                color: tokens.surface,
                borderColor: tokens.map[5] ?? tokens.ink3,
                borderWidth: 0.8,
              },
        })),
        symbolSize: 4.5,
        silent: true,
        markLine: {
          silent: true,
          symbol: ['none', 'none'],
          data: [
            ...(x.limit === null ? [] : [limitLine(tokens, { x: x.limit }, String(x.limit))]),
            ...(y.limit === null ? [] : [limitLine(tokens, { y: y.limit }, String(y.limit))]),
          ],
        },
      },
      {
        type: 'scatter',
        data: candidates.map((candidate) => [candidate.x, candidate.y]),
        symbol: 'rect',
        symbolSize: 18,
        silent: true,
        itemStyle: { color: tokens.surface, borderColor: tokens.ink, borderWidth: 1.4 },
        label: {
          show: true,
          color: tokens.ink,
          fontWeight: 600,
          formatter: ({ dataIndex }) => candidates[dataIndex]?.letter ?? '',
        },
        labelLayout: { hideOverlap: false, moveOverlap: 'shiftY' },
      },
    ],
  };
}
