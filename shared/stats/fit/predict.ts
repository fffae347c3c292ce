import type { Factor, Settings } from '../coding/factor';
import { tQuantile } from '../distributions/quantiles';
import { pointOf, termValue, type Point } from '../model/modelMatrix';
import { parseTerm, type Term } from '../model/term';
import { restored, type Transform } from './transform';

/** A fitted model as needed to predict: coefficients of the coded terms and (XᵀX)⁻¹, blocks left out. */
export interface Predictor {
  readonly factors: readonly Factor[];
  readonly terms: readonly Term[];
  readonly coefficients: Float64Array;
  /** p × p, row-major. */
  readonly unscaled: Float64Array;
  /** null when there is nothing to judge an error by. */
  readonly residualSd: number | null;
  readonly df: number;
  readonly transform: Transform;
}

export interface IntervalOptions {
  readonly confidence: number;
  /** The interval for the mean of so many new runs. */
  readonly meanOf: number;
  /** Day-to-day standard deviation on the analysed scale, added for runs in a new block. */
  readonly blockSd: number;
}

export interface Prediction {
  readonly predicted: number;
  readonly standardError: number | null;
  readonly ciLow: number | null;
  readonly ciHigh: number | null;
  readonly piLow: number | null;
  readonly piHigh: number | null;
}

const isBlock = (name: string) => name.startsWith('block[');

/**
 * Makes a predictor from names, estimates and (XᵀX)⁻¹ of a fit. Blocks count at their mean, so their
 * columns drop out.
 */
export function predictorOf(
  factors: readonly Factor[],
  fit: {
    readonly names: readonly string[];
    readonly estimates: readonly number[];
    readonly unscaled: (i: number, j: number) => number;
    readonly residualSd: number | null;
    readonly df: number;
  },
  transform: Transform,
): Predictor {
  const kept = fit.names.flatMap((name, j) => (isBlock(name) ? [] : [j]));
  const p = kept.length;
  const unscaled = new Float64Array(p * p);
  kept.forEach((a, i) => {
    kept.forEach((b, j) => (unscaled[i * p + j] = fit.unscaled(a, b)));
  });
  return {
    factors,
    terms: kept.map((j) => parseTerm(factors, fit.names[j]!)),
    coefficients: Float64Array.from(kept, (j) => fit.estimates[j]!),
    unscaled,
    residualSd: fit.residualSd,
    df: fit.df,
    transform,
  };
}

/** Values of the model's terms at a coded point. */
export function rowAt(predictor: Predictor, point: Point): Float64Array {
  return Float64Array.from(predictor.terms, (term) => termValue(predictor.factors, term, point));
}

/** Mean on the analysed scale at a row of term values. */
export function meanOfRow(predictor: Predictor, row: Float64Array): number {
  let sum = 0;
  for (let j = 0; j < row.length; j++) sum += row[j]! * predictor.coefficients[j]!;
  return sum;
}

/** x'(XᵀX)⁻¹x: the variance of the mean over that of one run. */
export function leverageOfRow({ unscaled }: Predictor, row: Float64Array): number {
  const p = row.length;
  let sum = 0;
  for (let i = 0; i < p; i++) {
    let inner = 0;
    for (let j = 0; j < p; j++) inner += unscaled[i * p + j]! * row[j]!;
    sum += row[i]! * inner;
  }
  return sum;
}

function backInOrder(transform: Transform, low: number, high: number): [number, number] {
  const a = restored(transform, low);
  const b = restored(transform, high);
  return a <= b ? [a, b] : [b, a];
}

/**
 * Prediction with intervals at a coded point: for the mean, and for the mean of new runs, on the
 * original scale (a median where transformed); the standard error is that of the mean on the analysed
 * scale.
 *
 * @see Draper & Smith (1998), §3.1 and 5.
 */
export function predictPoint(
  predictor: Predictor,
  point: Point,
  { confidence, meanOf, blockSd }: IntervalOptions,
): Prediction {
  const row = rowAt(predictor, point);
  const mean = meanOfRow(predictor, row);
  const { residualSd, df, transform } = predictor;
  const predicted = restored(transform, mean);
  if (residualSd === null || df <= 0)
    return {
      predicted,
      standardError: null,
      ciLow: null,
      ciHigh: null,
      piLow: null,
      piHigh: null,
    };
  const leverage = leverageOfRow(predictor, row);
  const standardError = residualSd * Math.sqrt(Math.max(0, leverage));
  const spread = Math.sqrt(residualSd ** 2 * (Math.max(0, leverage) + 1 / meanOf) + blockSd ** 2);
  const t = tQuantile((1 + confidence) / 2, df);
  const [ciLow, ciHigh] = backInOrder(
    transform,
    mean - t * standardError,
    mean + t * standardError,
  );
  const [piLow, piHigh] = backInOrder(transform, mean - t * spread, mean + t * spread);
  return { predicted, standardError, ciLow, ciHigh, piLow, piHigh };
}

/** As `predictPoint`, at settings in the factors' own units. */
export function predictAt(
  predictor: Predictor,
  settings: Settings,
  options: IntervalOptions,
): Prediction {
  return predictPoint(predictor, pointOf(predictor.factors, settings), options);
}
