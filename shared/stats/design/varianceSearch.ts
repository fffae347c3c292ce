import { isCategorical } from '../coding/factor';
import { bilinear } from '../linalg/cholesky';
import type { RowAt } from '../model/compileRow';
import type { Random } from '../random/random';
import { levelGrid } from './codedDesign';
import { spreadOver, type DesignRegion } from './designRegion';

/** Most candidates of a grid; larger grids are sampled. */
const MAX_CANDIDATES = 2500;
/** Grid lines along each numeric factor, by the number of factors; limits need a finer grid. */
const LINES_FREE: readonly number[] = [0, 21, 9, 5, 5, 3, 3, 3];
const LINES_LIMITED: readonly number[] = [0, 41, 31, 11, 5, 4, 3, 3];
const BISECTIONS = 30;

/** The point where a line from inside to outside leaves the region (the last point inside). */
function edgeBetween(
  region: DesignRegion,
  inside: readonly number[],
  outside: readonly number[],
): number[] {
  let good = [...inside];
  let bad = [...outside];
  for (let i = 0; i < BISECTIONS; i++) {
    const middle = good.map((x, j) => (x + bad[j]!) / 2);
    if (region.isFeasible(middle)) good = middle;
    else bad = middle;
  }
  return good;
}

function gridOf(region: DesignRegion): number[][] {
  const { factors, low, high, hasLimits } = region;
  const lines = (hasLimits ? LINES_LIMITED : LINES_FREE)[factors.length] ?? 0;
  if (lines === 0) return [];
  const levels = factors.map((factor, i) =>
    isCategorical(factor)
      ? factor.levels.map((_, level) => level)
      : Array.from({ length: lines }, (_, j) => low[i]! + ((high[i]! - low[i]!) * j) / (lines - 1)),
  );
  const size = levels.reduce((product, { length }) => product * length, 1);
  return size <= 4 * MAX_CANDIDATES ? levelGrid(levels) : [];
}

/** Where grid lines cross the limits: candidates that a grid alone would miss. */
function edgesOf(region: DesignRegion, inside: readonly number[][]): number[][] {
  const { factors, low, high } = region;
  const lines = LINES_LIMITED[factors.length] ?? 3;
  return inside.flatMap((point) =>
    factors.flatMap((factor, i) => {
      if (isCategorical(factor)) return [];
      const step = (high[i]! - low[i]!) / (lines - 1);
      return [-step, step].flatMap((move) => {
        const next = point.with(i, Math.min(high[i]!, Math.max(low[i]!, point[i]! + move)));
        return region.isFeasible(next) ? [] : [edgeBetween(region, point, next)];
      });
    }),
  );
}

/** Corners drawn at random, for many factors; those outside the limits are pulled to a point inside. */
function randomCorners(
  region: DesignRegion,
  inside: readonly number[][],
  random: Random,
): number[][] {
  const { factors, low, high } = region;
  return Array.from({ length: MAX_CANDIDATES }, (_, n) => {
    const corner = factors.map((factor, i) => {
      if (isCategorical(factor)) return random.below(factor.levels.length);
      // mostly ends, now and then the middle: where quadratic variances are large
      const draw = random.below(5);
      if (draw === 0) return (low[i]! + high[i]!) / 2;
      return draw < 3 ? low[i]! : high[i]!;
    });
    if (region.isFeasible(corner)) return corner;
    const anchor = inside[n % inside.length]!;
    const level = corner.map((x, i) => (isCategorical(factors[i]!) ? anchor[i]! : x));
    return edgeBetween(region, anchor, level);
  });
}

/**
 * Points among which the support of an optimal design and the largest prediction variance are looked
 * for: a grid with its crossings of the limits for few factors, else corners, edges and middles.
 */
export function candidatesOf(region: DesignRegion, random: Random): number[][] {
  const inside = spreadOver(region, 200);
  const grid = gridOf(region).filter((point) => region.isFeasible(point));
  if (grid.length === 0) return [...inside, ...randomCorners(region, inside, random)];
  if (!region.hasLimits) return grid;
  return [...grid, ...edgesOf(region, grid), ...inside.slice(0, 50)];
}

/** Moves tried from one start; the reach shrinks when none of a round is better. */
const ROUNDS = 24;
const FIRST_REACH = 0.25;

function moved(
  region: DesignRegion,
  point: readonly number[],
  reach: number,
  random: Random,
): number[] {
  const { factors, low, high } = region;
  // one factor, two, or all at once: along an axis, a slanted limit, anywhere
  const only =
    random.below(3) === 0 ? null : [random.below(factors.length), random.below(factors.length)];
  return point.map((x, i) => {
    if (only && !only.includes(i)) return x;
    const factor = factors[i]!;
    if (isCategorical(factor)) return random.below(factor.levels.length);
    const span = high[i]! - low[i]!;
    return Math.min(high[i]!, Math.max(low[i]!, x + reach * span * (2 * random.next() - 1)));
  });
}

export interface Variance {
  readonly point: readonly number[];
  /** f(x)′ A f(x). */
  readonly value: number;
}

export interface VarianceTask {
  readonly region: DesignRegion;
  readonly rowAt: RowAt;
  /** Inverse information matrix, p × p. */
  readonly inverse: Float64Array;
  readonly terms: number;
}

/**
 * Climbs from a start to a larger prediction variance by seeded random moves, kept inside the region.
 */
export function climb(task: VarianceTask, start: readonly number[], random: Random): Variance {
  const { region, rowAt, inverse, terms } = task;
  const row = new Float64Array(terms);
  const valueAt = (point: readonly number[]) => {
    rowAt(point, row);
    return bilinear(inverse, row, row);
  };
  let best: Variance = { point: start, value: valueAt(start) };
  let reach = FIRST_REACH;
  const moves = 6 + 4 * region.factors.length;
  for (let round = 0; round < ROUNDS; round++) {
    let isBetter = false;
    for (let move = 0; move < moves; move++) {
      let point = moved(region, best.point, reach, random);
      if (!region.isFeasible(point)) {
        point = point.map((x, i) => (isCategorical(region.factors[i]!) ? best.point[i]! : x));
        if (!region.isFeasible(point)) point = edgeBetween(region, best.point, point);
      }
      const value = valueAt(point);
      if (!(value > best.value)) continue;
      best = { point, value };
      isBetter = true;
    }
    if (!isBetter) reach /= 2;
  }
  return best;
}
