import { criteriaOf, upperBoundD } from '../stats/design/criteria';
import { aliasMatrix } from '../stats/design/aliasMatrix';
import { modelOf } from '../stats/design/designMatrix';
import { makeRegion } from '../stats/design/region';
import { correlationsOf, termPrecision } from '../stats/design/termPrecision';
import { pointOf } from '../stats/model/modelMatrix';
import { INTERCEPT, termsOf } from '../stats/model/term';
import {
  evaluateRequestSchema,
  type EvaluateAnswer,
  type EvaluateRequest,
} from '../schemas/calc/evaluate';
import { checkFactorCount } from './limits';

function warningsOf(answer: Pick<EvaluateAnswer, 'notEstimable' | 'residualDf'>) {
  const warnings: EvaluateAnswer['warnings'] = [];
  const { notEstimable, residualDf } = answer;
  if (notEstimable.length > 0)
    warnings.push({
      code: 'not-estimable',
      message: `These runs cannot tell apart: ${notEstimable.join(', ')}.`,
    });
  if (residualDf === 0)
    warnings.push({
      code: 'no-error-left',
      message: 'No run is left to judge the error by: there will be no p values and no power.',
    });
  return warnings;
}

/**
 * What runs can estimate, and how well, before anything is measured.
 *
 * @throws StatsError `unknown-term`, `out-of-bounds`, `not-finite`, `no-feasible-point`,
 *   `too-many-factors`.
 */
export function evaluateAnswer(input: EvaluateRequest): EvaluateAnswer {
  const request = evaluateRequestSchema.parse(input);
  const { factors, constraints } = request;
  checkFactorCount(factors);
  const region = makeRegion(factors, constraints, request.region);
  const terms = termsOf(factors, request.model);
  const points = request.runs.map(({ settings }) => pointOf(factors, settings));
  const blocks = request.runs.map(({ block }) => block);
  const { model, full, names, split, leverages } = modelOf(factors, terms, points, blocks);
  const criteria = criteriaOf(model, region, terms, upperBoundD(region, terms));
  const rank = split.independent.length;
  const residualDf = full.rows - rank;
  const notEstimable = names.filter((_, j) => !split.estimable[j]);
  const first = names[0] === INTERCEPT ? 1 : 0;
  return {
    parameters: full.cols,
    rank,
    residualDf,
    estimable: names.filter((_, j) => split.estimable[j]),
    notEstimable,
    ...criteria,
    terms: termPrecision(full, names, split).map((each) => ({ ...each, power: null })),
    leverages,
    correlations: {
      terms: names.slice(first),
      matrix: correlationsOf(full)
        .slice(first)
        .map((row) => row.slice(first)),
    },
    aliasMatrix: aliasMatrix(factors, terms, points),
    warnings: warningsOf({ notEstimable, residualDf }),
  };
}
