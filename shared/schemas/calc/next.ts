import { z } from 'zod';
import { constraintsSchema, factorsSchema, regionSchema, settingsSchema } from './common';
import { modelledFields } from './fit';

export const NEXT_PURPOSES = ['replicate', 'augment', 'ascent', 'improve', 'confirm'] as const;

export const nextRequestSchema = z.strictObject({
  factors: factorsSchema,
  constraints: constraintsSchema,
  region: regionSchema,
  ...modelledFields,
  purpose: z.enum(NEXT_PURPOSES),
  count: z.number().int().min(1, 'Ask for at least one run.').max(60).default(4),
  /** augment: what the added runs should improve. */
  criterion: z.enum(['D', 'I']).default('I'),
  /** ascent, improve: which way is better; a target needs its value. */
  aim: z.enum(['maximise', 'minimise', 'target']).default('maximise'),
  target: z.number().optional(),
  /** ascent: step along the steepest path in coded units of the factor that moves most. */
  step: z.number().positive().max(5).default(0.5),
  /** confirm: the setting to confirm; left out, the best predicted one. */
  at: settingsSchema.optional(),
  confidence: z.number().gt(0.5).lt(1).default(0.95),
  seed: z.number().int().min(0).max(4_294_967_295).default(7),
});
export type NextRequest = z.output<typeof nextRequestSchema>;

export interface NextAnswer {
  readonly runs: readonly {
    readonly settings: Readonly<Record<string, number | string>>;
    readonly coded: Readonly<Record<string, number | string>>;
    readonly predicted: number | null;
    readonly piLow: number | null;
    readonly piHigh: number | null;
  }[];
  readonly why: string;
  readonly gain: {
    readonly pureErrorDfBefore?: number;
    readonly pureErrorDfAfter?: number;
    readonly averageVarianceBefore?: number;
    readonly averageVarianceAfter?: number;
    readonly expectedImprovement?: number;
    readonly predictedFirst?: number;
    readonly predictedLast?: number;
    /** confirm: the interval in which the mean of the new runs should lie. */
    readonly meanLow?: number;
    readonly meanHigh?: number;
  };
  readonly warnings: readonly { code: string; message: string }[];
}
