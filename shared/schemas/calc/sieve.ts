import { z } from 'zod';

const massG = z.number('Enter the mass in g.').min(0, 'A mass cannot be below 0 g.').max(1e9);
const percent = z.number().min(0).max(100);

/** Losses in percent at which a balance warns, and at which the run should be repeated. */
export const sieveLimitsSchema = z
  .strictObject({
    treatmentWarn: percent.default(1),
    treatmentRepeat: percent.default(2),
    sievingWarn: percent.default(0.3),
    sievingRepeat: percent.default(1),
  })
  .superRefine((limits, ctx) => {
    if (limits.treatmentWarn > limits.treatmentRepeat)
      ctx.addIssue({
        code: 'custom',
        path: ['treatmentWarn'],
        message: 'The warning limit lies above the repeat limit.',
      });
    if (limits.sievingWarn > limits.sievingRepeat)
      ctx.addIssue({
        code: 'custom',
        path: ['sievingWarn'],
        message: 'The warning limit lies above the repeat limit.',
      });
  });

export const sieveRequestSchema = z
  .strictObject({
    feedMassG: massG.gt(0, 'The feed is above 0 g.'),
    beforeSievingG: massG.optional(),
    massBasis: z.literal('dry').default('dry'),
    sieves: z
      .array(
        z.strictObject({
          apertureMm: z.number().positive('A sieve opening is above 0 mm.').max(2000),
          retainedG: massG,
        }),
      )
      .min(1, 'Enter at least one sieve.')
      .max(60),
    panG: massG,
    passingAt: z.array(z.number().positive('A size is above 0 mm.')).max(60).default([]),
    percentiles: z
      .array(z.number().gt(0, 'A percentile lies between 0 and 100.').lt(100))
      .max(20)
      .default([80, 50]),
    interpolation: z.enum(['logSize', 'logLog']).default('logSize'),
    limits: sieveLimitsSchema.default({
      treatmentWarn: 1,
      treatmentRepeat: 2,
      sievingWarn: 0.3,
      sievingRepeat: 1,
    }),
  })
  .superRefine(({ sieves }, ctx) => {
    sieves.forEach(({ apertureMm }, i) => {
      if (sieves.findIndex((other) => other.apertureMm === apertureMm) < i)
        ctx.addIssue({
          code: 'custom',
          path: ['sieves', i, 'apertureMm'],
          message: `The sieve of ${apertureMm} mm is there twice: keep one.`,
        });
    });
  });
export type SieveRequest = z.output<typeof sieveRequestSchema>;

export interface BalanceAnswer {
  readonly lossG: number;
  readonly lossPercent: number;
  readonly verdict: 'holds' | 'warn' | 'repeat';
}

export interface SieveAnswer {
  readonly table: readonly {
    apertureMm: number;
    retainedPercent: number;
    cumulativePassingPercent: number;
  }[];
  /** By size in mm as text; null outside the stack. */
  readonly passing: Readonly<Record<string, number | null>>;
  /** By percent as text; null outside the stack. */
  readonly percentiles: Readonly<Record<string, number | null>>;
  readonly interpolation: 'logSize' | 'logLog';
  readonly recoveredG: number;
  readonly balance: {
    readonly treatment: BalanceAnswer | null;
    readonly sieving: BalanceAnswer | null;
    readonly overall: BalanceAnswer;
  };
  readonly shape: readonly { apertureMm: number; message: string }[];
  readonly rosinRammler: { sizeMm: number; slope: number; rSquared: number } | null;
  readonly gaudinSchuhmann: { sizeMm: number; slope: number; rSquared: number } | null;
  readonly warnings: readonly { code: string; message: string }[];
}
