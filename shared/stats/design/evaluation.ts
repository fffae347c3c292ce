import { EigenvalueDecomposition, Matrix as MlMatrix } from 'ml-matrix';
import { isCategorical, type Factor } from '../coding/factor';
import { fQuantile } from '../distributions/quantiles';
import { noncentralFUpper } from '../distributions/noncentralF';
import { blockContrast } from '../fit/codedColumns';
import { bilinear, cholesky, gramOf, inverseOf, lnDeterminant } from '../linalg/cholesky';
import { termValue, type Point } from '../model/modelMatrix';
import { INTERCEPT, order, type Term } from '../model/term';
import { approximateD } from './approximate';
import { latticePoints, samplePoints, type Region } from './region';

const CANDIDATES = 1200;
const LOOKED_AT = 20_000;
const MAX_ROUNDS = 6;
const ADDED = 150;
const CLOSE = 2e-3;
const SAMPLE = 4000;
const CURVE_POINTS = 101;
const NULL_SPACE = 1e-10;
const TAKES_PART = 1e-7;

/** Model rows without blocks at coded points. */
export function rowsAt(
  factors: readonly Factor[],
  terms: readonly Term[],
  points: readonly Point[],
): Float64Array[] {
  return points.map((point) => Float64Array.from(terms, (term) => termValue(factors, term, point)));
}

/** Model rows with sum-to-zero block columns behind the terms. */
export function rowsWithBlocks(
  rows: readonly Float64Array[],
  blocks: readonly number[],
): Float64Array[] {
  const distinct = [...new Set(blocks)].sort((a, b) => a - b);
  if (distinct.length < 2) return [...rows];
  return rows.map((row, i) =>
    Float64Array.from([
      ...row,
      ...distinct.slice(0, -1).map((_, c) => blockContrast(blocks[i]!, distinct, c)),
    ]),
  );
}

export interface TermEvaluation {
  readonly term: string;
  readonly relativeStandardError: number | null;
  readonly vif: number | null;
  readonly power: number | null;
}

export interface Evaluation {
  readonly parameters: number;
  readonly rank: number;
  readonly estimable: readonly string[];
  readonly notEstimable: readonly string[];
  readonly dEfficiency: number | null;
  readonly dBound: number | null;
  readonly dRelative: number | null;
  readonly aEfficiency: number | null;
  readonly gEfficiency: number | null;
  readonly iAverage: number | null;
  readonly terms: readonly TermEvaluation[];
  readonly leverages: readonly number[];
  readonly predictionVariance: {
    readonly fractions: readonly number[];
    readonly scaled: readonly number[];
    readonly max: number;
  } | null;
}

export interface PowerRequest {
  /** Change of the response from low to high; for a square from centre to high. */
  readonly effect: number;
  readonly sigma: number;
  readonly significance: number;
}

/** Which columns can be estimated at all: those with no part in the null space of XᵀX. */
function estimability(gram: Float64Array, p: number): { rank: number; isEstimable: boolean[] } {
  const matrix = new MlMatrix(
    Array.from({ length: p }, (_, i) => [...gram.subarray(i * p, (i + 1) * p)]),
  );
  const eigen = new EigenvalueDecomposition(matrix, { assumeSymmetric: true });
  const values = eigen.realEigenvalues;
  const largest = Math.max(...values.map(Math.abs));
  const isNull = values.map((value) => Math.abs(value) <= NULL_SPACE * largest);
  const vectors = eigen.eigenvectorMatrix;
  const isEstimable = Array.from({ length: p }, (_, j) =>
    values.every((_value, c) => !isNull[c] || Math.abs(vectors.get(j, c)) < TAKES_PART),
  );
  return { rank: isNull.filter((each) => !each).length, isEstimable };
}

/** The coefficient that an effect of this size has: half of it for a straight term, all of it for a square. */
function coefficientOf(term: Term, effect: number): number {
  const isEven = term.powers.every((power) => power % 2 === 0) && term.contrasts.length === 0;
  return isEven ? effect : effect / 2;
}

