import { StatsError } from '../errors';
import { pointsOf, type CodedDesign } from './codedDesign';
import { fractionRuns } from './twoLevel';

/** First rows; the others are its cyclic shifts, and a row of −1. */
const FIRST_ROWS: Readonly<Record<number, string>> = {
  12: '++-+++---+-',
  20: '++--++++-+-+----++-',
  24: '+++++-+-++--++--+-+----',
};

/** Blocks A, B, C of the 28 runs, arranged as [A B C; C A B; B C A], and a row of −1. */
const BLOCKS_28: readonly (readonly string[])[] = [
  [
    '+-++++---',
    '++-+++---',
    '-+++++---',
    '---+-++++',
    '---++-+++',
    '----+++++',
    '+++---+-+',
    '+++---++-',
    '+++----++',
  ],
  [
    '-+---+--+',
    '--++--+--',
    '+---+--+-',
    '--+-+---+',
    '+----++--',
    '-+-+---+-',
    '--+--+-+-',
    '+--+----+',
    '-+--+-+--',
  ],
  [
    '++-+-++-+',
    '-++++-++-',
    '+-+-++-++',
    '+-+++-+-+',
    '++--++++-',
    '-+++-+-++',
    '+-++-+++-',
    '++-++--++',
    '-++-+++-+',
  ],
];

const PLACKETT_BURMAN_RUNS = [8, 12, 16, 20, 24, 28] as const;

const signs = (text: string) => Array.from(text).map((sign) => (sign === '+' ? 1 : -1));

function cyclic(row: readonly number[]): number[][] {
  const n = row.length;
  const shifts = row.map((_, shift) => row.map((_each, i) => row[(i - shift + n) % n]!));
  return [...shifts, row.map(() => -1)];
}

function rows28(): number[][] {
  const block = (which: number, row: number) => signs(BLOCKS_28[which % 3]![row]!);
  const rows = [0, 2, 1].flatMap((first) =>
    BLOCKS_28[0]!.map((_, row) => [0, 1, 2].flatMap((j) => block(first + j, row))),
  );
  return [...rows, new Array<number>(27).fill(-1)];
}

/** All columns of 8 and 16 runs: the saturated fraction, every product of basic factors in use. */
function saturated(basic: number): number[][] {
  const factors = 2 ** basic - 1;
  const products = Array.from({ length: factors }, (_, i) => i + 1).filter(
    (mask) => (mask & (mask - 1)) !== 0,
  );
  return fractionRuns(
    factors,
    products.map((mask, j) => ({ factor: basic + j, mask, sign: 1 })),
  );
}

function rowsOf(runs: number): number[][] {
  if (runs === 8 || runs === 16) return saturated(Math.log2(runs));
  return runs === 28 ? rows28() : cyclic(signs(FIRST_ROWS[runs]!));
}

/**
 * A Plackett–Burman screening design: main effects of up to N − 1 factors in N runs, N a multiple of 4.
 * Main effects are clear of each other and partly aliased with two-factor products.
 *
 * @param runs N; null = the smallest that holds the factors.
 * @throws StatsError `not-available` for other N, `too-few-runs` when N ≤ the number of factors.
 * @see Plackett & Burman (1946), The design of optimum multifactorial experiments, Biometrika 33:
 *   305–325; NIST/SEMATECH e-Handbook 5.3.3.5.
 */
export function plackettBurman(factors: number, runs: number | null): CodedDesign {
  const n = runs ?? PLACKETT_BURMAN_RUNS.find((size) => size > factors)!;
  if (!PLACKETT_BURMAN_RUNS.some((size) => size === n))
    throw new StatsError(
      'not-available',
      `Plackett–Burman designs are given for ${PLACKETT_BURMAN_RUNS.join(', ')} runs, not ${n}.`,
    );
  if (n <= factors)
    throw new StatsError(
      'too-few-runs',
      `${n} runs hold at most ${n - 1} factors; there are ${factors}.`,
    );
  const rows = rowsOf(n).map((row) => row.slice(0, factors));
  return { points: pointsOf(rows, 'factorial'), blocks: 1 };
}
