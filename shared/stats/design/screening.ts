import { StatsError } from '../errors';
import { fractional, type FractionProperties } from './fractional';
import type { DesignPoint } from './designPoint';

/** First rows of cyclic Plackett–Burman designs, one sign a factor. */
const FIRST_ROWS: Readonly<Record<number, string>> = {
  12: '++-+++---+-',
  20: '++--++++-+-+----++-',
  24: '+++++-+-++--++--+-+----',
};

/** The 9 × 9 blocks of the design with 28 runs, cycled as A B C / C A B / B C A. */
const BLOCKS_OF_28: readonly (readonly string[])[] = [
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
    '-+++++-++',
    '+-+-++++-',
    '+-++-+-++',
    '++-++-++-',
    '-++-+++-+',
    '+-++-+++-',
    '++-++--++',
    '-++-+++-+',
  ],
];

const signs = (text: string) =>
  Array.from({ length: text.length }, (_, i) => (text[i] === '+' ? 1 : -1));

function cyclic(first: readonly number[]): number[][] {
  const n = first.length;
  return Array.from({ length: n }, (_, r) =>
    Array.from({ length: n }, (_unused, c) => first[(c - r + n) % n]!),
  );
}

function of28(): number[][] {
  const [a, b, c] = BLOCKS_OF_28.map((block) => block.map(signs)) as [
    number[][],
    number[][],
    number[][],
  ];
  return [
    [a, b, c],
    [c, a, b],
    [b, c, a],
  ].flatMap(([left, middle, right]) =>
    left!.map((row, i) => [...row, ...middle![i]!, ...right![i]!]),
  );
}

export interface PlackettBurman {
  readonly points: readonly DesignPoint[];
  readonly properties: FractionProperties | null;
}

/**
 * A Plackett–Burman design with 8, 12, 16, 20, 24 or 28 runs: main effects clear of each other, partly
 * confounded with interactions.
 *
 * @param runs or undefined for the fewest that carry the factors.
 * @throws StatsError `not-available` for other sizes or too many factors.
 * @see Plackett & Burman (1946), Biometrika 33: 305–325; NIST/SEMATECH e-Handbook 5.3.3.5.
 */
export function plackettBurman(keys: readonly string[], runs: number | undefined): PlackettBurman {
  const k = keys.length;
  const size = runs ?? [8, 12, 16, 20, 24, 28].find((n) => n > k) ?? 0;
  if (size <= k || ![8, 12, 16, 20, 24, 28].includes(size))
    throw new StatsError(
      'not-available',
      `A Plackett–Burman design here has 8, 12, 16, 20, 24 or 28 runs and at most runs − 1 factors; ${size} runs do not carry ${k} factors.`,
    );
  if (size === 8 || size === 16) {
    const base = Math.log2(size);
    if (k > base) {
      const { points, properties } = fractional(keys, { fraction: k - base });
      return { points, properties };
    }
  }
  const first = FIRST_ROWS[size];
  const rows = first !== undefined ? cyclic(signs(first)) : size === 28 ? of28() : hadamard(size);
  const all = [...rows, new Array<number>(rows[0]!.length).fill(-1)].slice(0, size);
  return {
    points: all.map((row): DesignPoint => ({
      coded: row.slice(0, k),
      type: 'factorial',
      block: 1,
    })),
    properties: null,
  };
}

/** Rows of a Sylvester matrix of order 8 or 16 without its constant column. */
function hadamard(order: number): number[][] {
  return Array.from({ length: order }, (_, r) =>
    Array.from({ length: order - 1 }, (_unused, c) => {
      let shared = r & (c + 1);
      let sign = 1;
      for (; shared > 0; shared &= shared - 1) sign = -sign;
      return sign;
    }),
  );
}

/** Elements of a finite field, numbered from 0 = zero, with subtraction and squares. */
interface Field {
  readonly size: number;
  readonly subtract: (a: number, b: number) => number;
  readonly isSquare: (a: number) => boolean;
}

function primeField(q: number): Field {
  const squares = new Set(Array.from({ length: q - 1 }, (_, i) => ((i + 1) * (i + 1)) % q));
  return {
    size: q,
    subtract: (a, b) => (a - b + q) % q,
    isSquare: (a) => squares.has(a),
  };
}

/** GF(9) as a + b·i with i² = −1 over GF(3); the number is 3a + b. */
function fieldOf9(): Field {
  const parts = (x: number): [number, number] => [Math.floor(x / 3), x % 3];
  const join = (a: number, b: number) => 3 * (((a % 3) + 3) % 3) + (((b % 3) + 3) % 3);
  const multiply = (x: number, y: number) => {
    const [a, b] = parts(x);
    const [c, d] = parts(y);
    return join(a * c - b * d, a * d + b * c);
  };
  const squares = new Set(Array.from({ length: 8 }, (_, i) => multiply(i + 1, i + 1)));
  return {
    size: 9,
    subtract: (x, y) => {
      const [a, b] = parts(x);
      const [c, d] = parts(y);
      return join(a - c, b - d);
    },
    isSquare: (x) => squares.has(x),
  };
}

const FIELDS: Readonly<Record<number, () => Field>> = {
  4: () => primeField(3),
  6: () => primeField(5),
  8: () => primeField(7),
  10: fieldOf9,
  12: () => primeField(11),
};

/**
 * A conference matrix of even order 4 to 12: 0 on the diagonal, ±1 elsewhere, CᵀC = (m − 1)I.
 *
 * @see Paley (1933), J. Math. Phys. 12: 311–320.
 */
export function conferenceMatrix(order: number): number[][] {
  const make = FIELDS[order];
  if (!make)
    throw new StatsError(
      'not-available',
      `No conference matrix of order ${order} is offered here.`,
    );
  const field = make();
  const q = field.size;
  const isSkew = q % 4 === 3;
  const chi = (x: number) => (x === 0 ? 0 : field.isSquare(x) ? 1 : -1);
  const rows = [[0, ...new Array<number>(q).fill(1)]];
  for (let i = 0; i < q; i++)
    rows.push([isSkew ? -1 : 1, ...Array.from({ length: q }, (_, j) => chi(field.subtract(j, i)))]);
  return rows;
}

/**
 * A definitive screening design: a conference matrix, its mirror image and a centre point; for an odd
 * number of factors one column less.
 *
 * @throws StatsError `not-available` outside 3 to 12 factors.
 * @see Jones & Nachtsheim (2011), J. Quality Technology 43: 1–15; Xiao, Lin & Bai (2012), ibid. 44: 2–8.
 */
export function definitiveScreening(k: number): DesignPoint[] {
  if (k < 3 || k > 12)
    throw new StatsError(
      'not-available',
      `A definitive screening design takes 3 to 12 factors, not ${k}.`,
    );
  const rows = conferenceMatrix(k % 2 === 0 ? k : k + 1).map((row) => row.slice(0, k));
  const pairs = rows.flatMap((row) => [row, row.map((x) => -x + 0)]);
  return [
    ...pairs.map((coded): DesignPoint => ({ coded, type: 'edge', block: 1 })),
    { coded: new Array<number>(k).fill(0), type: 'centre', block: 1 },
  ];
}
