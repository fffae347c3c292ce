import { z } from 'zod';
import { versionSchema } from './identity';
import { settingSchema } from './setPoint';
import { reasonSchema } from './text';

/** Which design, as /api/calc/design understands it; factors, region and limits come from the Brief. */
export const planSchema = z.strictObject({
  kind: z.string().max(40),
  options: z.record(z.string().max(40), z.unknown()).default({}),
  blocks: z.number().int().min(1).max(20).default(1),
  centrePoints: z.number().int().min(0).max(30).default(6),
  replicates: z.number().int().min(1).max(5).default(1),
  seed: z.number().int().min(0).max(4_294_967_295).default(7),
});
export type PlanInput = z.infer<typeof planSchema>;

/** Freezing: the server computes the runs anew from the plan, so what is frozen is what was shown. */
export const freezeInputSchema = z.strictObject({ plan: planSchema, version: versionSchema });

export const PURPOSES = ['matrix', 'replicate', 'augment', 'ascent', 'improve', 'confirm'] as const;
export const purposeSchema = z.enum(PURPOSES);
export type Purpose = z.infer<typeof purposeSchema>;

/** Runs added after the matrix was frozen: a new block, the next run numbers, stock reserved. */
export const addRunsSchema = z.strictObject({
  purpose: purposeSchema.exclude(['matrix']),
  settings: z.array(settingSchema).min(1, 'Choose at least one run to add.').max(60),
  why: reasonSchema,
  version: versionSchema,
});
