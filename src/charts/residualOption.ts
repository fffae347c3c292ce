import type { EChartsCoreOption } from 'echarts/core';
import { isNarrow, plotOption, type ChartSize } from './axes';
import { layer, padded, type Frame } from './frame';
import { area, line, path, plainRing, ring, text, type Shape } from './shapes';
import { roundTicks, thinned } from './ticks';
import type { ChartTokens } from './tokens';

export interface ResidualPoint {
  readonly id: string | number;
  /** Fitted value, order or normal quantile. */
  readonly x: number;
  /** Externally studentised. */
  readonly residual: number;
}

export interface ResidualInput {
  /** “fitted passing, %”, “run order”, “normal quantile” */
  readonly name: string;
  readonly points: readonly ResidualPoint[];
  /** Days or other blocks, in run order; every second is shaded. */
  readonly blocks?: readonly {
    readonly label: string;
    readonly from: number;
    readonly to: number;
  }[];
  /** Runs in order are joined by a thin line. */
  readonly isJoined?: boolean;
  /** Pointwise band of the normal plot, ascending in x. */
  readonly band?: readonly { readonly x: number; readonly low: number; readonly high: number }[];
  /** Numbers beside the rings beyond the dashes. */
  readonly hasNumbers?: boolean;
}

const PADDING = { left: 28, right: 10, top: 14, bottom: 40 };
const OUTER = 2;
const LEAST_HIGH = 3.4;

function shading({ blocks = [] }: ResidualInput, tokens: ChartTokens, frame: Frame): Shape[] {
  const { top, height } = frame;
  return blocks.flatMap(({ label, from, to }, index) => {
    const [left] = frame.at(from - 0.5, 0);
    const [right] = frame.at(to + 0.5, 0);
    return [
      ...(index % 2 === 1
        ? [path(`M${left} ${top}H${right}v${height}H${left}Z`, { fill: tokens.sunk })]
        : []),
      text([(left + right) / 2, top + 6], label, { fill: tokens['ink-3'] }),
    ];
  });
}

function normalBand({ band }: ResidualInput, tokens: ChartTokens, frame: Frame): Shape[] {
  if (!band) return [];
  const { low, height } = { low: frame.from([0, frame.top + frame.height])[1], height: frame.top };
  const high = frame.from([0, height])[1];
  const clamp = (value: number) => Math.max(low, Math.min(high, value));
  const upper = band.map((each) => frame.at(each.x, clamp(each.high)));
  const lower = band.map((each) => frame.at(each.x, clamp(each.low)));
  const [first, last] = [band[0]!.x, band.at(-1)!.x];
  return [
    area([[...upper, ...lower.reverse()]], { fill: tokens.sunk }),
    line([frame.at(first, clamp(first)), frame.at(last, clamp(last))], {
      stroke: tokens['ink-3'],
      lineWidth: 1,
    }),
  ];
}

function draw(input: ResidualInput, tokens: ChartTokens, frame: Frame): Shape[] {
  const { left, width } = frame;
  const dashes = [-OUTER, OUTER].map((level) =>
    path(`M${left} ${frame.at(0, level)[1]}h${width}`, {
      stroke: tokens['ink-3'],
      lineWidth: 1,
      lineDash: [5, 3],
    }),
  );
  const placed = input.points.map((point) => ({ point, at: frame.at(point.x, point.residual) }));
  const joined = input.isJoined
    ? [
        line(
          placed.map(({ at }) => at),
          { stroke: tokens['line-strong'], lineWidth: 1 },
        ),
      ]
    : [];
  const rings = placed.flatMap(({ point: { id, residual }, at }) => [
    ...ring(at, 4.5, residual, plainRing(tokens)),
    ...(input.hasNumbers && Math.abs(residual) > OUTER
      ? [text([at[0] + 8, at[1]], String(id), { fill: tokens['ink-2'], size: 11, align: 'left' })]
      : []),
  ]);
  return [...dashes, ...joined, ...rings];
}

/** Studentised residuals as run rings against anything, with dashes at ±2. */
export function residualOption(
  input: ResidualInput,
  tokens: ChartTokens,
  size: ChartSize,
): EChartsCoreOption {
  const xs = input.points.map((point) => point.x);
  const largest = Math.max(LEAST_HIGH, ...input.points.map(({ residual }) => Math.abs(residual)));
  const high = largest * (largest > LEAST_HIGH ? 1.12 : 1);
  const y = { low: -high, high };
  const [low = 0, top = 1] = xs.length > 0 ? [Math.min(...xs), Math.max(...xs)] : [];
  const x = padded({ low, high: top === low ? low + 1 : top }, 0.06);
  return plotOption({
    tokens,
    padding: PADDING,
    x: {
      name: input.name,
      domain: x,
      ticks: thinned(
        roundTicks(low, Math.max(top, low + 1), 5),
        isNarrow(size) && size.width < 200,
      ),
    },
    y: { name: '', domain: y, ticks: roundTicks(-high, high, 4) },
    layers: [
      layer({
        x,
        y,
        z: 0,
        draw: (frame) => [...shading(input, tokens, frame), ...normalBand(input, tokens, frame)],
      }),
      layer({ x, y, draw: (frame) => draw(input, tokens, frame) }),
    ],
  });
}
