import { StatsError } from '../errors';
import { parentsOf } from '../model/heredity';
import { INTERCEPT, termsOf, type Term } from '../model/term';
import { fitModel, type FitRun, type FittedModel, type ModelSpec } from './fitModel';

export type Heredity = 'strong' | 'weak' | 'none';
export type Criterion = 'aicc' | 'bic' | 'press' | 'p';

export interface SelectionOptions {
  readonly method: 'backward' | 'forward' | 'allSubsets';
  readonly criterion: Criterion;
  readonly limit: number;
  readonly heredity: Heredity;
}

export interface SelectionStep {
  readonly terms: readonly string[];
  /** The criterion's value (smaller is better), or the p that decided the step; null where it has none. */
  readonly value: number | null;
}

/** More subsets than this would take too long; backward elimination looks at far fewer. */
const MAX_SUBSETS = 20_000;

/** Whether a set of terms keeps its heredity: all parents (strong) or one of them (weak) are in. */
function isAllowed(pool: readonly Term[], kept: ReadonlySet<string>, heredity: Heredity): boolean {
  if (heredity === 'none') return true;
  return [...kept].every((name) => {
    const parents = parentsOf(pool, name);
    if (parents.length === 0) return true;
    return heredity === 'strong'
      ? parents.every((parent) => kept.has(parent))
      : parents.some((parent) => kept.has(parent));
  });
}

interface Candidate {
  readonly terms: readonly string[];
  readonly model: FittedModel;
  readonly value: number | null;
}

class Search {
  readonly pool: readonly Term[];
  readonly path: SelectionStep[] = [];

  constructor(
    private readonly spec: ModelSpec,
    private readonly runs: readonly FitRun[],
    private readonly options: SelectionOptions,
  ) {
    this.pool = termsOf(spec.factors, spec.model, spec.intercept).filter(
      ({ name }) => name !== INTERCEPT,
    );
  }

  /** In the order of the full model. */
  private inOrder(kept: ReadonlySet<string>): string[] {
    return this.pool.map(({ name }) => name).filter((name) => kept.has(name));
  }

  /** Fits a subset; null when these runs cannot carry it. */
  fit(kept: ReadonlySet<string>): Candidate | null {
    const terms = this.inOrder(kept);
    try {
      const model = fitModel({ ...this.spec, model: terms }, this.runs);
      const { summary } = model;
      const { criterion } = this.options;
      return { terms, model, value: criterion === 'p' ? null : summary[criterion] };
    } catch (error) {
      if (error instanceof StatsError && ['aliased', 'too-few-runs'].includes(error.code))
        return null;
      throw error;
    }
  }

  private isAllowed(kept: ReadonlySet<string>): boolean {
    return isAllowed(this.pool, kept, this.options.heredity);
  }

  /** Every allowed set with one term less. */
  private smaller(terms: readonly string[]): { kept: Set<string>; without: string }[] {
    return terms
      .map((without) => ({ kept: new Set(terms.filter((name) => name !== without)), without }))
      .filter(({ kept }) => this.isAllowed(kept));
  }

  /** Every allowed set with one term more. */
  private larger(terms: readonly string[]): { kept: Set<string>; added: string }[] {
    return this.pool
      .filter(({ name }) => !terms.includes(name))
      .map(({ name }) => ({ kept: new Set([...terms, name]), added: name }))
      .filter(({ kept }) => this.isAllowed(kept));
  }

  private note({ terms, value }: Candidate, decided: number | null = value): void {
    this.path.push({ terms, value: decided });
  }

  private pOf({ model }: Candidate, term: string): number {
    return model.anova.partial.find((line) => line.term === term)?.p ?? 1;
  }

  /** The neighbour with the smallest criterion, when it is smaller than here. */
  private better(here: Candidate, sets: readonly Set<string>[]): Candidate | null {
    const found = sets
      .map((kept) => this.fit(kept))
      .filter((each): each is Candidate => each !== null && each.value !== null)
      .sort((a, b) => (a.value ?? 0) - (b.value ?? 0))[0];
    if (!found) return null;
    return here.value === null || (found.value ?? Infinity) < here.value - 1e-12 ? found : null;
  }

