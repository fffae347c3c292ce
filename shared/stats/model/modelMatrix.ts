import { toCoded } from '../coding/code';
import { isCategorical, type Factor, type Setting, type Settings } from '../coding/factor';
import { StatsError } from '../errors';
import { zeros, type Matrix } from '../linalg/matrix';
import type { Term } from './term';

/** Coded numeric value, or the place of the level, for each factor. */
export type Point = readonly number[];

function codeOne(factor: Factor, value: Setting | undefined): number {
  if (isCategorical(factor)) {
    const level = typeof value === 'string' ? factor.levels.indexOf(value) : -1;
    if (level >= 0) return level;
    throw new StatsError(
      'out-of-bounds',
      `${factor.key}: ‘${String(value)}’ is none of its levels.`,
    );
  }
  const coded = typeof value === 'number' ? toCoded(factor, value) : NaN;
  if (Number.isFinite(coded)) return coded;
  throw new StatsError(
    'not-finite',
    `${factor.key}: ‘${String(value)}’ cannot be coded${factor.scale === 'log' ? '; on a log scale it must be above 0' : ''}.`,
  );
}

/**
 * One run's settings as a point: coded −1…+1 for numeric factors, the level's place for categorical ones.
 *
 * @throws StatsError `not-finite` or `out-of-bounds` for a value that cannot be coded.
 */
export function pointOf(factors: readonly Factor[], settings: Settings): number[] {
  return factors.map((factor) => codeOne(factor, settings[factor.key]));
}

function contrast(levels: number, level: number, at: number): number {
  if (at === levels - 1) return -1;
  return at === level ? 1 : 0;
}

/** The value of one term at a point. */
export function termValue(factors: readonly Factor[], term: Term, point: Point): number {
  let value = 1;
  for (let i = 0; i < term.powers.length; i++) {
    for (let k = term.powers[i]!; k > 0; k--) value *= point[i]!;
  }
  for (const { factor, level } of term.contrasts) {
    const categorical = factors[factor]!;
    if (isCategorical(categorical))
      value *= contrast(categorical.levels.length, level, point[factor]!);
  }
  return value;
}

/**
 * The model matrix: one row a point, one column a term, in coded units (raw products and powers of the
 * coded factors, not centred, not orthogonalised).
 */
export function modelMatrix(
  factors: readonly Factor[],
  terms: readonly Term[],
  points: readonly Point[],
): Matrix {
  const out = zeros(points.length, terms.length);
  points.forEach((point, i) => {
    terms.forEach((term, j) => {
      out.data[i * terms.length + j] = termValue(factors, term, point);
    });
  });
  return out;
}
