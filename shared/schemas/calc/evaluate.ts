import { z } from 'zod';
import {
  constraintsSchema,
  factorsSchema,
  modelSchema,
  regionSchema,
  settingsSchema,
} from './common';

export const evaluateRequestSchema = z.strictObject({
  factors: factorsSchema,
  constraints: constraintsSchema,
  region: regionSchema,
  runs: z
    .array(
      z.strictObject({
        settings: settingsSchema,
        block: z.number().int().min(1).max(1000).default(1),
      }),
    )
    .min(1, 'There is no run to evaluate.')
    .max(5000, 'At most 5000 runs are evaluated.'),
  model: modelSchema.default('quadratic'),
  /** Change in the response from low to high of a factor; for a square, from centre to high. */
  effect: z.number('Enter the change that matters.').positive('The change is above 0.').optional(),
  sigma: z.number('Enter the run-to-run spread.').positive('The spread is above 0.').optional(),
  significance: z.number().gt(0).lt(1).default(0.05),
});
export type EvaluateRequest = z.input<typeof evaluateRequestSchema>;

const nullable = z.number().nullable();

export const evaluationSchema = z.object({
  /** Coefficients to be estimated, blocks included. */
  parameters: z.number(),
  rank: z.number(),
  residualDf: z.number(),
  estimable: z.array(z.string()),
  notEstimable: z.array(z.string()),
  /** The criteria are for the model without block effects; 0 when its terms cannot be separated. */
  dEfficiency: z.number(),
  dBound: nullable,
  dRelative: nullable,
  aEfficiency: z.number(),
  gEfficiency: z.number(),
  iAverage: nullable,
  terms: z.array(
    z.object({
      term: z.string(),
      relativeStandardError: nullable,
      vif: nullable,
      power: nullable,
    }),
  ),
  leverages: z.array(z.number()),
  predictionVariance: z
    .object({ fractions: z.array(z.number()), scaled: z.array(z.number()), max: z.number() })
    .nullable(),
  correlations: z.object({ terms: z.array(z.string()), matrix: z.array(z.array(nullable)) }),
  aliasMatrix: z
    .object({
      terms: z.array(z.string()),
      aliased: z.array(z.string()),
      matrix: z.array(z.array(z.number())),
    })
    .nullable(),
  warnings: z.array(z.object({ code: z.string(), message: z.string() })),
});
export type EvaluateAnswer = z.infer<typeof evaluationSchema>;
