import { z } from 'zod';
import { byLineSchema, idSchema, momentSchema, versionSchema } from './identity';
import { responseInputSchema } from './response';
import { rigJsonSchema } from './rig';
import { SET_POINT_KEYS, setPointKeySchema } from './setPoint';
import { stageSchema } from './stage';
import { stockSchema } from './sample';
import { lineSchema, textSchema } from './text';

export const studyFactorSchema = z
  .strictObject({
    key: setPointKeySchema,
    low: z.number('Enter the low end of the range.').positive('A range starts above 0.'),
    high: z.number('Enter the high end of the range.').positive('A range ends above 0.'),
    scale: z.enum(['linear', 'log']).default('linear'),
  })
  .superRefine(({ low, high }, ctx) => {
    if (low > high)
      ctx.addIssue({
        code: 'custom',
        path: ['low'],
        message: `Low (${low}) is above high (${high}). Swap them?`,
      });
    if (low === high)
      ctx.addIssue({
        code: 'custom',
        path: ['high'],
        message: `Low and high are both ${low}, so this set-point cannot change. Hold it fixed instead?`,
      });
  });
export type StudyFactor = z.infer<typeof studyFactorSchema>;

const fixedSchema = z.strictObject({
  voltage: z.number().positive().nullable().default(null),
  gap: z.number().positive().nullable().default(null),
  pulses: z
    .number()
    .int('The number of pulses is a whole number.')
    .positive()
    .nullable()
    .default(null),
  frequency: z.number().positive().nullable().default(null),
});

export const PRACTICE_MATERIALS = ['granite', 'concrete', 'board', 'slag'] as const;
export const practiceMaterialSchema = z.enum(PRACTICE_MATERIALS);

/** The whole Brief, as one form saves it. Ranges are checked against the rig's envelope by the server. */
export const briefInputSchema = z
  .strictObject({
    title: lineSchema('A title'),
    question: textSchema(1000).default(''),
    sampleId: idSchema,
    rigId: idSchema,
    sieveStackId: idSchema,
    factors: z
      .array(studyFactorSchema)
      .min(2, 'Vary at least two set-points.')
      .max(4, 'There are four set-points to vary.'),
    fixed: fixedSchema,
    responses: z.array(responseInputSchema).min(1, 'Name at least one response.').max(20),
    batchMassG: z
      .number('Enter the mass of one run in g.')
      .positive('Enter a mass above 0 g.')
      .max(100_000),
    handlingMinutes: z
      .number('Enter the handling time of one run in minutes.')
      .positive('Enter a time above 0 minutes.')
      .max(1440),
    massLimitG: z.number().positive().nullable().default(null),
    runLimit: z.number().int().positive().max(500).nullable().default(null),
    dayLimit: z.number().int().positive().max(365).nullable().default(null),
    /** The smallest change that matters and the expected run-to-run spread, of the first response. */
    effectThatMatters: z.number().positive().nullable().default(null),
    expectedSpread: z.number().positive().nullable().default(null),
    /** A rehearsal on the practice rig, with this invented material. */
    practiceMaterial: practiceMaterialSchema.nullable().default(null),
  })
  .superRefine((brief, ctx) => {
    const issue = (path: (string | number)[], message: string) => {
      ctx.addIssue({ code: 'custom', path, message });
    };
    const varied = brief.factors.map(({ key }) => key);
    varied.forEach((key, i) => {
      if (varied.indexOf(key) < i) issue(['factors', i, 'key'], `${key} is named twice.`);
    });
    for (const key of SET_POINT_KEYS) {
      if (!varied.includes(key) && brief.fixed[key] === null)
        issue(['fixed', key], `Vary the ${key}, or say at which value it is held.`);
      if (varied.includes(key) && brief.fixed[key] !== null)
        issue(['fixed', key], `The ${key} is varied, so it has no fixed value.`);
    }
    const keys = brief.responses.map(({ key }) => key);
    keys.forEach((key, i) => {
      if (keys.indexOf(key) < i)
        issue(['responses', i, 'key'], `Two responses have the key ${key}.`);
    });
    if (!brief.responses.some(({ aim }) => aim !== 'observe'))
      issue(['responses'], 'Give at least one response a goal: it is what the study is for.');
  });
export type BriefInput = z.infer<typeof briefInputSchema>;

export const briefUpdateSchema = z.strictObject({
  brief: briefInputSchema,
  version: versionSchema,
});

/** Enough to open a study; the Brief follows. */
export const studyInputSchema = z.strictObject({
  title: lineSchema('A title'),
  sampleId: idSchema,
  question: textSchema(1000).default(''),
});

const progressSchema = z.object({
  stage: stageSchema,
  runsPlanned: z.number(),
  runsRecorded: z.number(),
  runsVoid: z.number(),
  blocks: z.number(),
  modelsKept: z.number(),
  modelsNeeded: z.number(),
  candidates: z.number(),
  releasedAt: momentSchema.nullable(),
});
export type ProgressJson = z.infer<typeof progressSchema>;

export const studySummarySchema = z.object({
  id: idSchema,
  code: z.string(),
  title: z.string(),
  question: z.string(),
  sample: z.object({ id: idSchema, code: z.string(), name: z.string(), material: z.string() }),
  customer: z.object({ id: idSchema, name: z.string() }).nullable(),
  isSimulated: z.boolean(),
  progress: progressSchema,
  openedBy: byLineSchema,
  createdAt: momentSchema,
  updatedAt: momentSchema,
});
export type StudySummaryJson = z.infer<typeof studySummarySchema>;

export const matrixJsonSchema = z.object({
  id: idSchema,
  kind: z.string(),
  plan: z.record(z.string(), z.unknown()),
  seed: z.number(),
  runCount: z.number(),
  frozenAt: momentSchema,
  frozenBy: byLineSchema,
});

/** The study's page: everything but its runs, fits and releases. `brief` is null until it is saved once. */
export const studyJsonSchema = studySummarySchema.extend({
  brief: z
    .object({
      factors: z.array(studyFactorSchema),
      fixed: z.record(z.string(), z.number().nullable()),
      responses: z.array(responseInputSchema),
      batchMassG: z.number(),
      handlingMinutes: z.number(),
      massLimitG: z.number().nullable(),
      runLimit: z.number().nullable(),
      dayLimit: z.number().nullable(),
      effectThatMatters: z.number().nullable(),
      expectedSpread: z.number().nullable(),
      practiceMaterial: practiceMaterialSchema.nullable(),
      sieveStack: z.object({
        id: idSchema,
        name: z.string(),
        aperturesMm: z.array(z.number()),
        frameDiameterMm: z.number(),
      }),
    })
    .nullable(),
  rig: rigJsonSchema.nullable(),
  stock: stockSchema,
  matrix: matrixJsonSchema.nullable(),
  version: versionSchema,
});
export type StudyJson = z.infer<typeof studyJsonSchema>;
export type BriefJson = NonNullable<StudyJson['brief']>;
