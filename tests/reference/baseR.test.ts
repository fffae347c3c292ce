import fs from 'node:fs';
import path from 'node:path';
import { describe, expect, it } from 'vitest';
import { fitAnswer } from '@shared/calc/fit';
import { fitRequestSchema } from '@shared/schemas/calc/fit';
import { expectClose } from '@tests/support/agreement';

/**
 * Source: base R 4.2.2 `lm`/`anova` on three simulated studies (make_references.R beside the data), full
 * precision. The files' `conventions` fix every definition.
 */

interface Interval {
  readonly fit: number;
  readonly seMean: number;
  readonly ci95: readonly number[];
  readonly pi95: readonly number[];
  readonly natural: Readonly<Record<string, number>>;
}
interface Line {
  readonly df: number;
  readonly ss: number;
  readonly F?: number;
  readonly p?: number;
}
interface Analysis {
  readonly response: string;
  readonly transform: string;
  readonly terms: readonly string[];
  readonly block: string | null;
  readonly note: string;
  readonly n: number;
  readonly p: number;
  readonly coefficients: readonly {
    term: string;
    estimate: number;
    se: number;
    t: number;
    p: number;
    ci95: readonly number[];
    vif: number | null;
  }[];
  readonly fit: Readonly<Record<string, number>>;
  readonly anova: {
    readonly total: Line;
    readonly block?: Line;
    readonly model: Line;
    readonly residual: Line;
    readonly lackOfFit?: Line | null;
    readonly pureError?: Line | null;
    readonly sequentialByTerm: readonly (Line & { term: string })[];
    readonly typeIII: readonly (Line & { term: string })[];
  };
  readonly diagnostics: Readonly<Record<string, readonly number[]>>;
  readonly stationaryPoint?: {
    readonly coded: Readonly<Record<string, number>>;
    readonly eigenvalues: readonly number[];
  } | null;
  readonly predictions: readonly Interval[];
}
interface Study {
  readonly id: string;
  readonly factors: readonly {
    symbol: string;
    name: string;
    centre: number;
    half: number;
    min: number;
    max: number;
  }[];
  readonly runTable: { columns: readonly string[]; rows: readonly (readonly number[])[] };
  readonly analyses: readonly Analysis[];
}

const folder = path.join(import.meta.dirname, 'data/least-squares');
const studies = fs
  .readdirSync(folder)
  .filter((file) => file.endsWith('.json'))
  .map((file) => JSON.parse(fs.readFileSync(path.join(folder, file), 'utf8')) as Study);
const cases = studies.flatMap((study) =>
  study.analyses.map((analysis) => ({
    study,
    analysis,
    name: `${study.id} ${analysis.response} (${analysis.transform}): ${analysis.note}`,
  })),
);

const TRANSFORMS: Readonly<Record<string, string>> = {
  identity: 'none',
  log: 'log',
  sqrt: 'sqrt',
  logit: 'logit',
};

/** `A*B` and `Block[1]` of the file as the terms of the calculation. */
function termOf(study: Study, name: string): string {
  if (name === 'Intercept') return 'intercept';
  if (name.startsWith('Block')) return name.toLowerCase();
  return name
    .split('*')
    .map((part) => {
      const [symbol = '', power] = part.split('^');
      const factor = study.factors.find((each) => each.symbol === symbol)?.name ?? symbol;
      return power ? `${factor}^${power}` : factor;
    })
    .join(':');
}

function column(study: Study, name: string): number[] {
  const at = study.runTable.columns.indexOf(name);
  return study.runTable.rows.map((row) => row[at]!);
}

function answerOf(study: Study, analysis: Analysis) {
  const factors = study.factors.map(({ name, centre, half, min, max }) => ({
    key: name,
    low: centre - half,
    high: centre + half,
    min,
    max,
  }));
  const values = column(study, analysis.response);
  const blocks = analysis.block ? column(study, analysis.block) : values.map(() => 1);
  const settings = values.map((_, i) =>
    Object.fromEntries(study.factors.map(({ name }) => [name, column(study, name)[i]!])),
  );
  return fitAnswer(
    fitRequestSchema.parse({
      factors,
      runs: values.map((value, i) => ({ settings: settings[i], block: blocks[i], value })),
      model: analysis.terms.map((term) => termOf(study, term)),
      blocks: analysis.block !== null,
      transform: TRANSFORMS[analysis.transform],
      // the only logit of the files is a fraction
      transformParameters: { lower: 0, upper: 1 },
      predictAt: analysis.predictions.map(({ natural }) =>
        Object.fromEntries(
          study.factors.map(({ symbol, name }) => [name, natural[symbol] ?? natural[name]]),
        ),
      ),
    }),
  );
}

