import type { EChartsOption } from 'echarts';
import { formatAperture, formatPlain } from '@/lib/format';
import { frame, valueAxis } from './axes';
import type { ChartTokens } from './tokens';

interface SieveCurveInput {
  readonly points: readonly { readonly apertureMm: number; readonly passingPercent: number }[];
  /** Sizes that a response asks for. */
  readonly marks: readonly { readonly apertureMm: number; readonly passingPercent: number }[];
}

/** Percent passing over the opening on a logarithmic axis; a square for each sieve. */
export function sieveCurveOption(
  { points, marks }: SieveCurveInput,
  tokens: ChartTokens,
): EChartsOption {
  const sizes = points.map(({ apertureMm }) => apertureMm);
  const line = [...points]
    .sort((a, b) => a.apertureMm - b.apertureMm)
    .map(({ apertureMm, passingPercent }) => [apertureMm, passingPercent]);
  return {
    ...frame(tokens),
    xAxis: {
      ...valueAxis(tokens, 'x', {
        name: 'Opening, mm',
        isLog: true,
        hasGrid: true,
        min: Math.min(...sizes, 0.05),
        max: Math.max(...sizes, 1),
        format: formatPlain,
      }),
    },
    yAxis: valueAxis(tokens, 'y', { name: 'Passing, %', min: 0, max: 100 }),
    series: [
      {
        type: 'line',
        data: line,
        symbol: 'rect',
        symbolSize: 7,
        lineStyle: { color: tokens.ink, width: 2.4 },
        itemStyle: { color: tokens.surface, borderColor: tokens.ink, borderWidth: 1.8 },
        silent: true,
      },
      {
        type: 'scatter',
        symbol: 'rect',
        symbolSize: 9,
        itemStyle: { color: tokens.ink },
        label: {
          show: true,
          position: 'left',
          color: tokens.ink,
          fontWeight: 600,
          formatter: ({ dataIndex }) => {
            const mark = marks[dataIndex];
            return mark
              ? `${mark.passingPercent.toFixed(1)}\u202F% below ${formatAperture(mark.apertureMm)}`
              : '';
          },
        },
        data: marks.map(({ apertureMm, passingPercent }) => [apertureMm, passingPercent]),
        silent: true,
      },
    ],
  };
}
