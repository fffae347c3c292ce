import * as Comlink from 'comlink';
import { chooseAnswer } from '@shared/calc/choose';
import { designAnswer } from '@shared/calc/design';
import { evaluateAnswer } from '@shared/calc/evaluate';
import { fitAnswer } from '@shared/calc/fit';
import { nextAnswer } from '@shared/calc/next';
import { selectAnswer } from '@shared/calc/select';
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
  | { readonly ok: false; readonly code: string; readonly message: string };

function attempt<S extends z.ZodType, T>(schema: S, compute: (request: z.output<S>) => T) {
  return (request: z.input<S>): Outcome<T> => {
    try {
      return { ok: true, answer: compute(schema.parse(request)) };
    } catch (error) {
      if (error instanceof StatsError)
        return { ok: false, code: error.code, message: error.message };
      throw error;
    }
  };
}

const engine = {
  choose: attempt(chooseRequestSchema, (request) => chooseAnswer(request)),
  design: attempt(designRequestSchema, (request) => designAnswer(request)),
  evaluate: attempt(evaluateRequestSchema, (request) => evaluateAnswer(request)),
  fit: attempt(fitRequestSchema, (request) => fitAnswer(request)),
  next: attempt(nextRequestSchema, (request) => nextAnswer(request)),
  select: attempt(selectRequestSchema, (request) => selectAnswer(request)),
};

export type Engine = typeof engine;

Comlink.expose(engine);
