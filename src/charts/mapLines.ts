import { formatPlain } from '@/lib/format';
import {
  bandLevels,
  isolines,
  lengths,
  pathOf,
  placeLabel,
  teeth,
  withGap,
  type Obstacle,
  type Px,
} from './contourGeometry';
import { gridOf, nearest, type GoalLine, type MapRun, type Scales } from './mapScales';

/** What the lines of a map are drawn from. */
export interface LineInput {
  readonly predicted: readonly (readonly number[])[];
  readonly feasible: readonly (readonly boolean[])[];
  readonly goals: readonly GoalLine[];
  readonly runs: readonly MapRun[];
  readonly setPoint: { readonly x: number; readonly y: number };
  readonly section: readonly [readonly [number, number], readonly [number, number]] | null;
}

const SECTION_DOTS = 40;

/** Labels keep off the section line: dots along it stand in the way. */
function alongSection(
  section: LineInput['section'],
  px: (value: number) => number,
  py: (value: number) => number,
): Obstacle[] {
  if (!section) return [];
  const [[ax, ay], [bx, by]] = section;
  return Array.from({ length: SECTION_DOTS + 1 }, (_, i) => {
    const share = i / SECTION_DOTS;
    return { x: px(ax + share * (bx - ax)), y: py(ay + share * (by - ay)), radius: 2 };
  });
}

export interface DrawnLine {
  readonly key: string;
  readonly path: string;
  readonly width: number;
  readonly isDark: boolean;
  readonly teeth?: string;
  readonly label?: { readonly at: Px; readonly angle: number; readonly text: string };
}

/** Isolines with labels in gaps of their own, goal lines first so that they win the room. */
export function drawLines(
  input: LineInput,
  scales: Scales,
): { lines: DrawnLine[]; goals: DrawnLine[]; levels: number[] } {
  const { predicted, feasible, goals, runs, setPoint, section } = input;
  const { box, px, py } = scales;
  const shown = predicted.flatMap((row, j) => row.filter((_, i) => feasible[j]?.[i] === true));
  const values = shown.length > 0 ? shown : predicted.flat();
  const { levels, step } = bandLevels(Math.min(...values), Math.max(...values));
  const mask = feasible.map((row) => row.map(Number));
  const isFree = (point: Px) => nearest(mask, box, point) === 1;
  const obstacles: Obstacle[] = [
    ...runs.map(({ x, y, isOnSlice }) => ({ x: px(x), y: py(y), radius: isOnSlice ? 12 : 4 })),
    { x: px(setPoint.x), y: py(setPoint.y), radius: 22 },
    ...alongSection(section, px, py),
  ];
  const draw = (
    line: Px[],
    text: string,
    look: { key: string; width: number; isDark: boolean; room: number },
  ): DrawnLine & { pieces: Px[][] } => {
    const label = placeLabel(line, text, isFree, obstacles);
    const sums = label ? lengths(line) : [];
    const pieces = label ? withGap(line, sums, label.gap) : [line];
    if (label) obstacles.push({ x: label.at[0], y: label.at[1], radius: look.room });
    return {
      key: look.key,
      path: pieces.map(pathOf).join(''),
      width: look.width,
      isDark: look.isDark,
      pieces,
      ...(label ? { label: { at: label.at, angle: label.angle, text } } : {}),
    };
  };
  const goalLines = goals.flatMap(({ words, values: field, level, holdsAbove }, g) =>
    isolines(gridOf(field, box), level).map((line, i): DrawnLine => {
      const drawn = draw(line, words, {
        key: `goal ${g} ${i}`,
        width: 1.8,
        isDark: false,
        room: 34,
      });
      const holds = (point: Px) => nearest(field, box, point) > level === holdsAbove;
      return { ...drawn, teeth: drawn.pieces.map((piece) => teeth(piece, holds)).join('') };
    }),
  );
  const grid = gridOf(predicted, box);
  const goalLevels = new Set(
    goals.filter(({ values: v }) => v === predicted).map(({ level }) => level),
  );
  const lines = levels
    .filter((level) => !goalLevels.has(level))
    .flatMap((level, k) => {
      const isIndex = Math.abs(Math.round(level / (2 * step)) * 2 * step - level) < 1e-9 * step;
      const isDark = levels.indexOf(level) >= 5;
      return isolines(grid, level).map((line, i): DrawnLine =>
        draw(line, formatPlain(level), {
          key: `${level} ${k} ${i}`,
          width: isIndex ? 1.3 : 0.8,
          isDark,
          room: 14,
        }),
      );
    });
  return { lines, goals: goalLines, levels };
}
