import type { Random } from '../random/random';
import type { DesignRegion } from './designRegion';
import type { SettableLattice } from './settableLattice';
import { candidatesOf } from './varianceSearch';

/** How good a settable point is; the search makes it large. */
export type Score = (point: readonly number[]) => number;

export interface ScoredPoint {
  readonly point: readonly number[];
  readonly score: number;
}

/** Points climbed from. */
const STARTS = 12;
/** Share of an axis that the first moves span. */
const FIRST_REACH = 4;

/** The levels at a distance on both sides of a value. */
function moves(levels: readonly number[], value: number, reach: number): number[] {
  const at = levels.indexOf(value);
  return [at - reach, at + reach].flatMap((i) => levels[i] ?? []);
}

/** From a settable point to one that no change of one factor, or of two by one step, makes better. */
function climb({ region, levels }: SettableLattice, start: ScoredPoint, score: Score): ScoredPoint {
  let best = start;
  const offer = (point: readonly number[]): boolean => {
    if (!region.isFeasible(point)) return false;
    const value = score(point);
    // also false for a score that is no number
    if (!(value > best.score)) return false;
    best = { point, score: value };
    return true;
  };
  const longest = Math.max(...levels.map(({ length }) => length));
  for (let reach = Math.max(1, Math.ceil(longest / FIRST_REACH)); reach >= 1;) {
    const from = best.point;
    const neighbours = levels.flatMap((each, i) =>
      moves(each, from[i]!, reach).map((value) => from.with(i, value)),
    );
    // along a slanted limit two factors have to move together
    const pairs = neighbours.flatMap((near) =>
      levels.flatMap((each, j) =>
        near[j] === from[j] ? moves(each, from[j]!, reach).map((value) => near.with(j, value)) : [],
      ),
    );
    const isBetter = [...neighbours, ...pairs].map(offer).some(Boolean);
    if (!isBetter) reach = reach === 1 ? 0 : Math.ceil(reach / 2);
  }
  return best;
}

/**
 * Settable points of a region ranked by a score, the best first: spread candidates, and what is reached
 * by climbing from the best of them. For smooth scores on lattices too large to be listed.
 *
 * @throws StatsError `no-feasible-point` when the limits leave no settable point.
 */
export function bestSettable(
  region: DesignRegion,
  lattice: SettableLattice,
  score: Score,
  random: Random,
): ScoredPoint[] {
  const seen = new Map<string, ScoredPoint>();
  for (const candidate of candidatesOf(region, random)) {
    const point = lattice.nearest(candidate) ?? lattice.draw(random);
    const key = point.join();
    if (!seen.has(key)) seen.set(key, { point, score: score(point) });
  }
  const ranked = (points: Iterable<ScoredPoint>) => [...points].sort((a, b) => b.score - a.score);
  for (const start of ranked(seen.values()).slice(0, STARTS)) {
    const top = climb(lattice, start, score);
    seen.set(top.point.join(), top);
  }
  return ranked(seen.values());
}
