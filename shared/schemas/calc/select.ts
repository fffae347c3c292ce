import { z } from 'zod';
import type { FitAnswer } from './fit';
import { fitRequestSchema } from './fit';

export const selectRequestSchema = fitRequestSchema.extend({
  method: z.enum(['backward', 'forward', 'allSubsets']),
  criterion: z.enum(['aicc', 'bic', 'press', 'p']).default('aicc'),
  /** For `p`: a term stays while its p is at most this. */
  limit: z.number().gt(0).lt(1).default(0.05),
  heredity: z.enum(['strong', 'weak', 'none']).default('strong'),
});
export type SelectRequest = z.output<typeof selectRequestSchema>;

export interface SelectAnswer {
  readonly best: FitAnswer;
  readonly path: readonly { readonly terms: readonly string[]; readonly value: number | null }[];
  readonly warnings: readonly { code: string; message: string }[];
}
