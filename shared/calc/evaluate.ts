import type { EvaluateAnswer, EvaluateRequest } from '../schemas/calc/evaluate';
import { isCategorical, type Factor } from '../stats/coding/factor';
import { evaluate, rowsAt } from '../stats/design/evaluation';
import { regionOf } from '../stats/design/region';
import { cholesky, gramOf, inverseOf } from '../stats/linalg/cholesky';
import { pointOf, type Point } from '../stats/model/modelMatrix';
import { INTERCEPT, termsOf, type Term } from '../stats/model/term';

type Leaks = EvaluateAnswer['aliasMatrix'];

/** Correlations between the columns of the terms, the intercept left out; 0 for a column without spread. */
function correlationsOf(
  terms: readonly Term[],
  rows: readonly Float64Array[],
): EvaluateAnswer['correlations'] {
  const kept = terms.flatMap(({ name }, j) => (name === INTERCEPT ? [] : [j]));
  const centred = kept.map((j) => {
    const mean = rows.reduce((sum, row) => sum + row[j]!, 0) / rows.length;
    return rows.map((row) => row[j]! - mean);
  });
  const dot = (a: readonly number[], b: readonly number[]) =>
    a.reduce((sum, value, i) => sum + value * b[i]!, 0);
  const size = centred.map((column) => Math.sqrt(dot(column, column)));
  return {
    terms: kept.map((j) => terms[j]!.name),
    matrix: centred.map((a, i) =>
      centred.map((b, j) => {
        if (i === j) return 1;
        return size[i]! > 0 && size[j]! > 0 ? dot(a, b) / (size[i]! * size[j]!) : 0;
      }),
    ),
  };
}

/** (XᵀX)⁻¹XᵀZ for the products and squares Z that the model leaves out: how they would bias its terms. */
function aliasMatrixOf(
  factors: readonly Factor[],
  terms: readonly Term[],
  points: readonly Point[],
): Leaks {
  const inModel = new Set(terms.map(({ name }) => name));
  const left = termsOf(factors, 'quadratic', false).filter(({ name }) => !inModel.has(name));
  const rows = rowsAt(factors, terms, points);
  const p = terms.length;
  const l = cholesky(gramOf(rows, p), p);
  if (!l) return null;
  const inverse = inverseOf(l, p);
  const outside = rowsAt(factors, left, points);
  return Object.fromEntries(
    terms.map(({ name }, i) => [
      name,
      Object.fromEntries(
        left.map((other, c) => {
          let sum = 0;
          rows.forEach((row, r) => {
            let projected = 0;
            for (let j = 0; j < p; j++) projected += inverse[i * p + j]! * row[j]!;
            sum += projected * outside[r]![c]!;
          });
          return [other.name, Math.abs(sum) < 1e-12 ? 0 : sum];
        }),
      ),
    ]),
  );
}

/** What a set of runs can tell about a model: `POST /api/calc/evaluate`. */
export function evaluateAnswer(request: EvaluateRequest): EvaluateAnswer {
  const { factors, constraints, region, runs, model, significance } = request;
  const { effect = null, sigma = null } = request;
  const terms = termsOf(factors, model);
  const points = runs.map(({ settings }) => pointOf(factors, settings));
  const blocks = runs.map(({ block }) => block);
  const power = effect !== null && sigma !== null ? { effect, sigma, significance } : null;
  const place = regionOf(factors, constraints, region);
  const hasNumeric = factors.some((factor) => !isCategorical(factor));
  return {
    ...evaluate(place, terms, { points, blocks }, power),
    correlations: correlationsOf(terms, rowsAt(factors, terms, points)),
    aliasMatrix: hasNumeric ? aliasMatrixOf(factors, terms, points) : null,
  };
}
