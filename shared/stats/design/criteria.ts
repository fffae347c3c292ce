import { cholesky, inverseFrom, logDeterminant, quadraticForm } from '../linalg/cholesky';
import type { Matrix } from '../linalg/matrix';
import { compileRow } from '../model/compileRow';
import type { Term } from '../model/term';
import { makeRandom } from '../random/generator';
import { approximateDesign } from './approximateDesign';
import { informationOf } from './designMatrix';
import { spreadOver, type Region } from './region';
import { regionMoments } from './regionMoments';
import { candidatesOf, climb } from './varianceSearch';

/** Searches over the region are seeded with this, so that one design has one evaluation. */
const SEED = 1;
const CURVE_POINTS = 4000;
const CURVE_STEPS = 50;
const STARTS = 6;

export interface Criteria {
  readonly dEfficiency: number;
  readonly dBound: number | null;
  readonly dRelative: number | null;
  readonly aEfficiency: number;
  readonly gEfficiency: number;
  readonly iAverage: number | null;
  readonly predictionVariance: {
    readonly fractions: number[];
    readonly scaled: number[];
    readonly max: number;
  } | null;
}

/** Rigorous upper bound of |M|^(1/p) over all designs on the region; null when none separates the terms. */
export function upperBoundD(region: Region, terms: readonly Term[]): number | null {
  const rowAt = compileRow(region.factors, terms);
  const best = approximateDesign({ region, rowAt, terms: terms.length }, makeRandom(SEED));
  if (!best) return null;
  return Math.exp(best.logDet / terms.length) * (best.maxVariance / terms.length);
}

/** Scaled prediction variance over shares of the region, and its largest value in it. */
function varianceOver(region: Region, terms: readonly Term[], inverse: Float64Array) {
  const rowAt = compileRow(region.factors, terms);
  const p = terms.length;
  const task = { region, rowAt, inverse, terms: p };
  const row = new Float64Array(p);
  const at = (point: readonly number[]) => {
    rowAt(point, row);
    return quadraticForm(inverse, row, p);
  };
  const spread = Float64Array.from(spreadOver(region, CURVE_POINTS), at).sort();
  const random = makeRandom(SEED);
  const found = candidatesOf(region, random)
    .map((point) => ({ point, value: at(point) }))
    .sort((a, b) => b.value - a.value);
  const climbed = found.slice(0, STARTS).map(({ point }) => climb(task, point, random).value);
  const max = Math.max(...climbed, spread.at(-1)!);
  const fractions = Array.from({ length: CURVE_STEPS + 1 }, (_, i) => i / CURVE_STEPS);
  // the last point of the curve is the largest value in the region, not in the sample
  const scaled = fractions.map((fraction) =>
    fraction === 1 ? max : spread[Math.floor(fraction * (spread.length - 1))]!,
  );
  return { fractions, scaled, max };
}

/**
 * The criteria of a design for a model, with M = X′X/n in coded units and without block effects.
 *
 * @param bound upper bound of |M|^(1/p); null = not asked for.
 * @see Atkinson, Donev & Tobias (2007), Optimum Experimental Designs, ch. 10–11; Zahran, Anderson-Cook &
 *   Myers (2003), Fraction of design space, J. Quality Technology 35: 377–386.
 */
export function criteriaOf(
  x: Matrix,
  region: Region,
  terms: readonly Term[],
  bound: number | null,
): Criteria {
  const p = x.cols;
  const l = cholesky(
    informationOf(x).map((value) => value / x.rows),
    p,
  );
  if (!l)
    return {
      dEfficiency: 0,
      dBound: bound,
      dRelative: bound === null ? null : 0,
      aEfficiency: 0,
      gEfficiency: 0,
      iAverage: null,
      predictionVariance: null,
    };
  const inverse = inverseFrom(l, p);
  const dEfficiency = Math.exp(logDeterminant(l, p) / p);
  let trace = 0;
  for (let a = 0; a < p; a++) trace += inverse[a * p + a]!;
  const moments = regionMoments(region, terms, compileRow(region.factors, terms));
  const iAverage = moments.reduce((sum, moment, i) => sum + moment * inverse[i]!, 0);
  const predictionVariance = varianceOver(region, terms, inverse);
  return {
    dEfficiency,
    dBound: bound,
    dRelative: bound === null ? null : dEfficiency / bound,
    aEfficiency: p / trace,
    gEfficiency: p / predictionVariance.max,
    iAverage,
    predictionVariance,
  };
}