function powerOf(
  term: Term,
  inverseDiagonal: number,
  df: number,
  request: PowerRequest | null,
): number | null {
  if (!request || df < 1 || term.name === INTERCEPT) return null;
  const { effect, sigma, significance } = request;
  const lambda = (coefficientOf(term, effect) / sigma) ** 2 / inverseDiagonal;
  const critical = fQuantile(1 - significance, 1, df, significance);
  return noncentralFUpper(critical, 1, df, lambda);
}

function vifOf(rows: readonly Float64Array[], j: number, inverseDiagonal: number): number | null {
  const values = rows.map((row) => row[j]!);
  const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
  const spread = values.reduce((sum, value) => sum + (value - mean) ** 2, 0);
  return spread > 0 ? spread * inverseDiagonal : null;
}

/** Mean of f f' over a box of coded ±1 by its exact moments; null when the region is no such box. */
function boxMoments(region: Region, terms: readonly Term[]): Float64Array | null {
  const { factors, constraints } = region;
  if (constraints.length > 0 || factors.some((f) => isCategorical(f) || f.step !== undefined))
    return null;
  const ends = region.axes.map(({ coded }) => [coded[0]!, coded.at(-1)!] as const);
  if (ends.some(([low, high]) => Math.abs(low + 1) > 1e-9 || Math.abs(high - 1) > 1e-9))
    return null;
  const p = terms.length;
  const moments = new Float64Array(p * p);
  terms.forEach((a, i) => {
    terms.forEach((b, j) => {
      moments[i * p + j] = a.powers.reduce((product, power, f) => {
        const sum = power + b.powers[f]!;
        return sum % 2 === 1 ? 0 : product / (sum + 1);
      }, 1);
    });
  });
  return moments;
}

/** The average of f f' over the region, p × p: exact for a plain box, else over points of the lattice. */
export function regionMoments(region: Region, terms: readonly Term[]): Float64Array {
  const exact = boxMoments(region, terms);
  if (exact) return exact;
  const rows = rowsAt(region.factors, terms, samplePoints(region, SAMPLE));
  const gram = gramOf(rows, terms.length);
  return gram.map((value) => value / rows.length);
}

/**
 * An upper bound on |M|^(1/p) over all designs on the region: candidates are added where the variance of
 * the best measure on the former ones is largest, until none stands out. Rigorous on the lattice itself
 * where it has at most `LOOKED_AT` combinations, else on it thinned to that many.
 */
function dBoundOf(region: Region, terms: readonly Term[]): number | null {
  const p = terms.length;
  const all = rowsAt(region.factors, terms, latticePoints(region, LOOKED_AT));
  let candidates = rowsAt(region.factors, terms, latticePoints(region, CANDIDATES));
  let smallest: number | null = null;
  for (let round = 0; round < MAX_ROUNDS; round++) {
    const measure = approximateD(candidates, p);
    if (!measure) return null;
    const variances = all.map((row) => bilinear(measure.inverse, row, row));
    const largest = variances.reduce((most, value) => Math.max(most, value), 0);
    const bound = (measure.dValue * Math.max(p, largest)) / p;
    smallest = Math.min(smallest ?? Infinity, bound);
    if (largest <= p * (1 + CLOSE)) break;
    const kept = candidates.filter((_, i) => measure.weights[i]! > 0);
    const worst = all
      .map((row, i) => ({ row, variance: variances[i]! }))
      .filter(({ variance }) => variance > p * (1 + CLOSE))
      .sort((a, b) => b.variance - a.variance)
      .slice(0, ADDED)
      .map(({ row }) => row);
    candidates = [...kept, ...worst];
  }
  return smallest;
}

const traceOfProduct = (a: Float64Array, b: Float64Array) =>
  a.reduce((sum, value, i) => sum + value * b[i]!, 0);

