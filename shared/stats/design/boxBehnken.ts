import { StatsError } from '../errors';
import { centrePoints, combinations, type DesignPoint } from './designPoint';

/**
 * Which factors vary together while the others stay at the centre, by number of factors (from 1).
 *
 * @see Box & Behnken (1960), Technometrics 2: 455–475; NIST/SEMATECH e-Handbook 5.3.3.6.2.
 */
const GROUPS: Readonly<Record<number, readonly (readonly number[])[]>> = {
  3: [
    [1, 2],
    [1, 3],
    [2, 3],
  ],
  4: [
    [1, 2],
    [3, 4],
    [1, 4],
    [2, 3],
    [1, 3],
    [2, 4],
  ],
  5: [
    [1, 2],
    [3, 4],
    [2, 5],
    [1, 3],
    [4, 5],
    [2, 3],
    [1, 4],
    [3, 5],
    [1, 5],
    [2, 4],
  ],
  6: [
    [1, 2, 4],
    [2, 3, 5],
    [3, 4, 6],
    [1, 4, 5],
    [2, 5, 6],
    [1, 3, 6],
  ],
  7: [
    [4, 5, 6],
    [1, 6, 7],
    [2, 5, 7],
    [1, 2, 4],
    [3, 4, 7],
    [1, 3, 5],
    [2, 3, 6],
  ],
};

/** Groups by block where the design splits into orthogonal blocks. */
const BLOCKS: Readonly<Record<string, readonly (readonly number[])[]>> = {
  '4 in 3': [
    [0, 1],
    [2, 3],
    [4, 5],
  ],
  '5 in 2': [
    [0, 1, 2, 3, 4],
    [5, 6, 7, 8, 9],
  ],
};

function blockOf(k: number, blocks: number, group: number): number {
  if (blocks === 1) return 1;
  const split = BLOCKS[`${k} in ${blocks}`];
  if (!split)
    throw new StatsError(
      'not-available',
      `A Box–Behnken design in ${k} factors does not split into ${blocks} orthogonal blocks (4 factors split into 3, 5 into 2). Take a central composite or an optimal design in blocks.`,
    );
  return split.findIndex((own) => own.includes(group)) + 1;
}

/**
 * A Box–Behnken design for 3 to 7 factors: midpoints of edges, with the corners left out.
 *
 * @throws StatsError `not-available` for other numbers of factors or blocks.
 */
export function boxBehnken(k: number, centres: number, blocks: number): DesignPoint[] {
  const groups = GROUPS[k];
  if (!groups)
    throw new StatsError(
      'not-available',
      `A Box–Behnken design takes 3 to 7 factors, not ${k}. With 2 factors take a central composite.`,
    );
  const edges = groups.flatMap((group, g) =>
    combinations(group.map(() => [-1, 1])).map((levels): DesignPoint => {
      const coded = new Array<number>(k).fill(0);
      group.forEach((factor, i) => (coded[factor - 1] = levels[i]!));
      return { coded, type: 'edge', block: blockOf(k, blocks, g) };
    }),
  );
  return [...edges, ...centrePoints(k, centres, blocks)];
}
