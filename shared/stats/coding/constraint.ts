import { StatsError } from '../errors';
import { isCategorical, type Factor, type Settings } from './factor';

/** Σ coefficient · Π uᵢ^pᵢ ≤ or ≥ bound, in the factors' own units. */
export interface Constraint {
  readonly terms: Readonly<Record<string, number>>;
  readonly op: '<=' | '>=';
  readonly bound: number;
}

/** Room for the rounding of a product, relative to the size of its parts. */
const SLACK = 1e-9;

/** A constraint read once: for each term the places of its factors, repeated by power. */
export interface ReadConstraint {
  readonly parts: readonly { readonly coefficient: number; readonly places: readonly number[] }[];
  readonly op: '<=' | '>=';
  readonly bound: number;
}

function placesOf(factors: readonly Factor[], name: string): number[] {
  return name.split(':').flatMap((part) => {
    const [, key = '', power = '1'] = /^([^^]+)(?:\^(\d+))?$/.exec(part.trim()) ?? [];
    const place = factors.findIndex((factor) => factor.key === key);
    const factor = factors[place];
    if (!factor || isCategorical(factor))
      throw new StatsError(
        'unknown-term',
        `The constraint names ‘${part}’, which is no numeric factor of this calculation.`,
        { term: name },
      );
    return new Array<number>(Number(power)).fill(place);
  });
}

/** @throws StatsError `unknown-term` when a term names no numeric factor. */
export function readConstraint(
  factors: readonly Factor[],
  { terms, op, bound }: Constraint,
): ReadConstraint {
  return {
    parts: Object.entries(terms).map(([name, coefficient]) => ({
      coefficient,
      places: placesOf(factors, name),
    })),
    op,
    bound,
  };
}

/** Whether values (in the order of the factors) keep a constraint. */
export function keeps({ parts, op, bound }: ReadConstraint, values: ArrayLike<number>): boolean {
  let sum = 0;
  let size = Math.abs(bound);
  for (const { coefficient, places } of parts) {
    let part = coefficient;
    for (const place of places) part *= values[place]!;
    sum += part;
    size = Math.max(size, Math.abs(part));
  }
  const slack = SLACK * size;
  return op === '<=' ? sum <= bound + slack : sum >= bound - slack;
}

/** How far values are from breaking a constraint, in its own units: 0 on its edge, negative beyond. */
export function slackOf({ parts, op, bound }: ReadConstraint, values: ArrayLike<number>): number {
  const sum = parts.reduce(
    (total, { coefficient, places }) =>
      total + places.reduce((part, place) => part * values[place]!, coefficient),
    0,
  );
  return op === '<=' ? bound - sum : sum - bound;
}

/** A constraint in words: "voltage − 9·gap ≤ 0". */
export function constraintWords({ terms, op, bound }: Constraint): string {
  const figure = (value: number) => String(Number(value.toPrecision(4)));
  const sum = Object.entries(terms)
    .map(([name, coefficient], i) => {
      const size = Math.abs(coefficient);
      const sign = coefficient < 0 ? '−' : i > 0 ? '+' : '';
      const body = `${size === 1 ? '' : `${figure(size)}·`}${name.replaceAll(':', '·').replaceAll('^2', '²')}`;
      return `${sign}${i > 0 ? ' ' : ''}${body}`;
    })
    .join(' ');
  return `${sum} ${op === '<=' ? '≤' : '≥'} ${figure(bound)}`;
}

/** Values of numeric factors in their order; NaN at the place of a categorical one. */
export function valuesOf(factors: readonly Factor[], settings: Settings): number[] {
  return factors.map(({ key }) => {
    const value = settings[key];
    return typeof value === 'number' ? value : NaN;
  });
}