  backward(): Candidate {
    let here = this.fit(new Set(this.pool.map(({ name }) => name)));
    if (!here) {
      // the runs cannot carry the full model: go up from nothing instead
      return this.forward();
    }
    this.note(here);
    for (;;) {
      const next: Candidate | null =
        this.options.criterion === 'p'
          ? this.dropWeakest(here)
          : this.better(
              here,
              this.smaller(here.terms).map(({ kept }) => kept),
            );
      if (!next) return here;
      here = next;
      if (this.options.criterion !== 'p') this.note(here);
    }
  }

  private dropWeakest(here: Candidate): Candidate | null {
    const weakest = this.smaller(here.terms)
      .map(({ kept, without }) => ({ kept, p: this.pOf(here, without) }))
      .sort((a, b) => b.p - a.p)[0];
    if (!weakest || weakest.p <= this.options.limit) return null;
    const next = this.fit(weakest.kept);
    if (next) this.note(next, weakest.p);
    return next;
  }

  forward(): Candidate {
    let here = this.fit(new Set());
    if (!here) throw new StatsError('too-few-runs', 'There are too few runs for any model.');
    this.note(here);
    for (;;) {
      const next: Candidate | null =
        this.options.criterion === 'p'
          ? this.addStrongest(here)
          : this.better(
              here,
              this.larger(here.terms).map(({ kept }) => kept),
            );
      if (!next) return here;
      here = next;
      if (this.options.criterion !== 'p') this.note(here);
    }
  }

  private addStrongest(here: Candidate): Candidate | null {
    const strongest = this.larger(here.terms)
      .flatMap(({ kept, added }) => {
        const candidate = this.fit(kept);
        return candidate ? [{ candidate, p: this.pOf(candidate, added) }] : [];
      })
      .sort((a, b) => a.p - b.p)[0];
    if (!strongest || strongest.p > this.options.limit) return null;
    this.note(strongest.candidate, strongest.p);
    return strongest.candidate;
  }

  allSubsets(): Candidate {
    const names = this.pool.map(({ name }) => name);
    const best: Candidate[] = [];
    let looked = 0;
    // depth first over terms in order; parents come before their children, so branches end early
    const visit = (from: number, kept: Set<string>): void => {
      if (++looked > MAX_SUBSETS)
        throw new StatsError(
          'not-available',
          `More than ${MAX_SUBSETS} models keep this heredity. Take backward elimination, or fewer terms to begin with.`,
        );
      const candidate = this.fit(kept);
      if (candidate && candidate.value !== null && (best[0]?.value ?? Infinity) > candidate.value) {
        best[0] = candidate;
        this.note(candidate);
      }
      for (let i = from; i < names.length; i++) {
        const larger = new Set([...kept, names[i]!]);
        if (this.isAllowed(larger)) visit(i + 1, larger);
      }
    };
    visit(0, new Set());
    return best[0] ?? this.forward();
  }
}

/**
 * Chooses terms by backward elimination, forward selection or all subsets, never dropping a parent under
 * strong heredity. `p` works with backward and forward only.
 *
 * @throws StatsError `not-available` for all subsets by p, or when there are too many of them.
 * @see Miller (2002), Subset Selection in Regression, 2nd ed.
 */
export function selectTerms(
  spec: ModelSpec,
  runs: readonly FitRun[],
  options: SelectionOptions,
): { model: FittedModel; terms: readonly string[]; path: readonly SelectionStep[] } {
  if (options.method === 'allSubsets' && options.criterion === 'p')
    throw new StatsError(
      'not-available',
      'All subsets are compared by AICc, BIC or PRESS; p compares only neighbours.',
    );
  const search = new Search(spec, runs, options);
  const { model, terms } = search[options.method]();
  return { model, terms, path: search.path };
}
