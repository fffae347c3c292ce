import { z } from 'zod';

const number = z.number('Enter a number.');
const massG = number.min(0, 'A mass cannot be negative. Check the tare.').max(1e7);
const apertureMm = number.positive('A sieve opening is above 0 mm.').max(1000);
const percentLimit = number.min(0).max(100);

export const sieveMassSchema = z.strictObject({ apertureMm, retainedG: massG });

export const sieveLimitsSchema = z.strictObject({
  treatmentWarn: percentLimit.default(1),
  treatmentRepeat: percentLimit.default(2),
  sievingWarn: percentLimit.default(0.3),
  sievingRepeat: percentLimit.default(1),
});

/** Names the sieve that is there twice; 500 µm and 0.5 mm are one sieve. */
function checkApertures(
  sieves: readonly { apertureMm: number }[],
  issue: (path: (string | number)[], message: string) => void,
): void {
  sieves.forEach((sieve, i) => {
    const first = sieves.findIndex(
      (other) => Math.abs(other.apertureMm - sieve.apertureMm) <= 1e-9 * sieve.apertureMm,
    );
    if (first < i)
      issue(
        ['sieves', i, 'apertureMm'],
        `The sieve of ${sieve.apertureMm} mm is there twice: keep one.`,
      );
  });
}

/** Masses of one sieving: opening in mm, masses in g, limits and percentiles in per cent. */
export const sieveRequestSchema = z
  .strictObject({
    feedMassG: number.positive('The feed is above 0 g.').max(1e7),
    beforeSievingG: number.positive('The mass before sieving is above 0 g.').max(1e7).optional(),
    massBasis: z.enum(['dry', 'wet']).default('dry'),
    sieves: z.array(sieveMassSchema).min(1, 'Enter at least one sieve.').max(100),
    panG: massG,
    passingAt: z.array(apertureMm).max(100).default([]),
    percentiles: z.array(number.gt(0).lt(100)).max(100).default([]),
    interpolation: z.enum(['logSize', 'logLog']).default('logSize'),
    limits: sieveLimitsSchema.optional(),
  })
  .superRefine((request, ctx) => {
    checkApertures(request.sieves, (path, message) => {
      ctx.addIssue({ code: 'custom', path, message });
    });
  });
export type SieveRequest = z.input<typeof sieveRequestSchema>;

const warningSchema = z.object({ code: z.string(), message: z.string() });

export const massBalanceSchema = z.object({
  lossG: z.number(),
  lossPercent: z.number(),
  verdict: z.enum(['holds', 'warn', 'repeat']),
});
export type MassBalance = z.infer<typeof massBalanceSchema>;

export const sieveAnswerSchema = z.object({
  table: z.array(
    z.object({
      apertureMm: z.number(),
      retainedPercent: z.number().nullable(),
      cumulativePassingPercent: z.number().nullable(),
    }),
  ),
  panPercent: z.number().nullable(),
  recoveredG: z.number(),
  passing: z.record(z.string(), z.number().nullable()),
  percentiles: z.record(z.string(), z.number().nullable()),
  interpolation: z.enum(['logSize', 'logLog']),
  balance: z.object({
    /** Feed against the product before sieving; null when that was not weighed. */
    treatment: massBalanceSchema.nullable(),
    /** Product before sieving against the sum after; null when it was not weighed. */
    sieving: massBalanceSchema.nullable(),
    /** Feed against the sum after sieving, judged by the limits of the treatment. */
    overall: massBalanceSchema,
  }),
  shape: z.array(z.object({ apertureMm: z.number(), message: z.string() })),
  rosinRammler: z
    .object({ sizeMm: z.number(), slope: z.number(), rSquared: z.number().nullable() })
    .nullable(),
  gaudinSchuhmann: z
    .object({ sizeMm: z.number(), slope: z.number(), rSquared: z.number().nullable() })
    .nullable(),
  warnings: z.array(warningSchema),
});
export type SieveAnswer = z.infer<typeof sieveAnswerSchema>;
