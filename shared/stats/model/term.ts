import { StatsError } from '../errors';
import { isCategorical, type Factor } from '../coding/factor';

/**
 * One column of a model: a product of powers of numeric factors and of contrasts of categorical ones.
 * Names are those of the calculation API: `intercept`, `voltage`, `voltage:gap`, `voltage^2`,
 * `electrode[cone]`.
 */
export interface Term {
  readonly name: string;
  /** Power of each numeric factor, by its place in the list of factors; 0 = absent. */
  readonly powers: readonly number[];
  /** Contrasts: place of the categorical factor, and which level's column. */
  readonly contrasts: readonly { readonly factor: number; readonly level: number }[];
}

export type ModelKind = 'linear' | 'interaction' | 'quadratic';

const MAX_POWER = 10;
export const INTERCEPT = 'intercept';

export function order(term: Term): number {
  return term.powers.reduce((sum, power) => sum + power, 0) + term.contrasts.length;
}

function nameOf(factors: readonly Factor[], term: Omit<Term, 'name'>): string {
  const parts = term.powers.flatMap((power, i) => {
    if (power === 0) return [];
    return [power === 1 ? factors[i]!.key : `${factors[i]!.key}^${power}`];
  });
  for (const { factor, level } of term.contrasts) {
    const categorical = factors[factor]!;
    if (isCategorical(categorical)) parts.push(`${categorical.key}[${categorical.levels[level]!}]`);
  }
  return parts.length === 0 ? INTERCEPT : parts.join(':');
}

function makeTerm(
  factors: readonly Factor[],
  powers: readonly number[],
  contrasts: Term['contrasts'] = [],
): Term {
  return { name: nameOf(factors, { powers, contrasts }), powers, contrasts };
}

function refuse(name: string, why: string): never {
  throw new StatsError('unknown-term', `The term ‘${name}’ ${why}`, { term: name });
}

type Part = { index: number; level: number } | { index: number; level?: undefined; power: number };

function parsePart(factors: readonly Factor[], part: string, name: string): Part {
  const [, key, label, exponent] =
    /^([^[\]^:]+)(?:\[([^\]]+)\])?(?:\^(\d+))?$/.exec(part.trim()) ?? [];
  const index = factors.findIndex((factor) => factor.key === key);
  const factor = factors[index];
  if (!factor) {
    const known = factors.map((f) => f.key).join(', ');
    return refuse(name, `names no factor of this calculation. Known are: ${known}.`);
  }
  if (isCategorical(factor)) {
    const level = factor.levels.indexOf(label ?? '');
    // sum to zero: the last level has no column of its own
    if (level >= 0 && level < factor.levels.length - 1 && !exponent) return { index, level };
    const known = factor.levels.slice(0, -1).map((l) => `${factor.key}[${l}]`);
    return refuse(name, `needs a level with a column of its own: ${known.join(', ')}.`);
  }
  const power = exponent ? Number(exponent) : 1;
  if (label || power < 1 || power > MAX_POWER)
    return refuse(name, `cannot be read: powers are 1 to ${MAX_POWER}.`);
  return { index, power };
}

/**
 * Reads a term's name. Order of the parts does not matter: `gap:voltage` is `voltage:gap`.
 *
 * @throws StatsError `unknown-term` when a part names no factor, no level, or a power above 10.
 */
export function parseTerm(factors: readonly Factor[], name: string): Term {
  const powers = factors.map(() => 0);
  const contrasts: { factor: number; level: number }[] = [];
  if (name === INTERCEPT || name === '1') return makeTerm(factors, powers);
  for (const part of name.split(':')) {
    const read = parsePart(factors, part, name);
    if (read.level !== undefined) contrasts.push({ factor: read.index, level: read.level });
    else powers[read.index]! += read.power;
  }
  contrasts.sort((a, b) => a.factor - b.factor);
  return makeTerm(factors, powers, contrasts);
}

/** All columns of one factor's main effect: one for a numeric factor, levels − 1 for a categorical. */
function mainEffects(factors: readonly Factor[], i: number): Term[] {
  const factor = factors[i]!;
  const none = factors.map(() => 0);
  if (!isCategorical(factor)) return [makeTerm(factors, none.with(i, 1))];
  return factor.levels
    .slice(0, -1)
    .map((_, level) => makeTerm(factors, none, [{ factor: i, level }]));
}

function product(factors: readonly Factor[], a: Term, b: Term): Term {
  const powers = a.powers.map((power, i) => power + b.powers[i]!);
  return makeTerm(factors, powers, [...a.contrasts, ...b.contrasts]);
}

function expand(factors: readonly Factor[], kind: ModelKind): Term[] {
  const mains = factors.map((_, i) => mainEffects(factors, i));
  const terms = mains.flat();
  if (kind === 'linear') return terms;
  for (let i = 0; i < mains.length; i++)
    for (let j = i + 1; j < mains.length; j++)
      for (const a of mains[i]!) for (const b of mains[j]!) terms.push(product(factors, a, b));
  if (kind === 'interaction') return terms;
  factors.forEach((factor, i) => {
    if (!isCategorical(factor)) terms.push(makeTerm(factors, factors.map(() => 0).with(i, 2)));
  });
  return terms;
}

/**
 * The terms of a model: linear, then products, then squares, in the order of the factors; the intercept
 * first unless left out. A list of names keeps its own order, doubles removed.
 *
 * @throws StatsError `unknown-term` as `parseTerm`.
 */
export function termsOf(
  factors: readonly Factor[],
  model: ModelKind | readonly string[],
  intercept = true,
): Term[] {
  const named =
    typeof model === 'string'
      ? expand(factors, model)
      : model.map((name) => parseTerm(factors, name));
  const terms = intercept ? [parseTerm(factors, INTERCEPT), ...named] : named;
  const seen = new Set<string>();
  return terms.filter(
    ({ name }) => !seen.has(name) && (seen.add(name), intercept || name !== INTERCEPT),
  );
}