const none = (
  terms: readonly Term[],
): Pick<
  Evaluation,
  | 'dEfficiency'
  | 'dRelative'
  | 'aEfficiency'
  | 'gEfficiency'
  | 'iAverage'
  | 'terms'
  | 'leverages'
  | 'predictionVariance'
> => ({
  dEfficiency: null,
  dRelative: null,
  aEfficiency: null,
  gEfficiency: null,
  iAverage: null,
  terms: terms.map(({ name }) => ({
    term: name,
    relativeStandardError: null,
    vif: null,
    power: null,
  })),
  leverages: [],
  predictionVariance: null,
});

/**
 * What a set of runs can tell about a model, before any of them is done. M = XᵀX/n in coded units, p
 * terms with blocks; scaled prediction variance d(x) = f(x)ᵀM⁻¹f(x), blocks at their mean.
 *
 * @param points coded runs; @param blocks their blocks.
 * @see Atkinson, Donev & Tobias (2007), Optimum Experimental Designs, with SAS, ch. 6 and 9; Zahran,
 *   Anderson-Cook & Myers (2003), J. Quality Technology 35: 377–386 (variance over fractions of the region).
 */
export function evaluate(
  region: Region,
  terms: readonly Term[],
  runs: { readonly points: readonly Point[]; readonly blocks: readonly number[] },
  power: PowerRequest | null,
): Evaluation {
  const { factors } = region;
  const own = rowsAt(factors, terms, runs.points);
  const rows = rowsWithBlocks(own, runs.blocks);
  const n = rows.length;
  const q = terms.length;
  const p = rows[0]?.length ?? q;
  const gram = gramOf(rows, p);
  const { rank, isEstimable } = estimability(gram, p);
  const names = terms.map(({ name }) => name);
  const bound = dBoundOf(region, terms);
  const head = {
    parameters: p,
    rank,
    estimable: names.filter((_, j) => isEstimable[j]),
    notEstimable: names.filter((_, j) => !isEstimable[j]),
    dBound: bound,
  };
  const l = rank === p ? cholesky(gram, p) : null;
  if (!l) return { ...head, ...none(terms) };
  const inverse = inverseOf(l, p);
  const dEfficiency = Math.exp(lnDeterminant(l, p) / p) / n;
  let trace = 0;
  for (let j = 0; j < p; j++) trace += n * inverse[j * p + j]!;
  // predictions are at the mean of the blocks: their columns are 0
  const scaled = new Float64Array(q * q);
  for (let i = 0; i < q; i++)
    for (let j = 0; j < q; j++) scaled[i * q + j] = n * inverse[i * p + j]!;
  const sample = [...samplePoints(region, SAMPLE), ...latticePoints(region, CANDIDATES)];
  const variances = rowsAt(factors, terms, sample).map((row) => bilinear(scaled, row, row));
  const overRegion = variances.slice(0, variances.length).sort((a, b) => a - b);
  const max = overRegion.at(-1)!;
  return {
    ...head,
    dEfficiency,
    dRelative: bound !== null && p === q ? dEfficiency / bound : null,
    aEfficiency: p / trace,
    gEfficiency: p / max,
    iAverage: traceOfProduct(scaled, regionMoments(region, terms)),
    terms: terms.map((term, j) => {
      const diagonal = inverse[j * p + j]!;
      return {
        term: term.name,
        relativeStandardError: Math.sqrt(diagonal),
        vif: order(term) === 0 ? null : vifOf(rows, j, diagonal),
        power: powerOf(term, diagonal, n - p, power),
      };
    }),
    leverages: rows.map((row) => bilinear(inverse, row, row)),
    predictionVariance: {
      fractions: Array.from({ length: CURVE_POINTS }, (_, i) => i / (CURVE_POINTS - 1)),
      scaled: Array.from(
        { length: CURVE_POINTS },
        (_, i) => overRegion[Math.round((i * (overRegion.length - 1)) / (CURVE_POINTS - 1))]!,
      ),
      max,
    },
  };
}
