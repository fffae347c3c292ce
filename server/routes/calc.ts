import { Router } from 'express';
import { designAnswer } from '@shared/calc/design';
import { energyAnswer } from '@shared/calc/energy';
import { evaluateAnswer } from '@shared/calc/evaluate';
import { sieveAnswer } from '@shared/calc/sieve';
import { calculationPolicy } from '@shared/policies/lab';
import { designAnswerSchema, designRequestSchema } from '@shared/schemas/calc/design';
import { energyAnswerSchema, energyRequestSchema } from '@shared/schemas/calc/energy';
import { evaluateRequestSchema, evaluationSchema } from '@shared/schemas/calc/evaluate';
import { sieveAnswerSchema, sieveRequestSchema } from '@shared/schemas/calc/sieve';
import type { z } from 'zod';
import { authorize } from '../authorize';
import { endpoint } from '../endpoint';

/** Stateless: nothing is read from or written to the database. The engine is the one of the screens. */
export const calcRouter = Router();

interface Calculation<B extends z.ZodType, A extends z.ZodType> {
  readonly path: string;
  readonly summary: string;
  readonly body: B;
  readonly answer: A;
  readonly compute: (request: z.output<B>) => z.input<A>;
}

function calculation<B extends z.ZodType, A extends z.ZodType>({
  compute,
  ...route
}: Calculation<B, A>): void {
  endpoint(calcRouter, {
    ...route,
    method: 'post',
    access: 'calculation',
    handle({ actor, body }) {
      authorize(calculationPolicy.use, actor, undefined);
      // a body is given, so what was parsed is its output: the compiler does not resolve that here
      return Promise.resolve(compute(body as z.output<B>));
    },
  });
}

calculation({
  path: '/design',
  summary: 'An experiment matrix of any kind, with what it can estimate',
  body: designRequestSchema,
  answer: designAnswerSchema,
  compute: designAnswer,
});

calculation({
  path: '/evaluate',
  summary: 'What given runs can estimate, and how well',
  body: evaluateRequestSchema,
  answer: evaluationSchema,
  compute: evaluateAnswer,
});

calculation({
  path: '/sieve',
  summary: 'A size distribution with its balances, from sieve masses',
  body: sieveRequestSchema,
  answer: sieveAnswerSchema,
  compute: sieveAnswer,
});

calculation({
  path: '/energy',
  summary: 'Energy, power, field and time of a setting',
  body: energyRequestSchema,
  answer: energyAnswerSchema,
  compute: energyAnswer,
});
