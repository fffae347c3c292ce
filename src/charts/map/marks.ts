import type { Frame } from '../frame';
import type { Point } from '../geometry';
import type { Obstacle } from '../labels';
import { line, path, text, type Shape } from '../shapes';
import type { Scene } from './mapInput';

const SECTION_STEPS = 125;

/** The set-point and the section line, as labels must avoid them. */
export function markObstacles({ input }: Scene, frame: Frame): Obstacle[] {
  const obstacles: Obstacle[] = [];
  if (input.setPoint) {
    const { x, y } = input.setPoint;
    obstacles.push({ at: frame.at(x, y), radius: 18 });
  }
  if (input.section) {
    const [a, b] = sectionEnds(input.section, frame);
    for (let k = 0; k <= SECTION_STEPS; k++) {
      const share = k / SECTION_STEPS;
      const at: Point = [a[0] + share * (b[0] - a[0]), a[1] + share * (b[1] - a[1])];
      obstacles.push({ at, radius: 1 });
    }
  }
  return obstacles;
}

function sectionEnds(section: NonNullable<Scene['input']['section']>, frame: Frame) {
  const { from, to } = section;
  return [frame.at(from.x, from.y), frame.at(to.x, to.y)] as const;
}

/** The section A–A′: dash-dot, with ticks and letters at its ends. */
export function sectionMark({ input, tokens }: Scene, frame: Frame): Shape[] {
  if (!input.section) return [];
  const [a, b] = sectionEnds(input.section, frame);
  const angle = Math.atan2(b[1] - a[1], b[0] - a[0]);
  const across: Point = [-7 * Math.sin(angle), 7 * Math.cos(angle)];
  const [light, dark] = [tokens['isolabel-on-dark'], tokens.isolabel];
  const end = (at: Point, letter: string, way: 1 | -1): Shape[] => [
    line(
      [
        [at[0] - across[0], at[1] - across[1]],
        [at[0] + across[0], at[1] + across[1]],
      ],
      { stroke: dark, lineWidth: 2 },
    ),
    text([at[0] + 15 * way * Math.cos(angle), at[1] + 15 * way * Math.sin(angle)], letter, {
      fill: dark,
      size: 15,
      weight: 600,
      halo: { colour: light, width: 4 },
    }),
  ];
  return [
    line([a, b], { stroke: light, lineWidth: 4, opacity: 0.5 }),
    line([a, b], { stroke: dark, lineWidth: 1.5, lineDash: [12, 3, 2, 3] }),
    ...end(a, 'A', -1),
    ...end(b, 'A′', 1),
  ];
}

/** The set-point: a spark-coloured diamond with four sight marks. The only accent on the map. */
export function setPointMark({ input, tokens }: Scene, frame: Frame): Shape[] {
  if (!input.setPoint) return [];
  const [x, y] = frame.at(input.setPoint.x, input.setPoint.y);
  const sights = `M${x - 24} ${y}H${x - 11}M${x + 11} ${y}H${x + 24}M${x} ${y - 24}V${y - 11}M${x} ${y + 11}V${y + 24}`;
  return [
    path(sights, { stroke: tokens['spark-halo'], lineWidth: 4.5 }),
    path(sights, { stroke: tokens.spark, lineWidth: 2.2 }),
    path(`M${x} ${y - 8}L${x + 8} ${y}L${x} ${y + 8}L${x - 8} ${y}Z`, {
      fill: tokens.spark,
      stroke: tokens['spark-halo'],
      lineWidth: 1.6,
    }),
  ];
}
