import { isCategorical } from '../coding/factor';
import { StatsError } from '../errors';
import type { Random } from '../random/random';
import { levelGrid } from './codedDesign';
import { settableLevels, spreadOver, type DesignRegion } from './designRegion';

/** Lattices up to this size are listed, so that a narrow feasible part is not missed. */
const LISTED = 20_000;
const TRIES = 2000;

/** The points that can be dialled in inside the region. */
export interface SettableLattice {
  readonly region: DesignRegion;
  /** Coded values of each factor, ascending. */
  readonly levels: readonly (readonly number[])[];
  /** A point at random; every one can come. */
  readonly draw: (random: Random) => number[];
  /** The settable feasible point nearest to a point, or null when its neighbours break the limits. */
  readonly nearest: (point: readonly number[]) => number[] | null;
}

function nearestLevel(levels: readonly number[], value: number): number {
  return levels.reduce((best, level) =>
    Math.abs(level - value) < Math.abs(best - value) ? level : best,
  );
}

/** The levels on both sides of a value. */
function neighbours(levels: readonly number[], value: number): number[] {
  const above = levels.findIndex((level) => level >= value);
  if (above < 0) return [levels.at(-1)!];
  return above === 0 ? [levels[0]!] : [levels[above - 1]!, levels[above]!];
}

function nearestFeasible(
  region: DesignRegion,
  levels: readonly (readonly number[])[],
  point: readonly number[],
): number[] | null {
  const direct = point.map((x, i) => nearestLevel(levels[i]!, x));
  if (region.isFeasible(direct)) return direct;
  const around = levelGrid(point.map((x, i) => neighbours(levels[i]!, x)));
  const distance = (other: readonly number[]) =>
    other.reduce((sum, x, i) => sum + (x - point[i]!) ** 2, 0);
  return (
    around
      .filter((other) => region.isFeasible(other))
      .sort((a, b) => distance(a) - distance(b))[0] ?? null
  );
}

/**
 * The settable lattice of a region.
 *
 * @throws StatsError `no-feasible-point` when no settable point meets the limits.
 */
export function settableLattice(region: DesignRegion): SettableLattice {
  const levels = settableLevels(region);
  const size = levels.reduce((product, { length }) => product * length, 1);
  const listed =
    region.hasLimits && size <= LISTED ? levelGrid(levels).filter(region.isFeasible) : null;
  const none = () =>
    new StatsError(
      'no-feasible-point',
      'The limits leave no settable point inside the ranges. Loosen a limit or widen a range.',
    );
  if (listed?.length === 0) throw none();
  const nearest = (point: readonly number[]) => nearestFeasible(region, levels, point);
  const draw = (random: Random): number[] => {
    if (listed) return listed[random.below(listed.length)]!;
    for (let i = 0; i < TRIES; i++) {
      const point = levels.map((each) => each[random.below(each.length)]!);
      if (region.isFeasible(point)) return point;
    }
    const inside = spreadOver(region, 50);
    const point = nearest(inside[random.below(inside.length)]!);
    if (point) return point;
    throw none();
  };
  return { region, levels, draw, nearest };
}

/** Whether a factor is set freely between its bounds. */
export function isContinuous(region: DesignRegion, i: number): boolean {
  const factor = region.factors[i]!;
  return !isCategorical(factor) && factor.step === undefined;
}
