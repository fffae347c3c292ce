import fs from 'node:fs';
import path from 'node:path';
import { describe, expect, it } from 'vitest';
import { fitAnswer } from '@shared/calc/fit';
import { fitRequestSchema } from '@shared/schemas/calc/fit';
import { digitsOf } from '@tests/support/agreement';

/** Source: NIST Statistical Reference Datasets, linear regression, certified values (US government, public domain). */

interface Dataset {
  readonly name: string;
  readonly kind: string;
  readonly terms: readonly string[];
  readonly intercept: boolean;
  readonly n: number;
  readonly x: Readonly<Record<string, readonly number[]>>;
  readonly y: readonly number[];
  readonly certified: {
    readonly coef: readonly number[];
    readonly se: readonly number[];
    readonly residualSd: number;
    readonly rSquared: number;
    readonly anova: {
      readonly regression: { df: number; ss: number };
      readonly F: number | null;
      readonly residual: { df: number; ss: number };
    };
  };
}

const folder = path.join(import.meta.dirname, 'data/nist-strd');
const sets = fs
  .readdirSync(folder)
  .map((file) => JSON.parse(fs.readFileSync(path.join(folder, file), 'utf8')) as Dataset)
  .filter(({ kind }) => kind === 'linear-least-squares');

/** Digits asked for; perfect fits have a certified error of 0, which double-double meets exactly. */
const BAR = 13;

function answerOf({ x, y, terms, intercept }: Dataset) {
  const factors = Object.entries(x).map(([key, values]) => ({
    key,
    low: Math.min(...values),
    high: Math.max(...values),
  }));
  const runs = y.map((value, i) => ({
    settings: Object.fromEntries(Object.keys(x).map((key) => [key, x[key]![i]!])),
    value,
  }));
  const model = terms.filter((term) => term !== '1');
  if (intercept) return fitAnswer(fitRequestSchema.parse({ factors, runs, model }));
  // through the origin in real units: coded −1…+1 about 0 keeps the origin where it is
  const about0 = factors.map(({ key, high }) => ({ key, low: -high, high }));
  return fitAnswer(fitRequestSchema.parse({ factors: about0, runs, model, intercept: false }));
}

describe('NIST linear regression', () => {
  it('has all eleven sets', () => {
    expect(sets.map(({ name }) => name)).toHaveLength(11);
  });

  it.each(sets)('$name: coefficients, errors and analysis of variance', (set) => {
    const answer = answerOf(set);
    const { coef, se, residualSd, rSquared, anova } = set.certified;
    const names = set.terms.map((term) => (term === '1' ? 'intercept' : term));
    names.forEach((name, j) => {
      const real = answer.realUnits.find(({ term }) => term === name);
      expect(digitsOf(real?.estimate ?? null, coef[j]!), `${name} estimate`).toBeGreaterThan(BAR);
      expect(digitsOf(real?.standardError ?? null, se[j]!), `${name} error`).toBeGreaterThan(BAR);
    });
    expect(digitsOf(answer.summary.residualSd, residualSd), 'residual SD').toBeGreaterThan(BAR);
    expect(digitsOf(answer.summary.rSquared, rSquared), 'R²').toBeGreaterThan(BAR);
    expect(digitsOf(answer.anova.residual.ss, anova.residual.ss), 'residual SS').toBeGreaterThan(
      BAR,
    );
    expect(digitsOf(answer.anova.model.ss, anova.regression.ss), 'model SS').toBeGreaterThan(BAR);
    expect(answer.anova.residual.df).toBe(anova.residual.df);
    if (anova.F !== null && residualSd > 0)
      expect(digitsOf(answer.anova.model.f, anova.F), 'F').toBeGreaterThan(BAR);
  });
});
