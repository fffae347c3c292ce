import { StatsError } from '../errors';
import { levelGrid, type CodedDesign, type CodedPoint } from './codedDesign';

/**
 * Factors that vary together at ±1 while the others stay at 0, in orthogonal groups: the groups of one
 * inner list make a block where the design parts into blocks.
 */
const SETS: Readonly<Record<number, readonly (readonly (readonly number[])[])[]>> = {
  3: [
    [
      [0, 1],
      [0, 2],
      [1, 2],
    ],
  ],
  4: [
    [
      [0, 1],
      [2, 3],
    ],
    [
      [0, 3],
      [1, 2],
    ],
    [
      [0, 2],
      [1, 3],
    ],
  ],
  5: [
    // a pentagon and its pentagram: each factor twice in each
    [
      [0, 1],
      [1, 2],
      [2, 3],
      [3, 4],
      [0, 4],
    ],
    [
      [0, 2],
      [2, 4],
      [1, 4],
      [1, 3],
      [0, 3],
    ],
  ],
  6: [
    [
      [0, 1, 3],
      [1, 2, 4],
      [2, 3, 5],
      [0, 3, 4],
      [1, 4, 5],
      [0, 2, 5],
    ],
  ],
  7: [
    [
      [3, 4, 5],
      [0, 5, 6],
      [1, 4, 6],
      [0, 1, 3],
      [2, 3, 6],
      [0, 2, 4],
      [1, 2, 5],
    ],
  ],
};

/** Six and seven factors part in two, by the sign of the product of the three that vary. */
const partsBySign = (factors: number) => factors >= 6;

function possibleBlocks(factors: number): number {
  return partsBySign(factors) ? 2 : SETS[factors]!.length;
}

/**
 * A Box–Behnken design of 3 to 7 factors: middles of edges (of faces for 6 and 7), no corner.
 *
 * @param blocks 1, or as published: 3 for four factors, 2 for five, six and seven.
 * @throws StatsError `not-available` for other numbers of factors or blocks.
 * @see Box & Behnken (1960), Some new three level designs for the study of quantitative variables,
 *   Technometrics 2: 455–475; NIST/SEMATECH e-Handbook 5.3.3.6.2.
 */
export function boxBehnken(factors: number, blocks: number): CodedDesign {
  const groups = SETS[factors];
  if (!groups)
    throw new StatsError(
      'not-available',
      `Box–Behnken designs are given for 3 to 7 factors; there ${factors === 1 ? 'is 1' : `are ${factors}`}. Take a central composite or an optimal design.`,
    );
  const possible = possibleBlocks(factors);
  if (blocks !== 1 && blocks !== possible)
    throw new StatsError(
      'not-available',
      possible === 1
        ? 'A Box–Behnken design of 3 factors has one block. Or repeat the whole design once in each block.'
        : `A Box–Behnken design of ${factors} factors parts into ${possible} blocks, not ${blocks}.`,
    );
  const bySign = blocks > 1 && partsBySign(factors);
  const points = groups.flatMap((sets, group) =>
    sets.flatMap((set) =>
      levelGrid(set.map(() => [-1, 1])).map((signs): CodedPoint => {
        const point = new Array<number>(factors).fill(0);
        set.forEach((place, i) => {
          point[place] = signs[i]!;
        });
        const product = signs.reduce((all, sign) => all * sign, 1);
        const block = bySign ? (product < 0 ? 1 : 2) : blocks > 1 ? group + 1 : 1;
        return { point, pointType: 'edge', block };
      }),
    ),
  );
  return { points, blocks };
}
