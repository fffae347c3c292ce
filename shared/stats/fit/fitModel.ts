import type { Factor, Settings } from '../coding/factor';
import { StatsError } from '../errors';
import { toNumber } from '../linalg/dd';
import { ddGet } from '../linalg/ddMatrix';
import { termsOf, type ModelKind, type Term } from '../model/term';
import { anovaOf, type Anova } from './anova';
import { boxCoxProfile, type BoxCoxProfile } from './boxCox';
import { codedColumns, type CodedColumns } from './codedColumns';
import { criteriaOf } from './criteria';
import { pressOf } from './diagnostics';
import { leastSquares, type LeastSquares } from './leastSquares';
import { predictorOf, type Predictor } from './predict';
import { agreementDigits, conditionNumber } from './secondSolver';
import {
  lnJacobian,
  settleTransform,
  transformed,
  type Transform,
  type TransformKind,
} from './transform';

/** One run that is used. */
export interface FitRun {
  readonly settings: Settings;
  readonly block: number;
  readonly value: number;
  readonly weight: number;
}

export interface ModelSpec {
  readonly factors: readonly Factor[];
  readonly model: ModelKind | readonly string[];
  readonly intercept: boolean;
  readonly blocks: boolean;
  readonly transform: TransformKind;
  readonly transformParameters: {
    readonly lower?: number | undefined;
    readonly upper?: number | undefined;
    readonly lambda?: number | undefined;
  };
}

export interface Summary {
  readonly n: number;
  readonly parameters: number;
  readonly rSquared: number | null;
  readonly adjustedRSquared: number | null;
  readonly predictedRSquared: number | null;
  readonly press: number | null;
  readonly residualSd: number | null;
  readonly aicc: number | null;
  readonly bic: number | null;
  readonly conditionNumber: number;
  readonly agreementDigits: number;
}

/** A fitted model with everything that reports and predictions are made from. */
export interface FittedModel {
  readonly terms: readonly Term[];
  readonly columns: CodedColumns;
  /** Values on the analysed scale. */
  readonly z: readonly number[];
  readonly weights: readonly number[];
  readonly fit: LeastSquares;
  readonly anova: Anova;
  readonly summary: Summary;
  readonly transform: Transform;
  readonly profile: BoxCoxProfile | null;
  readonly predictor: Predictor;
}

/** Beside this share of its size, a spread of the response is rounding. */
const CONSTANT = 1e-12;

function refuseConstant(values: readonly number[]): void {
  const low = Math.min(...values);
  const high = Math.max(...values);
  if (values.length > 1 && high - low <= CONSTANT * Math.max(Math.abs(low), Math.abs(high)))
    throw new StatsError(
      'constant-response',
      `All ${values.length} runs gave ${low}, so there is nothing to model.`,
    );
}

/** The blocks to fit: those of the runs, ascending; one block is none. */
export function blocksOf(runs: readonly FitRun[], wanted: boolean): number[] {
  const found = [...new Set(runs.map(({ block }) => block))].sort((a, b) => a - b);
  return wanted && found.length > 1 ? found : [];
}

function settle(
  spec: ModelSpec,
  columns: CodedColumns,
  values: readonly number[],
): { transform: Transform; profile: BoxCoxProfile | null } {
  const { transform: kind, transformParameters: given } = spec;
  const first = settleTransform(kind, values, given);
  if (kind !== 'boxcox' || given.lambda !== undefined) return { transform: first, profile: null };
  const profile = boxCoxProfile(columns, values);
  return { transform: { ...first, lambda: profile.lambda }, profile };
}

function summaryOf(
  model: Pick<FittedModel, 'columns' | 'fit' | 'anova' | 'z' | 'weights'>,
  jacobian: number,
): Summary {
  const { columns, fit, anova, z, weights } = model;
  const { n, p } = fit;
  const rss = anova.residual.ss;
  const total = anova.total;
  const df = n - p;
  const press = df > 0 ? pressOf(fit, weights) : null;
  const weighted = z.map((value, i) => value * toNumber(columns.rootWeights[i]!));
  const rSquared = total.ss > 0 ? 1 - rss / total.ss : null;
  const adjusted = total.ss > 0 && df > 0 ? 1 - rss / df / (total.ss / total.df) : null;
  const hasError = df > 0 && rss > 0;
  const criteria = hasError ? criteriaOf(rss, n, p, jacobian) : { aicc: null, bic: null };
  return {
    n,
    parameters: p,
    rSquared,
    adjustedRSquared: adjusted,
    predictedRSquared: press !== null && total.ss > 0 ? 1 - press / total.ss : null,
    press,
    residualSd: df > 0 ? Math.sqrt(rss / df) : null,
    ...criteria,
    conditionNumber: conditionNumber(columns.x),
    agreementDigits: agreementDigits(columns.x, weighted, fit.coefficients),
  };
}

/**
 * Fits one model to runs: codes, transforms, solves in double-double, and makes its analysis of variance
 * and summary.
 *
 * @throws StatsError `too-few-runs`, `aliased`, `constant-response`, `out-of-bounds`, `unknown-term`.
 */
export function fitModel(spec: ModelSpec, runs: readonly FitRun[]): FittedModel {
  const terms = termsOf(spec.factors, spec.model, spec.intercept);
  const values = runs.map(({ value }) => value);
  const columns = codedColumns(spec.factors, terms, runs, blocksOf(runs, spec.blocks));
  const { transform, profile } = settle(spec, columns, values);
  const z = values.map((value) => transformed(transform, value));
  const fit = leastSquares(columns, z);
  refuseConstant(values);
  const anova = anovaOf(columns, z, fit);
  const weights = runs.map(({ weight }) => weight);
  const jacobian = values.reduce((sum, value) => sum + lnJacobian(transform, value), 0);
  const summary = summaryOf({ columns, fit, anova, z, weights }, jacobian);
  const predictor = predictorOf(
    spec.factors,
    {
      names: columns.names,
      estimates: fit.coefficients.map(toNumber),
      unscaled: (i, j) => toNumber(ddGet(fit.inverse, i, j)),
      residualSd: summary.residualSd,
      df: fit.n - fit.p,
    },
    transform,
  );
  return { terms, columns, z, weights, fit, anova, summary, transform, profile, predictor };
}
