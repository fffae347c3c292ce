import { describe, expect, it } from 'vitest';
import { designAnswer } from '@shared/calc/design';
import { evaluateAnswer } from '@shared/calc/evaluate';
import { approximateDesign } from '@shared/stats/design/approximateDesign';
import type { Constraint } from '@shared/stats/design/constraint';
import { makeRegion } from '@shared/stats/design/region';
import { compileRow } from '@shared/stats/model/compileRow';
import { termsOf } from '@shared/stats/model/term';
import { makeRandom } from '@shared/stats/random/generator';
import continuous from '../../reference/data/optimal_continuous.json';
import exact from '../../reference/data/optimal_exact.json';

const plain = (k: number) =>
  Array.from({ length: k }, (_, i) => ({ key: `x${i + 1}`, low: -1, high: 1 }));

function bestOn(k: number, constraints: readonly Constraint[]) {
  const factors = plain(k);
  const terms = termsOf(factors, 'quadratic');
  const region = makeRegion(factors, constraints, 'range');
  const task = { region, rowAt: compileRow(factors, terms), terms: terms.length };
  return approximateDesign(task, makeRandom(1))!;
}

describe('the best approximate design', () => {
  // Kono (1962); Farrell, Kiefer & Walbran (1967): optimum on the cube in closed form
  it.each(continuous.cube)('on the cube, k = $k', ({ k, p, logdet }) => {
    const { logDet, maxVariance } = bestOn(k, []);
    expect(maxVariance / p - 1).toBeLessThanOrEqual(1e-3);
    expect(logDet).toBeLessThanOrEqual(logdet + 1e-9);
    expect(logdet - logDet).toBeLessThan(1e-3 * p);
    // a rigorous bound lies above the optimum
    expect(logDet + p * Math.log(maxVariance / p)).toBeGreaterThanOrEqual(logdet - 1e-9);
  });

  it('on a square cut by a slanted limit', () => {
    const { logdet, p } = continuous.constrained[0]!;
    const { logDet, maxVariance } = bestOn(2, [{ terms: { x1: 1, x2: -1 }, op: '<=', bound: 0.5 }]);
    expect(Math.abs(logDet - logdet)).toBeLessThan(1e-3 * p);
    expect(logDet + p * Math.log(maxVariance / p)).toBeGreaterThanOrEqual(logdet - 1e-9);
  });

  // Kiefer (1961): centre mass 2/((k+1)(k+2)), the rest even over the sphere
  it.each(continuous.ball.radius_1)('on the ball, k = $k', ({ k, p, logdet }) => {
    const terms = Object.fromEntries(plain(k).map(({ key }) => [`${key}^2`, 1]));
    const { logDet } = bestOn(k, [{ terms, op: '<=', bound: 1 }]);
    expect(Math.abs(logDet - logdet)).toBeLessThan(1e-3 * p);
  });
});

describe('standard designs', () => {
  const build = {
    'CCF n0=1': { kind: 'centralComposite', options: { alpha: 'faceCentred' }, centrePoints: 1 },
    '3^k factorial': { kind: 'threeLevel' },
    'Box-Behnken': { kind: 'boxBehnken', centrePoints: 3 },
  } as const;
  const known = exact.standard_designs.filter(({ design }) => design in build);

  it.each(known)('k = $k, $design: D, G, mean variance, leverage', (entry) => {
    const { evaluation } = designAnswer({
      factors: plain(entry.k),
      ...build[entry.design as keyof typeof build],
    });
    const relative = entry.D_efficiency_vs_continuous_optimum_on_cube;
    expect(evaluation.dRelative! / relative).toBeGreaterThan(0.999);
    expect(evaluation.dRelative! / relative).toBeLessThan(1 + 1e-9);
    expect(evaluation.dEfficiency).toBeCloseTo(Math.exp(entry.logdet_per_run / entry.p), 10);
    expect(evaluation.iAverage).toBeCloseTo(entry.average_scaled_prediction_variance_over_cube, 9);
    // the reference looks at a grid: the search may find a little more
    const { max } = evaluation.predictionVariance!;
    expect(max / entry.max_scaled_prediction_variance_on_grid).toBeGreaterThan(1 - 1e-9);
    expect(max / entry.max_scaled_prediction_variance_on_grid).toBeLessThan(1.01);
    expect(Math.max(...evaluation.leverages)).toBeCloseTo(entry.max_leverage, 10);
  });
});

