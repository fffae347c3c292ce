import { bandOf, FIRST_DARK_BAND } from '../bands';
import type { Frame } from '../frame';
import { dotPath, hatchPath, type Rect } from '../hatch';
import { area, group, line, path, type Shape } from '../shapes';
import { mapColour } from '../tokens';
import { areaOf, linesOf, rangesRing, settableRings, valueUnder, type Field } from './field';
import { FEW_DATA, FEWER_DATA, type Scene } from './mapInput';

function rectOf(field: Field, frame: Frame): Rect {
  const [left, bottom] = frame.at(field.x.low, field.y.low);
  const [right, top] = frame.at(field.x.high, field.y.high);
  return { left, top, width: right - left, height: bottom - top };
}

/** The ranges, hatched: what the bands do not cover cannot be had. */
export function hatched({ tokens }: Scene, field: Field, frame: Frame): Shape[] {
  const { left, top, width, height } = frame;
  const whole = `M${left} ${top}h${width}v${height}h${-width}Z`;
  return [
    path(whole, { fill: tokens.surface }),
    path(hatchPath(rectOf(field, frame)), {
      stroke: tokens['line-strong'],
      lineWidth: 1,
      opacity: 0.75,
    }),
    path(whole, { stroke: tokens['line-strong'] }),
    area([rangesRing(field, frame)], {
      stroke: tokens['line-strong'],
      lineWidth: 0.8,
      lineDash: [2, 3],
    }),
  ];
}

/** Nine bands with the faint half-steps between their lines, inside what can be had. */
export function bands({ input, tokens }: Scene, field: Field, frame: Frame): Shape {
  const { limits, step } = field.bands;
  const settable = settableRings(field, frame);
  const halves = [limits[0]! - step / 2, ...limits.map((limit) => limit + step / 2)];
  return group(
    [
      area(settable, { fill: mapColour(tokens, 0) }),
      ...limits.map((limit, k) =>
        area(areaOf(input.z, limit, field, frame), { fill: mapColour(tokens, k + 1) }),
      ),
      ...halves.flatMap((level) =>
        linesOf(input.z, level, field, frame).map((points) =>
          line(points, {
            stroke:
              bandOf(field.bands, level) >= FIRST_DARK_BAND
                ? tokens['isolabel-on-dark']
                : tokens.isoline,
            lineWidth: 0.6,
            opacity: 0.3,
          }),
        ),
      ),
    ],
    settable,
  );
}

/** Few data: a veil with dots and a dotted edge, and a second veil where there are fewer still. */
export function veil({ input, tokens }: Scene, field: Field, frame: Frame): Shape[] {
  const { support } = input;
  if (!support) return [];
  const supportAt = valueUnder(support, field, frame);
  const isFew = (x: number, y: number) => supportAt([x, y]) >= FEW_DATA;
  const veiled = group(
    [
      area(areaOf(support, FEW_DATA, field, frame), { fill: tokens.veil, opacity: 0.48 }),
      area(areaOf(support, FEWER_DATA, field, frame), { fill: tokens.veil, opacity: 0.5 }),
      path(dotPath(rectOf(field, frame), isFew), {
        stroke: tokens['ink-2'],
        lineWidth: 1.6,
        lineCap: 'round',
        opacity: 0.3,
      }),
      ...linesOf(support, FEW_DATA, field, frame).map((points) =>
        line(points, {
          stroke: tokens['ink-2'],
          lineWidth: 1,
          lineDash: [1, 4],
          lineCap: 'round',
        }),
      ),
    ],
    settableRings(field, frame),
  );
  return [veiled];
}
