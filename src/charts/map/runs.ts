import type { Frame } from '../frame';
import type { Point } from '../geometry';
import type { Obstacle } from '../labels';
import { rosette } from '../ring';
import { circle, path, ring, text, type Shape } from '../shapes';
import { MONO } from '../tokens';
import type { MapRun, Scene } from './mapInput';

const RADIUS = 6;
const GHOST_RADIUS = 2.6;
/** From three replicates on they stand in a rosette. */
const ROSETTE_FROM = 3;

export interface PlacedRun {
  readonly run: MapRun;
  readonly at: Point;
}

interface Group {
  readonly centre: Point;
  readonly placed: readonly PlacedRun[];
}

function groupsOf(runs: readonly MapRun[], frame: Frame): Group[] {
  const bySetting = new Map<string, MapRun[]>();
  for (const run of runs) {
    const setting = `${run.x} ${run.y}`;
    bySetting.set(setting, [...(bySetting.get(setting) ?? []), run]);
  }
  return [...bySetting.values()].map((group) => {
    const centre = frame.at(group[0]!.x, group[0]!.y);
    return { centre, placed: placeGroup(group, centre) };
  });
}

function placeGroup(group: readonly MapRun[], centre: Point): PlacedRun[] {
  if (group.length === 1) return [{ run: group[0]!, at: centre }];
  if (group.length < ROSETTE_FROM)
    return group.map((run, k) => ({ run, at: [centre[0] + (k === 0 ? -7 : 7), centre[1]] }));
  const spots = rosette(centre, group.length, Math.max(15, group.length * 2.4));
  return group.map((run, k) => ({ run, at: spots[k]! }));
}

/** Where each run near the slice is drawn: replicates step aside for each other. */
export function placedRuns(runs: readonly MapRun[], frame: Frame): PlacedRun[] {
  return groupsOf(
    runs.filter(({ onSlice }) => onSlice),
    frame,
  ).flatMap(({ placed }) => placed);
}

/** Rings and ghosts, as labels must avoid them. */
export function runObstacles({ input }: Scene, frame: Frame): Obstacle[] {
  const ghosts = input.runs.filter(({ onSlice }) => !onSlice);
  const rosettes = groupsOf(
    input.runs.filter(({ onSlice }) => onSlice),
    frame,
  ).filter(({ placed }) => placed.length >= ROSETTE_FROM);
  return [
    ...placedRuns(input.runs, frame).map(({ at }) => ({ at, radius: 11 })),
    // their count stands to the left
    ...rosettes.map(({ centre: [x, y] }) => ({ at: [x - 46, y] as const, radius: 20 })),
    ...ghosts.map(({ x, y }) => ({ at: frame.at(x, y), radius: 4, isSoft: true })),
  ];
}

/** Ghosts first, then the rings near the slice with their numbers; the focused one has a second circle. */
export function runs({ input, tokens, isNarrow }: Scene, frame: Frame): Shape[] {
  const colours = {
    stroke: tokens.isolabel,
    fill: tokens.isolabel,
    ground: tokens['isolabel-on-dark'],
  };
  const halo = { colour: tokens['isolabel-on-dark'], width: 3 };
  const near = input.runs.filter(({ onSlice }) => onSlice);
  const ghosts = input.runs
    .filter(({ onSlice }) => !onSlice)
    .map(({ x, y }) =>
      circle(frame.at(x, y), GHOST_RADIUS, {
        fill: colours.ground,
        stroke: colours.stroke,
        opacity: 0.6,
      }),
    );
  const rings = groupsOf(near, frame).flatMap(({ centre: [x, y], placed }) => {
    const shapes: Shape[] = [];
    if (placed.length >= ROSETTE_FROM)
      shapes.push(
        path(`M${x - 4} ${y}h8M${x} ${y - 4}v8`, { stroke: colours.stroke, lineWidth: 1.2 }),
        text([x - 26, y], `${placed.length} runs`, { fill: tokens.isolabel, align: 'right', halo }),
      );
    for (const { run, at } of placed) {
      shapes.push(...ring(at, RADIUS, run.residualShare, colours));
      if (run.id === input.focusedRun)
        shapes.push(circle(at, RADIUS + 4, { stroke: tokens.focus, lineWidth: 2 }));
    }
    if (placed.length < ROSETTE_FROM && !isNarrow)
      shapes.push(...numbers(placed, frame, tokens, halo));
    return shapes;
  });
  return [...ghosts, ...rings];
}

/** Run numbers beside their rings, on the side where there is room. */
function numbers(
  placed: readonly PlacedRun[],
  { left, width }: Frame,
  tokens: Scene['tokens'],
  halo: { colour: string; width: number },
): Shape[] {
  return placed.map(({ run, at: [x, y] }) => {
    const isAtEdge = x > left + width - 30;
    return text([x + (isAtEdge ? -10 : 10), y - 9], String(run.id), {
      fill: tokens.isolabel,
      align: isAtEdge ? 'right' : 'left',
      size: 11,
      family: MONO,
      halo,
    });
  });
}
