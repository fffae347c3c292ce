import { cholesky, inverseOf, lnDeterminant, bilinear } from '../linalg/cholesky';
import type { Matrix } from '../linalg/matrix';
import { compileRow } from '../model/compileRow';
import type { Term } from '../model/term';
import { seeded } from '../random/random';
import { approximateDesign, type ApproximateDesign } from './approximateDesign';
import { informationOf } from './designMatrix';
import { spreadOver, type DesignRegion } from './designRegion';
import { regionMoments } from './regionMoments';
import { candidatesOf, climb } from './varianceSearch';

/** Searches over the region are seeded with this, so that one design has one evaluation. */
const SEED = 1;
const CURVE_POINTS = 4000;
const CURVE_STEPS = 50;
const STARTS = 6;

export interface Criteria {
  readonly dEfficiency: number | null;
  readonly dBound: number | null;
  readonly dRelative: number | null;
  readonly aEfficiency: number | null;
  readonly gEfficiency: number | null;
  readonly iAverage: number | null;
  readonly predictionVariance: {
    readonly fractions: number[];
    readonly scaled: number[];
    readonly max: number;
  } | null;
}

/**
 * Products of distinct factors on the cube ±1 without limits: all corners alike give M = I and d ≤ p
 * everywhere, so 1 is the bound exactly.
 */
function isMultilinearOnCube(region: DesignRegion, terms: readonly Term[]): boolean {
  const isCube =
    !region.hasLimits && region.low.every((x) => x === -1) && region.high.every((x) => x === 1);
  return (
    isCube &&
    terms.every(({ powers, contrasts }) => contrasts.length === 0 && powers.every((n) => n <= 1))
  );
}

/** The best approximate design on a region; null when no design there separates the terms. */
export function bestOn(region: DesignRegion, terms: readonly Term[]): ApproximateDesign | null {
  const rowAt = compileRow(region.factors, terms);
  return approximateDesign({ region, rowAt, terms: terms.length }, seeded(SEED, 'evaluation'));
}

/** The bound that an approximate design proves: |M|^(1/p) · max d/p. */
export function boundFrom({ logDet, maxVariance }: ApproximateDesign, terms: number): number {
  return Math.exp(logDet / terms) * (maxVariance / terms);
}

/** Rigorous upper bound of |M|^(1/p) over all designs on the region; null when none separates the terms. */
export function upperBoundD(region: DesignRegion, terms: readonly Term[]): number | null {
  if (isMultilinearOnCube(region, terms)) return 1;
  const best = bestOn(region, terms);
  return best && boundFrom(best, terms.length);
}

/** Scaled prediction variance over shares of the region, and its largest value in it. */
function varianceOver(region: DesignRegion, terms: readonly Term[], inverse: Float64Array) {
  const rowAt = compileRow(region.factors, terms);
  const p = terms.length;
  const task = { region, rowAt, inverse, terms: p };
  const row = new Float64Array(p);
  const at = (point: readonly number[]) => {
    rowAt(point, row);
    return bilinear(inverse, row, row);
  };
  const spread = Float64Array.from(spreadOver(region, CURVE_POINTS), at).sort();
  const random = seeded(SEED, 'evaluation');
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
  region: DesignRegion,
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
      dEfficiency: null,
      dBound: bound,
      dRelative: null,
      aEfficiency: null,
      gEfficiency: null,
      iAverage: null,
      predictionVariance: null,
    };
  const inverse = inverseOf(l, p);
  const dEfficiency = Math.exp(lnDeterminant(l, p) / p);
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
