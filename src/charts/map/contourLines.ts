import { bandOf, FIRST_DARK_BAND, isIndex } from '../bands';
import type { Frame } from '../frame';
import { withGap, type Point, type Polyline } from '../geometry';
import { placeLabel, type Obstacle, type PlacedLabel } from '../labels';
import { group, line, path, text, type Shape } from '../shapes';
import { teeth } from '../teeth';
import { formatPlain } from '@/lib/format';
import { isSettable, linesOf, settableRings, valueUnder, type Field } from './field';
import type { MapGoal, Scene } from './mapInput';

/** Lines and labels so far; labels take room, so the later ones find what is left. */
interface Drawing {
  readonly scene: Scene;
  readonly field: Field;
  readonly frame: Frame;
  readonly lines: Shape[];
  readonly labels: Shape[];
  readonly obstacles: Obstacle[];
  readonly isFree: (pixel: Point) => boolean;
}

const EDGE_CLEARANCE = 9;

function gapped(points: Polyline, label: PlacedLabel | null): Polyline[] {
  return label ? withGap(points, label.from, label.to) : [points];
}

function drawGoal(goal: MapGoal, drawing: Drawing) {
  const { scene, field, frame } = drawing;
  const { tokens } = scene;
  const valueAt = valueUnder(goal.values, field, frame);
  const holds = (pixel: Point) =>
    goal.side === 'atLeast' ? valueAt(pixel) > goal.level : valueAt(pixel) < goal.level;
  for (const points of linesOf(goal.values, goal.level, field, frame)) {
    const label = placeLabel(points, { text: goal.label, ...drawing });
    for (const part of gapped(points, label)) {
      drawing.lines.push(
        line(part, { stroke: tokens['isolabel-on-dark'], lineWidth: 3.6, opacity: 0.55 }),
        line(part, { stroke: tokens.isolabel, lineWidth: 1.8 }),
        path(teeth(part, holds), { fill: tokens.isolabel }),
      );
    }
    if (!label) continue;
    drawing.obstacles.push({ at: label.at, radius: 34 });
    // the label's colour follows the band below it, not the goal's own response
    const isDark =
      bandOf(field.bands, valueUnder(scene.input.z, field, frame)(label.at)) >= FIRST_DARK_BAND - 1;
    drawing.labels.push(
      text(label.at, goal.label, {
        fill: isDark ? tokens['isolabel-on-dark'] : tokens.isolabel,
        weight: 600,
        angle: label.angle,
      }),
    );
  }
}

function drawIsoline(limit: number, drawing: Drawing) {
  const { scene, field, frame } = drawing;
  const { input, tokens } = scene;
  const isDark = bandOf(field.bands, limit) >= FIRST_DARK_BAND;
  const stroke = isDark ? tokens['isolabel-on-dark'] : tokens.isoline;
  const weight = isIndex(field.bands, limit)
    ? { lineWidth: 1.3 }
    : { lineWidth: 0.8, opacity: 0.8 };
  const words = formatPlain(limit);
  for (const points of linesOf(input.z, limit, field, frame)) {
    const label = placeLabel(points, { text: words, ...drawing });
    for (const part of gapped(points, label)) drawing.lines.push(line(part, { stroke, ...weight }));
    if (!label) continue;
    drawing.obstacles.push({ at: label.at, radius: 14 });
    drawing.labels.push(
      text(label.at, words, {
        fill: isDark ? tokens['isolabel-on-dark'] : tokens.isolabel,
        weight: 500,
        angle: label.angle,
      }),
    );
  }
}

/** A goal on the mapped response at a limit of a band is that limit's line already. */
function isGoalLine({ input }: Scene, limit: number): boolean {
  return input.goals.some(({ values, level }) => values === input.z && level === limit);
}

/** Goal lines with teeth, then index lines, then the others: in the order in which labels get their room. */
export function contourLines(
  scene: Scene,
  field: Field,
  frame: Frame,
  obstacles: readonly Obstacle[],
): Shape[] {
  const drawing: Drawing = {
    scene,
    field,
    frame,
    lines: [],
    labels: [],
    obstacles: [...obstacles],
    isFree: isSettable(field, frame, EDGE_CLEARANCE),
  };
  const { limits } = field.bands;
  const order = [
    ...limits.filter((limit) => isIndex(field.bands, limit)),
    ...limits.filter((limit) => !isIndex(field.bands, limit)),
  ].filter((limit) => !isGoalLine(scene, limit));
  for (const goal of scene.input.goals) drawGoal(goal, drawing);
  for (const limit of order) drawIsoline(limit, drawing);
  return [group(drawing.lines, settableRings(field, frame)), ...drawing.labels];
}