describe('evaluation', () => {
  const corners = [
    [-1, -1],
    [1, -1],
    [-1, 1],
    [1, 1],
  ].map(([x1, x2]) => ({ settings: { x1: x1!, x2: x2! } }));

  it('says what the runs cannot tell apart, and never NaN', () => {
    const answer = evaluateAnswer({ factors: plain(2), runs: corners, model: 'quadratic' });
    expect(answer.rank).toBe(4);
    expect(answer.estimable).toEqual(['x1', 'x2', 'x1:x2']);
    expect(answer.notEstimable).toEqual(['intercept', 'x1^2', 'x2^2']);
    expect(answer).toMatchObject({ dEfficiency: 0, dRelative: 0, gEfficiency: 0, iAverage: null });
    expect(answer.terms[1]).toMatchObject({ term: 'x1', relativeStandardError: 0.5, vif: 1 });
    expect(answer.terms[4]).toMatchObject({ relativeStandardError: null, vif: null });
    expect(JSON.stringify(answer)).not.toMatch(/NaN|Infinity/);
  });

  it('is 1 in every efficiency for a two-level factorial and its model', () => {
    const answer = evaluateAnswer({ factors: plain(2), runs: corners, model: 'interaction' });
    expect(answer.dEfficiency).toBeCloseTo(1, 12);
    expect(answer.aEfficiency).toBeCloseTo(1, 12);
    expect(answer.gEfficiency).toBeCloseTo(1, 12);
    expect(answer.dRelative).toBeCloseTo(1, 3);
    // mean of 1 + x₁² + x₂² + x₁²x₂² over the square
    expect(answer.iAverage).toBeCloseTo(16 / 9, 12);
    expect(answer.residualDf).toBe(0);
    expect(answer.warnings.map(({ code }) => code)).toEqual(['no-error-left']);
  });

  it('shows how left-out squares shift the estimates', () => {
    const runs = [...corners, { settings: { x1: 0, x2: 0 } }];
    const { aliasMatrix } = evaluateAnswer({ factors: plain(2), runs, model: 'interaction' });
    expect(aliasMatrix!.aliased).toEqual(['x1^2', 'x2^2']);
    expect(aliasMatrix!.matrix[0]![0]).toBeCloseTo(0.8, 12);
    expect(aliasMatrix!.matrix[1]).toEqual([0, 0]);
  });

  it('gives the curve of prediction variance, rising to the largest', () => {
    const { predictionVariance } = designAnswer({
      factors: plain(2),
      kind: 'centralComposite',
      options: { alpha: 'faceCentred' },
    }).evaluation;
    const { fractions, scaled, max } = predictionVariance!;
    expect(fractions[0]).toBe(0);
    expect(fractions.at(-1)).toBe(1);
    expect(scaled).toEqual([...scaled].sort((a, b) => a - b));
    expect(scaled.at(-1)).toBe(max);
  });

  it('counts blocks among the coefficients, and sees that orthogonal ones cost nothing', () => {
    const { evaluation } = designAnswer({
      factors: plain(3).map((factor) => ({ ...factor, min: -2, max: 2 })),
      kind: 'centralComposite',
      options: { alpha: 'orthogonalBlocks' },
      blocks: 3,
    });
    expect(evaluation.parameters).toBe(12);
    const { terms, matrix } = evaluation.correlations;
    const block = terms.indexOf('block[1]');
    terms.forEach((name, j) => {
      if (!name.startsWith('block')) expect(Math.abs(matrix[block]![j]!), name).toBeLessThan(1e-9);
    });
  });
});
