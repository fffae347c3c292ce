import { StatsError } from '../errors';
import type { RowAt } from '../model/compileRow';
import type { Random } from '../random/random';
import type { ApproximateDesign } from './approximateDesign';
import { gainOf, oldRowOf, stateOfRows, type Criterion, type ExchangeState } from './exchangeState';
import { isContinuous, type SettableLattice } from './settableLattice';

/** A run of the design: where, and in which block (from 1). */
export interface Placed {
  readonly point: readonly number[];
  readonly block: number;
}

export interface OptimalTask {
  readonly lattice: SettableLattice;
  readonly rowAt: RowAt;
  /** p, the number of terms. */
  readonly terms: number;
  /** p × p mean of ff′ over the region. */
  readonly moments: Float64Array;
  readonly criterion: Criterion;
  readonly blocks: number;
  /** Runs that stay. */
  readonly kept: readonly Placed[];
  /** Block of each run to be found. */
  readonly free: readonly number[];
  /** Where the best approximate design has its weight: half of the starts begin there. */
  readonly support: ApproximateDesign['support'];
}

export interface OptimalDesign {
  readonly points: readonly Placed[];
  /** Value of the criterion, larger is better, of the start and of the result. */
  readonly startValue: number;
  readonly value: number;
}

/** Gains below this are rounding. */
const MIN_GAIN = 1e-8;
const MAX_PASSES = 40;
const ROW_PASSES = 3;
const MAX_ROWS = 150;
/** More settable values than this are thinned at first; the last passes see all neighbours. */
const MAX_LEVELS = 13;
/** Runs × terms² above which a design is made with three values a factor and without the last passes. */
const LARGE = 60_000;
const LARGE_LEVELS = 3;
/** Multiplications spent on one design: the starts are as many as it allows. */
const WORK = 1.2e8;
const MAX_STARTS = 24;
const MIN_STARTS = 1;
/** Steps around a value that the last passes try, in coded units for a continuous factor. */
const REFINE = [0.1, 0.05, 0.02, 0.008, 0.003, 0.001];

const isLarge = ({ free, terms }: OptimalTask) => free.length * terms ** 2 > LARGE;

function thinned(levels: readonly number[], most: number): readonly number[] {
  if (levels.length <= most) return levels;
  const picked = Array.from(
    { length: most },
    (_, i) => levels[Math.round((i * (levels.length - 1)) / (most - 1))]!,
  );
  return [...new Set(picked)];
}

interface Working {
  readonly task: OptimalTask;
  readonly points: Placed[];
  readonly rows: Float64Array[];
  state: ExchangeState;
}

function rowOf({ rowAt, terms, blocks }: OptimalTask, { point, block }: Placed): Float64Array {
  const row = new Float64Array(terms + blocks - 1);
  rowAt(point, row);
  // the row is longer than the terms: the rest are sum-to-zero block columns
  for (let b = 1; b < blocks; b++) row[terms + b - 1] = block === blocks ? -1 : block === b ? 1 : 0;
  return row;
}

/** Moments padded with zeros: predictions are at the mean of the blocks. */
function padded({ moments, terms, blocks }: OptimalTask): Float64Array {
  const p = terms + blocks - 1;
  const out = new Float64Array(p * p);
  for (let a = 0; a < terms; a++) out.set(moments.subarray(a * terms, (a + 1) * terms), a * p);
  return out;
}

function begin(task: OptimalTask, points: Placed[]): Working | null {
  const rows = [...task.kept, ...points].map((each) => rowOf(task, each));
  const state = stateOfRows(rows, task.criterion, padded(task));
  return state && { task, points, rows, state };
}

/** The values to try for one coordinate of a point. */
type Choices = (point: readonly number[], i: number) => readonly number[];

/** Puts the best of some points in the place of run `r`; whether that helped. */
function improveRun(work: Working, r: number, choices: readonly (readonly number[])[]): boolean {
  const { task, points, rows, state } = work;
  const at = task.kept.length + r;
  const old = oldRowOf(state, rows[at]!);
  const { block } = points[r]!;
  let best: { placed: Placed; row: Float64Array; gain: number } | null = null;
  for (const point of choices) {
    if (!task.lattice.region.isFeasible(point)) continue;
    const placed = { point, block };
    const row = rowOf(task, placed);
    const gain = gainOf(state, old, row);
    if (gain > MIN_GAIN && gain > (best?.gain ?? 0)) best = { placed, row, gain };
  }
  if (!best) return false;
  const before = rows[at]!;
  rows[at] = best.row;
  const next = stateOfRows(rows, task.criterion, state.moments);
  if (!next || next.value <= state.value) {
    rows[at] = before;
    return false;
  }
  points[r] = best.placed;
  work.state = next;
  return true;
}

