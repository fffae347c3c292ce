import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { z } from 'zod';
import { designAnswer } from '@shared/calc/design';
import { energyAnswer } from '@shared/calc/energy';
import { evaluateAnswer } from '@shared/calc/evaluate';
import { fitAnswer } from '@shared/calc/fit';
import { nextAnswer } from '@shared/calc/next';
import { sieveAnswer } from '@shared/calc/sieve';
import { DESIGN_KINDS, designRequestSchema } from '@shared/schemas/calc/design';
import { energyRequestSchema } from '@shared/schemas/calc/energy';
import { evaluateRequestSchema } from '@shared/schemas/calc/evaluate';
import { fitRequestSchema } from '@shared/schemas/calc/fit';
import { NEXT_PURPOSES, nextRequestSchema } from '@shared/schemas/calc/next';
import { sieveRequestSchema } from '@shared/schemas/calc/sieve';
import { StatsError } from '@shared/stats/errors';

const EXTREME = /e[+-]\d{2,}/;

/**
 * Whatever is sent: an answer of finite numbers, a refusal by the schema, or a StatsError in a sentence.
 * What came out of extreme numbers may overflow: the route refuses it with `not-finite`.
 */
function holdsFor<S extends z.ZodType>(
  schema: S,
  answer: (request: z.output<S>) => object,
  input: unknown,
): void {
  const parsed = schema.safeParse(input);
  if (!parsed.success) return;
  try {
    JSON.stringify(answer(parsed.data), (key, value: unknown) => {
      const isBad = typeof value === 'number' && !Number.isFinite(value);
      if (isBad && !EXTREME.test(JSON.stringify(input)))
        throw new Error(`${key} is ${String(value)} for ${JSON.stringify(input)}`);
      return value;
    });
  } catch (error) {
    if (!(error instanceof StatsError)) throw error;
    expect(error.message).toMatch(/[.?]$/);
  }
}

const nasty = fc.oneof(
  { weight: 6, arbitrary: fc.integer({ min: -5, max: 200 }) },
  { weight: 2, arbitrary: fc.double({ noNaN: true, min: -10, max: 10 }) },
  {
    weight: 1,
    arbitrary: fc.constantFrom(0, -0, 1e-300, 1e300, -1e300, 1e9, 1e-9, Number.MIN_VALUE),
  },
);
const numeric = (key: string) =>
  fc
    .record(
      {
        low: nasty,
        high: nasty,
        min: nasty,
        max: nasty,
        step: nasty,
        scale: fc.constantFrom('linear', 'log'),
      },
      { requiredKeys: ['low', 'high'] },
    )
    .map(({ low, high, ...rest }) => ({
      key,
      low: Math.min(low, high),
      high: Math.max(low, high),
      ...rest,
    }));
const sane = (key: string) => fc.constant({ key, low: 10, high: 30, min: 0, max: 40, step: 1 });
const factors = fc.tuple(
  fc.oneof({ weight: 1, arbitrary: numeric('a') }, { weight: 4, arbitrary: sane('a') }),
  fc.oneof(
    { weight: 4, arbitrary: sane('b') },
    { weight: 1, arbitrary: numeric('b') },
    { weight: 1, arbitrary: fc.constant({ key: 'b', levels: ['x', 'y', 'z'] }) },
  ),
  sane('c'),
);
const constraints = fc.array(
  fc.record({
    terms: fc.dictionary(fc.constantFrom('a', 'c', 'a:c', 'a^2', 'b', 'a^9:c'), nasty, {
      maxKeys: 2,
    }),
    op: fc.constantFrom('<=', '>='),
    bound: fc.oneof(nasty, fc.constantFrom(-100, 40, 900)),
  }),
  { maxLength: 2 },
);
const model = fc.constantFrom('linear', 'interaction', 'quadratic', ['a', 'a^10', 'a:c'], []);
const runs = fc.array(
  fc.record({
    settings: fc.record({
      a: fc.oneof(fc.constantFrom(10, 20, 30), nasty),
      b: fc.oneof(
        { weight: 6, arbitrary: fc.constantFrom(10, 20, 30) },
        { weight: 1, arbitrary: fc.oneof(nasty, fc.constantFrom('x', 'y', 'q')) },
      ),
      c: fc.oneof(fc.constantFrom(10, 20, 30), nasty),
    }),
    block: fc.integer({ min: 1, max: 3 }),
  }),
  { minLength: 1, maxLength: 24 },
);
const plan = { seed: 7, numRuns: 150 };

