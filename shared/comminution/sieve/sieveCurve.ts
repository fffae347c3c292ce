import { StatsError } from '../../stats/errors';
import { sumOf } from '../decimal';

export interface SieveMass {
  readonly apertureMm: number;
  readonly retainedG: number;
}

/** One sieve of the curve: share held back on it and share that passes it, in per cent of the sum. */
export interface SievePoint {
  readonly apertureMm: number;
  readonly retainedG: number;
  readonly retainedPercent: number;
  readonly passingPercent: number;
}

export interface SieveCurve {
  /** Coarse to fine. Empty when nothing was recovered: there is no share of nothing. */
  readonly points: readonly SievePoint[];
  readonly panPercent: number | null;
  readonly recoveredG: number;
}

function check(sieves: readonly SieveMass[], panG: number): void {
  const bad = [...sieves.map(({ retainedG }) => retainedG), panG].find((mass) => !(mass >= 0));
  if (bad !== undefined)
    throw new StatsError('out-of-bounds', `A mass of ${bad} g cannot be. Check the tare.`);
  sieves.forEach(({ apertureMm }, i) => {
    if (sieves.findIndex((other) => other.apertureMm === apertureMm) < i)
      throw new StatsError('shape', `The sieve of ${apertureMm} mm is there twice: keep one.`);
  });
}

/**
 * Retained and cumulative passing shares of one sieving, on the basis of the recovered sum.
 *
 * @param sieves openings in mm and masses held back in g, in any order.
 * @param panG what passed the finest sieve, g.
 * @throws StatsError `out-of-bounds` on a negative mass, `shape` on a sieve named twice.
 * @see ISO 2591-1:1988; ASTM C136/C136M §9.
 */
export function sieveCurve(sieves: readonly SieveMass[], panG: number): SieveCurve {
  check(sieves, panG);
  const sorted = [...sieves].sort((a, b) => b.apertureMm - a.apertureMm);
  const recoveredG = sumOf([...sorted.map(({ retainedG }) => retainedG), panG]);
  if (recoveredG <= 0) return { points: [], panPercent: null, recoveredG: 0 };
  const points = sorted.map(({ apertureMm, retainedG }, i) => {
    // from below: passing the finest sieve is exactly the pan, with no difference of large sums
    const belowG = sumOf([...sorted.slice(i + 1).map((sieve) => sieve.retainedG), panG]);
    return {
      apertureMm,
      retainedG,
      retainedPercent: (100 * retainedG) / recoveredG,
      passingPercent: (100 * belowG) / recoveredG,
    };
  });
  return { points, panPercent: (100 * panG) / recoveredG, recoveredG };
}
