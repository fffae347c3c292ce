import type { EvaluateAnswer, EvaluateRequest } from '../schemas/calc/evaluate';
import { aliasMatrix } from '../stats/design/aliasMatrix';
import { criteriaOf, upperBoundD } from '../stats/design/criteria';
import { modelOf } from '../stats/design/designMatrix';
import { makeRegion } from '../stats/design/designRegion';
import { powerOf, type PowerQuestion } from '../stats/design/power';
import { correlationsOf, termPrecision } from '../stats/design/termPrecision';
import { pointOf, type Point } from '../stats/model/modelMatrix';
import { INTERCEPT, termsOf, type Term } from '../stats/model/term';
import { checkFactorCount } from './limits';

type Leaks = EvaluateAnswer['aliasMatrix'];

function leaksOf(
  { factors }: EvaluateRequest,
  terms: readonly Term[],
  points: readonly Point[],
): Leaks {
  const table = aliasMatrix(factors, terms, points);
  if (!table) return null;
  const named = (row: readonly number[]) =>
    Object.fromEntries(table.aliased.map((name, j) => [name, row[j]!]));
  return Object.fromEntries(table.terms.map((name, i) => [name, named(table.matrix[i]!)]));
}

function warningsOf(notEstimable: readonly string[], residualDf: number) {
  const warnings: { code: string; message: string }[] = [];
  if (notEstimable.length > 0)
    warnings.push({
      code: 'not-estimable',
      message: `These runs cannot tell apart: ${notEstimable.join(', ')}. Efficiencies are not given.`,
    });
  if (residualDf === 0)
    warnings.push({
      code: 'no-error-left',
      message: 'No run is left to judge the error by: there will be no p values and no power.',
    });
  return warnings;
}

function questionOf({ effect, sigma, significance }: EvaluateRequest): PowerQuestion | null {
  if (typeof effect !== 'number' || typeof sigma !== 'number') return null;
  return { effect, sigma, significance };
}

/**
 * What a set of runs can tell about a model, before any of them is done: `POST /api/calc/evaluate`.
 *
 * @param knownBound upper bound on |M|^(1/p) when it is known already; searching it takes longest.
 * @throws StatsError `unknown-term`, `out-of-bounds`, `not-finite`, `no-feasible-point`,
 *   `too-many-factors`.
 */
export function evaluateAnswer(request: EvaluateRequest, knownBound?: number): EvaluateAnswer {
  const { factors, constraints } = request;
  checkFactorCount(factors);
  const region = makeRegion(factors, constraints, request.region);
  const terms = termsOf(factors, request.model);
  const points = request.runs.map(({ settings }) => pointOf(factors, settings));
  const blocks = request.runs.map(({ block }) => block);
  const { model, full, names, split, leverages } = modelOf(factors, terms, points, blocks);
  const rank = split.independent.length;
  const residualDf = full.rows - rank;
  const notEstimable = names.filter((_, j) => !split.estimable[j]);
  const first = names[0] === INTERCEPT ? 1 : 0;
  const question = questionOf(request);
  return {
    parameters: full.cols,
    rank,
    residualDf,
    estimable: names.filter((_, j) => split.estimable[j]),
    notEstimable,
    ...criteriaOf(model, region, terms, knownBound ?? upperBoundD(region, terms)),
    terms: termPrecision(full, names, split).map((each, j) => ({
      ...each,
      power: powerOf(terms[j], each.relativeStandardError, residualDf, question),
    })),
    leverages,
    correlations: {
      terms: names.slice(first),
      matrix: correlationsOf(full)
        .slice(first)
        .map((row) => row.slice(first)),
    },
    aliasMatrix: leaksOf(request, terms, points),
    warnings: warningsOf(notEstimable, residualDf),
  };
}