describe.each(cases)('$name', ({ study, analysis }) => {
  const answer = answerOf(study, analysis);

  it('has the coefficients, errors, t, p, intervals and VIF', () => {
    expect(answer.terms).toHaveLength(analysis.coefficients.length);
    const size = Math.max(...analysis.coefficients.map(({ estimate }) => Math.abs(estimate)));
    for (const reference of analysis.coefficients) {
      const name = termOf(study, reference.term);
      const term = answer.terms.find((each) => each.term === name);
      // R works in plain doubles: small coefficients carry the rounding of the large ones
      const at = { relative: 1e-11, scale: size, what: name };
      expectClose(term?.estimate, reference.estimate, at);
      expectClose(term?.standardError, reference.se, { relative: 1e-10, what: `${name} error` });
      expectClose(term?.t, reference.t, {
        relative: 1e-8,
        scale: Math.max(1, Math.abs(reference.t)),
        what: `${name} t`,
      });
      expectClose(term?.p, reference.p, { relative: 1e-8, what: `${name} p` });
      expectClose(term?.ciLow, reference.ci95[0]!, at);
      expectClose(term?.ciHigh, reference.ci95[1]!, at);
      if (reference.vif !== null)
        expectClose(term?.vif, reference.vif, { relative: 1e-10, what: `${name} VIF` });
    }
  });

  it('has the analysis of variance, with lack of fit and pure error', () => {
    const total = analysis.anova.total.ss;
    for (const key of ['total', 'block', 'model', 'residual', 'lackOfFit', 'pureError'] as const) {
      const reference = analysis.anova[key];
      const line = answer.anova[key];
      if (!reference) continue;
      expect(line?.df, key).toBe(reference.df);
      expectClose(line?.ss, reference.ss, { relative: 1e-11, scale: total, what: key });
      if (reference.p !== undefined && key !== 'block')
        expectClose(line?.p, reference.p, { relative: 1e-8, what: `${key} p` });
    }
    const byTerm = (lines: typeof answer.anova.sequential, name: string) =>
      lines.find(({ term }) => term === (name === 'Block' ? 'block' : termOf(study, name)));
    for (const reference of analysis.anova.sequentialByTerm)
      expectClose(byTerm(answer.anova.sequential, reference.term)?.ss, reference.ss, {
        relative: 1e-11,
        scale: total,
        what: `sequential ${reference.term}`,
      });
    for (const reference of analysis.anova.typeIII)
      expectClose(byTerm(answer.anova.partial, reference.term)?.ss, reference.ss, {
        relative: 1e-11,
        scale: total,
        what: `partial ${reference.term}`,
      });
  });

  it('has R² three ways, PRESS and the condition number', () => {
    const { summary } = answer;
    expectClose(summary.rSquared, analysis.fit['r2']!, { relative: 1e-11 });
    expectClose(summary.adjustedRSquared, analysis.fit['r2adj']!, { relative: 1e-11 });
    expectClose(summary.predictedRSquared, analysis.fit['r2pred']!, { relative: 1e-10 });
    expectClose(summary.press, analysis.fit['press']!, { relative: 1e-10 });
    expectClose(summary.residualSd, analysis.fit['sigma']!, { relative: 1e-11 });
    expect(summary.agreementDigits).toBeGreaterThan(11);
  });

  it('has leverages, studentised residuals and Cook’s distances', () => {
    const pairs = {
      leverage: 'leverage',
      internallyStudentized: 'studentizedInternal',
      externallyStudentized: 'studentizedExternal',
      cook: 'cooksDistance',
    } as const;
    let compared = 0;
    for (const [theirs, ours] of Object.entries(pairs)) {
      const reference = analysis.diagnostics[theirs] ?? analysis.diagnostics[`${theirs}sDistance`];
      if (!reference) continue;
      compared++;
      reference.forEach((value, i) =>
        expectClose(answer.diagnostics[i]?.[ours], value, {
          relative: 1e-8,
          scale: Math.max(1, Math.abs(value)),
          what: `${ours} ${i}`,
        }),
      );
    }
    expect(compared).toBeGreaterThanOrEqual(3);
  });

  it('has the stationary point and eigenvalues', () => {
    const reference = analysis.stationaryPoint;
    if (!reference) return;
    for (const { symbol, name } of study.factors)
      expectClose(answer.canonical?.coded[name], reference.coded[symbol]!, {
        relative: 1e-9,
        scale: 1,
        what: name,
      });
    reference.eigenvalues.forEach((value, i) =>
      expectClose(answer.canonical?.eigenvalues[i], value, { relative: 1e-9, scale: 1 }),
    );
  });

  it('predicts with intervals for the mean and for a new run', () => {
    if (analysis.transform !== 'identity') return;
    analysis.predictions.forEach((reference, i) => {
      const prediction = answer.predictions[i];
      expectClose(prediction?.predicted, reference.fit, { relative: 1e-10 });
      expectClose(prediction?.standardError, reference.seMean, { relative: 1e-10 });
      expectClose(prediction?.ciLow, reference.ci95[0]!, { relative: 1e-10 });
      expectClose(prediction?.ciHigh, reference.ci95[1]!, { relative: 1e-10 });
      expectClose(prediction?.piLow, reference.pi95[0]!, { relative: 1e-10 });
      expectClose(prediction?.piHigh, reference.pi95[1]!, { relative: 1e-10 });
    });
  });
});
