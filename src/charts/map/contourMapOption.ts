import type { EChartsCoreOption } from 'echarts/core';
import { isNarrow, plotOption, type ChartSize, type Padding } from '../axes';
import { frameOf, layer, type Frame } from '../frame';
import { roundTicks, thinned } from '../ticks';
import type { ChartTokens } from '../tokens';
import { contourLines } from './contourLines';
import { edges } from './edges';
import { fieldOf, mapDomains, type Field } from './field';
import { bands, hatched, veil } from './ground';
import type { MapAxis, MapInput, Scene } from './mapInput';
import { markObstacles, sectionMark, setPointMark } from './marks';
import { runObstacles, runs } from './runs';

const axisName = ({ label, unit }: MapAxis) => (unit ? `${label}, ${unit}` : label);

export const mapPadding = (size: ChartSize): Padding => ({
  left: 46,
  right: isNarrow(size) ? 8 : 12,
  top: 28,
  bottom: 44,
});

/** The scales of a map of this size, for pointers and keys; the drawing uses the same. */
export function mapFrame(input: Pick<MapInput, 'x' | 'y'>, size: ChartSize): Frame {
  const { left, right, top, bottom } = mapPadding(size);
  const [x, y] = [input.x.values, input.y.values].map((values) => ({
    low: values[0]!,
    high: values.at(-1)!,
  }));
  const domains = mapDomains({ x: x!, y: y! });
  const rect = { left, top, width: size.width - left - right, height: size.height - top - bottom };
  return frameOf(rect, domains.x, domains.y);
}

function drawAll(scene: Scene, field: Field, frame: Frame) {
  const obstacles = [...markObstacles(scene, frame), ...runObstacles(scene, frame)];
  return [
    ...hatched(scene, field, frame),
    bands(scene, field, frame),
    ...veil(scene, field, frame),
    ...contourLines(scene, field, frame, obstacles),
    ...edges({ scene, field, frame, obstacles }),
    ...sectionMark(scene, frame),
    ...runs(scene, frame),
    ...setPointMark(scene, frame),
  ];
}

/**
 * The map of one response over two set-points: bands, isolines with their labels in gaps, goal lines
 * with teeth, what cannot be set, where data are few, the runs, the section and the set-point.
 * The grids have one row per y value and one column per x value; all numbers are in their own units.
 */
export function contourMapOption(
  input: MapInput,
  tokens: ChartTokens,
  size: ChartSize,
): EChartsCoreOption {
  const scene: Scene = { input, tokens, isNarrow: isNarrow(size) };
  const field = fieldOf(input);
  const domains = mapDomains(field);
  return plotOption({
    tokens,
    padding: mapPadding(size),
    hasGridlines: false,
    x: {
      name: axisName(input.x),
      domain: domains.x,
      ticks: thinned(roundTicks(field.x.low, field.x.high, 10), scene.isNarrow),
    },
    y: {
      name: axisName(input.y),
      domain: domains.y,
      ticks: roundTicks(field.y.low, field.y.high, 6),
    },
    layers: [layer({ ...domains, draw: (frame) => drawAll(scene, field, frame) })],
  });
}