function coordinatePass(work: Working, choicesOf: Choices): boolean {
  let isBetter = false;
  work.points.forEach((_, r) => {
    for (let i = 0; i < work.task.lattice.levels.length; i++) {
      const { point } = work.points[r]!;
      const choices = choicesOf(point, i)
        .filter((value) => value !== point[i])
        .map((value) => point.with(i, value));
      if (improveRun(work, r, choices)) isBetter = true;
    }
  });
  return isBetter;
}

function rowPass(work: Working, rows: readonly (readonly number[])[]): boolean {
  return work.points.map((_, r) => improveRun(work, r, rows)).some(Boolean);
}

function passes(work: Working, choicesOf: Choices): void {
  for (let pass = 0; pass < MAX_PASSES; pass++) if (!coordinatePass(work, choicesOf)) return;
}

/** Settable neighbours of a value; small steps to both sides for a continuous factor. */
function refined({ lattice }: OptimalTask, step: number): Choices {
  return (point, i) => {
    if (isContinuous(lattice.region, i)) {
      const { low, high } = lattice.region;
      return [point[i]! - step, point[i]! + step].filter((x) => x >= low[i]! && x <= high[i]!);
    }
    const levels = lattice.levels[i]!;
    const at = levels.indexOf(point[i]!);
    return [at - 2, at - 1, at + 1, at + 2].flatMap((j) => levels[j] ?? []);
  };
}

function improve(work: Working, corners: readonly (readonly number[])[]): void {
  const { task } = work;
  const most = isLarge(task) ? LARGE_LEVELS : MAX_LEVELS;
  const levels = task.lattice.levels.map((each) => thinned(each, most));
  passes(work, (_, i) => levels[i]!);
  // whole rows too: along a slanted limit no single coordinate can move
  for (let pass = 0; pass < ROW_PASSES && rowPass(work, corners); pass++)
    passes(work, (_, i) => levels[i]!);
  if (isLarge(task)) return;
  for (const step of REFINE) passes(work, refined(task, step));
}

/** A start: points at random, or where the approximate design has its weight. */
function startOf(
  task: OptimalTask,
  corners: readonly (readonly number[])[],
  random: Random,
): Placed[] {
  const { lattice, support, free } = task;
  const fromSupport = corners.length > 0 && random.below(2) === 0;
  const total = support.reduce((sum, { weight }) => sum + weight, 0);
  return free.map((block) => {
    if (!fromSupport) return { point: lattice.draw(random), block };
    let rest = random.next() * total;
    const place = support.findIndex(({ weight }) => (rest -= weight) <= 0);
    const point = lattice.nearest(support[Math.max(place, 0)]!.point);
    return { point: point ?? lattice.draw(random), block };
  });
}

/** Settable points where the approximate design has most weight, for whole-row exchange. */
function heaviest({ lattice, support }: OptimalTask): number[][] {
  const seen = new Set<string>();
  return [...support]
    .sort((a, b) => b.weight - a.weight)
    .slice(0, MAX_ROWS)
    .flatMap(({ point }) => {
      const nearest = lattice.nearest(point);
      if (!nearest || seen.has(nearest.join())) return [];
      seen.add(nearest.join());
      return [nearest];
    });
}

function startCount(task: OptimalTask): number {
  const { lattice, terms, free } = task;
  if (isLarge(task)) return MIN_STARTS;
  const tried = lattice.levels.reduce((sum, { length }) => sum + Math.min(length, MAX_LEVELS), 0);
  const onePass = free.length * tried * terms ** 2;
  return Math.max(MIN_STARTS, Math.min(MAX_STARTS, Math.floor(WORK / (8 * onePass))));
}

/**
 * An exact design that is best by D or I for a model: coordinate exchange on the settable lattice inside
 * the limits, from many seeded starts, then whole-row exchange and fine steps. The result is never worse
 * than its start.
 *
 * @returns the runs found, in the order of `free`; kept runs are not repeated.
 * @throws StatsError `too-few-runs` with fewer runs than terms; `rank-deficient` when no start separates
 *   the terms.
 * @see Meyer & Nachtsheim (1995), Technometrics 37: 60–69; Atkinson, Donev & Tobias (2007), ch. 12.
 */
export function optimalDesign(task: OptimalTask, random: Random): OptimalDesign {
  const needed = task.terms + task.blocks - 1;
  const runs = task.kept.length + task.free.length;
  if (runs < needed)
    throw new StatsError(
      'too-few-runs',
      `The model has ${needed} coefficients, so it needs ${needed} runs or more; there are ${runs}.`,
    );
  const places = heaviest(task);
  let best: OptimalDesign | null = null;
  for (let start = 0; start < startCount(task); start++) {
    const work = begin(task, startOf(task, places, random));
    if (!work) continue;
    const startValue = work.state.value;
    improve(work, places);
    if (!best || work.state.value > best.value)
      best = { points: work.points, startValue, value: work.state.value };
  }
  if (best) return best;
  throw new StatsError(
    'rank-deficient',
    'No settable runs inside the limits separate the terms of this model. Take a smaller model.',
  );
}
