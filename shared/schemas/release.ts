import { z } from 'zod';
import { byLineSchema, idSchema, momentSchema, versionSchema } from './identity';
import { settingSchema } from './setPoint';
import { lineSchema, textSchema } from './text';

/** A setting taken from the map or the ranking, kept with the study under a letter. */
export const candidateInputSchema = z.strictObject({
  settings: settingSchema,
  note: textSchema(500).default(''),
});
export const candidateJsonSchema = z.object({
  id: idSchema,
  letter: z.string(),
  settings: settingSchema,
  note: z.string(),
  by: byLineSchema,
  createdAt: momentSchema,
});
export type CandidateJson = z.infer<typeof candidateJsonSchema>;

export const MEANING = 'I release these settings for use on this rig within the stated limits.';

/** Signing asks for the password again: an open session alone cannot sign. */
export const releaseInputSchema = z.strictObject({
  settings: settingSchema,
  purpose: lineSchema('The purpose', 200),
  decisionRule: lineSchema('The decision rule', 500),
  validUntil: z.iso.date().nullable().default(null),
  password: z.string().min(1, 'Enter your password to sign.').max(1000),
  version: versionSchema,
});

const expectationSchema = z.object({
  key: z.string(),
  name: z.string(),
  unit: z.string(),
  goal: z.string(),
  predicted: z.number(),
  piLow: z.number().nullable(),
  piHigh: z.number().nullable(),
  holds: z.boolean().nullable(),
});

/** What was signed, in full: it is hashed and sealed, and never changed. */
export const releaseContentSchema = z.object({
  study: z.object({ code: z.string(), title: z.string() }),
  sample: z.object({ code: z.string(), name: z.string(), material: z.string() }),
  rig: z.object({ name: z.string(), revision: z.number() }),
  settings: settingSchema,
  batchMassG: z.number(),
  purpose: z.string(),
  decisionRule: z.string(),
  validUntil: z.string().nullable(),
  expectations: z.array(expectationSchema),
  chanceAllGoals: z.number().nullable(),
  chanceError: z.number().nullable(),
  confirmation: z.object({
    runs: z.number(),
    passed: z.boolean().nullable(),
    words: z.string(),
  }),
  models: z.array(
    z.object({
      responseKey: z.string(),
      fitId: idSchema,
      dataHash: z.string(),
      keptBy: z.string(),
    }),
  ),
  twoPersonRule: z.boolean(),
  meaning: z.string(),
  signedBy: byLineSchema,
  signedAt: momentSchema,
  isSimulated: z.boolean(),
});
export type ReleaseContent = z.infer<typeof releaseContentSchema>;

export const releaseJsonSchema = z.object({
  id: idSchema,
  studyId: idSchema,
  revision: z.number().int(),
  content: releaseContentSchema,
  contentHash: z.string(),
  sealShort: z.string(),
  /** Whether hash and seal still fit the content. */
  isSealIntact: z.boolean(),
});
export type ReleaseJson = z.infer<typeof releaseJsonSchema>;
