import { StatsError } from '../errors';

export type AlphaRule =
  'rotatable' | 'faceCentred' | 'spherical' | 'orthogonal' | 'orthogonalBlocks' | 'fourthRoot';

/** Numbers of runs of a central composite design. */
export interface CompositeCounts {
  readonly factors: number;
  /** Distinct factorial points F. */
  readonly factorial: number;
  readonly replicates: number;
  /** Centre points in all, in the factorial blocks, in the axial block. */
  readonly centre: number;
  readonly centreFactorial: number;
  readonly centreAxial: number;
}

/**
 * Distance of the axial points from the centre, in coded units.
 *
 * @throws StatsError `out-of-bounds` for a number that is not above 0.
 * @see Box & Wilson (1951); Box & Hunter (1957), Ann. Math. Statist. 28: 195–241; NIST/SEMATECH
 *   e-Handbook 5.3.3.6.1.
 */
export function axialDistance(rule: AlphaRule | number, counts: CompositeCounts): number {
  const { factors: k, factorial, replicates, centre, centreFactorial, centreAxial } = counts;
  if (typeof rule === 'number') {
    if (rule > 0 && Number.isFinite(rule)) return rule;
    throw new StatsError('out-of-bounds', 'The axial distance is above 0.');
  }
  // replicates repeat factorial and axial points alike
  const nf = replicates * factorial;
  const na = replicates * 2 * k;
  const n = nf + na + centre;
  switch (rule) {
    case 'rotatable':
      return factorial ** (1 / 4);
    case 'spherical':
      return Math.sqrt(k);
    case 'faceCentred':
      return 1;
    case 'fourthRoot':
      return k ** (1 / 4);
    case 'orthogonal':
      // squares uncorrelated with the mean: n·Σx²z² = (Σx²)²
      return Math.sqrt((Math.sqrt(n * nf) - nf) / (2 * replicates));
    case 'orthogonalBlocks':
      return Math.sqrt((k * (1 + centreAxial / na)) / (1 + centreFactorial / nf));
  }
}
