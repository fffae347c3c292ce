import type { FitAnswer, FitRequest, FitTerm } from '../schemas/calc/fit';
import { tQuantile } from '../stats/distributions/quantiles';
import { tTwoSided } from '../stats/distributions/tails';
import { betweenBlockSd } from '../stats/fit/betweenBlocks';
import { constantSpreadCheck, normalityCheck, runOrderCheck } from '../stats/fit/checks';
import { diagnosticsOf } from '../stats/fit/diagnostics';
import { fitModel, type FittedModel } from '../stats/fit/fitModel';
import { predictAt } from '../stats/fit/predict';
import { realUnitsOf } from '../stats/fit/realUnits';
import { toNumber } from '../stats/linalg/dd';
import { ddGet } from '../stats/linalg/ddMatrix';
import { INTERCEPT } from '../stats/model/term';
import { canonicalOf } from '../stats/surface/canonical';
import { fitWarnings } from './fitWarnings';
import { usedRuns, type RunSelection } from './usedRuns';

const NO_RUNS_LEFT =
  'There are as many terms as runs: the coefficients are exact, and no run is left over to judge the error, so tests and intervals cannot be given.';
const PERFECT_FIT =
  'The model meets every run exactly, so there is no error to judge by; tests and intervals would mean nothing.';

/** Σ(xⱼ − mean)² · (XᵀX)⁻¹ⱼⱼ of a column; null for the intercept and for a column without spread. */
function vifOf(model: FittedModel, j: number): number | null {
  const { columns, fit } = model;
  if (columns.names[0] !== INTERCEPT || j === 0) return null;
  const values = Array.from(
    { length: fit.n },
    (_, i) => toNumber(ddGet(columns.x, i, j)) / toNumber(columns.rootWeights[i]!),
  );
  const sumOfWeights = model.weights.reduce((sum, weight) => sum + weight, 0);
  const mean = values.reduce((sum, value, i) => sum + model.weights[i]! * value, 0) / sumOfWeights;
  const spread = values.reduce((sum, value, i) => sum + model.weights[i]! * (value - mean) ** 2, 0);
  const vif = spread * toNumber(ddGet(fit.inverse, j, j));
  return spread > 0 ? vif : null;
}

function termsOfAnswer(model: FittedModel, confidence: number): FitTerm[] {
  const { fit, columns, summary } = model;
  const df = fit.n - fit.p;
  const sd = summary.residualSd;
  const quantile = df > 0 ? tQuantile((1 + confidence) / 2, df) : null;
  return columns.names.map((term, j) => {
    const estimate = toNumber(fit.coefficients[j]!);
    const vif = vifOf(model, j);
    if (sd === null || quantile === null)
      return {
        term,
        estimate,
        standardError: null,
        t: null,
        p: null,
        ciLow: null,
        ciHigh: null,
        vif,
      };
    const standardError = sd * Math.sqrt(toNumber(ddGet(fit.inverse, j, j)));
    const t = standardError > 0 ? estimate / standardError : null;
    return {
      term,
      estimate,
      standardError,
      t,
      p: t === null ? null : tTwoSided(t, df),
      ciLow: estimate - quantile * standardError,
      ciHigh: estimate + quantile * standardError,
      vif,
    };
  });
}

function reasonOf(model: FittedModel): string | null {
  if (model.fit.n === model.fit.p) return NO_RUNS_LEFT;
  return model.fit.isPerfect ? PERFECT_FIT : null;
}

function covarianceOf(model: FittedModel): FitAnswer['covariance'] {
  const { columns, fit, summary } = model;
  const { rows, cols, data } = fit.inverseRounded;
  return {
    terms: columns.names,
    unscaled: Array.from({ length: rows }, (_, i) => [...data.subarray(i * cols, (i + 1) * cols)]),
    residualSd: summary.residualSd,
    df: fit.n - fit.p,
  };
}

function transformOf({ transform, profile }: FittedModel): FitAnswer['transform'] {
  const { kind, lower, upper, movedBy, lambda } = transform;
  return {
    kind,
    lower: kind === 'logit' ? lower : null,
    upper: kind === 'logit' ? upper : null,
    movedBy,
    lambda: kind === 'boxcox' ? lambda : null,
    lambdaLow: profile?.low ?? null,
    lambdaHigh: profile?.high ?? null,
  };
}

type Warning = FitAnswer['warnings'][number];

/** The day-to-day spread to add for runs in a new block, and what to say about it. */
function newBlockSpread(
  request: FitRequest,
  model: FittedModel,
  selection: RunSelection,
): { sd: number; warnings: Warning[] } {
  if (!request.newBlock) return { sd: 0, warnings: [] };
  if (request.blockSd !== null) return { sd: request.blockSd, warnings: [] };
  const sd = request.blocks ? betweenBlockSd(model, selection.used) : null;
  if (sd !== null) return { sd, warnings: [] };
  return {
    sd: 0,
    warnings: [
      {
        code: 'day-not-included',
        message:
          'Day-to-day variation not included: it takes runs in three blocks, or the lab’s own figure for it.',
      },
    ],
  };
}

/** Everything that is reported of a fitted model. */
export function answerOf(
  request: FitRequest,
  model: FittedModel,
  selection: RunSelection,
): FitAnswer {
  const terms = termsOfAnswer(model, request.confidence);
  const diagnostics = diagnosticsOf(model.fit, model.weights).map((each, i) => ({
    id: selection.used[i]!.id,
    observed: model.z[i]!,
    ...each,
  }));
  const reason = reasonOf(model);
  const day = newBlockSpread(request, model, selection);
  const options = {
    confidence: request.confidence,
    meanOf: request.meanOf,
    blockSd: day.sd,
  };
  const { residuals, fitted } = model.fit;
  const inferred = reason === null ? residuals : [];
  return {
    terms,
    realUnits: realUnitsOf(
      request.factors,
      model.columns.names,
      model.fit,
      model.summary.residualSd,
    ),
    anova: model.anova,
    summary: model.summary,
    diagnostics,
    checks: {
      normality: normalityCheck(inferred),
      constantSpread: constantSpreadCheck(inferred, fitted.slice(0, inferred.length)),
      runOrder: runOrderCheck(inferred),
    },
    canonical: canonicalOf(model.predictor),
    predictions: request.predictAt.map((settings) => ({
      settings,
      ...predictAt(model.predictor, settings, options),
    })),
    covariance: covarianceOf(model),
    transform: transformOf(model),
    reason,
    warnings: [
      ...fitWarnings(model, { terms, anova: model.anova, reason, diagnostics }, selection),
      ...day.warnings,
    ],
  };
}

/**
 * Fits one response: `POST /api/calc/fit`.
 *
 * @throws StatsError when the calculation is impossible; see `fitModel`.
 */
export function fitAnswer(request: FitRequest): FitAnswer {
  const selection = usedRuns(request.runs);
  return answerOf(request, fitModel(request, selection.used), selection);
}
