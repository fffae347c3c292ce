import * as Comlink from 'comlink';
import { chooseAnswer } from '@shared/calc/choose';
import { designAnswer } from '@shared/calc/design';
import { evaluateAnswer } from '@shared/calc/evaluate';
import { fitAnswer } from '@shared/calc/fit';
import { nextAnswer } from '@shared/calc/next';
import { selectAnswer } from '@shared/calc/select';
import { surfaceAnswer, type SurfaceRequest } from '@shared/calc/surface';
import { chooseRequestSchema } from '@shared/schemas/calc/choose';
import { designRequestSchema } from '@shared/schemas/calc/design';
import { evaluateRequestSchema } from '@shared/schemas/calc/evaluate';
import { fitRequestSchema } from '@shared/schemas/calc/fit';
import { nextRequestSchema } from '@shared/schemas/calc/next';
import { selectRequestSchema } from '@shared/schemas/calc/select';
import { StatsError } from '@shared/stats/errors';
import type { z } from 'zod';

/** A calculation’s outcome: errors that a person can act on cross the border as values. */
export type Outcome<T> =
  | { readonly ok: true; readonly answer: T }
  | {
      readonly ok: false;
      readonly code: string;
      readonly message: string;
      readonly details: Readonly<Record<string, unknown>>;
    };

/** Runs a calculation; what a person can act on becomes a value. */
function compute<Request, Answer>(calculate: (request: Request) => Answer) {
  return (request: Request): Outcome<Answer> => {
    try {
      return { ok: true, answer: calculate(request) };
    } catch (error) {
      if (error instanceof StatsError)
        return { ok: false, code: error.code, message: error.message, details: error.details };
      throw error;
    }
  };
}

/** The same, with the request filled up by its schema first. */
function attempt<S extends z.ZodType, Answer>(
  schema: S,
  calculate: (request: z.output<S>) => Answer,
) {
  const run = compute(calculate);
  return (request: z.input<S>): Outcome<Answer> => run(schema.parse(request));
}

const engine = {
  choose: attempt(chooseRequestSchema, (request) => chooseAnswer(request)),
  design: attempt(designRequestSchema, (request) => designAnswer(request)),
  evaluate: attempt(evaluateRequestSchema, (request) => evaluateAnswer(request)),
  fit: attempt(fitRequestSchema, (request) => fitAnswer(request)),
  next: attempt(nextRequestSchema, (request) => nextAnswer(request)),
  select: attempt(selectRequestSchema, (request) => selectAnswer(request)),
  surface: compute<SurfaceRequest, ReturnType<typeof surfaceAnswer>>(surfaceAnswer),
};

export type Engine = typeof engine;

Comlink.expose(engine);
