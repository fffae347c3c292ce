import type { Factor } from '../coding/factor';
import { INTERCEPT, order, termsOf, type ModelKind, type Term } from './term';

/**
 * The terms that must be in a model for `term` to be in it under strong heredity: every term got by
 * taking one factor out once (voltage²·gap needs voltage², voltage·gap).
 *
 * @see Chipman (1996), Bayesian variable selection with related predictors, Canad. J. Statist. 24: 17–36.
 */
export function isParent(parent: Term, term: Term): boolean {
  if (parent.name === INTERCEPT || order(term) !== order(parent) + 1) return false;
  const lower = parent.powers.every((power, i) => power <= (term.powers[i] ?? 0));
  const within = parent.contrasts.every(({ factor }) =>
    term.contrasts.some((c) => c.factor === factor),
  );
  return lower && within;
}

/** Names of the terms in `terms` that `name` cannot do without. */
export function parentsOf(terms: readonly Term[], name: string): string[] {
  const term = terms.find((candidate) => candidate.name === name);
  return term ? terms.filter((other) => isParent(other, term)).map((other) => other.name) : [];
}

/**
 * The terms that hang on `name`, near and far: what has to leave a model together with it.
 */
export function descendantsOf(terms: readonly Term[], name: string): string[] {
  const gone = new Set([name]);
  for (let grown = true; grown;) {
    grown = false;
    for (const term of terms) {
      if (gone.has(term.name)) continue;
      if (parentsOf(terms, term.name).some((parent) => gone.has(parent))) {
        gone.add(term.name);
        grown = true;
      }
    }
  }
  gone.delete(name);
  return [...gone];
}

/** The terms of `wanted` with every parent that `kind`'s full model has for them, in the full order. */
export function withParents(
  factors: readonly Factor[],
  kind: ModelKind,
  wanted: readonly string[],
): string[] {
  const full = termsOf(factors, kind, false);
  const kept = new Set(wanted);
  for (const term of [...full].reverse()) {
    if (kept.has(term.name)) parentsOf(full, term.name).forEach((parent) => kept.add(parent));
  }
  return full.map((term) => term.name).filter((name) => kept.has(name));
}
