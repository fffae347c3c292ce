import type { EChartsCoreOption } from 'echarts/core';
import { formatNumber, withUnit } from '@/lib/format';
import { isNarrow, plotOption, type ChartSize } from './axes';
import { layer, type Frame } from './frame';
import type { Point } from './geometry';
import { limitLine, type ChartLimit } from './limitLine';
import { area, line, path, plainRing, ring, text, type Shape } from './shapes';
import type { ChartTokens } from './tokens';
import { valueDomain } from './valueDomain';

export interface SectionPoint {
  /** Along the section: 0 at A, 1 at A′. */
  readonly share: number;
  readonly x: number;
  readonly y: number;
  readonly mean: number;
  readonly ciLow: number;
  readonly ciHigh: number;
  readonly piLow: number;
  readonly piHigh: number;
}

export interface SectionInput {
  /** “Passing 2 mm, %” */
  readonly name: string;
  /** Units and decimals of the two set-points under the axis: y first, as on the map's upright axis. */
  readonly x: { readonly unit: string; readonly digits: number };
  readonly y: { readonly unit: string; readonly digits: number };
  /** Ascending in share, at least two. */
  readonly points: readonly SectionPoint[];
  /** Runs moved onto the section with their residuals. */
  readonly runs: readonly {
    readonly id: string | number;
    readonly share: number;
    readonly value: number;
    readonly residualShare: number;
  }[];
  readonly limits: readonly ChartLimit[];
  readonly setPointShare: number | null;
}

const PADDING = { left: 46, right: 12, top: 34, bottom: 46 };
const DOMAIN = { low: 0, high: 1 };
const SAME_PLACE = 0.005;
const BESIDE = 9;

/** The two rows under a tick: upright set-point above, level one below; the first tick says the units. */
function tickLabel({ points, x, y }: SectionInput, share: number, isFirst: boolean): string {
  const point = points.reduce((best, each) =>
    Math.abs(each.share - share) < Math.abs(best.share - share) ? each : best,
  );
  const words = (value: number, { unit, digits }: SectionInput['x']) =>
    withUnit(formatNumber(value, digits), isFirst ? unit : '');
  return `${words(point.y, y)}\n${words(point.x, x)}`;
}

function draw(input: SectionInput, tokens: ChartTokens, frame: Frame): Shape[] {
  const curve = (key: 'mean' | 'ciLow' | 'ciHigh' | 'piLow' | 'piHigh'): Point[] =>
    input.points.map((point) => frame.at(point.share, point[key]));
  const dashed = { stroke: tokens['ink-3'], lineWidth: 1, lineDash: [4, 3] };
  const bottom = frame.top + frame.height;
  const letter = (share: number, words: string, align: 'left' | 'right') =>
    text([frame.at(share, 0)[0], bottom + 13], words, {
      fill: tokens.ink,
      size: 14,
      weight: 600,
      align,
    });
  return [
    area([[...curve('piHigh'), ...curve('piLow').reverse()]], {
      fill: tokens['map-1'],
      opacity: 0.55,
    }),
    area([[...curve('ciHigh'), ...curve('ciLow').reverse()]], {
      fill: tokens['map-3'],
      opacity: 0.8,
    }),
    line(curve('piHigh'), dashed),
    line(curve('piLow'), dashed),
    line(curve('mean'), { stroke: tokens.ink, lineWidth: 2 }),
    ...input.limits.flatMap((limit) => limitLine(limit, 'y', frame, tokens)),
    ...placed(input, frame).flatMap(({ at, residualShare }) =>
      ring(at, 5, residualShare, plainRing(tokens)),
    ),
    ...setPoint(input, tokens, frame),
    letter(0, 'A', 'left'),
    letter(1, 'A′', 'right'),
  ];
}

/** Replicates stand beside each other, centred on their place. */
function placed({ runs }: SectionInput, frame: Frame) {
  const alike = (share: number) => runs.filter((run) => Math.abs(run.share - share) < SAME_PLACE);
  return runs.map((run) => {
    const group = alike(run.share);
    const aside = (group.indexOf(run) - (group.length - 1) / 2) * BESIDE;
    const [x, y] = frame.at(run.share, run.value);
    return { at: [x + aside, y] as const, residualShare: run.residualShare };
  });
}

function setPoint(input: SectionInput, tokens: ChartTokens, frame: Frame): Shape[] {
  if (input.setPointShare === null) return [];
  const [x] = frame.at(input.setPointShare, 0);
  const { top, height } = frame;
  return [
    path(`M${x} ${top}v${height}`, { stroke: tokens.accent, lineWidth: 1.6 }),
    path(`M${x} ${top - 6}l5 5l-5 5l-5 -5Z`, { fill: tokens.accent }),
  ];
}

/** The response along the line A–A′ with the band of its mean, of one new run, and the runs beside it. */
export function sectionOption(
  input: SectionInput,
  tokens: ChartTokens,
  size: ChartSize,
): EChartsCoreOption {
  const values = [
    ...input.points.flatMap(({ piLow, piHigh }) => [piLow, piHigh]),
    ...input.runs.map(({ value }) => value),
    ...input.limits.map(({ value }) => value),
  ];
  const y = valueDomain(values, 3);
  const gaps = isNarrow(size) ? 4 : 8;
  const ticks = Array.from({ length: gaps - 1 }, (_, k) => (k + 1) / gaps);
  return plotOption({
    tokens,
    padding: PADDING,
    x: {
      name: '',
      domain: DOMAIN,
      ticks,
      format: (share) => tickLabel(input, share, share === ticks[0]),
    },
    y: { name: input.name, domain: y, ticks: y.ticks },
    layers: [layer({ x: DOMAIN, y, draw: (frame) => draw(input, tokens, frame) })],
  });
}
