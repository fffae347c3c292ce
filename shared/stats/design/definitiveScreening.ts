import { StatsError } from '../errors';
import { pointsOf, type CodedDesign } from './codedDesign';

/** A finite field as its addition and its squares: elements are 0 … q−1, 0 is the zero. */
interface Field {
  readonly order: number;
  readonly minus: (a: number, b: number) => number;
  readonly squares: ReadonlySet<number>;
}

function primeField(order: number): Field {
  const elements = Array.from({ length: order }, (_, i) => i);
  return {
    order,
    minus: (a, b) => (a - b + order) % order,
    squares: new Set(elements.slice(1).map((x) => (x * x) % order)),
  };
}

/** Nine elements a + bi with i² = −1 over the whole numbers modulo 3, numbered a + 3b. */
function fieldOfNine(): Field {
  const parts = (x: number) => ({ a: x % 3, b: Math.floor(x / 3) });
  const join = (a: number, b: number) => (((a % 3) + 3) % 3) + 3 * (((b % 3) + 3) % 3);
  const square = (x: number) => {
    const { a, b } = parts(x);
    return join(a * a - b * b, 2 * a * b);
  };
  return {
    order: 9,
    minus: (x, y) => join(parts(x).a - parts(y).a, parts(x).b - parts(y).b),
    squares: new Set([1, 2, 3, 4, 5, 6, 7, 8].map(square)),
  };
}

/**
 * A conference matrix of order q + 1: zero diagonal, ±1 elsewhere, C′C = qI. From the squares of a field
 * of q elements; skew for q = 3 modulo 4, else symmetric.
 *
 * @param size 4, 6, 8, 10, 12 or 14.
 * @see Paley (1933), On orthogonal matrices, J. Math. Phys. 12: 311–320.
 */
export function conferenceMatrix(size: number): number[][] {
  const { order, minus, squares } = size === 10 ? fieldOfNine() : primeField(size - 1);
  const character = (x: number) => (x === 0 ? 0 : squares.has(x) ? 1 : -1);
  const border = order % 4 === 3 ? -1 : 1;
  const first = Array.from({ length: size }, (_, j) => (j === 0 ? 0 : 1));
  const rest = Array.from({ length: order }, (_, i) => [
    border,
    ...Array.from({ length: order }, (_each, j) => character(minus(i, j))),
  ]);
  return [first, ...rest];
}

/** A product of −1 with 0 is 0, not −0. */
const negative = (x: number) => (x === 0 ? 0 : -x);

/**
 * A definitive screening design without its centre runs: C and −C in turn. Main effects are clear of
 * each other, of squares and of two-factor products. An odd number of factors takes one column less of
 * the next larger design.
 *
 * @throws StatsError `not-available` below 3 factors.
 * @see Jones & Nachtsheim (2011), J. Quality Technology 43: 1–15; Xiao, Lin & Bai (2012), J. Quality
 *   Technology 44: 2–8.
 */
export function definitiveScreening(factors: number): CodedDesign {
  if (factors < 3)
    throw new StatsError(
      'not-available',
      'A definitive screening design needs three factors or more. Take a central composite design.',
    );
  const size = Math.max(4, factors + (factors % 2));
  const rows = conferenceMatrix(size).map((row) => row.slice(0, factors));
  const folded = rows.flatMap((row) => [row, row.map(negative)]);
  return { points: pointsOf(folded, 'edge'), blocks: 1 };
}
