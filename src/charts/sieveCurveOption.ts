import type { EChartsCoreOption } from 'echarts/core';
import { formatAperture, formatNumber, formatPlain, withUnit } from '@/lib/format';
import { isNarrow, plotOption, type ChartSize } from './axes';
import { layer, type Domain, type Frame } from './frame';
import type { Point } from './geometry';
import { line, path, text, type Shape } from './shapes';
import type { ChartTokens } from './tokens';
import { thinned } from './ticks';

export interface SievePoint {
  readonly openingMm: number;
  readonly passingPercent: number;
}

export interface SieveCurveInput {
  /** The run being looked at; each square is a sieve. */
  readonly points: readonly SievePoint[];
  /** The feed, dashed; other runs, thin. */
  readonly others: readonly {
    readonly label: string;
    readonly isFeed: boolean;
    readonly points: readonly SievePoint[];
  }[];
  /** The openings that goals ask about. */
  readonly marked: readonly SievePoint[];
}

const PADDING = { left: 44, right: 14, top: 30, bottom: 44 };
const PERCENT: Domain = { low: 0, high: 100 };
const PERCENT_TICKS = [0, 20, 40, 60, 80, 100];
const ROUND_OPENINGS = [0.01, 0.02, 0.032, 0.063, 0.125, 0.25, 0.5, 1, 2, 4, 8, 16, 31.5, 63, 125];

/** The decade scale of all openings, with a little room at both ends. */
function openingDomain({ points, others }: SieveCurveInput): Domain {
  const openings = [...points, ...others.flatMap((other) => other.points)]
    .map(({ openingMm }) => openingMm)
    .filter((opening) => opening > 0);
  if (openings.length === 0) return { low: -2, high: 2 };
  return {
    low: Math.log10(Math.min(...openings)) - 0.1,
    high: Math.log10(Math.max(...openings)) + 0.1,
  };
}

/** Upright lines at 1, 2 … 9 of every decade. */
function decades({ low, high }: Domain, tokens: ChartTokens, frame: Frame): Shape[] {
  const shapes: Shape[] = [];
  for (let power = Math.floor(low); power <= high; power++)
    for (let digit = 1; digit < 10; digit++) {
      const at = power + Math.log10(digit);
      if (at < low || at > high) continue;
      const [x] = frame.at(at, 0);
      shapes.push(
        path(`M${Math.round(x)} ${frame.top}v${frame.height}`, {
          stroke: tokens.line,
          lineWidth: 1,
          opacity: digit === 1 ? 1 : 0.45,
        }),
      );
    }
  return shapes;
}

function draw(input: SieveCurveInput, tokens: ChartTokens, frame: Frame): Shape[] {
  const at = ({ openingMm, passingPercent }: SievePoint): Point =>
    frame.at(Math.log10(openingMm), passingPercent);
  const curve = (points: readonly SievePoint[]) =>
    points.filter(({ openingMm }) => openingMm > 0).map(at);
  const squares = curve(input.points).map(([x, y]) =>
    path(`M${x - 3.5} ${y - 3.5}h7v7h-7Z`, {
      fill: tokens.surface,
      stroke: tokens.ink,
      lineWidth: 1.8,
    }),
  );
  return [
    ...input.others.flatMap(({ label, isFeed, points }) => {
      const drawn = curve(points);
      const middle = drawn[Math.floor(drawn.length / 2)];
      return [
        line(drawn, {
          stroke: tokens['ink-3'],
          lineWidth: isFeed ? 1.4 : 1.2,
          ...(isFeed ? { lineDash: [5, 3] } : {}),
        }),
        ...(middle
          ? [text([middle[0] - 8, middle[1]], label, { fill: tokens['ink-3'], align: 'right' })]
          : []),
      ];
    }),
    ...input.marked.flatMap((point) => readOff(point, tokens, frame)),
    line(curve(input.points), { stroke: tokens.ink, lineWidth: 2.4 }),
    ...squares,
    ...input.marked.flatMap((point) => answer(point, tokens, frame)),
  ];
}

/** From the opening up to the curve and across to the percentage. */
function readOff(point: SievePoint, tokens: ChartTokens, frame: Frame): Shape[] {
  const [x, y] = frame.at(Math.log10(point.openingMm), point.passingPercent);
  return [
    path(`M${x} ${frame.top + frame.height}V${y}H${frame.left}`, {
      stroke: tokens['ink-2'],
      lineWidth: 1,
      lineDash: [2, 3],
    }),
  ];
}

function answer(point: SievePoint, tokens: ChartTokens, frame: Frame): Shape[] {
  const [x, y] = frame.at(Math.log10(point.openingMm), point.passingPercent);
  const words = `${withUnit(formatNumber(point.passingPercent, 1), '%')} below ${formatAperture(point.openingMm)}`;
  // left of a rising curve, unless the axis is too near: then below it
  const isCrowded = x - frame.left < 150;
  return [
    path(`M${x - 4.5} ${y - 4.5}h9v9h-9Z`, { fill: tokens.ink }),
    text(isCrowded ? [x + 10, y + 13] : [x - 10, y - 13], words, {
      fill: tokens.ink,
      weight: 600,
      size: 13,
      align: isCrowded ? 'left' : 'right',
      halo: { colour: tokens.surface, width: 3 },
    }),
  ];
}

/** The axis says mm once; only what is finer carries its own unit. */
const axisWords = (openingMm: number) =>
  openingMm < 0.1 ? formatAperture(openingMm) : formatPlain(openingMm);

/** Passing over opening on a logarithmic scale: the run with its sieves, the feed and other runs behind. */
export function sieveCurveOption(
  input: SieveCurveInput,
  tokens: ChartTokens,
  size: ChartSize,
): EChartsCoreOption {
  const x = openingDomain(input);
  const inside = ROUND_OPENINGS.filter((mm) => Math.log10(mm) >= x.low && Math.log10(mm) <= x.high);
  return plotOption({
    tokens,
    padding: PADDING,
    x: {
      name: 'Opening, mm (log)',
      domain: x,
      ticks: thinned(inside, isNarrow(size)).map((mm) => Math.log10(mm)),
      format: (power) => axisWords(Number((10 ** power).toPrecision(4))),
    },
    y: { name: 'Passing, %', domain: PERCENT, ticks: PERCENT_TICKS },
    layers: [
      layer({ x, y: PERCENT, z: 0, draw: (frame) => decades(x, tokens, frame) }),
      layer({ x, y: PERCENT, draw: (frame) => draw(input, tokens, frame) }),
    ],
  });
}
