import { fromCoded, toCoded } from '../coding/code';
import { isCategorical } from '../coding/factor';
import { snap } from '../coding/snap';
import { StatsError } from '../errors';
import { seeded, shuffled } from '../random/random';
import { isInside, type Region } from './region';

const STARTS = 200;
const MAX_REPAIRS = 2000;

function smallestDistance(points: readonly (readonly number[])[]): number {
  let smallest = Infinity;
  for (let i = 0; i < points.length; i++)
    for (let j = 0; j < i; j++) {
      const distance = points[i]!.reduce((sum, x, f) => sum + (x - points[j]![f]!) ** 2, 0);
      smallest = Math.min(smallest, distance);
    }
  return smallest;
}

/**
 * A maximin Latin hypercube on the settable lattice: of many seeded hypercubes, snapped, the one whose
 * closest two points are farthest apart. Points outside the constraints are drawn anew.
 *
 * @returns coded points.
 * @throws StatsError `no-feasible-point` when the constraints leave too little room.
 * @see McKay, Beckman & Conover (1979), Technometrics 21: 239–245; Morris & Mitchell (1995).
 */
export function spaceFilling(region: Region, count: number, seed: number): number[][] {
  const { factors, axes } = region;
  let best: number[][] = [];
  let bestDistance = -1;
  for (let start = 0; start < STARTS; start++) {
    const random = seeded(seed, `hypercube ${start}`);
    const columns = axes.map(() =>
      shuffled(
        Array.from({ length: count }, (_, i) => i),
        random,
      ),
    );
    const at = (axis: (typeof axes)[number], f: number, share: number) => {
      const factor = factors[f]!;
      if (isCategorical(factor))
        return Math.min(axis.values.length - 1, Math.floor(share * axis.values.length));
      const low = axis.coded[0]!;
      const high = axis.coded.at(-1)!;
      return snap(factor, fromCoded(factor, low + share * (high - low)));
    };
    const points = Array.from({ length: count }, (_, i) => {
      let values = axes.map((axis, f) => at(axis, f, (columns[f]![i]! + random.next()) / count));
      for (let repair = 0; !isInside(region, values); repair++) {
        if (repair > MAX_REPAIRS)
          throw new StatsError(
            'no-feasible-point',
            'The limits leave almost no settable combination in these ranges.',
          );
        values = axes.map((axis, f) => at(axis, f, random.next()));
      }
      return values.map((value, f) => {
        const factor = factors[f]!;
        return isCategorical(factor) ? value : toCoded(factor, value);
      });
    });
    const distance = smallestDistance(points);
    if (distance > bestDistance) {
      best = points;
      bestDistance = distance;
    }
  }
  return best;
}
