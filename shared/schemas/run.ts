import { z } from 'zod';
import { byLineSchema, idSchema, momentSchema, versionSchema } from './identity';
import { purposeSchema } from './matrix';
import { actualSettingSchema, settingSchema } from './setPoint';
import { reasonSchema, textSchema } from './text';

const massG = z.number('Enter the mass in g.').min(0, 'A mass cannot be below 0 g.').max(1_000_000);
const typed = z.string().max(40).default('');

export const sieveMassSchema = z.strictObject({
  /** Opening; 0 is the pan. */
  apertureMm: z.number().min(0).max(200),
  retainedG: massG,
  /** As it was typed or read, before parsing. */
  typed,
});

export const measuredValueSchema = z.strictObject({
  responseKey: z.string().max(40),
  value: z.number('Enter a number.'),
  typed,
});

/** The checks before the first pulse. Common practice, no source; the maker's manual goes first. */
export const PRE_RUN_CHECKS = [
  { key: 'earthStick', label: 'Earth stick off, back on its hook' },
  { key: 'lid', label: 'Lid clamped, cover closed' },
  { key: 'interlock', label: 'Interlock tested today' },
  { key: 'water', label: 'Water to the mark, conductivity read' },
  { key: 'hearing', label: 'Cell empty, hearing protection on' },
] as const;
export const checkKeySchema = z.enum(PRE_RUN_CHECKS.map(({ key }) => key));

/**
 * What the bench writes down for one run. `feedMassG` is the dry feed, `beforeSievingG` the dry product
 * before sieving (null: not weighed, then only the overall balance is known).
 */
export const runRecordSchema = z
  .strictObject({
    actual: actualSettingSchema,
    misfires: z
      .number()
      .int('Misfires is a whole number.')
      .min(0)
      .max(100_000)
      .nullable()
      .default(null),
    conductivityStartUsPerCm: z.number().min(0).max(200_000).nullable().default(null),
    conductivityEndUsPerCm: z.number().min(0).max(200_000).nullable().default(null),
    waterTemperatureC: z.number().min(-5).max(100).nullable().default(null),
    feedMassG: massG.gt(0, 'The feed is above 0 g.'),
    feedTyped: typed,
    beforeSievingG: massG.nullable().default(null),
    beforeSievingTyped: typed,
    checks: z.array(checkKeySchema).default([]),
    sieves: z.array(sieveMassSchema).max(41),
    measured: z.array(measuredValueSchema).max(20).default([]),
    note: textSchema(2000).default(''),
    /** Needed when the run is taken out of order, when a balance asks for a repeat, or on a correction. */
    why: textSchema(1000).default(''),
    version: versionSchema,
  })
  .superRefine((record, ctx) => {
    const issue = (path: (string | number)[], message: string) => {
      ctx.addIssue({ code: 'custom', path, message });
    };
    record.sieves.forEach(({ apertureMm }, i) => {
      if (record.sieves.findIndex((other) => other.apertureMm === apertureMm) < i)
        issue(
          ['sieves', i, 'apertureMm'],
          `The sieve of ${apertureMm} mm is there twice: keep one.`,
        );
    });
    if (record.sieves.length > 0 && !record.sieves.some(({ apertureMm }) => apertureMm === 0))
      issue(['sieves'], 'The pan is missing: enter 0 if nothing passed the finest sieve.');
    const keys = record.measured.map(({ responseKey }) => responseKey);
    keys.forEach((key, i) => {
      if (keys.indexOf(key) < i)
        issue(['measured', i, 'responseKey'], `${key} is there twice: keep one.`);
    });
  });
export type RunRecord = z.infer<typeof runRecordSchema>;

export const voidInputSchema = z.strictObject({ why: reasonSchema, version: versionSchema });

const balanceSchema = z.object({
  lossG: z.number(),
  lossPercent: z.number(),
  verdict: z.enum(['holds', 'warn', 'repeat']),
});

export const runJsonSchema = z.object({
  id: idSchema,
  studyId: idSchema,
  number: z.number().int(),
  standardOrder: z.number().int(),
  block: z.number().int(),
  pointType: z.string(),
  purpose: purposeSchema,
  settings: settingSchema,
  status: z.enum(['planned', 'recorded', 'void']),
  actual: actualSettingSchema,
  misfires: z.number().nullable(),
  conductivityStartUsPerCm: z.number().nullable(),
  conductivityEndUsPerCm: z.number().nullable(),
  waterTemperatureC: z.number().nullable(),
  feedMassG: z.number().nullable(),
  feedTyped: z.string(),
  beforeSievingG: z.number().nullable(),
  beforeSievingTyped: z.string(),
  checks: z.array(checkKeySchema),
  sieves: z.array(sieveMassSchema),
  measured: z.array(measuredValueSchema.extend({ by: byLineSchema, at: momentSchema })),
  note: z.string(),
  voidReason: z.string().nullable(),
  repeats: z.number().int().nullable(),
  /** Derived, never stored: one value for each response of the study, null where it cannot be had. */
  results: z.record(z.string(), z.number().nullable()),
  balances: z.object({ treatment: balanceSchema.nullable(), sieving: balanceSchema.nullable() }),
  shape: z.array(z.object({ apertureMm: z.number(), message: z.string() })),
  operator: byLineSchema.nullable(),
  recordedAt: momentSchema.nullable(),
  isSimulated: z.boolean(),
  version: versionSchema,
});
export type RunJson = z.infer<typeof runJsonSchema>;

export const recordedRunSchema = z.object({ run: runJsonSchema, warnings: z.array(z.string()) });

/** A CSV as text, with what the person said about it. Nothing is stored until `accept` is true. */
export const importInputSchema = z.strictObject({
  csv: z
    .string()
    .min(1, 'The file is empty.')
    .max(5_000_000, 'The file is larger than 5 MB: split it.'),
  fileName: z.string().max(200).default(''),
  accept: z.boolean(),
  /** How numbers like 1,234 are meant, when the file itself does not say. */
  decimal: z.enum(['auto', 'point', 'comma']).default('auto'),
});

export const importAnswerSchema = z.object({
  accepted: z.boolean(),
  separator: z.string(),
  decimal: z.enum(['point', 'comma']),
  columns: z.array(z.object({ heading: z.string(), meaning: z.string().nullable() })),
  rows: z.array(
    z.object({
      line: z.number(),
      runNumber: z.number().nullable(),
      feedMassG: z.number().nullable(),
      recoveredG: z.number().nullable(),
      problems: z.array(z.string()),
      warnings: z.array(z.string()),
    }),
  ),
  problems: z.array(z.string()),
});
export type ImportAnswer = z.infer<typeof importAnswerSchema>;
