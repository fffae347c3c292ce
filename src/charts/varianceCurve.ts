import type { EChartsOption } from 'echarts';
import { frame, valueAxis } from './axes';
import type { ChartTokens } from './tokens';

/**
 * Spread of a prediction over run-to-run spread, sorted over the region: how much of it is known how well.
 *
 * @param fractions 0…1; @param ratios standard deviation of the mean over that of one run.
 */
export function varianceCurveOption(
  { fractions, ratios }: { fractions: readonly number[]; ratios: readonly number[] },
  tokens: ChartTokens,
): EChartsOption {
  const median = ratios[Math.floor((ratios.length - 1) / 2)] ?? 0;
  return {
    ...frame(tokens),
    grid: { left: 30, right: 12, top: 22, bottom: 24 },
    xAxis: {
      ...valueAxis(tokens, 'x', { name: '', min: 0, max: 1 }),
      interval: 0.5,
      axisLabel: {
        color: tokens.ink3,
        formatter: (value: number) => (value === 0 ? '0' : value === 1 ? 'all of it' : 'half'),
      },
    },
    yAxis: {
      ...valueAxis(tokens, 'y', {
        name: '',
        min: 0,
        max: Math.max(1, Math.ceil(2 * (ratios.at(-1) ?? 1)) / 2),
      }),
      splitNumber: 3,
    },
    series: [
      {
        type: 'line',
        data: fractions.map((fraction, i) => [fraction, ratios[i] ?? 0]),
        showSymbol: false,
        lineStyle: { color: tokens.ink, width: 1.8 },
        areaStyle: { color: tokens.map[1] ?? tokens.sunk, opacity: 0.6 },
        silent: true,
      },
      {
        type: 'scatter',
        data: [[0.5, median]],
        symbolSize: 7,
        itemStyle: { color: tokens.surface, borderColor: tokens.ink, borderWidth: 1.6 },
        label: {
          show: true,
          position: 'top',
          color: tokens.ink,
          fontWeight: 600,
          formatter: median.toFixed(2),
        },
        silent: true,
      },
    ],
  };
}
