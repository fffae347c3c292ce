import type { Frame } from '../frame';
import { distance, lengths, pointAt, type Point, type Polyline } from '../geometry';
import type { Obstacle } from '../labels';
import { area, text, type Shape } from '../shapes';
import { linesOf, settableRings, valueUnder, type Field } from './field';
import type { MapLimit, Scene } from './mapInput';

const OFFSET = 13;
const REACH = 40;
/** Where along its edge a name may stand, the wished places first. */
const PLACES = [0.5, 0.38, 0.62, 0.28, 0.72];

const longest = (lines: readonly Polyline[]): Polyline | null =>
  lines.reduce<Polyline | null>(
    (best, line) =>
      !best || (lengths(line).at(-1) ?? 0) > (lengths(best).at(-1) ?? 0) ? line : best,
    null,
  );

/** The first place along the edge that nothing else needs; the middle when all are taken. */
function freePlace(
  edge: Polyline,
  along: readonly number[],
  obstacles: readonly Obstacle[],
): number {
  const whole = along.at(-1)!;
  const isFree = (share: number) => {
    const at = pointAt(edge, along, share * whole);
    return obstacles.every((each) => each.isSoft || distance(each.at, at) > each.radius + REACH);
  };
  return whole * (PLACES.find(isFree) ?? 0.5);
}

/** What an edge's name is placed by. */
interface Edging {
  readonly scene: Scene;
  readonly field: Field;
  readonly frame: Frame;
  readonly obstacles: readonly Obstacle[];
}

/** The limit's name along its edge, on the side that cannot be had. */
function edgeName(limit: MapLimit, { scene, field, frame, obstacles }: Edging): Shape[] {
  const edge = longest(linesOf(limit.margin, 0, field, frame));
  if (!edge) return [];
  const along = lengths(edge);
  if (along.at(-1)! < 2 * REACH) return [];
  const middle = freePlace(edge, along, obstacles);
  const at = pointAt(edge, along, middle);
  const [a, b] = [pointAt(edge, along, middle - REACH), pointAt(edge, along, middle + REACH)];
  let angle = Math.atan2(b[1] - a[1], b[0] - a[0]);
  const normal: Point = [-Math.sin(angle), Math.cos(angle)];
  const marginAt = valueUnder(limit.margin, field, frame);
  const isOut = marginAt([at[0] + 6 * normal[0], at[1] + 6 * normal[1]]) < 0;
  const way = isOut ? OFFSET : -OFFSET;
  if (angle > Math.PI / 2) angle -= Math.PI;
  if (angle < -Math.PI / 2) angle += Math.PI;
  const words = scene.isNarrow ? (limit.shortLabel ?? limit.label) : limit.label;
  return [
    text([at[0] + way * normal[0], at[1] + way * normal[1]], words, {
      fill: scene.tokens['ink-2'],
      angle,
      halo: { colour: scene.tokens.surface, width: 6 },
    }),
  ];
}

/** The ink border of what can be had, and what stands in the way beyond it. */
export function edges(edging: Edging): Shape[] {
  const { scene, field, frame } = edging;
  return [
    area(settableRings(field, frame), { stroke: scene.tokens.ink, lineWidth: 1.4 }),
    ...scene.input.limits.flatMap((limit) => edgeName(limit, edging)),
  ];
}
