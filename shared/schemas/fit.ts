import { z } from 'zod';
import { byLineSchema, idSchema, momentSchema } from './identity';
import { textSchema, reasonSchema } from './text';

export const exclusionSchema = z.strictObject({ runId: idSchema, why: reasonSchema });

/** A model to compute, store and keep for one response. */
export const fitInputSchema = z.strictObject({
  responseKey: z.string().max(40),
  /** Terms without the intercept, by name; blocks are added when the runs have more than one. */
  terms: z.array(z.string().max(100)).max(60),
  transform: z.enum(['none', 'log', 'sqrt', 'logit']).default('none'),
  settingsUsed: z.enum(['set', 'actual']).default('actual'),
  exclusions: z.array(exclusionSchema).max(100).default([]),
  why: textSchema(1000).default(''),
});
export type FitInput = z.infer<typeof fitInputSchema>;

export const fitJsonSchema = z.object({
  id: idSchema,
  studyId: idSchema,
  responseKey: z.string(),
  terms: z.array(z.string()),
  transform: z.enum(['none', 'log', 'sqrt', 'logit']),
  settingsUsed: z.enum(['set', 'actual']),
  exclusions: z.array(exclusionSchema),
  why: z.string(),
  isKept: z.boolean(),
  /** SHA-256 of the runs, settings and values that went in: a fit of older data shows as stale. */
  dataHash: z.string(),
  isStale: z.boolean(),
  summary: z.object({
    n: z.number(),
    parameters: z.number(),
    rSquared: z.number().nullable(),
    adjustedRSquared: z.number().nullable(),
    predictedRSquared: z.number().nullable(),
    residualSd: z.number().nullable(),
    lackOfFitP: z.number().nullable(),
    agreementDigits: z.number().nullable(),
  }),
  by: byLineSchema,
  createdAt: momentSchema,
});
export type FitJson = z.infer<typeof fitJsonSchema>;

/** With the full answer of the calculation, in the shape of `POST /api/calc/fit`. */
export const fitDetailSchema = fitJsonSchema.extend({ answer: z.record(z.string(), z.unknown()) });
