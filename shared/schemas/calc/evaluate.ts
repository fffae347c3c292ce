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
        block: z.number().int().min(1).default(1),
        // a run as fit takes it may be handed over whole
        id: z.union([z.string(), z.number()]).optional(),
        value: z.number().nullable().optional(),
      }),
    )
    .min(1, 'There are no runs.')
    .max(1000),
  model: modelSchema.default('quadratic'),
  effect: z.number().positive('An effect is above 0.').nullable().optional(),
  sigma: z.number().positive('A spread is above 0.').nullable().optional(),
  significance: z.number().gt(0).lt(1).default(0.05),
});
export type EvaluateRequest = z.output<typeof evaluateRequestSchema>;

export interface EvaluateAnswer {
  readonly parameters: number;
  readonly rank: number;
  readonly estimable: readonly string[];
  readonly notEstimable: readonly string[];
  readonly dEfficiency: number | null;
  readonly dBound: number | null;
  readonly dRelative: number | null;
  readonly aEfficiency: number | null;
  readonly gEfficiency: number | null;
  readonly iAverage: number | null;
  readonly terms: readonly {
    term: string;
    relativeStandardError: number | null;
    vif: number | null;
    power: number | null;
  }[];
  readonly leverages: readonly number[];
  readonly predictionVariance: {
    readonly fractions: readonly number[];
    readonly scaled: readonly number[];
    readonly max: number;
  } | null;
  readonly correlations: {
    readonly terms: readonly string[];
    readonly matrix: readonly (readonly number[])[];
  };
  /** How terms left out of the model would leak into its terms: rows by model term, columns by term left out. */
  readonly aliasMatrix: Readonly<Record<string, Readonly<Record<string, number>>>> | null;
}
