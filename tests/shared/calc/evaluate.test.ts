import { describe, expect, it } from 'vitest';
import type { z } from 'zod';
import { designAnswer as answerOf } from '@shared/calc/design';
import { evaluateAnswer as evaluationOf } from '@shared/calc/evaluate';
import { designRequestSchema } from '@shared/schemas/calc/design';
import { evaluateRequestSchema } from '@shared/schemas/calc/evaluate';
import { approximateDesign } from '@shared/stats/design/approximateDesign';
import type { Constraint } from '@shared/stats/coding/constraint';
import { makeRegion } from '@shared/stats/design/designRegion';
import { compileRow } from '@shared/stats/model/compileRow';
import { termsOf } from '@shared/stats/model/term';
import { seeded } from '@shared/stats/random/random';
import continuous from '../../reference/data/published/optimal_continuous.json' with { type: 'json' };
import { powerOf } from '@shared/stats/design/power';
import power from '../../reference/data/published/power.json' with { type: 'json' };
import exact from '../../reference/data/published/optimal_exact.json' with { type: 'json' };

const designAnswer = (request: z.input<typeof designRequestSchema>) =>
  answerOf(designRequestSchema.parse(request));
const evaluateAnswer = (request: z.input<typeof evaluateRequestSchema>) =>
  evaluationOf(evaluateRequestSchema.parse(request));

const plain = (k: number) =>
  Array.from({ length: k }, (_, i) => ({ key: `x${i + 1}`, low: -1, high: 1 }));

function bestOn(k: number, constraints: readonly Constraint[]) {
  const factors = plain(k);
  const terms = termsOf(factors, 'quadratic');
  const region = makeRegion(factors, constraints, 'range');
  const task = { region, rowAt: compileRow(factors, terms), terms: terms.length };
  return approximateDesign(task, seeded(1, 'test'))!;
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
    expect(evaluation.dEfficiency!).toBeCloseTo(Math.exp(entry.logdet_per_run / entry.p), 10);
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
    expect(answer).toMatchObject({
      dEfficiency: null,
      dRelative: null,
      gEfficiency: null,
      iAverage: null,
    });
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
    expect(aliasMatrix!['intercept']!['x1^2']).toBeCloseTo(0.8, 12);
    expect(aliasMatrix!['x1']).toEqual({ 'x1^2': 0, 'x2^2': 0 });
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

describe('power', () => {
  // Cohen (1992), A power primer, table 2; noncentral F by two independent programs
  it.each(power.two_level_effect.entries)(
    'N = $N, effect/σ = $effect_over_sigma: $power',
    ({ N, df_error, effect_over_sigma, alpha, power: expected }) => {
      // an orthogonal two-level design: the relative standard error of a coefficient is 1/√N
      const [, x1] = termsOf(plain(1), 'linear');
      const question = { effect: effect_over_sigma, sigma: 1, significance: alpha };
      expect(powerOf(x1, 1 / Math.sqrt(N), df_error, question)).toBeCloseTo(expected, 8);
    },
  );

  it('is given when effect and spread are, and never for what cannot be tested', () => {
    const runs = [-1, -1, 1, 1].map((x1) => ({ settings: { x1 } }));
    const of = (more: object) =>
      evaluateAnswer({ factors: plain(1), runs, model: 'linear', ...more }).terms;
    expect(of({}).map((term) => term.power)).toEqual([null, null]);
    expect(of({ effect: 2, sigma: 1 })[0]!.power).toBeNull();
    expect(of({ effect: 2, sigma: 1 })[1]!.power).toBeGreaterThan(0.2);
    expect(of({ effect: 1e9, sigma: 1e-9 })[1]!.power).toBeCloseTo(1, 2);
  });
});