describe('any input', () => {
  it('to design', () => {
    const request = fc.record({
      factors,
      constraints,
      region: fc.constantFrom('range', 'envelope'),
      kind: fc.constantFrom(...DESIGN_KINDS),
      options: fc.record(
        {
          runs: fc.integer({ min: 1, max: 20 }),
          fraction: fc.integer({ min: 0, max: 3 }),
          alpha: fc.constantFrom('rotatable', 'orthogonalBlocks', 'spherical', 0.2, 3),
          inscribed: fc.boolean(),
          foldOver: fc.boolean(),
          criterion: fc.constantFrom('D', 'I'),
          model,
        },
        { requiredKeys: ['runs'] },
      ),
      blocks: fc.integer({ min: 1, max: 4 }),
      centrePoints: fc.integer({ min: 0, max: 6 }),
      replicates: fc.integer({ min: 1, max: 3 }),
      snap: fc.boolean(),
    });
    fc.assert(
      fc.property(request, (input) => {
        holdsFor(designRequestSchema, designAnswer, input);
      }),
      plan,
    );
  }, 60_000);

  it('to evaluate', () => {
    const request = fc.record({ factors, constraints, runs, model, effect: nasty, sigma: nasty });
    fc.assert(
      fc.property(request, (input) => {
        holdsFor(evaluateRequestSchema, evaluateAnswer, input);
      }),
      plan,
    );
  }, 60_000);

  it('to fit', () => {
    const request = fc.record({
      factors,
      runs: runs.chain((all) =>
        fc
          .array(nasty, { minLength: all.length, maxLength: all.length })
          .map((values) => all.map((run, id) => ({ ...run, id, value: values[id]! }))),
      ),
      model,
      transform: fc.constantFrom('none', 'log', 'sqrt', 'logit', 'boxcox'),
    });
    fc.assert(
      fc.property(request, (input) => {
        holdsFor(fitRequestSchema, fitAnswer, input);
      }),
      plan,
    );
  }, 60_000);

  it('to next', () => {
    const request = fc.record({
      factors,
      constraints,
      runs: runs.chain((all) =>
        fc
          .array(nasty, { minLength: all.length, maxLength: all.length })
          .map((values) => all.map((run, id) => ({ ...run, id, value: values[id]! }))),
      ),
      model,
      purpose: fc.constantFrom(...NEXT_PURPOSES),
      count: fc.integer({ min: 1, max: 4 }),
      aim: fc.constantFrom('maximise', 'minimise', 'target'),
      step: fc.constantFrom(0.5, 1e-9, 5),
    });
    fc.assert(
      fc.property(request, (input) => {
        holdsFor(nextRequestSchema, nextAnswer, input);
      }),
      plan,
    );
  }, 60_000);

  it('to sieve and energy', () => {
    const positive = nasty.map(Math.abs);
    const sieve = fc.record({
      feedMassG: positive,
      beforeSievingG: positive,
      sieves: fc.array(fc.record({ apertureMm: positive, retainedG: positive }), { maxLength: 8 }),
      panG: positive,
      passingAt: fc.array(positive, { maxLength: 3 }),
      percentiles: fc.array(fc.double({ min: 0.001, max: 99.9, noNaN: true }), { maxLength: 3 }),
      interpolation: fc.constantFrom('logSize', 'logLog'),
    });
    const energy = fc.record({
      capacitanceNf: positive,
      voltageKv: positive,
      pulses: fc.integer({ min: 1, max: 1000 }),
      frequencyHz: positive,
      gapMm: positive,
      massG: positive,
      chargingPowerW: positive,
    });
    fc.assert(
      fc.property(sieve, energy, (a, b) => {
        holdsFor(sieveRequestSchema, sieveAnswer, a);
        holdsFor(energyRequestSchema, energyAnswer, b);
      }),
      { seed: 7, numRuns: 500 },
    );
  });
});
