import type { EChartsOption } from 'echarts';
import { frame, limitLine, valueAxis } from './axes';
import type { ChartTokens } from './tokens';

export interface SectionPoint {
  /** 0 at A, 1 at A′. */
  readonly share: number;
  readonly predicted: number;
  readonly ciLow: number | null;
  readonly ciHigh: number | null;
  readonly piLow: number | null;
  readonly piHigh: number | null;
  /** Settings there, in words for the axis: "160 kV, 26 mm". */
  readonly words: string;
}

interface SectionInput {
  readonly points: readonly SectionPoint[];
  readonly runs: readonly { readonly id: string; readonly share: number; readonly value: number }[];
  readonly limits: readonly { readonly value: number; readonly words: string }[];
  readonly setPointShare: number | null;
  readonly yName: string;
}

/** A band between two curves, as a stacked pair: the lower edge unseen, the difference filled. */
function band(
  points: readonly SectionPoint[],
  [low, high]: readonly ['ciLow' | 'piLow', 'ciHigh' | 'piHigh'],
  look: { readonly name: string; readonly color: string; readonly opacity: number },
) {
  const kept = points.filter((point) => point[low] !== null && point[high] !== null);
  const common = { type: 'line' as const, stack: look.name, showSymbol: false, silent: true };
  return [
    {
      ...common,
      data: kept.map((point) => [point.share, point[low]]),
      lineStyle: { opacity: 0 },
    },
    {
      ...common,
      data: kept.map((point) => [point.share, (point[high] ?? 0) - (point[low] ?? 0)]),
      lineStyle: { opacity: 0 },
      areaStyle: { color: look.color, opacity: look.opacity },
    },
  ];
}

/** The response along the line A–A′: mean, band of the mean, band of one new run, runs near the line. */
export function sectionOption(input: SectionInput, tokens: ChartTokens): EChartsOption {
  const { points, runs, limits, setPointShare, yName } = input;
  const ends = [0, 0.25, 0.5, 0.75, 1];
  const wordsAt = (share: number) =>
    points[Math.round(share * (points.length - 1))]?.words.replace(', ', '\n') ?? '';
  const lows = points.map(({ piLow, predicted }) => piLow ?? predicted);
  const highs = points.map(({ piHigh, predicted }) => piHigh ?? predicted);
  const values = [
    ...lows,
    ...highs,
    ...runs.map(({ value }) => value),
    ...limits.map(({ value }) => value),
  ];
  const [low, high] = [Math.min(...values), Math.max(...values)];
  const pad = 0.05 * (high - low || 1);
  return {
    ...frame(tokens),
    grid: { left: 46, right: 24, top: 22, bottom: 56 },
    xAxis: {
      ...valueAxis(tokens, 'x', { name: '', min: 0, max: 1 }),
      interval: 0.25,
      axisLabel: {
        color: tokens.ink3,
        formatter: (share: number) =>
          ends.includes(share)
            ? `${share === 0 ? 'A  ' : share === 1 ? 'A′  ' : ''}${wordsAt(share)}`
            : '',
      },
    },
    yAxis: {
      ...valueAxis(tokens, 'y', { name: yName }),
      min: Math.floor(low - pad),
      max: Math.ceil(high + pad),
    },
    series: [
      ...band(points, ['piLow', 'piHigh'], {
        name: 'one new run',
        color: tokens.map[1] ?? tokens.sunk,
        opacity: 0.6,
      }),
      ...band(points, ['ciLow', 'ciHigh'], {
        name: 'mean',
        color: tokens.map[3] ?? tokens.sunk,
        opacity: 0.8,
      }),
      {
        type: 'line',
        data: points.map(({ share, predicted }) => [share, predicted]),
        showSymbol: false,
        silent: true,
        lineStyle: { color: tokens.ink, width: 2 },
        markLine: {
          silent: true,
          symbol: ['none', 'none'],
          data: [
            ...limits.map(({ value, words }) => limitLine(tokens, { y: value }, words)),
            ...(setPointShare === null
              ? []
              : [
                  {
                    xAxis: setPointShare,
                    lineStyle: { color: tokens.accent, width: 1.6, type: 'solid' as const },
                    label: { show: false },
                  },
                ]),
          ],
        },
      },
      {
        type: 'scatter',
        data: runs.map(({ share, value }) => [share, value]),
        symbolSize: 9,
        silent: true,
        itemStyle: { color: tokens.surface, borderColor: tokens.ink, borderWidth: 1.4 },
      },
    ],
  };
}
