import { isCategorical } from '../coding/factor';
import { StatsError } from '../errors';
import type { Random } from '../random/random';
import { shuffled } from '../random/random';
import { pointsOf, type CodedDesign } from './codedDesign';
import type { SettableLattice } from './settableLattice';

const STARTS = 8;
/** Exchanges tried per run and start. */
const TRIES_PER_RUN = 120;
/** Power of the distances: near to their minimum, yet smooth. */
const POWER = 15;

/** Share of each factor’s range, evenly over the runs: one run in each slice. */
function hypercube(lattice: SettableLattice, runs: number, random: Random): number[][] {
  const { region } = lattice;
  const columns = region.factors.map((factor, i) => {
    const slices = Array.from({ length: runs }, (_, r) => r);
    const column = slices.map((slice) => {
      if (isCategorical(factor)) return slice % factor.levels.length;
      const share = (slice + 0.5) / runs;
      return region.low[i]! + share * (region.high[i]! - region.low[i]!);
    });
    return shuffled(column, random);
  });
  return Array.from({ length: runs }, (_, r) => columns.map((column) => column[r]!));
}

/** Σ 1/distance^POWER over pairs, and the number of points outside the limits. */
function badness(lattice: SettableLattice, points: readonly (readonly number[])[]) {
  const { region } = lattice;
  const spans = region.low.map((low, i) => region.high[i]! - low);
  let crowding = 0;
  for (let a = 0; a < points.length; a++)
    for (let b = 0; b < a; b++) {
      let squared = 0;
      for (let i = 0; i < spans.length; i++)
        squared += ((points[a]![i]! - points[b]![i]!) / spans[i]!) ** 2;
      crowding += (squared + 1e-12) ** (-POWER / 2);
    }
  const outside = points.filter((point) => !region.isFeasible(point)).length;
  return { outside, crowding };
}

type Badness = ReturnType<typeof badness>;
const isBetter = (a: Badness, b: Badness) =>
  a.outside < b.outside || (a.outside === b.outside && a.crowding < b.crowding);

/** Exchanges coordinates between runs: stays a Latin hypercube, moves points apart and inside. */
function spread(lattice: SettableLattice, start: number[][], random: Random) {
  let points = start;
  let value = badness(lattice, points);
  const tries = Math.min(TRIES_PER_RUN * start.length, 6000);
  for (let t = 0; t < tries; t++) {
    const i = random.below(lattice.levels.length);
    const [a, b] = [random.below(start.length), random.below(start.length)];
    if (a === b || points[a]![i] === points[b]![i]) continue;
    const next = points
      .with(a, points[a]!.with(i, points[b]![i]!))
      .with(b, points[b]!.with(i, points[a]![i]!));
    const nextValue = badness(lattice, next);
    if (!isBetter(nextValue, value)) continue;
    points = next;
    value = nextValue;
  }
  return { points, value };
}

/**
 * A maximin Latin hypercube: each factor’s range cut into as many slices as there are runs, one run in
 * each, far apart; then snapped to settable values. Points that cannot be brought inside the limits are
 * drawn anew from the settable lattice.
 *
 * @throws StatsError `too-few-runs` below two runs.
 * @see McKay, Beckman & Conover (1979), Technometrics 21: 239–245; Morris & Mitchell (1995), J. Statist.
 *   Plann. Inference 43: 381–402.
 */
export function spaceFilling(lattice: SettableLattice, runs: number, random: Random): CodedDesign {
  if (runs < 2)
    throw new StatsError('too-few-runs', 'A space-filling design has two runs or more.');
  let best: ReturnType<typeof spread> | null = null;
  for (let start = 0; start < STARTS; start++) {
    const found = spread(lattice, hypercube(lattice, runs, random), random);
    if (!best || isBetter(found.value, best.value)) best = found;
  }
  const points = best!.points.map((point) => {
    const isInside = lattice.region.isFeasible(point);
    return (isInside ? lattice.nearest(point) : null) ?? lattice.draw(random);
  });
  return { points: pointsOf(points, 'spaceFilling'), blocks: 1 };
}
