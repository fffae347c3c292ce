import { isCategorical, type Factor, type Setting, type Settings } from '../coding/factor';
import { StatsError } from '../errors';
import { parseTerm, type Term } from '../model/term';

/** A polynomial limit in real units: Σ coefficient · term ≤ (or ≥) bound. */
export interface Constraint {
  readonly terms: Readonly<Record<string, number>>;
  readonly op: '<=' | '>=';
  readonly bound: number;
}

/** Room for the rounding of the polynomial, relative to the sizes summed. */
const SLACK = 1e-9;

/** By how much settings break a limit, as a share of the sizes summed; 0 or less when it holds. */
export type Limit = (values: ArrayLike<number>) => number;

function compileOne(factors: readonly Factor[], constraint: Constraint): Limit {
  const terms = Object.entries(constraint.terms).map(([name, coefficient]) => ({
    term: readTerm(factors, name),
    coefficient,
  }));
  const sign = constraint.op === '<=' ? 1 : -1;
  return (values) => {
    let sum = -constraint.bound;
    let size = Math.abs(constraint.bound);
    for (const { term, coefficient } of terms) {
      let value = coefficient;
      for (let i = 0; i < term.powers.length; i++)
        if (term.powers[i]! > 0) value *= values[i]! ** term.powers[i]!;
      sum += value;
      size += Math.abs(value);
    }
    return sign * sum - SLACK * size;
  };
}

function readTerm(factors: readonly Factor[], name: string): Term {
  const term = parseTerm(factors, name);
  if (term.contrasts.length === 0) return term;
  throw new StatsError('unknown-term', `A limit is on numbers; ‘${name}’ names a level.`, {
    term: name,
  });
}

/**
 * Limits as functions of the numeric settings, in the order of the factors (a categorical factor’s place
 * is not read).
 *
 * @throws StatsError `unknown-term` when a term names no numeric factor.
 */
export function compileConstraints(
  factors: readonly Factor[],
  constraints: readonly Constraint[],
): Limit[] {
  return constraints.map((constraint) => compileOne(factors, constraint));
}

/** The numeric values of settings, in the order of the factors; NaN for a categorical one. */
export function valuesOf(factors: readonly Factor[], settings: Settings): number[] {
  return factors.map((factor) => {
    const value: Setting | undefined = settings[factor.key];
    return isCategorical(factor) || typeof value !== 'number' ? NaN : value;
  });
}

/** Whether all limits hold. */
export function isInside(limits: readonly Limit[], values: ArrayLike<number>): boolean {
  return limits.every((limit) => limit(values) <= 0);
}

const signed = (coefficient: number, name: string, isFirst: boolean) => {
  const size = Math.abs(coefficient);
  const factor = size === 1 ? '' : `${Number(size.toPrecision(6))}·`;
  const lead = coefficient < 0 ? '−' : isFirst ? '' : '+';
  return `${lead}${isFirst ? '' : ' '}${factor}${name.replaceAll(':', '·')}`;
};

/** A limit in words: `voltage − 5·gap ≥ 0`. */
export function describeConstraint({ terms, op, bound }: Constraint): string {
  const sum = Object.entries(terms)
    .map(([name, coefficient], i) => signed(coefficient, name, i === 0))
    .join(' ');
  return `${sum} ${op === '<=' ? '≤' : '≥'} ${bound}`;
}
