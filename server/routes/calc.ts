import { Router } from 'express';
import { chooseAnswer } from '@shared/calc/choose';
import { designAnswer } from '@shared/calc/design';
import { energyAnswer } from '@shared/calc/energy';
import { evaluateAnswer } from '@shared/calc/evaluate';
import { fitAnswer } from '@shared/calc/fit';
import { nextAnswer } from '@shared/calc/next';
import { selectAnswer } from '@shared/calc/select';
import { sieveAnswer } from '@shared/calc/sieve';
import { calculationPolicy } from '@shared/policies/lab';
import { chooseRequestSchema } from '@shared/schemas/calc/choose';
import { designRequestSchema } from '@shared/schemas/calc/design';
import { energyRequestSchema } from '@shared/schemas/calc/energy';
import { evaluateRequestSchema } from '@shared/schemas/calc/evaluate';
import { fitRequestSchema } from '@shared/schemas/calc/fit';
import { nextRequestSchema } from '@shared/schemas/calc/next';
import { selectRequestSchema } from '@shared/schemas/calc/select';
import { sieveRequestSchema } from '@shared/schemas/calc/sieve';
import { z } from 'zod';
import { authorize } from '../authorize';
import { endpoint, mountedAt } from '../endpoint';
import { HttpError } from '../errors';

export const calcRouter = mountedAt(Router(), '/calc');

/** The last fence: no number leaves that is not one. */
function refuseNotFinite(key: string, value: unknown): unknown {
  if (typeof value === 'number' && !Number.isFinite(value))
    throw new HttpError(
      422,
      'not-finite',
      `These numbers are too extreme to compute with: ‘${key}’ came out infinite or undefined.`,
    );
  return value;
}

function calculation<S extends z.ZodType>(
  path: string,
  summary: string,
  body: S,
  compute: (request: z.output<S>) => object,
): void {
  endpoint(calcRouter, {
    method: 'post',
    path,
    summary,
    access: 'calculation',
    body,
    answer: z.record(z.string(), z.unknown()),
    handle({ actor, body: request }) {
      authorize(calculationPolicy.use, actor, undefined);
      // the generic body has lost its schema's type on the way through the handler
      const answer = compute(request as z.output<S>);
      JSON.stringify(answer, refuseNotFinite);
      return Promise.resolve({ ...answer });
    },
  });
}

calculation('/design', 'Build a design', designRequestSchema, designAnswer);
calculation('/evaluate', 'What a set of runs can tell', evaluateRequestSchema, evaluateAnswer);
calculation('/fit', 'Fit one response', fitRequestSchema, fitAnswer);
calculation('/select', 'Choose the terms of a model', selectRequestSchema, selectAnswer);
calculation('/choose', 'Rank all settable settings', chooseRequestSchema, (request) =>
  chooseAnswer(request),
);
calculation('/next', 'What to run next', nextRequestSchema, nextAnswer);
calculation('/sieve', 'Size distribution and mass balances', sieveRequestSchema, sieveAnswer);
calculation('/energy', 'Energy, power and time of a run', energyRequestSchema, energyAnswer);
